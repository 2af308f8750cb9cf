import type { Fault, FitDef, Pattern } from '@/engine';
import type { Lit } from '@/features/projects/followers';
import { changeFit, removeFit } from '@/features/projects/pattern-edits';
import type { DeskStore } from './desk-store';
import { LabelledFormula, OptionField, orNothing, TextField } from './fields';
import { NamePlate } from './NamePlate';

const RELATIONS = [
  { value: 'at least' },
  { value: 'more than' },
  { value: 'same as' },
  { value: 'at most' },
  { value: 'less than' },
] as const;

export interface FitDetailsProps {
  readonly store: DeskStore;
  readonly pattern: Pattern;
  readonly fit: FitDef;
  readonly names: readonly string[];
  readonly lit: Lit | null;
  readonly faults: readonly Fault[];
  readonly onRenamed: (name: string) => void;
  readonly onGone: () => void;
}

/** What a fit compares, how exactly, when, and what is said when it does not hold. */
export function FitDetails({ store, pattern, fit, names, lit, faults, onRenamed, onGone }: FitDetailsProps) {
  const { name } = fit;
  const change = (field: string | null, part: Partial<FitDef>) =>
    store.editPattern(field === null ? null : `fit.${name}.${field}`, (now) => changeFit(now, name, part));
  const formula = (key: 'left' | 'right' | 'tolerance' | 'when', label: string, place: string) => (
    <LabelledFormula
      label={label}
      of={name}
      value={fit[key] ?? ''}
      {...{ names, lit }}
      faults={faults.filter(({ where }) => where === `fit “${name}”, ${place}`)}
      onChange={(value) => change(key, { [key]: key === 'left' || key === 'right' ? value : orNothing(value) })}
    />
  );
  const asked = pattern.measures.filter(({ ask }) => ask);
  const toChange = fit.change ?? [];
  return (
    <div className="fit-details">
      <NamePlate store={store} named={{ what: 'fit', from: name }} what="fit" onRenamed={onRenamed} />
      <div className="field-row fit-sides">
        {formula('left', 'This', 'left side')}
        <OptionField
          label="must be"
          of={name}
          value={fit.is}
          options={RELATIONS}
          onChange={(is) => change(null, { is })}
        />
        {formula('right', 'that', 'right side')}
        {formula('tolerance', 'give or take', 'tolerance')}
        {formula('when', 'Only when', 'when')}
      </div>
      <TextField
        label="When it does not hold, the reader is told"
        of={name}
        rows={2}
        maxLength={1000}
        value={fit.otherwise}
        onChange={(otherwise) => change('otherwise', { otherwise })}
      />
      <fieldset className="faces">
        <legend className="small soft">and is asked to change</legend>
        {asked.map((measure) => (
          <label key={measure.name} className="check tight">
            <input
              type="checkbox"
              checked={toChange.includes(measure.name)}
              onChange={(event) => {
                const next = event.currentTarget.checked
                  ? [...toChange, measure.name]
                  : toChange.filter((one) => one !== measure.name);
                change(null, { change: next.length === 0 ? undefined : next });
              }}
            />
            <span>{measure.name}</span>
          </label>
        ))}
      </fieldset>
      <div className="measure-deeds">
        <label className="check tight">
          <input
            type="checkbox"
            checked={fit.advice ?? false}
            onChange={(event) => change(null, { advice: event.currentTarget.checked || undefined })}
          />
          <span>Only advice: it never stops a size</span>
        </label>
        <button
          type="button"
          className="text-button small"
          onClick={() => {
            store.editPattern(null, (now) => removeFit(now, name));
            onGone();
          }}
        >
          Take it out
        </button>
      </div>
    </div>
  );
}
