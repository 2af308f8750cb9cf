import { useState } from 'react';
import { agoWords } from './SaveWords';
import type { Saving } from './use-saving';

/** Another tab or person saved meanwhile: both are kept, whichever is chosen. */
export function ConflictBanner({ saving }: { readonly saving: Saving }) {
  const [busy, setBusy] = useState(false);
  const { status } = saving.state;
  const act = (deed: () => Promise<void>) => async () => {
    setBusy(true);
    await deed();
    setBusy(false);
  };
  return (
    <>
      {status.kind === 'conflict' ? (
        <div className="desk-banner problem" role="alert">
          <p>
            <b>Changed in another place.</b> Revision {status.other.revision} was saved{' '}
            {agoWords(Date.now() - status.other.updatedAt)} from another tab or by another person. Nothing of yours or
            theirs is lost: what is not shown becomes a draft of its own.
          </p>
          <div className="banner-deeds">
            <button type="button" className="btn small-btn" disabled={busy} onClick={act(saving.keepMine)}>
              Keep mine as a new revision
            </button>
            <button type="button" className="btn small-btn" disabled={busy} onClick={act(saving.takeOther)}>
              Take the other
            </button>
          </div>
        </div>
      ) : null}
      {saving.notice === null ? null : (
        <div className="desk-banner note" role="status">
          <p>
            {saving.notice.words}{' '}
            {saving.notice.link ? <a href={saving.notice.link.href}>{saving.notice.link.words}</a> : null}
          </p>
          <button type="button" className="btn small-btn" onClick={saving.dismiss}>
            Close
          </button>
        </div>
      )}
    </>
  );
}
