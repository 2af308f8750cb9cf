import { useId, useRef, useState } from 'react';
import type { LiveFigures } from '../live';
import type { Match } from '../numbers/match-numbers';
import { understood } from '../numbers/match-words';
import { MatchList } from './MatchList';
import type { StrayAt } from './stray-numbers';

export interface StrayFieldProps {
  readonly stray: StrayAt;
  readonly live: LiveFigures;
  readonly onTake: (match: Match) => void;
  /** It stays as it is, and is not asked for again. */
  readonly onKeep: () => void;
  /** Asks for a measure by name. */
  readonly onOther: () => void;
}

/** What a typed number may be: one key takes a measure or leaves it as typed. */
export function StrayField({ stray, live, onTake, onKeep, onOther }: StrayFieldProps) {
  const id = useId();
  const list = useRef<HTMLDivElement>(null);
  const [active, setActive] = useState(0);
  const { matches, doubtful } = stray;

  const onKey = (key: string): boolean => {
    const match = key === 'Enter' ? matches[active] : /^[1-9]$/.test(key) ? matches[Number(key) - 1] : undefined;
    if (match) onTake(match);
    else if (key === 'ArrowDown' || key === 'ArrowUp')
      setActive(Math.min(Math.max(active + (key === 'ArrowDown' ? 1 : -1), 0), Math.max(matches.length - 1, 0)));
    else if (key.toLowerCase() === 'k') onKeep();
    else if (key.toLowerCase() === 'm') onOther();
    else return false;
    return true;
  };

  return (
    <div
      ref={(element) => {
        // Keys count at once; what is typed goes nowhere else.
        if (element && list.current === null) element.focus({ preventScroll: true });
        list.current = element;
      }}
      className="stray-field"
      tabIndex={-1}
      role="group"
      aria-labelledby={`${id}-asks`}
      onKeyDown={(event) => {
        if (event.ctrlKey || event.metaKey || event.altKey || event.nativeEvent.isComposing) return;
        if (event.key === 'Enter' && event.target instanceof HTMLButtonElement) return;
        if (onKey(event.key)) event.preventDefault();
      }}
    >
      <p id={`${id}-asks`}>
        {matches.length === 0 ? 'Typed, not live. No measure has this size.' : 'Typed, not live. Which measure is it?'}
        {doubtful ? <span className="hint"> Read as {understood(stray)}.</span> : null}
      </p>
      <MatchList id={id} matches={matches} live={live} active={active} onTake={onTake} />
      <p className="stray-deeds">
        <button type="button" className="text-button" onClick={onOther}>
          Another measure <kbd>M</kbd>
        </button>
        <button type="button" className="text-button" onClick={onKeep}>
          Leave as typed <kbd>K</kbd>
        </button>
        <kbd>Esc</kbd>
      </p>
    </div>
  );
}
