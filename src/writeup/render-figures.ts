import {
  drawPiece,
  instructionsOf,
  sayParts,
  show,
  showPosition,
  type Figures,
  type PieceFigure,
  type Sentence,
} from '@/engine';
import { drawingSvg } from '@/exports/svg/drawing';
import { esc } from '@/exports/escape';
import { figure } from './render-measure';

/**
 * What of a write-up is drawn or listed at a size, as HTML. Each comes as `render…`, the whole element, and `…Inside`, what
 * changes in it: the reader's page and the editor put in the same words as the server.
 */

/** Usual width in pixels that a piece is drawn at. */
export const CARD_WIDTH = 560;
/** A second layout for phones, so that its figures keep their size; the style sheet shows one of the two. */
const PHONE_WIDTH = 300;

type Looked = Figures['sizing'];

// ── Piece cards ──────────────────────────────────────────────────────────────────────────────────────────────────────

/** The card of a piece: name, how many of what, the drawing with its dimensions, and how to cut and score it in words. */
export function renderPieceCard(figures: Figures, name: string, width = CARD_WIDTH): string {
  return `<div class="piece-card" role="group" aria-label="${esc(name)}" data-piece="${esc(name)}">${pieceCardInside(figures, name, width)}</div>`;
}

export function pieceCardInside(figures: Figures, name: string, width = CARD_WIDTH): string {
  const piece = figures.pieces.find((p) => p.name === name);
  if (!piece) return `<p class="piece-card-none"><b>${esc(name)}</b> is not part of the box as it is set up now.</p>`;
  const { units, grid } = figures.sizing;
  const drawn = (w: number, name: string) => drawingSvg(drawPiece(piece, { width: w, units, grid }), { class: name });
  const drawing =
    width <= PHONE_WIDTH ? drawn(width, '') : drawn(width, 'wide-only') + drawn(PHONE_WIDTH, 'narrow-only');
  const words = instructionsOf(piece)
    .map((sentence) => `<p>${sentenceHtml(sentence, figures.sizing)}</p>`)
    .join('');
  return (
    '<div class="ruled" aria-hidden="true"></div>' +
    `<p class="piece-card-head"><b>${esc(name)}</b> <span>cut ${piece.count} · ${esc(piece.stock)}</span></p>` +
    `<div class="piece-card-drawing">${drawing}</div>` +
    (words === '' ? '' : `<div class="piece-card-words">${words}</div>`)
  );
}

/** A sentence from the geometry; its figures look like live measures, for they follow the size in the same way. */
export function sentenceHtml(sentence: Sentence, { units, grid }: Looked): string {
  return sayParts(sentence, { units, grid })
    .map((part) => (part.figure ? `<span class="measure">${figure(part)}</span>` : esc(part.text)))
    .join('');
}

// ── The cut list ─────────────────────────────────────────────────────────────────────────────────────────────────────

const COLUMNS = ['Piece', 'Cut', 'Size', 'Score from the left', 'Score from the top'] as const;

/** Every piece with its count, size and score positions. */
export function renderCutList(figures: Figures): string {
  return `<div class="cut-list" data-cut-list>${cutListInside(figures)}</div>`;
}

export function cutListInside(figures: Figures): string {
  const { units, grid } = figures.sizing;
  const bare = (mm: number) => figure(show(mm, { units, grid, bare: true }));
  const scores = (at: readonly number[], { thickness }: PieceFigure) =>
    at.length === 0
      ? '<span class="soft">none</span>'
      : at.map((mm) => figure(showPosition(mm, thickness, { units, grid }))).join(', ');
  const cells = (piece: PieceFigure) => [
    `${piece.count} <span class="soft">${esc(piece.stock)}</span>`,
    `${bare(piece.across)} × ${figure(show(piece.along, { units, grid }))}`,
    scores(piece.scores.across, piece),
    scores(piece.scores.along, piece),
  ];
  const rows = figures.pieces.map((piece) => {
    const rest = cells(piece).map((cell, n) => `<td data-label="${COLUMNS[n + 1]}">${cell}</td>`);
    return `<tr><th scope="row">${esc(piece.name)}</th>${rest.join('')}</tr>`;
  });
  const head = COLUMNS.map((name) => `<th scope="col">${name}</th>`).join('');
  const steps = /[+−]/u.test(rows.join('').replace(/<[^>]*>/gu, ''));
  const note = steps ? '<p class="small soft">+ a card’s thickness more, − one less.</p>' : '';
  return `<table class="table"><caption>Cut list</caption><thead><tr>${head}</tr></thead><tbody>${rows.join('')}</tbody></table>${note}`;
}
