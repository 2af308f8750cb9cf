import type { Ask, Fault, MeasureDef } from '@/engine';
import { changeAsk, changeMeasure, removeMeasure, turnOver, usersOf } from '@/features/projects/pattern-edits';
import { fieldOfFault } from '@/features/projects/proof-place';
import { FaultWords } from './FaultWords';
import { LabelledFormula, OptionField, orNothing, TextField } from './fields';
import { FormulaField } from './FormulaField';
import type { MeasureRowProps } from './MeasureRow';
import { SizeSlider } from './SizeSlider';
import { TakeOut } from './TakeOut';

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
      <MeasureFields {...{ store, measure, names, own }} lit={lit} />
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
        <TakeOut
          usersOf={() => usersOf(store.$draft.get().pattern, name)}
          onTake={() => {
            store.select(null);
            store.editPattern(null, (pattern) => removeMeasure(pattern, name));
          }}
        />
      </div>
    </div>
  );
}

const KINDS = [
  { value: 'length' },
  { value: 'area' },
  { value: 'angle' },
  { value: 'number' },
  { value: 'whole number' },
] as const;
const UNITS = [
  { value: 'own', label: 'as the reader chose' },
  { value: 'in', label: 'inches' },
  { value: 'mm', label: 'millimetres' },
  { value: 'cm', label: 'centimetres' },
] as const;

/** What kind of value it is, in which unit it is always shown, when it is asked, and a note. */
function MeasureFields({
  store,
  measure,
  names,
  own,
  lit,
}: Pick<MeasureRowProps, 'store' | 'measure' | 'names' | 'lit'> & { readonly own: readonly Fault[] }) {
  const { name, ask } = measure;
  const kind = measure.kind ?? 'length';
  const change = (field: string | null, part: Partial<MeasureDef>) =>
    store.editPattern(field === null ? null : `${name}.${field}`, (pattern) => changeMeasure(pattern, name, part));
  return (
    <div className="field-row">
      <OptionField
        label="It is a"
        of={name}
        value={kind}
        options={KINDS}
        onChange={(next) => change(null, { kind: next === 'length' ? undefined : next })}
      />
      {kind === 'length' ? (
        <OptionField
          label="Shown in"
          of={name}
          value={measure.unit ?? 'own'}
          options={UNITS}
          onChange={(unit) => change(null, { unit: unit === 'own' ? undefined : unit })}
        />
      ) : null}
      {ask ? (
        <LabelledFormula
          label="Asked only when"
          of={name}
          value={ask.when ?? ''}
          {...{ names, lit }}
          faults={own.filter(({ where }) => where === `measure “${name}”, when`)}
          onChange={(when) =>
            store.editPattern(`${name}.when`, (pattern) => changeAsk(pattern, name, { when: orNothing(when) }))
          }
        />
      ) : null}
      <TextField
        label="Note to yourself"
        of={name}
        value={measure.note ?? ''}
        maxLength={1000}
        onChange={(note) => change('note', { note: orNothing(note) })}
      />
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
    if (fault.where === `measure “${name}”, when`) return false;
    const field = fieldOfFault(fault, name);
    return field === key || (field === 'formula' && key === 'usual');
  });
