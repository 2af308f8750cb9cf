import { useState } from 'react';
import { Field } from '@/components/Field';
import { call } from './project-api';

export interface ReadersPartProps {
  readonly projectId: string;
  /** Why it is withdrawn; null while readers have it. */
  readonly withdrawn: string | null;
  readonly onWithdrawn: (reason: string | null) => void;
}

/** Takes a published project back from readers, or gives it to them again. */
export function ReadersPart({ projectId, withdrawn, onWithdrawn }: ReadersPartProps) {
  const [reason, setReason] = useState('');
  const [error, setError] = useState<string | undefined>();
  const [asking, setAsking] = useState(false);
  const send = async (to: string | null) => {
    const answer = await call(`/api/projects/${projectId}/withdrawal`, {
      ...(to === null ? { method: 'DELETE' as const } : { method: 'PUT' as const, body: { reason: to } }),
    });
    if (!answer.ok) return setError(answer.refusal.errors[0]?.sentence ?? answer.refusal.sentence);
    setError(undefined);
    setAsking(false);
    onWithdrawn(to);
  };
  if (withdrawn !== null)
    return (
      <div className="note">
        <p>
          <b>Withdrawn.</b> Its page says why, lists and the feed leave it out: “{withdrawn}”
        </p>
        <button type="button" className="btn small-btn" onClick={() => void send(null)}>
          Show it to readers again
        </button>
        {error === undefined ? null : <p className="error">{error}</p>}
      </div>
    );
  if (!asking)
    return (
      <p>
        <button type="button" className="btn small-btn" onClick={() => setAsking(true)}>
          Withdraw it from readers…
        </button>
      </p>
    );
  return (
    <form
      onSubmit={(event) => {
        event.preventDefault();
        void send(reason.trim());
      }}
    >
      <Field
        label="Why it is withdrawn"
        hint="Stands on its page for those who come by a link or cut by it already. It can be shown again at any time."
        error={error}
      >
        {(control) => (
          <textarea
            {...control}
            className="input"
            rows={3}
            maxLength={500}
            required
            value={reason}
            onChange={(event) => setReason(event.currentTarget.value)}
          />
        )}
      </Field>
      <p className="slug-deeds">
        <button type="submit" className="btn small-btn" disabled={reason.trim() === ''}>
          Withdraw
        </button>
        <button type="button" className="btn small-btn" onClick={() => setAsking(false)}>
          Leave it published
        </button>
      </p>
    </form>
  );
}
