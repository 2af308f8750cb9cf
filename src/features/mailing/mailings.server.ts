import { randomBytes } from 'node:crypto';
import { and, desc, eq, ne } from 'drizzle-orm';
import { config } from '@/config.server';
import { db, sqlite } from '@/db/client.server';
import { mailings, subscribers, users } from '@/db/schema';
import { emailKey } from '@/features/accounts/email-key';
import { getEdition, type Edition } from '@/features/editions/editions.server';
import { openProject, type Asker } from '@/features/projects/projects.server';
import { compileMailing, MOST_BYTES, type CompiledMailing } from './compose/compile.server';
import { fillCopy, type Recipient } from './compose/fill-copy';
import { countAudience } from './fan-out.server';
import { readGate } from './gate.server';
import { queueLetter } from './letters.server';
import { missingIn, type MailingInput } from './mailing-text-input';
import type { MailingView, SendingView } from './mailing-view';
import { acceptedSince, countDeliveries, troublesOf } from './outbox.server';
import { listHeaders, senderParts } from './sender';
import { workerSeenAt } from './worker-lease.server';

export interface Sender extends Asker {
  readonly name: string;
  readonly email: string;
}
type Row = typeof mailings.$inferSelect;

/** A mailing with the edition that it is about. */
export interface OpenMailing {
  readonly row: Row;
  readonly edition: Edition;
}

/**
 * The mailing of a project's newest edition, begun with words from the edition when there is none yet; null when the
 * project is not the asker's, `'unpublished'` when it has no edition. An edition has one mailing, ever.
 */
export function mailingOfNewest(projectId: string, asker: Asker): OpenMailing | 'unpublished' | null {
  const project = openProject(projectId, asker);
  // A letter goes out in the owner's name and is answered to the owner.
  if (!project || project.standing === 'co-author') return null;
  const edition = getEdition(project.slug);
  if (!edition) return 'unpublished';
  db.insert(mailings)
    .values({
      id: randomBytes(9).toString('hex'),
      projectId,
      edition: edition.n,
      authorId: edition.author.id,
      ...firstWords(edition),
    })
    .onConflictDoNothing({ target: [mailings.projectId, mailings.edition] })
    .run();
  const row = db
    .select()
    .from(mailings)
    .where(and(eq(mailings.projectId, projectId), eq(mailings.edition, edition.n)))
    .get();
  return row ? { row, edition } : null;
}

const firstWords = ({ n, title, summary }: Edition) => ({
  subject: (n === 1 ? `New: ${title}` : `Corrected: ${title}`).slice(0, 70),
  greeting: 'Hello [name],',
  excerpt: n === 1 ? summary : `${title} has a new edition. What changed stands below.`,
});

/** A mailing that the asker may see and change; null for all others, also when it does not exist. */
export function openMailing(id: string, asker: Asker): OpenMailing | null {
  const row = db.select().from(mailings).where(eq(mailings.id, id)).get();
  if (!row) return null;
  const project = openProject(row.projectId, asker);
  if (!project || project.standing === 'co-author') return null;
  const edition = getEdition(project.slug, row.edition, { withdrawn: true });
  return edition ? { row, edition } : null;
}

export interface EarlierMailing {
  readonly edition: number;
  readonly subject: string;
  readonly state: string;
  readonly startedAt: number | null;
  readonly accepted: number;
  readonly total: number;
}

/** Mailings of the project's other editions, newest first; drafts that were never sent are left out. */
export function earlierMailings({ row }: OpenMailing): readonly EarlierMailing[] {
  return db
    .select()
    .from(mailings)
    .where(and(eq(mailings.projectId, row.projectId), ne(mailings.id, row.id), ne(mailings.state, 'draft')))
    .orderBy(desc(mailings.edition))
    .all()
    .map(({ id, edition, subject, state, messageDate }) => {
      const { accepted, total } = countDeliveries(id);
      return { edition, subject, state, startedAt: messageDate?.getTime() ?? null, accepted, total };
    });
}

export type SaveOutcome =
  | { readonly ok: true; readonly revision: number; readonly updatedAt: number }
  | { readonly ok: false; readonly code: 'changed meanwhile'; readonly revision: number; readonly updatedAt: number }
  | { readonly ok: false; readonly code: 'being sent' };

export function saveMailing(
  { row }: OpenMailing,
  input: MailingInput,
  revision: number,
  now = Date.now(),
): SaveOutcome {
  const saved = db
    .update(mailings)
    .set({ ...input, revision: revision + 1, updatedAt: new Date(now) })
    .where(and(eq(mailings.id, row.id), eq(mailings.revision, revision), eq(mailings.state, 'draft')))
    .run();
  if (saved.changes > 0) return { ok: true, revision: revision + 1, updatedAt: now };
  const there = db.select().from(mailings).where(eq(mailings.id, row.id)).get() ?? row;
  if (there.state !== 'draft') return { ok: false, code: 'being sent' };
  return { ok: false, code: 'changed meanwhile', revision: there.revision, updatedAt: there.updatedAt.getTime() };
}

const compileRow = ({ row, edition }: OpenMailing): Promise<CompiledMailing> => compileMailing(edition, row);

const SAMPLE: Recipient = {
  address: 'sample.reader@mail.example',
  name: 'Sample Reader',
  units: 'in',
  leaveToken: 'sample',
  confirmedAt: Date.UTC(2026, 1, 2),
};

/** Both parts as a made-up person would get them. */
export async function previewMailing(
  mailing: OpenMailing,
  { units, name = SAMPLE.name }: { units: Recipient['units']; name?: string | null },
) {
  const compiled = await compileRow(mailing);
  return fillCopy({ ...compiled, greeting: mailing.row.greeting, siteUrl: config.siteUrl }, { ...SAMPLE, units, name });
}

/** Who a mailing says it is from. */
const senderOf = ({ edition }: OpenMailing) => {
  const { address, domain } = senderParts(config.mailFrom);
  const author = db.select({ email: users.email }).from(users).where(eq(users.id, edition.author.id)).get();
  const name = edition.author.name === config.listName ? config.listName : `${edition.author.name}, ${config.listName}`;
  return { name, address, domain, replyTo: author?.email ?? address };
};

/** Sends the mail as it stands to whoever asks for it, as a subscriber gets it but for the word in the subject. */
export async function sendTest(mailing: OpenMailing, to: Sender, now = Date.now()): Promise<void> {
  const { row, edition } = mailing;
  const subscriber = db
    .select()
    .from(subscribers)
    .where(eq(subscribers.emailKey, emailKey(to.email) ?? ''))
    .get();
  const recipient: Recipient = {
    address: to.email,
    name: subscriber?.name ?? to.name,
    units: subscriber?.units ?? edition.sizing.units,
    leaveToken: subscriber?.leaveToken ?? 'sample',
    confirmedAt: subscriber?.confirmedAt?.getTime() ?? now,
  };
  const compiled = await compileRow(mailing);
  const { html, text } = fillCopy({ ...compiled, greeting: row.greeting, siteUrl: config.siteUrl }, recipient);
  const { name, address, domain, replyTo } = senderOf(mailing);
  const list = subscriber
    ? listHeaders({ listName: config.listName, domain, siteUrl: config.siteUrl, token: subscriber.leaveToken })
    : {};
  queueLetter({
    toName: to.name,
    toAddress: to.email,
    subject: `[Test] ${row.subject}`,
    text,
    html,
    headers: { From: `"${name.replace(/["\\<>]/g, '')}" <${address}>`, 'Reply-To': replyTo, ...list },
    expiresInMinutes: 60,
  });
  db.update(mailings)
    .set({ testedAt: new Date(now) })
    .where(eq(mailings.id, row.id))
    .run();
}

export type BeginOutcome =
  | { readonly ok: true }
  | { readonly ok: false; readonly status: 409 | 412 | 422; readonly code: string; readonly sentence: string };

/**
 * Fixes the mailing as it stands in `revision` and gives it to the worker, which makes a row for each recipient and sends.
 * Asked twice, the second time finds it begun. Nothing goes out before all rows are there.
 */
export async function beginSending(mailing: OpenMailing, revision: number, now = Date.now()): Promise<BeginOutcome> {
  const { row, edition } = mailing;
  const refuse = (status: 409 | 412 | 422, code: string, sentence: string): BeginOutcome => ({
    ok: false,
    status,
    code,
    sentence,
  });
  if (row.state !== 'draft')
    return refuse(409, 'being-sent', 'This mailing has been sent already, or is being sent now.');
  if (row.revision !== revision)
    return refuse(
      412,
      'changed-meanwhile',
      'It was changed from another place meanwhile. Look at it once more, then send.',
    );
  if (!getEdition(edition.slug))
    return refuse(409, 'withdrawn', 'The project is withdrawn: put it back before you tell of it.');
  if (edition.n !== edition.newest)
    return refuse(409, 'newer-edition', `Edition ${edition.newest} is out: tell of that one.`);
  const [missing] = missingIn(row);
  if (missing) return refuse(422, 'unfinished', missing);
  if (countAudience(now).people === 0)
    return refuse(409, 'nobody', 'Nobody has confirmed yet, so there is nobody to send it to.');
  const { html, text, unitParts, bytes } = await compileRow(mailing);
  if (bytes > MOST_BYTES) {
    return refuse(
      422,
      'too-heavy',
      `The mail weighs ${Math.ceil(bytes / 1000)} kB, and past ${MOST_BYTES / 1000} kB some mail programs cut off its end. Shorten the first words or the correction note.`,
    );
  }
  const { name, replyTo } = senderOf(mailing);
  const began = db
    .update(mailings)
    .set({
      state: 'preparing',
      html,
      text,
      unitParts: unitParts as unknown as Row['unitParts'],
      fromName: name,
      replyTo,
      messageDate: new Date(now),
      updatedAt: new Date(now),
    })
    .where(and(eq(mailings.id, row.id), eq(mailings.state, 'draft'), eq(mailings.revision, revision)))
    .run();
  return began.changes > 0
    ? { ok: true }
    : refuse(409, 'being-sent', 'It was begun or changed from another place at this moment. Look at it once more.');
}

// ── As its page shows it ─────────────────────────────────────────────────────────────────────────────────────────────

export async function viewMailing(
  mailing: OpenMailing,
  { email }: Pick<Sender, 'email'>,
  now = Date.now(),
): Promise<MailingView> {
  const { row, edition } = mailing;
  const { name, address, replyTo } = senderOf(mailing);
  const isDraft = row.state === 'draft';
  return {
    id: row.id,
    projectId: row.projectId,
    edition: row.edition,
    state: row.state,
    subject: row.subject,
    greeting: row.greeting,
    excerpt: row.excerpt,
    withHero: row.withHero,
    revision: row.revision,
    updatedAt: row.updatedAt.getTime(),
    hasHero: edition.hero !== null,
    from: { name: row.fromName ?? name, address },
    replyTo: row.replyTo ?? replyTo,
    testTo: email,
    testedAt: row.testedAt?.getTime() ?? null,
    audience: isDraft ? countAudience(now) : { people: row.total, leftOut: 0 },
    bytes: isDraft ? (await compileRow(mailing)).bytes : null,
    missing: isDraft ? missingIn(row) : [],
    sending: isDraft ? null : sendingView(row, now),
  };
}

const MINUTE = 60_000;

function sendingView(row: Row, now: number): SendingView {
  const counts = countDeliveries(row.id);
  const troubles = troublesOf(row.id);
  const gate = readGate();
  const due = troubles
    .filter(({ what }) => what === 'later')
    .flatMap(({ nextAt }) => (nextAt === null ? [] : [nextAt]));
  const isBusy = row.state === 'preparing' || (row.state === 'sending' && counts.waiting > 0);
  return {
    startedAt: row.messageDate?.getTime() ?? row.updatedAt.getTime(),
    finishedAt: row.finishedAt?.getTime() ?? null,
    counts,
    troubles,
    pauseReason: row.pauseReason,
    perMinute: acceptedSince(row.id, now - MINUTE),
    nextRetryAt: due.length > 0 ? Math.min(...due) : null,
    away:
      gate && gate.opensAt > now - MINUTE && row.state === 'sending'
        ? { until: gate.opensAt, reply: gate.reply }
        : null,
    isStuck: isBusy && !gate && standsStill(row, now),
  };
}

/** No worker to be seen, or one that has done nothing for two minutes. */
function standsStill(row: Row, now: number): boolean {
  const rest = now - lastMove(row);
  return rest > 2 * MINUTE || (rest > MINUTE / 4 && now - (workerSeenAt() ?? 0) > MINUTE / 2);
}

function lastMove(row: Row): number {
  const last = sqlite()
    .prepare(
      'SELECT max(a.started_at) FROM attempt a JOIN delivery d ON d.id = a.delivery_id WHERE d.mailing_id = ? AND d.id > (SELECT max(id) - 5000 FROM delivery WHERE mailing_id = ?)',
    )
    .pluck()
    .get(row.id, row.id) as number | null;
  return Math.max(last ?? 0, row.updatedAt.getTime());
}
