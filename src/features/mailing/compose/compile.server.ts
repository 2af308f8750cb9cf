import { render } from '@react-email/render';
import { createElement } from 'react';
import { config } from '@/config.server';
import { compilePattern, evaluate } from '@/engine';
import type { Edition } from '@/features/editions/editions.server';
import { pieceCount, piecesWords, timeWords } from '@/features/sizing/facts';
import { COLUMN, mailingBlocks, type MailingFacts } from './mailing-blocks';
import { mailingText } from './mailing-text';
import { MailingMail } from './MailingMail';
import { photoAlt } from './photo-alt';
import { withoutSlots } from './slots';
import { MAIL_UNITS, sizingIn, unitPart, type UnitPart } from './unit-parts';

/** Some mail programs cut a mail off at 102 kB, and the way out with it. */
export const MOST_BYTES = 90_000;

export interface MailingText {
  readonly greeting: string;
  readonly excerpt: string;
  readonly withHero: boolean;
}
/** A mailing with its slots still open; the same for every recipient. */
export interface CompiledMailing {
  readonly html: string;
  readonly text: string;
  readonly unitParts: Readonly<Record<'in' | 'mm' | 'cm', UnitPart>>;
  /** Of the HTML, in bytes, about as a recipient gets it. */
  readonly bytes: number;
}

/**
 * Compiles what a mailing says about an edition. Done once a mailing, never once a recipient.
 * Throws when the edition's pattern no longer compiles, which publishing has ruled out.
 */
export async function compileMailing(edition: Edition, { excerpt, withHero }: MailingText): Promise<CompiledMailing> {
  const compiled = compilePattern(edition.pattern);
  if (!compiled.ok) throw new Error(`the pattern of edition ${edition.n} of "${edition.title}" does not compile`);
  const figures = (units: 'in' | 'mm' | 'cm') => evaluate(compiled.value, sizingIn(edition.sizing, units));
  const projectUrl = `${config.siteUrl}/projects/${edition.slug}`;
  const unitParts = Object.fromEntries(
    MAIL_UNITS.map((units) => [units, unitPart(figures(units), projectUrl)]),
  ) as Record<'in' | 'mm' | 'cm', UnitPart>;
  const facts: MailingFacts = {
    siteUrl: config.siteUrl,
    title: edition.title,
    excerpt,
    edition: edition.n,
    correctionNote: edition.correctionNote,
    picture: withHero && edition.hero ? heroPicture(edition, edition.hero) : null,
    rows: [
      { label: 'To cut', value: piecesWords(pieceCount(figures(edition.sizing.units))) },
      ...(edition.minutes === null ? [] : [{ label: 'Time', value: timeWords(edition.minutes) }]),
    ],
    authorName: edition.author.name,
    listName: config.listName,
    postalAddress: config.postalAddress,
  };
  const blocks = mailingBlocks(facts);
  const firstWords = withoutSlots(excerpt).replace(/\s+/g, ' ').trim();
  const html = await render(createElement(MailingMail, { blocks, title: withoutSlots(edition.title), firstWords }));
  const widest = Math.max(...MAIL_UNITS.map((units) => Object.values(unitParts[units]).join('').length));
  return { html, text: mailingText(blocks), unitParts, bytes: Buffer.byteLength(html) + widest + ROOM_FOR_SLOTS };
}

/** Name, address, date and two long links. */
const ROOM_FOR_SLOTS = 800;

/** Mail programs want the size in the element; the JPEG is at most 1200 wide, shown in the column's width. */
function heroPicture(
  edition: Edition,
  { id, width, height }: NonNullable<Edition['hero']>,
): NonNullable<MailingFacts['picture']> {
  const shown = Math.min(COLUMN, width);
  return {
    url: `${config.siteUrl}/media/${id}.jpg`,
    width: shown,
    height: Math.round((shown * height) / width),
    alt: photoAlt(edition.writeUp.doc, id) || edition.title,
  };
}
