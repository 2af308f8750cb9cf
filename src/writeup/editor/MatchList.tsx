import type { LiveFigures } from '../live';
import type { Match } from '../numbers/match-numbers';
import { matchWords } from '../numbers/match-words';

export interface MatchListProps {
  readonly id: string;
  readonly matches: readonly Match[];
  readonly live: LiveFigures;
  /** The one that Enter takes. */
  readonly active: number;
  /** The one that was taken already. */
  readonly taken?: Match | null;
  readonly onTake: (match: Match) => void;
}

/** The measures that a number may be, the likeliest first, each with the key that takes it. */
export function MatchList({ id, matches, live, active, taken = null, onTake }: MatchListProps) {
  return (
    <ol className="match-list" id={id} aria-label="Measures that it may be">
      {matches.map((match, n) => {
        const { name, place, figure, lies } = matchWords(match, live);
        return (
          <li key={`${match.formula} ${match.reading.mm}`}>
            <button
              type="button"
              aria-current={n === active ? true : undefined}
              aria-pressed={match === taken}
              // The field or list beside it keeps the focus.
              onMouseDown={(event) => event.preventDefault()}
              onClick={() => onTake(match)}
            >
              <span>
                <b>{name}</b>
                {place === '' ? null : <span className="match-place">{place}</span>}
              </span>
              <small>
                {figure} · {lies}
              </small>
              <kbd>{n === active ? 'Enter' : n + 1}</kbd>
            </button>
          </li>
        );
      })}
    </ol>
  );
}
