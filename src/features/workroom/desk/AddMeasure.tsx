import { useState, type FormEvent } from 'react';
import { Icon } from '@/components/Icon';
import { cleanName, type Pattern } from '@/engine';
import { addChoice, addMeasure, nameTrouble, questionFor } from '@/features/projects/pattern-edits';
import type { DeskStore } from './desk-store';

/** A new measure by name, asked of the reader or worked out; or a new choice. */
export function AddMeasure({ store, pattern }: { readonly store: DeskStore; readonly pattern: Pattern }) {
  const [open, setOpen] = useState(false);
  const [name, setName] = useState('');
  const [trouble, setTrouble] = useState<string | null>(null);

  const addAsChoice = () => {
    const found = nameTrouble(pattern, name, 'choice');
    setTrouble(found);
    if (found !== null) return;
    const clean = cleanName(name);
    store.editPattern(null, (now) => addChoice(now, clean));
    store.select(clean);
    setName('');
    setOpen(false);
  };
  const add = (asked: boolean) => {
    const found = nameTrouble(pattern, name);
    setTrouble(found);
    if (found !== null) return;
    const clean = cleanName(name);
    store.editPattern(null, (now) =>
      addMeasure(
        now,
        asked
          ? { name: clean, ask: { question: questionFor(clean), usual: '1 in', from: '1/2 in', to: '12 in' } }
          : { name: clean, formula: '1 in' },
      ),
    );
    store.select(clean);
    setName('');
    setOpen(false);
    requestAnimationFrame(() =>
      document.querySelector<HTMLElement>(`[data-place="measure:${CSS.escape(clean)}"]`)?.focus(),
    );
  };
  if (!open) {
    return (
      <p className="desk-add">
        <button type="button" className="text-button small" onClick={() => setOpen(true)}>
          <Icon name="plus" /> Measure or choice
        </button>
      </p>
    );
  }
  return (
    <form
      className="desk-add add-measure"
      onSubmit={(event: FormEvent) => {
        event.preventDefault();
        add(false);
      }}
    >
      <label className="small soft" htmlFor="new-measure">
        Name of the new measure or choice
      </label>
      <input
        id="new-measure"
        className="input"
        autoFocus
        value={name}
        maxLength={40}
        aria-invalid={trouble === null ? undefined : true}
        onChange={(event) => setName(event.currentTarget.value)}
      />
      <button type="submit" className="btn small-btn">
        Worked out
      </button>
      <button type="button" className="btn small-btn" onClick={() => add(true)}>
        Asked
      </button>
      <button type="button" className="btn small-btn" onClick={addAsChoice}>
        A choice
      </button>
      <button type="button" className="text-button small" onClick={() => setOpen(false)}>
        Cancel
      </button>
      {trouble === null ? null : (
        <p className="fault-words" role="alert">
          {trouble}
        </p>
      )}
    </form>
  );
}
