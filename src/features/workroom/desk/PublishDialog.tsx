import { useState } from 'react';
import { Dialog } from '@/components/Dialog';
import { Field } from '@/components/Field';
import type { ProofItem } from '@/features/projects/proof';
import type { Planned } from '@/features/projects/planned';
import type { SaveState } from '../saving/autosave';
import { PlannedNote } from './PlannedNote';
import { call, type Refusal } from './project-api';
import { localInput, zoneWords } from './local-input';

export interface PublishDialogProps {
  readonly open: boolean;
  readonly projectId: string;
  /** The edition that would be made. */
  readonly edition: number;
  readonly advice: readonly ProofItem[];
  /** Saves what waits, and tells what was saved. */
  readonly flush: () => Promise<SaveState>;
  readonly planned: Planned | null;
  readonly onPlanned: (planned: Planned | null) => void;
  readonly onClose: () => void;
  readonly onPublished: (published: { readonly n: number; readonly slug: string; readonly revision: number }) => void;
}

const DAY = 86_400_000;

/** The last look before an edition is made; from the second on it asks what changed. */
export function PublishDialog({ open, projectId, edition, advice, flush, planned, ...on }: PublishDialogProps) {
  const { onPlanned, onClose, onPublished } = on;
  const [note, setNote] = useState('');
  const [later, setLater] = useState(false);
  const [at, setAt] = useState(() => localInput(Date.now() + DAY));
  const [busy, setBusy] = useState(false);
  const [refusal, setRefusal] = useState<Refusal | null>(null);

  const publish = async () => {
    setBusy(true);
    setRefusal(null);
    const saved = await flush();
    if (saved.status.kind !== 'saved') {
      setBusy(false);
      return setRefusal({
        sentence: 'It is not saved yet, so it cannot be published. Look at the top of the desk for what is in the way.',
        code: 'unsaved',
        errors: [],
      });
    }
    const body = { revision: saved.revision, ...(edition > 1 ? { note } : {}) };
    const path = `/api/projects/${projectId}`;
    if (later) {
      const publishAt = new Date(at).getTime();
      const answer = await call<{ planned: Planned }>(`${path}/schedule`, {
        method: 'PUT',
        body: { ...body, publishAt },
      });
      setBusy(false);
      return answer.ok ? onPlanned(answer.value.planned) : setRefusal(answer.refusal);
    }
    const answer = await call<{ n: number; slug: string }>(`${path}/publish`, { method: 'POST', body });
    setBusy(false);
    if (!answer.ok) return setRefusal(answer.refusal);
    setNote('');
    onPublished({ ...answer.value, revision: saved.revision });
  };

  return (
    <Dialog open={open} title={`Publish edition ${edition}`} onClose={onClose}>
      <form
        className="dialog-form"
        onSubmit={(event) => {
          event.preventDefault();
          void publish();
        }}
      >
        {planned === null ? null : <PlannedNote projectId={projectId} planned={planned} onPlanned={onPlanned} />}
        <p>
          An edition is kept for ever as it is now: pieces, text and pictures. What you change later reaches readers
          with the next one.
        </p>
        {advice.length === 0 ? null : (
          <div className="note">
            <b>Worth a look first.</b>
            <ul>
              {advice.map((item, i) => (
                <li key={i}>{item.title}</li>
              ))}
            </ul>
          </div>
        )}
        {edition > 1 ? (
          <Field
            label="Correction note"
            hint="What changed since the last edition, and what someone who already cut should do."
          >
            {(control) => (
              <textarea
                {...control}
                className="input"
                rows={4}
                maxLength={2000}
                required
                value={note}
                onChange={(event) => setNote(event.currentTarget.value)}
              />
            )}
          </Field>
        ) : null}
        <fieldset className="field">
          <legend>When</legend>
          <label>
            <input type="radio" name="when" checked={!later} onChange={() => setLater(false)} /> Now
          </label>
          <label>
            <input type="radio" name="when" checked={later} onChange={() => setLater(true)} /> Later, as it stands now
          </label>
        </fieldset>
        {later ? (
          <Field label="Day and time" hint={`Your own time here, ${zoneWords(at)}. What you save after this waits.`}>
            {(control) => (
              <input
                {...control}
                className="input moment"
                type="datetime-local"
                required
                value={at}
                onChange={(event) => setAt(event.currentTarget.value)}
              />
            )}
          </Field>
        ) : null}
        {refusal === null ? null : (
          <div className="problem" role="alert">
            <p>{refusal.sentence}</p>
            {refusal.errors.length === 0 ? null : (
              <ul>
                {refusal.errors.map((error, i) => (
                  <li key={i}>
                    {error.where ? `${error.where}: ` : ''}
                    {error.sentence}
                  </li>
                ))}
              </ul>
            )}
          </div>
        )}
        <div className="dialog-deeds">
          <button type="submit" className="tab-button" disabled={busy || (edition > 1 && note.trim() === '')}>
            {busy ? 'One moment…' : later ? `Plan edition ${edition}` : `Publish edition ${edition}`}
          </button>
          <button type="button" className="btn" onClick={onClose}>
            Not yet
          </button>
        </div>
      </form>
    </Dialog>
  );
}
