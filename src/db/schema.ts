import { sql } from 'drizzle-orm';
import { index, integer, primaryKey, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';
import type { Pattern, Sizing } from '../engine';
import type { WriteUp } from '../writeup/document';

/** Every instant is a UTC epoch in milliseconds; every id is a random text unless it says otherwise. */
const now = sql`(unixepoch('subsec') * 1000)`;
const createdAt = () => integer('created_at', { mode: 'timestamp_ms' }).notNull().default(now);

export const ROLES = ['admin', 'author', 'reader'] as const;
export type Role = (typeof ROLES)[number];

// ── People ───────────────────────────────────────────────────────────────────────────────────────────────────────────

export const users = sqliteTable('user', {
  id: text('id').primaryKey(),
  name: text('name'),
  /** As typed; `emailKey` is what is compared. */
  email: text('email').notNull(),
  emailKey: text('email_key').notNull().unique(),
  emailVerified: integer('email_verified', { mode: 'timestamp_ms' }),
  image: text('image'),
  /** argon2id; null for those who only use links by mail. */
  passwordHash: text('password_hash'),
  role: text('role', { enum: ROLES }).notNull().default('reader'),
  disabledAt: integer('disabled_at', { mode: 'timestamp_ms' }),
  /** Raised to end every session of this person. */
  sessionVersion: integer('session_version').notNull().default(1),
  createdAt: createdAt(),
});

export const verificationTokens = sqliteTable(
  'verification_token',
  {
    identifier: text('identifier').notNull(),
    token: text('token').notNull(),
    expires: integer('expires', { mode: 'timestamp_ms' }).notNull(),
  },
  (t) => [primaryKey({ columns: [t.identifier, t.token] })],
);

/** Auth.js wants the table; nobody signs in through another site. */
export const accounts = sqliteTable(
  'account',
  {
    userId: text('user_id')
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
    type: text('type').notNull(),
    provider: text('provider').notNull(),
    providerAccountId: text('provider_account_id').notNull(),
  },
  (t) => [primaryKey({ columns: [t.provider, t.providerAccountId] })],
);

/** The sheets that a reader has, in their own order; `card` is a sheet as links write it. */
export const sheets = sqliteTable(
  'sheet',
  {
    userId: text('user_id')
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
    card: text('card').notNull(),
    count: integer('count').notNull(),
    place: integer('place').notNull(),
  },
  (t) => [primaryKey({ columns: [t.userId, t.card] })],
);

// ── Projects and editions ────────────────────────────────────────────────────────────────────────────────────────────

export const projects = sqliteTable(
  'project',
  {
    id: text('id').primaryKey(),
    authorId: text('author_id')
      .notNull()
      .references(() => users.id),
    slug: text('slug').notNull().unique(),
    title: text('title').notNull(),
    /** One line of what it is. */
    summary: text('summary').notNull().default(''),
    /** Minutes at the table; null when the author has not said. */
    minutes: integer('minutes'),
    pattern: text('pattern', { mode: 'json' }).$type<Pattern>().notNull(),
    /** The author's own sizing: what readers see first. */
    sizing: text('sizing', { mode: 'json' }).$type<Sizing>().notNull(),
    writeUp: text('write_up', { mode: 'json' }).$type<WriteUp>().notNull(),
    heroUploadId: text('hero_upload_id'),
    /** Raised by every save; a save names the one it changes. */
    revision: integer('revision').notNull().default(1),
    /** The revision that the newest edition was made from. */
    publishedRevision: integer('published_revision'),
    deletedAt: integer('deleted_at', { mode: 'timestamp_ms' }),
    /** Taken back from readers: its page says so with the reason, lists leave it out. */
    withdrawnAt: integer('withdrawn_at', { mode: 'timestamp_ms' }),
    withdrawnReason: text('withdrawn_reason').notNull().default(''),
    createdAt: createdAt(),
    updatedAt: integer('updated_at', { mode: 'timestamp_ms' }).notNull().default(now),
  },
  (t) => [index('project_author').on(t.authorId, t.updatedAt)],
);

/** What a project holds, as one document. */
export interface KeptState {
  readonly title: string;
  readonly summary: string;
  readonly minutes: number | null;
  readonly hero: string | null;
  readonly pattern: Pattern;
  readonly sizing: Sizing;
  readonly writeUp: WriteUp;
}
export const REVISION_KINDS = ['saved', 'merged', 'restored', 'set aside', 'published', 'scheduled'] as const;
/** States that were saved, each under the number that the project had with it. Older ones are thinned, never all. */
export const revisions = sqliteTable(
  'revision',
  {
    projectId: text('project_id')
      .notNull()
      .references(() => projects.id, { onDelete: 'cascade' }),
    n: integer('n').notNull(),
    state: text('state', { mode: 'json' }).$type<KeptState>().notNull(),
    /** Only `saved` and `merged` are thinned. */
    kind: text('kind', { enum: REVISION_KINDS }).notNull().default('saved'),
    savedBy: text('saved_by').references(() => users.id, { onDelete: 'set null' }),
    savedAt: integer('saved_at', { mode: 'timestamp_ms' }).notNull().default(now),
  },
  (t) => [primaryKey({ columns: [t.projectId, t.n] })],
);

/** Others who may work on a project. An invitation waits under its address until its owner takes it. */
export const coAuthors = sqliteTable(
  'co_author',
  {
    id: text('id').primaryKey(),
    projectId: text('project_id')
      .notNull()
      .references(() => projects.id, { onDelete: 'cascade' }),
    /** The address that was invited, in the form that is compared. */
    emailKey: text('email_key').notNull(),
    /** Who took the invitation; null until then. */
    userId: text('user_id').references(() => users.id, { onDelete: 'cascade' }),
    invitedBy: text('invited_by').references(() => users.id, { onDelete: 'set null' }),
    state: text('state', { enum: ['invited', 'accepted'] }).notNull(),
    createdAt: createdAt(),
    acceptedAt: integer('accepted_at', { mode: 'timestamp_ms' }),
  },
  (t) => [
    uniqueIndex('co_author_address').on(t.projectId, t.emailKey),
    index('co_author_person').on(t.userId),
    index('co_author_invited').on(t.emailKey),
  ],
);

/** Links by which somebody trusted reads a project before it is published. */
export const draftLinks = sqliteTable(
  'draft_link',
  {
    id: text('id').primaryKey(),
    projectId: text('project_id')
      .notNull()
      .references(() => projects.id, { onDelete: 'cascade' }),
    /** SHA-256 of what stands in the link. */
    tokenHash: text('token_hash').notNull().unique(),
    /** Whom it is for, in the author's words. */
    label: text('label').notNull().default(''),
    createdAt: createdAt(),
    revokedAt: integer('revoked_at', { mode: 'timestamp_ms' }),
  },
  (t) => [index('draft_link_project').on(t.projectId)],
);

/** A revision that becomes an edition by itself when its time comes. */
export const schedules = sqliteTable('schedule', {
  projectId: text('project_id')
    .primaryKey()
    .references(() => projects.id, { onDelete: 'cascade' }),
  revision: integer('revision').notNull(),
  note: text('note').notNull().default(''),
  publishAt: integer('publish_at', { mode: 'timestamp_ms' }).notNull(),
  setBy: text('set_by')
    .notNull()
    .references(() => users.id, { onDelete: 'cascade' }),
  /** Why it was not published when its time came; null while it waits. */
  problem: text('problem'),
  createdAt: createdAt(),
});

/** Addresses that a published project had before. */
export const slugRedirects = sqliteTable(
  'slug_redirect',
  {
    slug: text('slug').primaryKey(),
    projectId: text('project_id')
      .notNull()
      .references(() => projects.id, { onDelete: 'cascade' }),
    createdAt: createdAt(),
  },
  (t) => [index('slug_redirect_project').on(t.projectId)],
);

/** Text brought in to be written up: a transcript, an old article. */
export const sourceTexts = sqliteTable(
  'source_text',
  {
    id: text('id').primaryKey(),
    projectId: text('project_id')
      .notNull()
      .references(() => projects.id, { onDelete: 'cascade' }),
    name: text('name').notNull(),
    kind: text('kind').notNull(),
    text: text('text').notNull(),
    createdAt: createdAt(),
  },
  (t) => [index('source_text_project').on(t.projectId)],
);

/** Patterns that an author keeps to begin projects from. */
export const ownPatterns = sqliteTable(
  'own_pattern',
  {
    id: text('id').primaryKey(),
    ownerId: text('owner_id')
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
    name: text('name').notNull(),
    pattern: text('pattern', { mode: 'json' }).$type<Pattern>().notNull(),
    createdAt: createdAt(),
    updatedAt: integer('updated_at', { mode: 'timestamp_ms' }).notNull().default(now),
  },
  (t) => [index('own_pattern_owner').on(t.ownerId, t.name)],
);

/** A published, frozen state of a project. Rows are never changed. */
export const editions = sqliteTable(
  'edition',
  {
    id: text('id').primaryKey(),
    projectId: text('project_id')
      .notNull()
      .references(() => projects.id),
    n: integer('n').notNull(),
    title: text('title').notNull(),
    summary: text('summary').notNull(),
    minutes: integer('minutes'),
    pattern: text('pattern', { mode: 'json' }).$type<Pattern>().notNull(),
    sizing: text('sizing', { mode: 'json' }).$type<Sizing>().notNull(),
    writeUp: text('write_up', { mode: 'json' }).$type<WriteUp>().notNull(),
    heroUploadId: text('hero_upload_id'),
    /** What changed and why it matters to someone who already cut; empty on the first. */
    correctionNote: text('correction_note').notNull().default(''),
    publishedBy: text('published_by')
      .notNull()
      .references(() => users.id),
    publishedAt: integer('published_at', { mode: 'timestamp_ms' }).notNull().default(now),
  },
  (t) => [uniqueIndex('edition_project_n').on(t.projectId, t.n)],
);

/** Pictures, re-encoded; the files lie in storage under their id. Never deleted while an edition shows them. */
export const uploads = sqliteTable('upload', {
  id: text('id').primaryKey(),
  ownerId: text('owner_id')
    .notNull()
    .references(() => users.id),
  projectId: text('project_id').references(() => projects.id, { onDelete: 'set null' }),
  width: integer('width').notNull(),
  height: integer('height').notNull(),
  bytes: integer('bytes').notNull(),
  createdAt: createdAt(),
});

// ── Subscribers and mailings ─────────────────────────────────────────────────────────────────────────────────────────

export const subscribers = sqliteTable('subscriber', {
  id: text('id').primaryKey(),
  name: text('name'),
  email: text('email').notNull(),
  /** Trimmed, NFC, lower case: what is compared. */
  emailKey: text('email_key').notNull().unique(),
  state: text('state', { enum: ['pending', 'confirmed', 'left'] }).notNull(),
  units: text('units', { enum: ['in', 'mm', 'cm'] })
    .notNull()
    .default('in'),
  /** SHA-256 of the confirmation token; null once used. */
  confirmHash: text('confirm_hash'),
  confirmExpires: integer('confirm_expires', { mode: 'timestamp_ms' }),
  /** Opaque, stands in the unsubscribe links of every mail. */
  leaveToken: text('leave_token').notNull().unique(),
  confirmedAt: integer('confirmed_at', { mode: 'timestamp_ms' }),
  leftAt: integer('left_at', { mode: 'timestamp_ms' }),
  createdAt: createdAt(),
});

/** Addresses that must not be written to, whoever asks. */
export const suppressions = sqliteTable('suppression', {
  emailKey: text('email_key').primaryKey(),
  reason: text('reason', { enum: ['hard', 'complaint', 'manual'] }).notNull(),
  createdAt: createdAt(),
});

export const MAILING_STATES = ['draft', 'preparing', 'sending', 'paused', 'done', 'cancelled'] as const;
export const mailings = sqliteTable(
  'mailing',
  {
    id: text('id').primaryKey(),
    projectId: text('project_id')
      .notNull()
      .references(() => projects.id),
    edition: integer('edition').notNull(),
    authorId: text('author_id')
      .notNull()
      .references(() => users.id),
    state: text('state', { enum: MAILING_STATES }).notNull().default('draft'),
    subject: text('subject').notNull(),
    greeting: text('greeting').notNull(),
    excerpt: text('excerpt').notNull(),
    withHero: integer('with_hero', { mode: 'boolean' }).notNull().default(true),
    revision: integer('revision').notNull().default(1),
    /** Compiled once when sending begins, with slots for what is personal. */
    html: text('html'),
    text: text('text'),
    /** The same Date header on every copy and every resend. */
    messageDate: integer('message_date', { mode: 'timestamp_ms' }),
    preparedAt: integer('prepared_at', { mode: 'timestamp_ms' }),
    total: integer('total').notNull().default(0),
    /** Fixed when sending begins, so that a resend is the same mail to the byte. */
    fromName: text('from_name'),
    replyTo: text('reply_to'),
    /** What stands in the slots that depend on a subscriber's units, worked out once for each. */
    unitParts: text('unit_parts', { mode: 'json' }).$type<Record<'in' | 'mm' | 'cm', Record<string, string>>>(),
    pauseReason: text('pause_reason'),
    finishedAt: integer('finished_at', { mode: 'timestamp_ms' }),
    testedAt: integer('tested_at', { mode: 'timestamp_ms' }),
    createdAt: createdAt(),
    updatedAt: integer('updated_at', { mode: 'timestamp_ms' }).notNull().default(now),
  },
  (t) => [uniqueIndex('mailing_edition').on(t.projectId, t.edition)],
);

export const DELIVERY_STATES = [
  'queued',
  'leased',
  'in_flight',
  'accepted',
  'rejected',
  'unknown',
  'suppressed',
  'cancelled',
  'expired',
] as const;
/** One recipient's copy. The only truth about what was sent. */
export const deliveries = sqliteTable(
  'delivery',
  {
    id: integer('id').primaryKey({ autoIncrement: true }),
    mailingId: text('mailing_id')
      .notNull()
      .references(() => mailings.id),
    subscriberId: text('subscriber_id')
      .notNull()
      .references(() => subscribers.id),
    emailKey: text('email_key').notNull(),
    state: text('state', { enum: DELIVERY_STATES }).notNull().default('queued'),
    attempts: integer('attempts').notNull().default(0),
    /** How often the answer to a whole message was lost. */
    unknowns: integer('unknowns').notNull().default(0),
    nextAt: integer('next_at', { mode: 'timestamp_ms' }).notNull().default(now),
    leaseOwner: text('lease_owner'),
    leaseUntil: integer('lease_until', { mode: 'timestamp_ms' }),
    phase: text('phase'),
    code: integer('code'),
    enhanced: text('enhanced'),
    reply: text('reply'),
    messageId: text('message_id').notNull().unique(),
    acceptedAt: integer('accepted_at', { mode: 'timestamp_ms' }),
  },
  (t) => [
    uniqueIndex('delivery_once').on(t.mailingId, t.emailKey),
    index('delivery_due').on(t.mailingId, t.state, t.nextAt, t.id),
    index('delivery_lease').on(t.state, t.leaseUntil),
  ],
);

/** Every time a delivery was handed to a server: only added to, never changed but for its end. */
export const attempts = sqliteTable(
  'attempt',
  {
    deliveryId: integer('delivery_id')
      .notNull()
      .references(() => deliveries.id, { onDelete: 'cascade' }),
    n: integer('n').notNull(),
    startedAt: integer('started_at', { mode: 'timestamp_ms' }).notNull(),
    /** Null when the process ended before the answer came. */
    endedAt: integer('ended_at', { mode: 'timestamp_ms' }),
    outcome: text('outcome'),
    phase: text('phase'),
    code: integer('code'),
    reply: text('reply'),
  },
  (t) => [primaryKey({ columns: [t.deliveryId, t.n] })],
);

/** Single letters: sign-in links, confirmations, invitations, tests of a mailing. */
export const letters = sqliteTable(
  'letter',
  {
    id: text('id').primaryKey(),
    toName: text('to_name'),
    toAddress: text('to_address').notNull(),
    subject: text('subject').notNull(),
    text: text('text').notNull(),
    html: text('html').notNull(),
    headers: text('headers', { mode: 'json' }).$type<Record<string, string>>().notNull().default({}),
    state: text('state', { enum: ['queued', 'accepted', 'rejected', 'expired'] })
      .notNull()
      .default('queued'),
    attempts: integer('attempts').notNull().default(0),
    nextAt: integer('next_at', { mode: 'timestamp_ms' }).notNull().default(now),
    expiresAt: integer('expires_at', { mode: 'timestamp_ms' }).notNull(),
    reply: text('reply'),
    createdAt: createdAt(),
  },
  (t) => [index('letter_due').on(t.state, t.nextAt)],
);

// ── The house ────────────────────────────────────────────────────────────────────────────────────────────────────────

/** Small facts about this installation: `demo`, the worker's lease. */
export const settings = sqliteTable('setting', {
  key: text('key').primaryKey(),
  value: text('value').notNull(),
  updatedAt: integer('updated_at', { mode: 'timestamp_ms' }).notNull().default(now),
});
