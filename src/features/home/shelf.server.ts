import { drawFolded, foldedExtent, type Unit } from '@/engine';
import { drawingSvg } from '@/exports/svg/drawing';
import { cardFacts } from '@/features/editions/card.server';
import type { Edition } from '@/features/editions/editions.server';
import { authorsFigures } from '@/features/editions/models.server';
import { shelfScale } from './shelf-scale';

/** A published box as it stands on the home page's shelf. */
export interface ShelfBox {
  readonly slug: string;
  readonly title: string;
  readonly summary: string;
  /** `New this week`, `Edition 2`. */
  readonly state: string;
  /** The folded box as SVG, standing on the picture's lower edge. */
  readonly picture: string;
  /** Class that gives the picture its card's colour. */
  readonly card: string;
  readonly facts: readonly string[];
}
export interface Shelf {
  readonly boxes: readonly ShelfBox[];
  /** Pixels a millimetre, the same for every box and for the ruler under them. */
  readonly scale: number;
  readonly units: Unit;
}

/** Largest picture in pixels, and the room round it. */
const LARGEST = { across: 216, up: 210 };
const ROOM = 4;
const WEEK = 7 * 24 * 60 * 60 * 1000;
/** Neighbours on the shelf are told apart by their card. */
const CARDS = ['card-plum', 'card-green', 'card-kraft', 'card-rose'];

/** Boxes at the size their authors made them, all at one scale, on a ruler in the first one's units. */
export function shelfOf(editions: readonly Edition[], now: Date): Shelf {
  const drawn = editions.map((edition) => {
    const { model, figures } = authorsFigures(edition);
    return { edition, model, figures, extent: foldedExtent(model, figures) };
  });
  const scale = shelfScale(
    drawn.map(({ extent }) => extent),
    LARGEST,
  );
  const boxes = drawn.map(({ edition, model, figures, extent }, index): ShelfBox => {
    const width = Math.ceil(extent.across * scale) + 2 * ROOM;
    const height = Math.ceil(extent.up * scale) + 2 * ROOM;
    const facts = cardFacts(edition);
    const fresh = edition.n === 1 && now.getTime() - edition.publishedAt.getTime() < WEEK;
    return {
      slug: edition.slug,
      title: edition.title,
      summary: edition.summary,
      state: fresh ? 'New this week' : `Edition ${edition.n}`,
      picture: drawingSvg(drawFolded(model, figures, { width, height, scale }), { class: 'folded' }),
      card: CARDS[index % CARDS.length] ?? '',
      facts: [facts.range, [facts.pieces, facts.time].filter(Boolean).join(' · '), facts.sheets].filter(Boolean),
    };
  });
  return { boxes, scale, units: editions[0]?.sizing.units ?? 'in' };
}
