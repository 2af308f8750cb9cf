import { useState } from 'react';
import type { Invited } from '@/features/projects/sharing';
import { call } from '../desk/project-api';

/** Projects of others that this author is asked to work on. */
export function Invitations({ invited }: { readonly invited: readonly Invited[] }) {
  const [open, setOpen] = useState(invited);
  const [trouble, setTrouble] = useState<string | null>(null);
  const answer = async ({ id }: Invited, accept: boolean) => {
    const done = await call<{ project: string }>(`/api/invitations/${id}`, { method: 'POST', body: { accept } });
    if (!done.ok) return setTrouble(done.refusal.sentence);
    if (accept) location.assign(`/workroom/${done.value.project}`);
    else setOpen((now) => now.filter((one) => one.id !== id));
  };
  if (open.length === 0) return null;
  return (
    <section className="note" aria-label="Invitations">
      {open.map((one) => (
        <div key={one.id} className="invitation">
          <p>
            <b>{one.from}</b> asks you to work on “{one.title}” together.
          </p>
          <span className="banner-deeds">
            <button type="button" className="btn small-btn" onClick={() => void answer(one, true)}>
              Accept<span className="visually-hidden">: {one.title}</span>
            </button>
            <button type="button" className="btn small-btn" onClick={() => void answer(one, false)}>
              Decline<span className="visually-hidden">: {one.title}</span>
            </button>
          </span>
        </div>
      ))}
      {trouble === null ? null : (
        <p className="error" role="alert">
          {trouble}
        </p>
      )}
    </section>
  );
}
