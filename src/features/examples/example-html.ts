import { compileLive, drawPiece, explain, sayParts, showValue, type PieceFigure } from '@/engine';
import { drawingSvg } from '@/exports/svg/drawing';
import { escapeHtml } from '@/features/sizing/escape';
import type { Example } from './example';

/** The parts of an example that follow its size, as HTML for the server and the browser alike. */

/** A formula's value as cut, typeset; a question mark while it has none. Throws when the formula does not read. */
export function liveText({ model, figures }: Example, formula: string, bare = false): string {
  const live = compileLive(model, formula);
  if (!live.ok) throw new Error(`"${formula}" in ${model.pattern.slug}: ${live.faults.map(explain).join(' ')}`);
  const { value, kind, unit } = live.value;
  const worked = value(figures);
  if (!worked) return '?';
  const { units, grid } = figures.sizing;
  return showValue(worked.cut, kind, { units, grid, unit, bare }).typeset;
}

/** Throws when the pattern has no such piece. */
export function pieceOf({ model, figures }: Example, name: string): PieceFigure {
  const piece = figures.pieces.find((one) => one.name === name);
  if (!piece) throw new Error(`${model.pattern.slug} has no piece called "${name}" at this size.`);
  return piece;
}

/** A piece's drawing with its dimensions, twice: laid out for a wide place and for a phone. */
export function pieceSvg(example: Example, name: string, { wide, narrow }: { wide: number; narrow: number }): string {
  const { units, grid } = example.figures.sizing;
  const piece = pieceOf(example, name);
  const drawn = (width: number, className: string) =>
    drawingSvg(drawPiece(piece, { width, units, grid, labels: true, dims: true }), { class: className });
  return wide === narrow
    ? drawn(wide, 'drawing')
    : drawn(wide, 'drawing wide-only') + drawn(narrow, 'drawing narrow-only');
}

/** A piece's making instructions, their figures on tabs. */
export function wordsHtml(example: Example, name: string): string {
  const { units, grid } = example.figures.sizing;
  return pieceOf(example, name)
    .instructions.map((sentence) =>
      sayParts(sentence, { units, grid })
        .map(({ text, figure }) => (figure ? `<span class="measure">${escapeHtml(text)}</span>` : escapeHtml(text)))
        .join(''),
    )
    .join(' ');
}

/** What keeps the asked size from being made; empty when nothing does. */
export function troublesHtml({ troubles, figures }: Example): string {
  if (troubles.length === 0) return '';
  const items = troubles.map((sentence) => `<p>${escapeHtml(sentence)}</p>`).join('');
  const inside = figures.finished.inside
    .map(({ mm }, index, all) => showValue(mm, 'length', { ...figures.sizing, bare: index < all.length - 1 }).typeset)
    .join(' × ');
  return `${items}<p>The figures stay at a size that works: ${escapeHtml(inside)} inside.</p>`;
}
