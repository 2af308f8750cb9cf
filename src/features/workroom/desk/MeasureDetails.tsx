import { useState } from 'react';
import type { Ask, Fault } from '@/engine';
import { changeAsk, removeMeasure, turnOver, usersOf } from '@/features/projects/pattern-edits';
import { fieldOfFault } from '@/features/projects/proof-place';
import { FaultWords } from './FaultWords';
import { FormulaField } from './FormulaField';
import type { MeasureRowProps } from './MeasureRow';
import { SizeSlider } from './SizeSlider';

const RANGE_FIELDS: readonly { readonly key: 'usual' | 'from' | 'to'; readonly label: string }[] = [
  { key: 'usual', label: 'Usual' },
  { key: 'from', label: 'From' },
  { key: 'to', label: 'To' },
];

/** What else a selected measure has: the size shown, usual value and range, and leaving the pattern. */
export function MeasureDetails({
  store,
  measure,
  names,
  figure,
  lit,
  sizing,
  own,
  onRename,
}: MeasureRowProps & { readonly own: readonly Fault[]; readonly onRename: () => void }) {
  const { name, ask } = measure;
  return (
    <div className="measure-details">
      {ask && figure ? <SizeSlider store={store} figure={figure} sizing={sizing} /> : null}
      {ask ? <AskFields store={store} name={name} ask={ask} names={names} own={own} lit={lit?.names ?? null} /> : null}
      <div className="measure-deeds">
        {ask ? (
          <label className="check tight">
            <input
              type="checkbox"
              checked={ask.finer ?? false}
              onChange={() => store.editPattern(null, (pattern) => changeAsk(pattern, name, { finer: !ask.finer }))}
            />
            <span>Among the finer points</span>
          </label>
        ) : null}
        <button type="button" className="text-button small" onClick={onRename}>
          Rename it
        </button>
        <button
          type="button"
          className="text-button small"
          onClick={() => store.editPattern(null, (pattern) => turnOver(pattern, name))}
        >
          {ask ? 'Work it out by a formula' : 'Ask the reader instead'}
        </button>
        <TakeOut {...{ store, name }} />
      </div>
    </div>
  );
}

function AskFields({
  store,
  name,
  ask,
  names,
  own,
  lit,
}: {
  readonly store: MeasureRowProps['store'];
  readonly name: string;
  readonly ask: Ask;
  readonly names: readonly string[];
  readonly own: readonly Fault[];
  readonly lit: ReadonlySet<string> | null;
}) {
  return (
    <>
      <div className="ask-fields">
        {RANGE_FIELDS.map(({ key, label }) => (
          <div key={key} className="ask-field">
            <span className="small soft">{label}</span>
            <FormulaField
              label={`${label} of ${name}`}
              value={ask[key]}
              names={names}
              lit={lit}
              faults={inField(own, name, key)}
              onChange={(value) =>
                store.editPattern(`${name}.${key}`, (pattern) => changeAsk(pattern, name, { [key]: value }))
              }
            />
          </div>
        ))}
      </div>
      {own.slice(0, 1).map((fault) => {
        const key = RANGE_FIELDS.find((field) => inField([fault], name, field.key).length > 0)?.key ?? 'usual';
        return (
          <FaultWords
            key={fault.where}
            faults={[fault]}
            value={ask[key]}
            onCure={(value) => store.editPattern(null, (pattern) => changeAsk(pattern, name, { [key]: value }))}
          />
        );
      })}
    </>
  );
}

/** The faults that stand in one field of an asked measure; those of no field are told at the usual value. */
const inField = (faults: readonly Fault[], name: string, key: 'usual' | 'from' | 'to'): readonly Fault[] =>
  faults.filter((fault) => {
    const field = fieldOfFault(fault, name);
    return field === key || (field === 'formula' && key === 'usual');
  });

function TakeOut({ store, name }: { readonly store: MeasureRowProps['store']; readonly name: string }) {
  const [asking, setAsking] = useState<readonly string[] | null>(null);
  const remove = () => {
    store.select(null);
    store.editPattern(null, (pattern) => removeMeasure(pattern, name));
  };
  if (asking === null) {
    return (
      <button
        type="button"
        className="text-button small"
        onClick={() => {
          const users = usersOf(store.$draft.get().pattern, name);
          if (users.length === 0) remove();
          else setAsking(users);
        }}
      >
        Take it out
      </button>
    );
  }
  const shown = asking.slice(0, 3).join(', ');
  return (
    <p className="take-out" role="alert">
      {shown}
      {asking.length > 3 ? ` and ${asking.length - 3} more` : ''} would no longer read.
      <button type="button" className="btn small-btn danger" onClick={remove}>
        Take it out all the same
      </button>
      <button type="button" className="btn small-btn" onClick={() => setAsking(null)}>
        Keep it
      </button>
    </p>
  );
}
