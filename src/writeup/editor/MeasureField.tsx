import { useId, useState } from 'react';
import { explain } from '@/engine';
import type { LiveFigures, LiveText } from '../live';
import { measureOptions, type MeasureOption } from './measure-options';

export interface MeasureFieldProps {
  readonly live: LiveFigures | null;
  readonly begin: LiveText;
  /** A measure that stands in the text is being changed. */
  readonly changing: boolean;
  readonly onTake: (text: LiveText) => void;
}

const IS = { asked: 'asked', worked: 'worked out', formula: 'as typed' } as const;

/** Finds a measure by name or figure, or takes a formula as it is typed; what does not read is marked where it stands. */
export function MeasureField({ live, begin, changing, onTake }: MeasureFieldProps) {
  const id = useId();
  const [typed, setTyped] = useState(begin.formula);
  const [bare, setBare] = useState(begin.bare);
  const [active, setActive] = useState(0);
  if (!live) return <p className="hint">Measures can be put in once the pattern reads.</p>;

  const { options, fault } = measureOptions(live, typed, bare);
  const at = Math.min(active, options.length - 1);
  const type = (text: string) => {
    setTyped(text);
    setActive(0);
  };
  const take = (option: MeasureOption | undefined) => {
    if (!option) return;
    if (option.completes !== undefined) type(option.completes);
    else onTake({ formula: option.formula, bare });
  };

  return (
    <div className="measure-field">
      <label htmlFor={`${id}-field`}>{changing ? 'Change the live measure' : 'Measure or formula'}</label>
      <input
        id={`${id}-field`}
        className="input"
        role="combobox"
        autoFocus
        autoComplete="off"
        spellCheck={false}
        maxLength={300}
        aria-expanded={options.length > 0}
        aria-controls={`${id}-list`}
        aria-activedescendant={at >= 0 ? `${id}-${at}` : undefined}
        aria-invalid={fault ? true : undefined}
        aria-describedby={fault ? `${id}-fault` : undefined}
        placeholder="inside width, or arc + 2 * tab"
        value={typed}
        onFocus={(event) => event.target.select()}
        onChange={(event) => type(event.target.value)}
        onKeyDown={(event) => {
          if (event.nativeEvent.isComposing) return;
          if (event.key === 'ArrowDown' || event.key === 'ArrowUp') {
            event.preventDefault();
            const by = event.key === 'ArrowDown' ? 1 : -1;
            setActive((Math.max(at, 0) + by + options.length) % Math.max(options.length, 1));
          } else if (event.key === 'Enter') {
            event.preventDefault();
            take(options[at]);
          }
        }}
      />
      <div aria-live="polite">
        {fault ? (
          <div className="measure-fault" id={`${id}-fault`}>
            <FaultPlace typed={typed} span={fault.span} />
            <p>{explain(fault)}</p>
            {fault.cure !== undefined && fault.span ? (
              <button
                type="button"
                className="btn small-btn"
                onClick={() => type(cured(typed, fault.span, fault.cure))}
              >
                Use {fault.cure}
              </button>
            ) : null}
          </div>
        ) : null}
      </div>
      <ul role="listbox" id={`${id}-list`} aria-label="Measures" className="measure-list">
        {options.map((option, n) => (
          <li
            key={`${option.is} ${option.formula} ${option.completes ?? ''}`}
            id={`${id}-${n}`}
            role="option"
            aria-selected={n === at}
            ref={(element) => {
              if (n === at) element?.scrollIntoView({ block: 'nearest' });
            }}
            // The field keeps the focus.
            onMouseDown={(event) => event.preventDefault()}
            onClick={() => take(option)}
          >
            <span className="measure-option-name">{option.completes ?? option.formula}</span>
            <span className="measure-option-figure">
              {option.completes === undefined ? (option.shown ?? 'no value at this size') : 'go on'}
            </span>
            <small>{IS[option.is]}</small>
          </li>
        ))}
      </ul>
      <div className="measure-field-foot">
        <label className="check">
          <input type="checkbox" checked={bare} onChange={(event) => setBare(event.target.checked)} />
          Without its unit
        </label>
        <span className="hint">
          <kbd>Enter</kbd> {changing ? 'changes it' : 'puts it in'}, <kbd>Esc</kbd> leaves
        </span>
      </div>
    </div>
  );
}

/** The typed text with what does not read underlined, and a caret below where it begins. */
function FaultPlace({
  typed,
  span,
}: {
  readonly typed: string;
  readonly span: { readonly from: number; readonly to: number } | undefined;
}) {
  if (!span) return null;
  const moved = typed.length - typed.trimStart().length;
  const from = Math.min(span.from + moved, typed.length);
  const to = Math.max(Math.min(span.to + moved, typed.length), from);
  return (
    <p className="measure-fault-place" aria-hidden="true">
      {typed.slice(0, from)}
      <u>{typed.slice(from, to) || '\u00a0'}</u>
      {typed.slice(to)}
    </p>
  );
}

function cured(typed: string, span: { from: number; to: number } | undefined, cure: string | undefined): string {
  const text = typed.trim();
  return span && cure !== undefined ? text.slice(0, span.from) + cure + text.slice(span.to) : text;
}
