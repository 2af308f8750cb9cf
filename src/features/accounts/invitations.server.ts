import { randomBytes } from 'node:crypto';
import { and, eq, gt, like } from 'drizzle-orm';
import { config } from '@/config.server';
import { db } from '@/db/client.server';
import { verificationTokens } from '@/db/schema';
import { invitationLetter } from './account-letters';
import { forgetExpiredTokens, takeToken, tokenHash } from './adapter.server';
import { addressFault, EMAIL_SENTENCE } from './email-key';
import { createPerson, emailKey, findByEmail, refused, setRole, type Person, type Refused } from './people.server';
import { post } from './post.server';

/**
 * Invitations to become an author. The link proves the address; the role is given when it is used, not before.
 * They are kept beside the sign-in links under a name that no address can have (a colon stands in none).
 */
const INVITATION_DAYS = 7;
const MARK = 'invite:';

export interface Invitation {
  readonly email: string;
  readonly expires: Date;
}

/** Sends an invitation; an older one to the same address stops working. */
export function invite(
  email: string,
  invitedBy: string,
): { readonly ok: true; readonly invitation: Invitation } | Refused {
  const key = emailKey(email);
  const fault = addressFault(email);
  if (!key || fault) return refused('no-address', fault ?? EMAIL_SENTENCE);
  const person = findByEmail(key);
  if (person?.disabledAt) return refused('disabled', `${key} is disabled. Enable the account first.`);
  if (person && person.role !== 'reader')
    return refused('already', `${key} is ${person.role === 'admin' ? 'an admin' : 'an author'} already.`);

  const token = randomBytes(32).toString('base64url');
  const expires = new Date(Date.now() + INVITATION_DAYS * 86_400_000);
  forgetExpiredTokens();
  db.transaction((tx) => {
    tx.delete(verificationTokens)
      .where(eq(verificationTokens.identifier, MARK + key))
      .run();
    tx.insert(verificationTokens)
      .values({ identifier: MARK + key, token: tokenHash(token), expires })
      .run();
  });
  const address = `${config.siteUrl}/sign-up/invitation?${new URLSearchParams({ email: key, token })}`;
  post(
    { email: person?.email ?? email.trim(), name: person?.name },
    invitationLetter({ address, invitedBy, days: INVITATION_DAYS }),
    INVITATION_DAYS * 1440,
  );
  return { ok: true, invitation: { email: key, expires } };
}

/** Those that were sent, not used and still work. */
export function openInvitations(): Invitation[] {
  const open = and(like(verificationTokens.identifier, `${MARK}%`), gt(verificationTokens.expires, new Date()));
  const rows = db.select().from(verificationTokens).where(open).orderBy(verificationTokens.expires).all();
  return rows.map(({ identifier, expires }) => ({ email: identifier.slice(MARK.length), expires }));
}

/** Makes the invitation to this address stop working. False when there was none. */
export function withdrawInvitation(email: string): boolean {
  return (
    db
      .delete(verificationTokens)
      .where(eq(verificationTokens.identifier, MARK + emailKey(email)))
      .run().changes > 0
  );
}

/** The invitation behind a link, without using it up; null when it is too old, withdrawn or used. */
export function readInvitation(email: string, token: string): (Invitation & { readonly person: Person | null }) | null {
  const matches = and(
    eq(verificationTokens.identifier, MARK + emailKey(email)),
    eq(verificationTokens.token, tokenHash(token)),
  );
  const row = db
    .select()
    .from(verificationTokens)
    .where(and(matches, gt(verificationTokens.expires, new Date())))
    .get();
  const person = findByEmail(email) ?? null;
  return row && !person?.disabledAt ? { email: row.identifier.slice(MARK.length), expires: row.expires, person } : null;
}

/** Makes the author. Name and password are for those who have no account yet; others keep theirs. */
export async function acceptInvitation(
  { email, token }: { email: string; token: string },
  { name, password }: { name: string; password: string },
): Promise<{ readonly ok: true; readonly person: Person } | Refused> {
  const invitation = readInvitation(email, token);
  const taken = invitation && takeToken(MARK + invitation.email, tokenHash(token));
  if (!invitation || !taken) return refused('no-invitation', 'This invitation no longer works. Ask for a new one.');
  return invitation.person
    ? setRole(invitation.person.id, invitation.person.role === 'admin' ? 'admin' : 'author')
    : createPerson({ email: invitation.email, name, password, role: 'author' });
}
