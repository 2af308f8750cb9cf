import { and, asc, count, desc, eq, inArray, isNull, or, sql, type SQL } from 'drizzle-orm';
import { alias } from 'drizzle-orm/sqlite-core';
import { db } from '@/db/client.server';
import { editions, projects, uploads, users } from '@/db/schema';
import type { Pattern, Sizing } from '@/engine';
import type { WriteUp } from '@/writeup/document';

export interface Picture {
  readonly id: string;
  readonly width: number;
  readonly height: number;
}
/** A published edition as a reader sees it. */
export interface Edition {
  readonly id: string;
  readonly projectId: string;
  readonly slug: string;
  readonly n: number;
  /** The number of the project's newest edition. */
  readonly newest: number;
  readonly title: string;
  readonly summary: string;
  readonly minutes: number | null;
  readonly pattern: Pattern;
  readonly sizing: Sizing;
  readonly writeUp: WriteUp;
  readonly hero: Picture | null;
  readonly author: { readonly id: string; readonly name: string };
  readonly correctionNote: string;
  readonly publishedAt: Date;
}
export interface EditionNote {
  readonly n: number;
  readonly correctionNote: string;
  readonly publishedAt: Date;
}
export interface PublishedFilter {
  /** Words that must all be found in title, summary, author, kind of box or the pattern's name. */
  readonly query?: string;
  /** Kinds of box (`Pattern.group`); none means every kind. */
  readonly groups?: readonly string[];
  /** Slug of the pattern that the project began from. */
  readonly pattern?: string;
}
export interface PublishedPage extends PublishedFilter {
  readonly limit: number;
  readonly offset?: number;
  /** Usual: newest first. */
  readonly order?: 'newest' | 'title';
}

/**
 * The newest edition of a published project, or edition `n`; null when there is none or the project was deleted or withdrawn.
 * `withdrawn` also finds what was withdrawn: for its author, who may still look after its mailings.
 */
export function getEdition(slug: string, n?: number, { withdrawn = false } = {}): Edition | null {
  const row = select()
    .where(
      and(
        eq(projects.slug, slug),
        isNull(projects.deletedAt),
        withdrawn ? undefined : isNull(projects.withdrawnAt),
        n === undefined ? isNewest() : eq(editions.n, n),
      ),
    )
    .get();
  return row ? toEdition(row) : null;
}

/** What each edition of a project changed, newest first. */
export function editionHistory(projectId: string): readonly EditionNote[] {
  return db
    .select({ n: editions.n, correctionNote: editions.correctionNote, publishedAt: editions.publishedAt })
    .from(editions)
    .where(eq(editions.projectId, projectId))
    .orderBy(desc(editions.n))
    .all();
}

/** Newest editions of all published projects. */
export function listPublished({ limit, offset = 0, order = 'newest', ...filter }: PublishedPage): readonly Edition[] {
  return select()
    .where(matches(filter))
    .orderBy(
      ...(order === 'title' ? [asc(sql`lower(${editions.title})`)] : [desc(editions.publishedAt)]),
      asc(projects.slug),
    )
    .limit(limit)
    .offset(offset)
    .all()
    .map(toEdition);
}

export function countPublished(filter: PublishedFilter = {}): number {
  const row = db
    .select({ all: count() })
    .from(editions)
    .innerJoin(projects, eq(editions.projectId, projects.id))
    .innerJoin(users, eq(projects.authorId, users.id))
    .where(matches(filter))
    .get();
  return row?.all ?? 0;
}

/** Kinds of box that have something published, with how many of them match the query, in the order of their names. */
export function countByGroup(query = ''): readonly { readonly group: string; readonly count: number }[] {
  const counted = db
    .select({ group: sql<string>`${group}`, count: count() })
    .from(editions)
    .innerJoin(projects, eq(editions.projectId, projects.id))
    .innerJoin(users, eq(projects.authorId, users.id))
    .where(matches({ query }))
    .groupBy(group)
    .all();
  const every = db
    .selectDistinct({ group: sql<string>`${group}` })
    .from(editions)
    .innerJoin(projects, eq(editions.projectId, projects.id))
    .where(matches({}))
    .orderBy(group)
    .all();
  return every.map((row) => ({ group: row.group, count: counted.find((c) => c.group === row.group)?.count ?? 0 }));
}

const group = sql`json_extract(${editions.pattern}, '$.group')`;
const later = alias(editions, 'later');

function isNewest(): SQL {
  return sql`${editions.n} = (select max(${later.n}) from ${editions} as ${later} where ${later.projectId} = ${editions.projectId})`;
}

function matches({ query = '', groups = [], pattern }: PublishedFilter): SQL | undefined {
  const words = query.trim().split(/\s+/u).filter(Boolean).slice(0, 12);
  return and(
    isNull(projects.deletedAt),
    isNull(projects.withdrawnAt),
    isNewest(),
    groups.length > 0 ? inArray(group, [...groups]) : undefined,
    pattern === undefined ? undefined : eq(sql`json_extract(${editions.pattern}, '$.slug')`, pattern),
    ...words.map((word) => {
      const like = `%${word.replaceAll(/[\\%_]/gu, '\\$&')}%`;
      return or(
        ...[editions.title, editions.summary, users.name, group, sql`json_extract(${editions.pattern}, '$.name')`].map(
          (column) => sql`${column} like ${like} escape '\\'`,
        ),
      );
    }),
  );
}

function select() {
  return db
    .select({
      edition: editions,
      slug: projects.slug,
      newest: sql<number>`(select max(${later.n}) from ${editions} as ${later} where ${later.projectId} = ${editions.projectId})`,
      authorId: users.id,
      authorName: users.name,
      hero: { id: uploads.id, width: uploads.width, height: uploads.height },
    })
    .from(editions)
    .innerJoin(projects, eq(editions.projectId, projects.id))
    .innerJoin(users, eq(projects.authorId, users.id))
    .leftJoin(uploads, eq(editions.heroUploadId, uploads.id));
}

type Row = NonNullable<ReturnType<ReturnType<typeof select>['get']>>;

function toEdition({ edition, slug, newest, authorId, authorName, hero }: Row): Edition {
  return {
    id: edition.id,
    projectId: edition.projectId,
    slug,
    n: edition.n,
    newest,
    title: edition.title,
    summary: edition.summary,
    minutes: edition.minutes,
    pattern: edition.pattern,
    sizing: edition.sizing,
    writeUp: edition.writeUp,
    hero,
    author: { id: authorId, name: authorName ?? 'Unnamed' },
    correctionNote: edition.correctionNote,
    publishedAt: edition.publishedAt,
  };
}
