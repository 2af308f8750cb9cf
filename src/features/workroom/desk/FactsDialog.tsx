import { useStore } from '@nanostores/react';
import { useState } from 'react';
import { Dialog } from '@/components/Dialog';
import { Field } from '@/components/Field';
import { slugOf } from '@/features/projects/project-slug';
import { SUMMARY_LIMIT, type Standing } from '@/features/projects/project';
import { pictureUrl } from '@/writeup/pictures';
import { collectUses } from '@/writeup/uses';
import type { DeskStore } from './desk-store';
import { call } from './project-api';
import { ReadersPart } from './ReadersPart';

export interface FactsDialogProps {
  readonly open: boolean;
  readonly store: DeskStore;
  readonly projectId: string;
  readonly slug: string;
  readonly published: boolean;
  readonly standing: Standing;
  readonly withdrawn: string | null;
  readonly onWithdrawn: (reason: string | null) => void;
  readonly onSlug: (slug: string) => void;
  readonly onClose: () => void;
}

/** What cards and search show of a project: summary, time, picture, address. */
export function FactsDialog({ open, store, projectId, slug, published, standing, ...rest }: FactsDialogProps) {
  const { withdrawn, onWithdrawn, onSlug, onClose } = rest;
  const draft = useStore(store.$draft);
  return (
    <Dialog open={open} title="About this project" onClose={onClose}>
      <div className="dialog-form">
        <Field label="Summary" hint="One line of what it is. Cards and search results show it.">
          {(control) => (
            <textarea
              {...control}
              className="input"
              rows={2}
              maxLength={SUMMARY_LIMIT}
              data-place="fact:summary"
              value={draft.summary}
              onChange={(event) => {
                const summary = event.currentTarget.value;
                store.edit('summary', (now) => ({ ...now, summary }));
              }}
            />
          )}
        </Field>
        <Field label="Minutes at the table" hint="Left empty, nothing is said about the time.">
          {(control) => (
            <input
              {...control}
              className="input short"
              inputMode="numeric"
              value={draft.minutes ?? ''}
              onChange={(event) => {
                const digits = event.currentTarget.value.replace(/\D/gu, '').slice(0, 4);
                store.edit('minutes', (now) => ({
                  ...now,
                  minutes: digits === '' || Number(digits) === 0 ? null : Number(digits),
                }));
              }}
            />
          )}
        </Field>
        <HeroChoice store={store} hero={draft.hero} />
        {standing === 'co-author' ? (
          <p className="small soft">Address: /projects/{slug}. Its owner can change it.</p>
        ) : (
          <>
            <SlugField
              key={slug}
              projectId={projectId}
              slug={slug}
              title={draft.title}
              published={published}
              onSlug={onSlug}
            />
            {published ? <ReadersPart projectId={projectId} withdrawn={withdrawn} onWithdrawn={onWithdrawn} /> : null}
          </>
        )}
        <div className="dialog-deeds">
          <button type="button" className="btn" onClick={onClose}>
            Back to the desk
          </button>
        </div>
      </div>
    </Dialog>
  );
}

function HeroChoice({ store, hero }: { readonly store: DeskStore; readonly hero: string | null }) {
  const writeUp = useStore(store.$writeUp);
  const photos = [...new Map(collectUses(writeUp.doc).photos.map((photo) => [photo.upload, photo])).values()];
  const choices =
    hero !== null && !photos.some((photo) => photo.upload === hero)
      ? [{ upload: hero, alt: 'The picture chosen now' }, ...photos]
      : photos;
  const choose = (next: string | null) => store.edit(null, (now) => ({ ...now, hero: next }));
  return (
    <fieldset className="field">
      <legend>First picture</legend>
      {choices.length === 0 ? (
        <p className="hint">
          Put a photo into the write-up; then it can be chosen here. Until then cards show the folded box.
        </p>
      ) : null}
      <div className="heroes">
        {choices.map((photo) => (
          <label key={photo.upload} className="hero-choice">
            <input type="radio" name="hero" checked={hero === photo.upload} onChange={() => choose(photo.upload)} />
            <img
              src={pictureUrl(photo.upload, 480)}
              alt={photo.alt || 'A photo without words yet'}
              width="120"
              height="80"
              loading="lazy"
            />
          </label>
        ))}
        {choices.length > 0 ? (
          <label className="hero-choice none">
            <input type="radio" name="hero" checked={hero === null} onChange={() => choose(null)} />
            <span>The folded box</span>
          </label>
        ) : null}
      </div>
    </fieldset>
  );
}

function SlugField({
  projectId,
  slug,
  title,
  published,
  onSlug,
}: {
  readonly projectId: string;
  readonly slug: string;
  readonly title: string;
  readonly published: boolean;
  readonly onSlug: (slug: string) => void;
}) {
  const [typed, setTyped] = useState(slug);
  const [error, setError] = useState<string | undefined>();
  const suggested = slugOf(title);
  const move = async (to: string) => {
    const answer = await call<{ slug: string }>(`/api/projects/${projectId}/address`, {
      method: 'PUT',
      body: { slug: to.trim() },
    });
    if (!answer.ok) return setError(answer.refusal.errors[0]?.sentence ?? answer.refusal.sentence);
    setError(undefined);
    onSlug(answer.value.slug);
  };
  return (
    <form
      onSubmit={(event) => {
        event.preventDefault();
        void move(typed);
      }}
    >
      <Field
        label="Address"
        hint={
          published
            ? 'Stands after /projects/. The address that readers know leads on to a new one.'
            : 'Stands after /projects/.'
        }
        error={error}
      >
        {(control) => (
          <input
            {...control}
            className="input"
            value={typed}
            maxLength={60}
            spellCheck={false}
            onChange={(event) => setTyped(event.currentTarget.value)}
          />
        )}
      </Field>
      <p className="slug-deeds">
        <button type="submit" className="btn small-btn" disabled={typed.trim() === slug}>
          Change the address
        </button>
        {suggested === slug ? null : (
          <button type="button" className="text-button small" onClick={() => void move(suggested)}>
            Use the title: {suggested}
          </button>
        )}
      </p>
    </form>
  );
}
