import { useId, useState, type KeyboardEvent } from 'react';
import { Dialog } from '@/components/Dialog';
import { answersTo } from '@/features/projects/project';
import type { ProofPlace } from '@/features/projects/proof-place';
import type { DeskPlace } from './desk-places';

/** Something that the desk can do, under the words of its button. */
export interface DeskAct {
  readonly label: string;
  readonly what: string;
  /** Why it cannot be done now. */
  readonly hindrance?: string | null;
  readonly act: () => void;
}

export interface GoToDialogProps {
  readonly open: boolean;
  readonly places: readonly DeskPlace[];
  readonly acts: readonly DeskAct[];
  readonly onGo: (place: ProofPlace) => void;
  readonly onClose: () => void;
}

/** More than a screen of answers are no answer. */
const MOST = 12;

/** By the first letters of a name to its place on the desk, or to what a button does; all by keyboard. */
export function GoToDialog(props: GoToDialogProps) {
  return (
    <Dialog open={props.open} title="Go to, or do" onClose={props.onClose}>
      <Finder {...props} />
    </Dialog>
  );
}

function Finder({ places, acts, onGo, onClose }: GoToDialogProps) {
  const listId = useId();
  const [query, setQuery] = useState('');
  const [at, setAt] = useState(0);
  const found: readonly (DeskPlace | DeskAct)[] = [...places, ...acts].filter(({ label, what }) =>
    answersTo(`${label} ${what}`, query),
  );
  const shown = found.slice(0, MOST);
  const active = Math.min(at, shown.length - 1);
  const optionId = (index: number) => `${listId}-${index}`;
  const take = (one: DeskPlace | DeskAct) => {
    if ('act' in one && one.hindrance) return;
    onClose();
    // Once the dialog has given the focus back, or it would take it away again.
    requestAnimationFrame(() => ('act' in one ? one.act() : onGo(one.place)));
  };
  const press = (event: KeyboardEvent) => {
    const by = { ArrowDown: 1, ArrowUp: -1 }[event.key];
    const chosen = shown[active];
    if (by !== undefined && shown.length > 0) setAt((active + by + shown.length) % shown.length);
    else if (event.key === 'Enter' && chosen) take(chosen);
    else return;
    event.preventDefault();
  };
  return (
    <div className="go-to">
      <input
        className="input"
        role="combobox"
        aria-label="Name of a measure, piece, step or act"
        aria-expanded={shown.length > 0}
        aria-controls={listId}
        aria-activedescendant={active < 0 ? undefined : optionId(active)}
        autoComplete="off"
        spellCheck={false}
        placeholder="The first letters of its name"
        // What a dialog puts the focus on when it opens; React's own property comes too early for that.
        ref={(field) => field?.setAttribute('autofocus', '')}
        value={query}
        onChange={(event) => {
          setQuery(event.currentTarget.value);
          setAt(0);
        }}
        onKeyDown={press}
      />
      <ul id={listId} className="go-to-list" role="listbox" aria-label="What answers">
        {shown.map((one, index) => (
          <li
            key={`${one.what} ${one.label}`}
            id={optionId(index)}
            role="option"
            aria-selected={index === active}
            aria-disabled={('act' in one && one.hindrance != null) || undefined}
            onPointerDown={(event) => {
              event.preventDefault();
              take(one);
            }}
          >
            <b>{one.label}</b>
            <span>{('act' in one && one.hindrance) || one.what}</span>
          </li>
        ))}
      </ul>
      <p className="small soft" role="status">
        {shown.length === 0
          ? `Nothing on this desk begins like “${query}”.`
          : found.length > MOST
            ? `${found.length - MOST} more: type another letter.`
            : ''}
      </p>
    </div>
  );
}
