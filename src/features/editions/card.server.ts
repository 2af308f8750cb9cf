import { drawFolded, show } from '@/engine';
import { drawingSvg } from '@/exports/svg/drawing';
import { blanksOf, type CardBlank } from '@/features/sheets/card-fit';
import { pieceCount, piecesWords, sheetsWords, shortTimeWords } from '@/features/sizing/facts';
import type { Edition } from './editions.server';
import { authorsFigures } from './models.server';

/** What a project's card says besides its title. */
export interface CardFacts {
  /** `4 to 14 in tall`: the range of the first question. */
  readonly range: string;
  readonly pieces: string;
  readonly sheets: string;
  readonly tooLarge: boolean;
  /** What it takes of card, to be held against somebody's own sheets. */
  readonly blanks: readonly CardBlank[];
  readonly time: string;
  /** The folded box, for a project without a photo. */
  readonly picture: string | null;
}

const kept = new Map<string, CardFacts>();
const KEPT = 200;

/** Facts of an edition at the author's size, in the author's units. Worked out once: an edition never changes. */
export function cardFacts(edition: Edition): CardFacts {
  const found = kept.get(edition.id);
  if (found) return found;
  const facts = workOut(edition);
  if (kept.size >= KEPT) kept.clear();
  kept.set(edition.id, facts);
  return facts;
}

function workOut(edition: Edition): CardFacts {
  const { model, figures, plan } = authorsFigures(edition);
  const { units, grid } = edition.sizing;
  const first = figures.measures.find(({ asked, inUse, kind }) => asked && inUse && kind === 'length');
  const range =
    first?.from === undefined || first.to === undefined
      ? ''
      : `${first.name} ${show(first.from, { units, grid, bare: true }).typeset} to ${show(first.to, { units, grid }).typeset}`;
  const tooLarge = plan.tooLarge.length > 0;
  return {
    range,
    pieces: piecesWords(pieceCount(figures)),
    sheets: tooLarge ? `Needs more than ${plan.stock.name}` : `Takes ${sheetsWords(plan)}`,
    tooLarge,
    blanks: blanksOf(figures.pieces),
    time: shortTimeWords(edition.minutes),
    picture: edition.hero
      ? null
      : drawingSvg(drawFolded(model, figures, { width: 240, height: 180 }), { class: 'folded' }),
  };
}
