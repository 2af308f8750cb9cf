import { useRef } from 'react';
import type { Fault } from '@/engine';
import { namesIn } from '@/features/projects/formula-names';
import { CompletionList } from './CompletionList';
import { useCompletion } from './use-completion';

export interface FormulaFieldProps {
  readonly label: string;
  readonly value: string;
  readonly names: readonly string[];
  /** Names to light up in it. */
  readonly lit?: ReadonlySet<string> | null;
  readonly faults?: readonly Fault[];
  /** The id of the words that say what is wrong. */
  readonly describedBy?: string;
  readonly place?: string;
  readonly onChange: (value: string) => void;
  readonly onFocus?: () => void;
}

interface Piece {
  readonly text: string;
  readonly mark: 'lit' | 'bad' | null;
}

/**
 * A formula to type in, with what does not read underlined at its place and names offered as they are typed. It grows with its
 * text; Enter leaves the field.
 */
export function FormulaField({
  label,
  value,
  names,
  lit,
  faults = [],
  describedBy,
  place,
  onChange,
  onFocus,
}: FormulaFieldProps) {
  const span = faults.find((fault) => fault.span !== undefined)?.span;
  const field = useRef<HTMLTextAreaElement>(null);
  const completing = useCompletion(field, value, onChange);
  const { offer, listId } = completing;
  return (
    <div className={faults.length > 0 ? 'formula wrong' : 'formula'}>
      <div className="formula-ink" aria-hidden="true">
        {marked(value, names, lit ?? null, span).map(({ text, mark }, i) =>
          mark === null ? (
            text
          ) : (
            <mark key={i} className={mark === 'bad' ? 'formula-bad' : 'formula-lit'}>
              {text}
            </mark>
          ),
        )}
        {'\u200b'}
      </div>
      <textarea
        ref={field}
        rows={1}
        role="combobox"
        aria-autocomplete="list"
        aria-expanded={offer !== null}
        aria-controls={offer === null ? undefined : listId}
        aria-activedescendant={offer === null || offer.active < 0 ? undefined : `${listId}-${offer.active}`}
        aria-label={label}
        aria-invalid={faults.length > 0 ? true : undefined}
        aria-describedby={describedBy}
        data-place={place}
        spellCheck={false}
        autoComplete="off"
        autoCapitalize="off"
        maxLength={1000}
        value={value}
        onChange={(event) => {
          const next = event.currentTarget.value.replace(/\n/gu, ' ');
          onChange(next);
          completing.typed(next, event.currentTarget.selectionStart);
        }}
        onFocus={onFocus}
        onBlur={completing.close}
        onKeyDown={(event) => {
          if (completing.press(event)) event.preventDefault();
          else if (event.key === 'Enter') {
            event.preventDefault();
            event.currentTarget.blur();
          }
        }}
      />
      {offer === null ? null : <CompletionList id={listId} label={label} offer={offer} onTake={completing.take} />}
    </div>
  );
}

function marked(value: string, names: readonly string[], lit: ReadonlySet<string> | null, bad: Fault['span']): Piece[] {
  const marks: { from: number; to: number; mark: 'lit' | 'bad' }[] = [];
  if (bad !== undefined)
    marks.push({
      from: Math.min(bad.from, value.length),
      to: Math.min(Math.max(bad.to, bad.from + 1), value.length),
      mark: 'bad',
    });
  if (lit !== null) {
    for (const found of namesIn(value, names)) {
      const covered = bad !== undefined && found.from < bad.to && found.to > bad.from;
      if (lit.has(found.name) && !covered) marks.push({ from: found.from, to: found.to, mark: 'lit' });
    }
  }
  marks.sort((a, b) => a.from - b.from);
  const pieces: Piece[] = [];
  let at = 0;
  for (const { from, to, mark } of marks) {
    if (from > at) pieces.push({ text: value.slice(at, from), mark: null });
    if (to > from) pieces.push({ text: value.slice(from, to), mark });
    // A fault at the very end has nothing to underline: a blank stands for what is missing.
    else pieces.push({ text: '\u00a0', mark });
    at = to;
  }
  pieces.push({ text: value.slice(at), mark: null });
  return pieces;
}
