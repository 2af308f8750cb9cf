import type { PreparedNumber } from '@/features/bringing-in/prepare';
import { MatchList } from '@/writeup/editor/MatchList';
import type { LiveFigures } from '@/writeup/live';
import type { Match } from '@/writeup/numbers/match-numbers';
import { understood } from '@/writeup/numbers/match-words';
import type { BringingIn } from './use-bringing-in';

export interface NumberPanelProps {
  readonly bringing: BringingIn;
  readonly live: LiveFigures;
  readonly onTake: (match: Match) => void;
  readonly onKeep: () => void;
}

/** The number that is looked at: what was understood, and what it may be. */
export function NumberPanel({ bringing, live, onTake, onKeep }: NumberPanelProps) {
  const { current, numbers, decisions } = bringing;
  if (current === null) return <p className="note">No measurements were found in this text.</p>;
  const decision = decisions.get(current.id);
  return (
    <div className="number-panel" aria-live="polite">
      <p className="number-said">
        <b>“{current.text}”</b>
        <span className="soft">
          {current.id + 1} of {numbers.length}
        </span>
      </p>
      <p>
        Understood as {understood(current)}.{doubt(current)}
      </p>
      {current.matches.length === 0 ? (
        <p className="hint">No measure and no piece has this size. It stays as it is.</p>
      ) : (
        <MatchList
          id="brought-matches"
          matches={current.matches}
          live={live}
          active={0}
          taken={typeof decision === 'object' ? decision.take : null}
          onTake={onTake}
        />
      )}
      <p className="stray-deeds">
        <button type="button" className="text-button" aria-pressed={decision === 'plain'} onClick={onKeep}>
          Keep as plain text <kbd>K</kbd>
        </button>
        {decision === undefined ? null : (
          <button type="button" className="text-button" onClick={bringing.undecide}>
            Undecided <kbd>Backspace</kbd>
          </button>
        )}
      </p>
    </div>
  );
}

function doubt({ doubtful, ofMaterial }: PreparedNumber): string {
  if (doubtful) return ' It may have been misheard: look at it.';
  return ofMaterial ? ' It seems to be said of material, not of the box.' : '';
}
