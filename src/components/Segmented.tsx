import { useId, type ReactNode } from 'react';

export interface SegmentedProps<Value extends string> {
  readonly legend: string;
  /** Keeps the legend for screen readers alone. */
  readonly quietLegend?: boolean;
  readonly options: readonly { readonly value: Value; readonly label: ReactNode; readonly disabled?: boolean }[];
  readonly value: Value;
  readonly onChange: (value: Value) => void;
  /** The form field's name; usual: one of its own. */
  readonly name?: string;
}

/** One of a few, side by side: radio buttons, so that arrow keys move and a form sends the answer. */
export function Segmented<Value extends string>(props: SegmentedProps<Value>) {
  const ownName = useId();
  return (
    <fieldset className="field">
      <legend className={props.quietLegend ? 'visually-hidden' : undefined}>{props.legend}</legend>
      <div className="segmented">
        {props.options.map((option) => (
          <label key={option.value}>
            <input
              type="radio"
              name={props.name ?? ownName}
              value={option.value}
              checked={option.value === props.value}
              disabled={option.disabled}
              onChange={() => props.onChange(option.value)}
            />
            <span>{option.label}</span>
          </label>
        ))}
      </div>
    </fieldset>
  );
}
