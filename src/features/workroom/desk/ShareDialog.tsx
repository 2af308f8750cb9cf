import { useEffect, useState } from 'react';
import { Dialog } from '@/components/Dialog';
import { Field } from '@/components/Field';
import type { Standing } from '@/features/projects/project';
import { LABEL_LIMIT, type CoAuthor, type DraftLink, type Sharing } from '@/features/projects/sharing';
import { call } from './project-api';

export interface ShareDialogProps {
  readonly open: boolean;
  readonly projectId: string;
  readonly standing: Standing;
  readonly owner: string;
  readonly onClose: () => void;
}

/** Who works on the project, and who may read it before it is published. */
export function ShareDialog({ open, projectId, standing, owner, onClose }: ShareDialogProps) {
  const [sharing, setSharing] = useState<Sharing | null>(null);
  const [trouble, setTrouble] = useState<string | null>(null);
  const base = `/api/projects/${projectId}`;
  useEffect(() => {
    if (!open) return;
    void call<Sharing>(`${base}/people`).then((answer) => {
      setTrouble(answer.ok ? null : answer.refusal.sentence);
      if (answer.ok) setSharing(answer.value);
    });
  }, [open, base]);

  /** Asks, takes over what the answer says, and tells whether it was done. */
  const ask = async <T extends object = Sharing>(...request: Parameters<typeof call>): Promise<T | null> => {
    const answer = await call<T & Partial<Sharing>>(...request);
    setTrouble(answer.ok ? null : answer.refusal.sentence);
    if (!answer.ok) return null;
    setSharing((was) => ({ people: [], links: [], ...was, ...answer.value }));
    return answer.value;
  };

  return (
    <Dialog open={open} title="People and draft links" onClose={onClose}>
      <div className="dialog-form">
        {trouble === null ? null : (
          <p className="problem" role="alert">
            {trouble}
          </p>
        )}
        {sharing === null ? (
          <p>Asking who works on it…</p>
        ) : (
          <>
            <People
              people={sharing.people}
              owner={owner}
              mayInvite={standing !== 'co-author'}
              onInvite={async (email) => (await ask(`${base}/people`, { method: 'POST', body: { email } })) !== null}
              onRemove={async (person) => {
                const done = await ask(`${base}/people/${person.id}`, { method: 'DELETE' });
                if (done !== null && person.isAsker) location.assign('/workroom');
              }}
            />
            <Links
              links={sharing.links}
              onMake={async (label) =>
                (await ask<{ link: string }>(`${base}/links`, { method: 'POST', body: { label } }))?.link ?? null
              }
              onRevoke={(link) => void ask(`${base}/links/${link.id}`, { method: 'DELETE' })}
            />
          </>
        )}
      </div>
    </Dialog>
  );
}

interface PeopleProps {
  readonly people: readonly CoAuthor[];
  readonly owner: string;
  readonly mayInvite: boolean;
  readonly onInvite: (email: string) => Promise<boolean>;
  readonly onRemove: (person: CoAuthor) => void;
}

function People({ people, owner, mayInvite, onInvite, onRemove }: PeopleProps) {
  const [email, setEmail] = useState('');
  const [said, setSaid] = useState('');
  return (
    <section className="share-part">
      <h3>Who works on it</h3>
      <ul className="share-list">
        <li>
          <span>
            <b>{owner}</b>, the owner
          </span>
        </li>
        {people.map((person) => (
          <li key={person.id}>
            <span>
              <b>{person.name}</b>, {person.state === 'accepted' ? 'co-author' : 'invited'}
            </span>
            {mayInvite || person.isAsker ? (
              <button type="button" className="btn small-btn" onClick={() => onRemove(person)}>
                {person.isAsker ? 'Leave the project' : person.state === 'accepted' ? 'Take out' : 'Take back'}
                <span className="visually-hidden">: {person.name}</span>
              </button>
            ) : null}
          </li>
        ))}
      </ul>
      {mayInvite ? (
        <form
          onSubmit={(event) => {
            event.preventDefault();
            void onInvite(email).then((done) => {
              if (!done) return setSaid('');
              setSaid('Invited. An author with this address finds the invitation in the workroom and in a letter.');
              setEmail('');
            });
          }}
        >
          <Field
            label="Invite an author by e-mail address"
            hint="They can change and publish it. Deleting it, its address and mailings stay with the owner."
          >
            {(control) => (
              <input
                {...control}
                className="input"
                type="email"
                required
                maxLength={320}
                value={email}
                onChange={(event) => setEmail(event.currentTarget.value)}
              />
            )}
          </Field>
          <p className="share-deeds">
            <button type="submit" className="btn small-btn" disabled={email.trim() === ''}>
              Invite
            </button>
            <span role="status" className="small">
              {said}
            </span>
          </p>
        </form>
      ) : null}
    </section>
  );
}

interface LinksProps {
  readonly links: readonly DraftLink[];
  readonly onMake: (label: string) => Promise<string | null>;
  readonly onRevoke: (link: DraftLink) => void;
}

function Links({ links, onMake, onRevoke }: LinksProps) {
  const [label, setLabel] = useState('');
  const [made, setMade] = useState<string | null>(null);
  return (
    <section className="share-part">
      <h3>Draft links</h3>
      <p className="small">
        Whoever has a link reads the project as it is saved now, at any size, before it is published. Nobody can change
        anything by it. Stop it when it has done its work.
      </p>
      <ul className="share-list">
        {links.map((link) => (
          <li key={link.id}>
            <span>
              <b>{link.label || 'Without a name'}</b>, made {new Date(link.createdAt).toLocaleDateString('en-GB')}
              {link.revokedAt === null ? '' : ', stopped'}
            </span>
            {link.revokedAt === null ? (
              <button type="button" className="btn small-btn" onClick={() => onRevoke(link)}>
                Stop this link<span className="visually-hidden">: {link.label}</span>
              </button>
            ) : null}
          </li>
        ))}
      </ul>
      {made === null ? null : (
        <div className="note">
          <p>
            <b>Copy it now.</b> It is shown this once; only its mark is kept here.
          </p>
          <input
            className="input"
            readOnly
            aria-label="The new draft link"
            value={made}
            onFocus={(event) => event.currentTarget.select()}
          />
        </div>
      )}
      <form
        onSubmit={(event) => {
          event.preventDefault();
          void onMake(label).then((link) => {
            if (link === null) return;
            setMade(link);
            setLabel('');
          });
        }}
      >
        <Field label="For whom" hint="Only you see this. It tells links apart.">
          {(control) => (
            <input
              {...control}
              className="input"
              maxLength={LABEL_LIMIT}
              value={label}
              onChange={(event) => setLabel(event.currentTarget.value)}
            />
          )}
        </Field>
        <p className="share-deeds">
          <button type="submit" className="btn small-btn">
            Make a draft link
          </button>
        </p>
      </form>
    </section>
  );
}
