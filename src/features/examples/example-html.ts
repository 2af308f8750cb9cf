import { drawPiece, explain, instructionsOf, planSheets, showValue, type PieceFigure } from '@/engine';
import { ICONS } from '@/components/icons';
import { esc } from '@/exports/escape';
import { drawingSvg } from '@/exports/svg/drawing';
import { pieceCount } from '@/features/sizing/facts';
import { readLive } from '@/writeup/live';
import { sentenceHtml } from '@/writeup/render-figures';
import { measureInside } from '@/writeup/render-measure';
import type { Example } from './example';

/** The parts of an example that follow its size, as HTML for the server and the browser alike. */

/** What stands in a live measure's span. Throws when the formula does not read: pages name formulas in their source. */
export function liveInside(example: Example, formula: string, bare = false): string {
  const live = readLive(example.model, formula);
  if (live.ok) return measureInside(example, { formula, bare });
  throw new Error(`"${formula}" in ${example.model.pattern.slug}: ${live.faults.map(explain).join(' ')}`);
}

/** Throws when the pattern has no such piece. */
export function pieceOf({ model, figures }: Example, name: string): PieceFigure {
  const piece = figures.pieces.find((one) => one.name === name);
  if (!piece) throw new Error(`${model.pattern.slug} has no piece called "${name}" at this size.`);
  return piece;
}

export interface Places {
  /** Pixels across in a wide place and on a phone; the same for both gives one drawing. */
  readonly wide: number;
  readonly narrow: number;
  /** The piece itself is at most this tall. */
  readonly tallest?: number;
}

/** A piece's drawing with its dimensions, laid out for a wide place and once more for a phone. */
export function pieceSvg(example: Example, name: string, { wide, narrow, tallest }: Places): string {
  const { units, grid } = example.figures.sizing;
  const piece = pieceOf(example, name);
  const drawn = (width: number, layout: { class?: string }) =>
    drawingSvg(drawPiece(piece, { width, units, grid, tallest }), layout);
  return wide === narrow
    ? drawn(wide, {})
    : drawn(wide, { class: 'wide-only' }) + drawn(narrow, { class: 'narrow-only' });
}

/** A piece's making instructions, their figures on tabs. */
export function wordsHtml(example: Example, name: string): string {
  return instructionsOf(pieceOf(example, name))
    .map((sentence) => sentenceHtml(sentence, example.figures.sizing))
    .join(' ');
}

/** What keeps the asked size from being made; empty when nothing does. */
export function troublesHtml({ troubles, figures }: Example): string {
  if (troubles.length === 0) return '';
  const items = troubles.map((sentence) => `<p>${esc(sentence)}</p>`).join('');
  const inside = figures.finished.inside
    .map(({ mm }, index, all) => showValue(mm, 'length', { ...figures.sizing, bare: index < all.length - 1 }).typeset)
    .join(' × ');
  return `${items}<p>The figures stay at a size that works: ${esc(inside)} inside.</p>`;
}

/** Whether the pieces go together, and what card they take; an icon says the same at a glance. */
export function closesHtml({ figures }: Example): string {
  const fails = figures.fits.filter(({ holds, advice }) => !holds && !advice);
  const plan = planSheets(figures, { stock: '12x12in' });
  const stock = plan.stock.name;
  const closes = fails.length === 0 ? 'It closes' : `Does not hold: ${fails.map(({ name }) => name).join(', ')}`;
  const pieces = pieceCount(figures) === 1 ? 'its piece comes' : `its ${pieceCount(figures)} pieces come`;
  const card =
    plan.tooLarge.length > 0
      ? `but ${plan.tooLarge.map(({ name }) => name).join(' and ')} will not fit a ${stock} sheet`
      : `and ${pieces} out of ${plan.used} ${plan.used === 1 ? 'sheet' : 'sheets'} of ${stock}`;
  const icon = fails.length === 0 && plan.tooLarge.length === 0 ? 'check' : 'warning';
  const svg = `<svg class="icon said-${icon}" viewBox="0 0 24 24" width="20" height="20" aria-hidden="true"><path d="${ICONS[icon]}"/></svg>`;
  return `${svg}<span>${esc(`${closes}, ${card}.`)}</span>`;
}

/** What the last change did, for the line that says so. */
export function changesWords(figures: number, drawings: number): string {
  if (figures + drawings === 0) return 'Nothing changed: cut to your marks, it is the same box.';
  const words = figures === 1 ? 'one figure' : `${figures} figures`;
  return `Just changed: ${words}${drawings > 0 ? ' and the drawing' : ''}.`;
}
