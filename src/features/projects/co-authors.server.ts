import { randomUUID } from 'node:crypto';
import { and, asc, count, eq, isNull } from 'drizzle-orm';
import { config } from '@/config.server';
import { db } from '@/db/client.server';
import { coAuthors, projects, users } from '@/db/schema';
import { coAuthorLetter } from '@/features/accounts/account-letters';
import { addressFault, emailKey } from '@/features/accounts/email-key';
import { findByEmail, personName, refused, type Refused } from '@/features/accounts/people.server';
import { post } from '@/features/accounts/post.server';
import type { CoAuthor, Invited } from './sharing';
import { openRow, type Asker } from './project-access.server';

const MOST = 20;

/** Who works on a project besides its owner; the addresses of open invitations are for the owner alone. */
export function listCoAuthors(projectId: string, asker: Asker): readonly CoAuthor[] {
  const opened = openRow(db, projectId, asker);
  if (opened === null) return [];
  return db
    .select({
      id: coAuthors.id,
      emailKey: coAuthors.emailKey,
      state: coAuthors.state,
      userId: users.id,
      name: users.name,
    })
    .from(coAuthors)
    .leftJoin(users, eq(coAuthors.userId, users.id))
    .where(eq(coAuthors.projectId, projectId))
    .orderBy(asc(coAuthors.createdAt))
    .all()
    .filter(({ state }) => state === 'accepted' || opened.standing !== 'co-author')
    .map(({ id, emailKey: address, state, userId, name }) => ({
      id,
      state,
      name: state === 'accepted' ? (name ?? 'Unnamed') : address,
      isAsker: userId === asker.id,
    }));
}

/**
 * Invites whoever has this address. An author hears of it by letter and in the workroom; for an address without an author the
 * invitation waits, and the answer is the same, so that nobody learns who has an account. Null: not the asker's project.
 */
export function inviteCoAuthor(
  projectId: string,
  asker: Asker & { readonly name: string },
  email: string,
): { readonly ok: true } | Refused | null {
  const opened = openRow(db, projectId, asker, { ownerOnly: true });
  if (opened === null) return null;
  const key = emailKey(email);
  const fault = addressFault(email);
  if (key === null || fault !== null) return refused('no-address', fault ?? 'That is no e-mail address.');
  const person = findByEmail(key);
  if (person?.id === opened.row.authorId) return refused('owner', 'That is the owner’s own address.');
  const there = db.select({ n: count() }).from(coAuthors).where(eq(coAuthors.projectId, projectId)).get();
  if ((there?.n ?? 0) >= MOST) return refused('many', `At most ${MOST} people can be asked to work on one project.`);
  const added = db
    .insert(coAuthors)
    .values({ id: randomUUID(), projectId, emailKey: key, invitedBy: asker.id, state: 'invited' })
    .onConflictDoNothing()
    .run();
  if (added.changes === 0) return refused('already', 'This address is invited already.');
  if (person && !person.disabledAt && person.role !== 'reader') {
    const title = opened.row.title || 'a project';
    post(person, coAuthorLetter({ address: `${config.siteUrl}/workroom`, invitedBy: asker.name, title }), 7 * 24 * 60);
  }
  return { ok: true };
}

/** Invitations that wait for this person, newest last. */
export function invitationsFor(user: { readonly email: string }): readonly Invited[] {
  return db
    .select({ id: coAuthors.id, title: projects.title, by: users })
    .from(coAuthors)
    .innerJoin(projects, eq(coAuthors.projectId, projects.id))
    .leftJoin(users, eq(coAuthors.invitedBy, users.id))
    .where(waitingFor(user.email))
    .orderBy(asc(coAuthors.createdAt))
    .all()
    .map(({ id, title, by }) => ({ id, title: title || 'Untitled', from: by ? personName(by) : 'A former author' }));
}

/** Takes or declines an invitation to one's own address; the project's id, or null when there is none. */
export function answerInvitation(
  id: string,
  user: Asker & { readonly email: string },
  { accept }: { readonly accept: boolean },
): string | null {
  return db.transaction(
    (tx) => {
      const row = tx
        .select({ projectId: coAuthors.projectId })
        .from(coAuthors)
        .innerJoin(projects, eq(coAuthors.projectId, projects.id))
        .where(and(eq(coAuthors.id, id), waitingFor(user.email)))
        .get();
      if (row === undefined) return null;
      if (accept)
        tx.update(coAuthors)
          .set({ state: 'accepted', userId: user.id, acceptedAt: new Date() })
          .where(eq(coAuthors.id, id))
          .run();
      else tx.delete(coAuthors).where(eq(coAuthors.id, id)).run();
      return row.projectId;
    },
    { behavior: 'immediate' },
  );
}

/** Ends a part in a project: the owner anybody's, a co-author their own. False when there is no such part or not so. */
export function removeCoAuthor(projectId: string, id: string, asker: Asker): boolean {
  const opened = openRow(db, projectId, asker);
  if (opened === null) return false;
  const theirs = opened.standing === 'co-author' ? eq(coAuthors.userId, asker.id) : undefined;
  return (
    db
      .delete(coAuthors)
      .where(and(eq(coAuthors.projectId, projectId), eq(coAuthors.id, id), theirs))
      .run().changes > 0
  );
}

const waitingFor = (email: string) =>
  and(eq(coAuthors.emailKey, emailKey(email) ?? ''), eq(coAuthors.state, 'invited'), isNull(projects.deletedAt));
