import { orderOf } from '@/engine';
import { esc } from '@/exports/escape';
import { sizesTogether } from '@/features/sizing/facts';
import { panelFor } from '@/features/sizing/panel';
import { liveParts } from '@/writeup/live';
import { renderMeasure } from '@/writeup/render-measure';
import type { Example } from './example';
import { closesHtml, pieceSvg, wordsHtml } from './example-html';

/** Whole parts of a page about one box, which follow its size and its choices; HTML for the server and the browser alike. */
const PARTS = { outside, pieces, ranges, order } as const;

export type ExamplePartName = keyof typeof PARTS;
export const isExamplePart = (name: string): name is ExamplePartName => Object.hasOwn(PARTS, name);
export const partHtml = (example: Example, name: ExamplePartName): string => PARTS[name](example);

/** The box's outside and whether it closes. */
function outside(example: Example): string {
  const { figures } = example;
  const names = figures.finished.outside.map(({ name }) => name).join(', ');
  return (
    `<p>Outside ${esc(sizesTogether(figures.finished.outside, figures.sizing))} <span class="soft">(${esc(names)})</span></p>` +
    `<p class="box-closes">${closesHtml(example)}</p>`
  );
}

/** Width in pixels of a drawing where cards stand side by side. */
const BESIDE = 300;

/** Every piece that the box has with these choices, drawn; how to cut and score it can be unfolded. */
function pieces(example: Example): string {
  const { pieces } = example.figures;
  const widths = { wide: pieces.length > 1 ? BESIDE : 620, narrow: BESIDE };
  const cards = pieces.map(
    ({ name, count, stock }) =>
      `<div class="piece-card" role="group" aria-label="${esc(name)}">` +
      '<div class="ruled" aria-hidden="true"></div>' +
      `<p class="piece-card-head"><b>${esc(name)}</b> <span>cut ${count} · ${esc(stock)}</span></p>` +
      `<div class="piece-card-drawing">${pieceSvg(example, name, widths)}</div>` +
      `<details class="piece-card-words"><summary>Cut and score it, in words</summary><p>${wordsHtml(example, name)}</p></details></div>`,
  );
  return `<div class="piece-cards">${cards.join('')}</div>`;
}

/** Each asked measure, and how far it may go while the others stay. */
function ranges({ model, figures }: Example): string {
  const rows = panelFor(model, figures)
    .fields.filter(({ inUse }) => inUse)
    .map(
      ({ name, range }) =>
        `<tr><th scope="row">${esc(name)}</th><td class="figures">${renderMeasure({ model, figures }, { formula: name, bare: false })}</td><td class="figures">${esc(range)}</td></tr>`,
    );
  return `<table class="table"><thead><tr><th scope="col">measure</th><th scope="col" class="figures">now</th><th scope="col" class="figures">may be</th></tr></thead><tbody>${rows.join('')}</tbody></table>`;
}

/** The pattern's order of making, its figures on tabs. */
function order({ model, figures }: Example): string {
  const steps = orderOf(model, figures).map((sentence) =>
    liveParts(sentence)
      .map((part) =>
        'formula' in part ? renderMeasure({ model, figures }, { formula: part.formula, bare: false }) : esc(part.text),
      )
      .join(''),
  );
  return `<ol>${steps.map((step) => `<li>${step}</li>`).join('')}</ol>`;
}
