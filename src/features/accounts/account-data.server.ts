import { and, asc, eq, inArray, or, sql } from 'drizzle-orm';
import { db, type Transaction } from '@/db/client.server';
import {
  coAuthors,
  editions,
  letters,
  mailings,
  ownPatterns,
  projects,
  revisions,
  sheets,
  subscribers,
  uploads,
  users,
} from '@/db/schema';
import { dropPictureFiles } from '@/features/uploads/storage.server';
import { GONE_DOMAIN, lastAdmin, type Person, type Refused } from './people.server';

/** Everything kept about a person, for themselves: no hashes, tokens or other people's data. */
export function exportOwnData(person: Person) {
  const own = db.select().from(projects).where(eq(projects.authorId, person.id)).all();
  const ids = own.map((project) => project.id);
  const subscription = db.select().from(subscribers).where(eq(subscribers.emailKey, person.emailKey)).get();
  return {
    format: 'foldwright own data',
    version: 1,
    account: {
      name: person.name,
      email: person.email,
      role: person.role,
      createdAt: person.createdAt,
      addressProvedAt: person.emailVerified,
      hasPassword: person.passwordHash !== null,
    },
    subscription: subscription
      ? {
          state: subscription.state,
          name: subscription.name,
          units: subscription.units,
          since: subscription.createdAt,
          confirmedAt: subscription.confirmedAt,
          leftAt: subscription.leftAt,
        }
      : null,
    sheets: db
      .select({ card: sheets.card, count: sheets.count })
      .from(sheets)
      .where(eq(sheets.userId, person.id))
      .orderBy(sheets.place)
      .all(),
    projects: own,
    revisions:
      ids.length > 0
        ? db.select().from(revisions).where(inArray(revisions.projectId, ids)).orderBy(revisions.n).all()
        : [],
    sharedWithMe: db
      .select({ title: projects.title, address: projects.slug, since: coAuthors.acceptedAt })
      .from(coAuthors)
      .innerJoin(projects, eq(coAuthors.projectId, projects.id))
      .where(eq(coAuthors.userId, person.id))
      .all(),
    patterns: db.select().from(ownPatterns).where(eq(ownPatterns.ownerId, person.id)).all(),
    editions:
      ids.length > 0
        ? db.select().from(editions).where(inArray(editions.projectId, ids)).orderBy(editions.publishedAt).all()
        : [],
    pictures: db
      .select()
      .from(uploads)
      .where(eq(uploads.ownerId, person.id))
      .all()
      .map((upload) => ({ ...upload, address: `/media/${upload.id}-1600.webp` })),
    mailings: db
      .select({
        subject: mailings.subject,
        greeting: mailings.greeting,
        excerpt: mailings.excerpt,
        state: mailings.state,
        total: mailings.total,
        createdAt: mailings.createdAt,
      })
      .from(mailings)
      .where(eq(mailings.authorId, person.id))
      .all(),
    letters: db
      .select({ subject: letters.subject, state: letters.state, createdAt: letters.createdAt })
      .from(letters)
      .where(sql`lower(${letters.toAddress}) = ${person.emailKey}`)
      .orderBy(letters.createdAt)
      .all(),
  };
}

/** What deleting the account would leave standing. */
export function whatStays(personId: string): { readonly published: number; readonly drafts: number } {
  const own = db.select({ id: projects.id }).from(projects).where(eq(projects.authorId, personId)).all();
  const published = publishedAmong(
    db,
    own.map(({ id }) => id),
  ).length;
  return { published, drafts: own.length - published };
}

export type Deletion = { readonly ok: true } | Refused;

/**
 * Deletes an account. Projects that others work on become theirs. Drafts go, and pictures that no edition and nobody else's project shows. Editions stay: readers have
 * cut card by them. When something stays, a row stays with it, emptied of address and password, under the person's
 * name or as "A former author". A subscription to the list is kept apart from accounts and is not touched.
 */
export async function deleteAccount(person: Person, { keepName }: { keepName: boolean }): Promise<Deletion> {
  const outcome = db.transaction((tx) => removePerson(tx, person, keepName), { behavior: 'immediate' });
  if (!outcome.ok) return outcome;
  for (const id of outcome.pictures) await dropPictureFiles(id);
  return { ok: true };
}

function removePerson(tx: Transaction, person: Person, keepName: boolean): { ok: true; pictures: string[] } | Refused {
  const fault = lastAdmin(person, 'Make somebody else an admin before you delete this account.');
  if (fault) return fault;
  handOver(tx, person.id);
  const own = tx
    .select({ id: projects.id })
    .from(projects)
    .where(eq(projects.authorId, person.id))
    .all()
    .map(({ id }) => id);
  const kept = publishedAmong(tx, own);
  const pictures = unusedPictures(tx, person.id, kept);
  if (pictures.length > 0) tx.delete(uploads).where(inArray(uploads.id, pictures)).run();
  // The person's row may stay, emptied: what they have at home goes in any case.
  tx.delete(sheets).where(eq(sheets.userId, person.id)).run();
  tx.delete(ownPatterns).where(eq(ownPatterns.ownerId, person.id)).run();
  tx.delete(coAuthors)
    .where(or(eq(coAuthors.userId, person.id), eq(coAuthors.emailKey, person.emailKey)))
    .run();
  const drafts = own.filter((id) => !kept.includes(id));
  if (drafts.length > 0) tx.delete(projects).where(inArray(projects.id, drafts)).run();

  if (kept.length === 0 && !isReferredTo(tx, person.id)) {
    tx.delete(users).where(eq(users.id, person.id)).run();
  } else {
    const address = `${person.id}@${GONE_DOMAIN}`;
    tx.update(users)
      .set({
        name: keepName ? person.name : 'A former author',
        email: address,
        emailKey: address,
        emailVerified: null,
        passwordHash: null,
        role: 'reader',
        disabledAt: new Date(),
        sessionVersion: person.sessionVersion + 1,
      })
      .where(eq(users.id, person.id))
      .run();
  }
  return { ok: true, pictures };
}

/** What others work on as well is theirs from then on: whoever came first owns it. */
function handOver(tx: Transaction, ownerId: string): void {
  const parts = tx
    .select({ id: coAuthors.id, projectId: coAuthors.projectId, userId: coAuthors.userId })
    .from(coAuthors)
    .innerJoin(projects, eq(coAuthors.projectId, projects.id))
    .where(and(eq(projects.authorId, ownerId), eq(coAuthors.state, 'accepted')))
    .orderBy(asc(coAuthors.acceptedAt))
    .all();
  for (const { id, projectId, userId } of parts) {
    if (userId === null) continue;
    const handed = tx
      .update(projects)
      .set({ authorId: userId })
      .where(and(eq(projects.id, projectId), eq(projects.authorId, ownerId)))
      .run();
    if (handed.changes > 0) tx.delete(coAuthors).where(eq(coAuthors.id, id)).run();
  }
}

function publishedAmong(tx: Pick<Transaction, 'selectDistinct'>, ids: readonly string[]): string[] {
  if (ids.length === 0) return [];
  const told = tx
    .selectDistinct({ id: editions.projectId })
    .from(editions)
    .where(inArray(editions.projectId, [...ids]))
    .all();
  return told.map(({ id }) => id);
}

/** Own pictures whose id stands in no edition and in no project that stays. Ids are random, so their text is enough. */
function unusedPictures(tx: Transaction, ownerId: string, keptProjects: readonly string[]): string[] {
  const pictures = tx.select({ id: uploads.id }).from(uploads).where(eq(uploads.ownerId, ownerId)).all();
  return pictures
    .map(({ id }) => id)
    .filter((id) => {
      const shows = (table: typeof editions | typeof projects) =>
        or(eq(table.heroUploadId, id), sql`instr(${table.writeUp}, ${id}) > 0`);
      const inEdition = tx.select({ id: editions.id }).from(editions).where(shows(editions)).limit(1).get();
      const stays =
        keptProjects.length > 0
          ? or(sql`${projects.authorId} <> ${ownerId}`, inArray(projects.id, [...keptProjects]))
          : sql`${projects.authorId} <> ${ownerId}`;
      const inProject = tx
        .select({ id: projects.id })
        .from(projects)
        .where(and(shows(projects), stays))
        .limit(1)
        .get();
      return !inEdition && !inProject;
    });
}

function isReferredTo(tx: Transaction, id: string): boolean {
  return Boolean(
    tx.select({ id: uploads.id }).from(uploads).where(eq(uploads.ownerId, id)).limit(1).get() ??
    tx.select({ id: editions.id }).from(editions).where(eq(editions.publishedBy, id)).limit(1).get() ??
    tx.select({ id: mailings.id }).from(mailings).where(eq(mailings.authorId, id)).limit(1).get(),
  );
}
