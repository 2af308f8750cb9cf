import { escXml } from '@/exports/escape';

/** One published project as the feed tells of it. */
export interface FeedEntry {
  readonly projectId: string;
  readonly slug: string;
  readonly title: string;
  readonly author: string;
  readonly summary: string;
  /** What the newest edition corrected; empty for a first edition. */
  readonly correctionNote: string;
  readonly edition: number;
  readonly firstPublished: Date;
  readonly updated: Date;
  /** HTML, told inside the entry. */
  readonly content: string;
  readonly group: string;
}
export interface Feed {
  /** Origin, without a slash at the end. */
  readonly siteUrl: string;
  readonly title: string;
  readonly entries: readonly FeedEntry[];
  /** When the site began, for a feed that has no entry yet. */
  readonly began: Date;
}

/**
 * An Atom feed (RFC 4287). An entry's id names the project and never changes, so that a correction updates the entry
 * instead of making another; `updated` is the newest edition's.
 */
export function atomFeed({ siteUrl, title, entries, began }: Feed): string {
  const updated = entries.reduce((newest, entry) => (entry.updated > newest ? entry.updated : newest), began);
  return [
    '<?xml version="1.0" encoding="utf-8"?>',
    '<feed xmlns="http://www.w3.org/2005/Atom" xml:lang="en">',
    `<id>${escXml(siteUrl)}/feed.xml</id>`,
    `<title>${escXml(title)}</title>`,
    `<updated>${updated.toISOString()}</updated>`,
    `<link rel="self" type="application/atom+xml" href="${escXml(siteUrl)}/feed.xml"/>`,
    `<link rel="alternate" type="text/html" href="${escXml(siteUrl)}/projects"/>`,
    `<author><name>${escXml(title)}</name></author>`,
    ...entries.map((entry) => entryXml(entry, siteUrl)),
    '</feed>',
    '',
  ].join('\n');
}

function entryXml(entry: FeedEntry, siteUrl: string): string {
  const address = `${siteUrl}/projects/${encodeURIComponent(entry.slug)}`;
  return [
    '<entry>',
    `<id>${escXml(`${siteUrl}/projects/${entry.projectId}`)}</id>`,
    `<title>${escXml(entry.title)}</title>`,
    `<link rel="alternate" type="text/html" href="${escXml(address)}"/>`,
    `<published>${entry.firstPublished.toISOString()}</published>`,
    `<updated>${entry.updated.toISOString()}</updated>`,
    `<author><name>${escXml(entry.author)}</name></author>`,
    `<category term="${escXml(entry.group)}"/>`,
    `<summary type="text">${escXml(entry.correctionNote === '' ? entry.summary : `Edition ${entry.edition}: ${entry.correctionNote}`)}</summary>`,
    `<content type="html">${escXml(entry.content)}</content>`,
    '</entry>',
  ].join('\n');
}
