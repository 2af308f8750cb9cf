import { min, eq } from 'drizzle-orm';
import { config } from '@/config.server';
import { db } from '@/db/client.server';
import { editions } from '@/db/schema';
import { pieceCount, piecesWords, sheetsWords, sizesTogether, timeWords } from '@/features/sizing/facts';
import { esc } from '@/exports/escape';
import { jpegUrl } from '@/writeup/pictures';
import { atomFeed, type FeedEntry } from './atom';
import { listPublished, type Edition } from './editions.server';
import { authorsFigures } from './models.server';

const ENTRIES = 30;
/** A feed with nothing in it still has to say when it was updated. */
const BEGAN = new Date(Date.UTC(2026, 0, 1));

/** The newest projects and corrections, with a tag of what they are made of. */
export function projectFeed(): { readonly xml: string; readonly parts: readonly string[] } {
  const published = listPublished({ limit: ENTRIES });
  return {
    xml: atomFeed({ siteUrl: config.siteUrl, title: config.listName, entries: published.map(toEntry), began: BEGAN }),
    parts: published.flatMap(({ id, slug, author }) => [id, slug, author.name]),
  };
}

function toEntry(edition: Edition): FeedEntry {
  const first = db
    .select({ at: min(editions.publishedAt) })
    .from(editions)
    .where(eq(editions.projectId, edition.projectId))
    .get();
  return {
    projectId: edition.projectId,
    slug: edition.slug,
    title: edition.title,
    author: edition.author.name,
    summary: edition.summary || edition.pattern.summary,
    correctionNote: edition.correctionNote,
    edition: edition.n,
    firstPublished: first?.at ?? edition.publishedAt,
    updated: edition.publishedAt,
    content: contentHtml(edition),
    group: edition.pattern.group,
  };
}

/** What the box is and what it takes at the author's size; the making itself is read on the page, at the reader's. */
function contentHtml(edition: Edition): string {
  const { figures, plan } = authorsFigures(edition);
  const { units, grid } = edition.sizing;
  const facts = [
    `${sizesTogether(figures.finished.inside, { units, grid })} inside, or any size you choose`,
    `${piecesWords(pieceCount(figures))}, ${sheetsWords(plan)}`,
    timeWords(edition.minutes),
  ].filter((fact) => fact !== '');
  const picture = edition.hero
    ? `<p><img src="${esc(config.siteUrl + jpegUrl(edition.hero.id))}" alt="${esc(edition.title)}"></p>`
    : '';
  const correction =
    edition.correctionNote === ''
      ? ''
      : `<p><strong>Corrected in edition ${edition.n}.</strong> ${esc(edition.correctionNote).replaceAll('\n', '<br>')}</p>`;
  const summary = edition.summary || edition.pattern.summary;
  return (
    `${picture}<p>${esc(summary)}</p>${correction}<ul>${facts.map((fact) => `<li>${esc(fact)}</li>`).join('')}</ul>` +
    `<p><a href="${esc(`${config.siteUrl}/projects/${edition.slug}`)}">Make it at your size</a></p>`
  );
}
