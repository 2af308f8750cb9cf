import { useId } from 'react';
import type { Fault } from '@/engine';
import type { Lit } from '@/features/projects/followers';
import { FaultWords } from './FaultWords';
import { FormulaField } from './FormulaField';

export interface LabelledFormulaProps {
  readonly label: string;
  /** What the label belongs to, for those who hear it alone: `corner of floor`. */
  readonly of?: string;
  readonly value: string;
  readonly names: readonly string[];
  readonly lit: Lit | null;
  readonly faults: readonly Fault[];
  /** Keeps the label for those who hear the page. */
  readonly quiet?: boolean;
  readonly onChange: (value: string) => void;
}

/** A formula under its label, with what does not read beneath it. */
export function LabelledFormula({ label, of, value, names, lit, faults, quiet, onChange }: LabelledFormulaProps) {
  return (
    <div className="desk-field">
      {quiet ? null : <span className="small soft">{label}</span>}
      <FormulaField
        label={of === undefined ? label : `${label}, ${of}`}
        value={value}
        names={names}
        lit={lit?.names ?? null}
        faults={faults}
        onChange={onChange}
      />
      <FaultWords faults={faults} value={value} onCure={onChange} />
    </div>
  );
}

export interface OptionFieldProps<Value extends string> {
  readonly label: string;
  readonly of?: string;
  readonly value: Value;
  readonly options: readonly { readonly value: Value; readonly label?: string }[];
  readonly onChange: (value: Value) => void;
}

/** One of a few words. */
export function OptionField<Value extends string>({ label, of, value, options, onChange }: OptionFieldProps<Value>) {
  const id = useId();
  return (
    <div className="desk-field">
      <label className="small soft" htmlFor={id}>
        {label}
        {of === undefined ? null : <span className="visually-hidden">, {of}</span>}
      </label>
      <select
        id={id}
        className="plain-select framed"
        value={value}
        onChange={(event) => onChange(event.currentTarget.value as Value)}
      >
        {options.map((option) => (
          <option key={option.value} value={option.value}>
            {option.label ?? option.value}
          </option>
        ))}
      </select>
    </div>
  );
}

export interface TextFieldProps {
  readonly label: string;
  readonly of?: string;
  readonly value: string;
  readonly rows?: number;
  readonly maxLength?: number;
  readonly onChange: (value: string) => void;
}

/** Plain words. */
export function TextField({ label, of, value, rows, maxLength = 80, onChange }: TextFieldProps) {
  const id = useId();
  return (
    <div className="desk-field">
      <label className="small soft" htmlFor={id}>
        {label}
        {of === undefined ? null : <span className="visually-hidden">, {of}</span>}
      </label>
      {rows === undefined ? (
        <input
          id={id}
          className="input"
          value={value}
          maxLength={maxLength}
          onChange={(event) => onChange(event.currentTarget.value)}
        />
      ) : (
        <textarea
          id={id}
          className="input"
          rows={rows}
          value={value}
          maxLength={maxLength}
          onChange={(event) => onChange(event.currentTarget.value)}
        />
      )}
    </div>
  );
}

/** Nothing typed is nothing said: a field that may be left away. */
export const orNothing = (value: string): string | undefined => (value.trim() === '' ? undefined : value);
