import { explain } from '@/engine';
import { useId, useState } from 'react';
import { conditionFault, holds } from '../condition';
import type { LiveFigures } from '../live';

export interface ConditionFieldProps {
  readonly live: LiveFigures | null;
  readonly begin: string;
  /** A phrase of the text, or a step, which may be optional too. */
  readonly of: 'phrase' | 'step';
  readonly optional?: boolean;
  readonly onTake: (when: string, optional: boolean) => void;
}

/** When a step or a phrase is there: one of the box's choices, or a condition as it is typed. */
export function ConditionField({ live, begin, of, optional = false, onTake }: ConditionFieldProps) {
  const id = useId();
  const [typed, setTyped] = useState(begin);
  const [skips, setSkips] = useState(optional);
  const [refused, setRefused] = useState(false);
  const choices = live?.model.pattern.choices ?? [];
  const when = typed.trim();
  const fault = live && when !== '' ? conditionFault(live.model, when) : null;
  const offers = choices.flatMap(({ name, options }) => options.map((option) => `${name} is ${option}`));
  const take = (taken: string) => onTake(taken, skips);

  return (
    <form
      className="condition-field"
      onSubmit={(event) => {
        event.preventDefault();
        event.stopPropagation();
        if (fault) setRefused(true);
        else take(when);
      }}
    >
      <label htmlFor={`${id}-field`}>{of === 'step' ? 'This step is there only when' : 'Said only when'}</label>
      <input
        id={`${id}-field`}
        className="input"
        autoFocus
        autoComplete="off"
        spellCheck={false}
        maxLength={300}
        placeholder={offers[0] ?? 'inside width > 6 in'}
        value={typed}
        aria-invalid={refused && fault ? true : undefined}
        aria-describedby={`${id}-said`}
        onFocus={(event) => event.target.select()}
        onChange={(event) => {
          setTyped(event.target.value);
          setRefused(false);
        }}
      />
      <div id={`${id}-said`} aria-live="polite">
        {refused && fault ? <p className="error">{explain(fault)}</p> : null}
        {live && when !== '' && !fault ? (
          <p className="hint">At the size you see, this {holds(live, when) ? 'holds' : 'does not hold'}.</p>
        ) : null}
      </div>
      {offers.length > 0 ? (
        <ul className="condition-offers" aria-label="Choices of this box">
          {offers.map((offer) => (
            <li key={offer}>
              <button type="button" className="btn small-btn" aria-pressed={offer === when} onClick={() => take(offer)}>
                {offer}
              </button>
            </li>
          ))}
        </ul>
      ) : null}
      {of === 'step' ? (
        <label className="check">
          <input type="checkbox" checked={skips} onChange={(event) => setSkips(event.target.checked)} />
          Optional: the maker may skip it
        </label>
      ) : null}
      <div className="link-field-actions">
        <button type="submit" className="btn small-btn">
          {when === '' ? 'There always' : 'Only then'}
        </button>
        {begin === '' ? null : (
          <button type="button" className="btn small-btn" onClick={() => take('')}>
            Take the condition away
          </button>
        )}
      </div>
    </form>
  );
}
