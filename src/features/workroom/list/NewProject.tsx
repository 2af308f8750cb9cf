import { useEffect, useRef, useState } from 'react';
import { Dialog } from '@/components/Dialog';
import { Field } from '@/components/Field';
import { TITLE_LIMIT } from '@/features/projects/project';
import { BLANK } from '@/features/patterns/blank-pattern';
import { boxHref } from '@/features/handbook/box-href';
import { call } from '../desk/project-api';

/** What the shelf shows of a pattern; drawn on the server. */
export interface ShelfPattern {
  readonly slug: string;
  readonly name: string;
  readonly summary: string;
  readonly asks: string;
  readonly folded: string;
  /** Not one of ours, of which the handbook tells. */
  readonly own: boolean;
}
/** Nothing drawn up yet. */
export const BLANK_START: ShelfPattern = {
  slug: BLANK,
  name: 'Blank',
  summary: 'Nothing drawn up yet: begin with a piece, and give it sizes.',
  asks: '',
  folded: '',
  own: true,
};
export interface NewProjectProps {
  readonly patterns: readonly ShelfPattern[];
  readonly open: boolean;
  /** The pattern that was chosen on the shelf. */
  readonly chosen: string | null;
  readonly onClose: () => void;
}

/** A pattern and a title make a project; its desk opens at once. */
export function NewProject({ patterns, open, chosen, onClose }: NewProjectProps) {
  const [slug, setSlug] = useState<string | null>(null);
  const [title, setTitle] = useState('');
  const [error, setError] = useState<string | undefined>();
  const [busy, setBusy] = useState(false);
  const titleField = useRef<HTMLInputElement>(null);
  useEffect(() => {
    if (!open) return;
    setSlug(chosen ?? (patterns.find(({ own }) => !own) ?? patterns[0])?.slug ?? null);
    setTitle('');
    setError(undefined);
    titleField.current?.focus();
  }, [open, chosen, patterns]);

  const selected = patterns.find((pattern) => pattern.slug === slug);
  const make = async () => {
    if (title.trim() === '') return setError('Give the project a title. It can be changed later.');
    setBusy(true);
    const answer = await call<{ id: string }>('/api/projects', { method: 'POST', body: { pattern: slug, title } });
    if (answer.ok) return location.assign(`/workroom/${answer.value.id}`);
    setBusy(false);
    setError(answer.refusal.errors[0]?.sentence ?? answer.refusal.sentence);
  };

  return (
    <Dialog open={open} title="New project" onClose={onClose}>
      <form
        className="new-project"
        onSubmit={(event) => {
          event.preventDefault();
          void make();
        }}
      >
        <Field label="Title" hint="What the box is for, such as “Seed packet box”." error={error}>
          {(control) => (
            <input
              {...control}
              ref={titleField}
              className="input"
              value={title}
              maxLength={TITLE_LIMIT}
              onChange={(event) => setTitle(event.currentTarget.value)}
            />
          )}
        </Field>
        <fieldset className="field">
          <legend>Pattern</legend>
          <div className="pattern-choices">
            {patterns.map((pattern) => (
              <label key={pattern.slug} className="pattern-choice">
                <input
                  type="radio"
                  name="pattern"
                  value={pattern.slug}
                  checked={slug === pattern.slug}
                  onChange={() => setSlug(pattern.slug)}
                />
                <span
                  className="pattern-picture"
                  aria-hidden="true"
                  dangerouslySetInnerHTML={{ __html: pattern.folded }}
                />
                <span>
                  <b>{pattern.name}</b>
                  <span className="small soft">{pattern.summary}</span>
                </span>
              </label>
            ))}
          </div>
        </fieldset>
        {selected && !selected.own ? (
          <p className="small">
            <a href={boxHref(selected.slug)} target="_blank" rel="noopener">
              How it works: {selected.name}
            </a>{' '}
            <span className="soft">(opens beside this page)</span>
          </p>
        ) : null}
        <p className="new-deeds">
          <button type="submit" className="tab-button" disabled={busy || slug === null}>
            {busy ? 'Making it…' : 'Make the project'}
          </button>
          <button type="button" className="btn" onClick={onClose}>
            Cancel
          </button>
        </p>
      </form>
    </Dialog>
  );
}
