import type { Figures, Model } from '@/engine';
import { esc } from '@/exports/escape';
import { FIELD, FROM_SIDES, usualState, viewSvg, type FoldedSize, type FoldedState } from './view';
import { foldWords, turnWords } from './words';

export interface FoldedMarkup extends FoldedSize {
  readonly model: Model;
  readonly figures: Figures;
  /** Usual: the pattern's own view, closed. */
  readonly state?: FoldedState;
  /** The rest of the address that the form keeps, as a query. */
  readonly keep?: string;
  /** The element's id; the form leads back to it. */
  readonly id: string;
}

/** The folded box with what turns and folds it: a plain form, which the element's script makes answer at once. */
export function foldedViewHtml({
  model,
  figures,
  state = usualState(model),
  keep = '',
  id,
  ...size
}: FoldedMarkup): string {
  const kept = [...new URLSearchParams(keep)].map(
    ([name, value]) => `<input type="hidden" name="${esc(name)}" value="${esc(value)}">`,
  );
  const slider = (name: string, label: string, ends: string, range: string, words: string) =>
    `<label class="folded-slide"><span><b>${label}</b>${ends}</span>` +
    `<input class="slider" type="range" name="${name}" ${range} aria-label="${label}" aria-valuetext="${words}"></label>`;
  const check = (name: string, label: string, checked: boolean) =>
    `<label class="check"><input type="checkbox" name="${name}" value="1"${checked ? ' checked' : ''}><span>${label}</span></label>`;
  return (
    `<folded-view id="${esc(id)}" class="folded-view" data-turn="${state.turn}" data-tilt="${state.tilt}" data-width="${size.width}" data-height="${size.height}">` +
    `<div class="folded-stage" data-stage role="group" aria-label="${esc(model.pattern.name)}: arrow keys turn and tilt it, plus and minus fold it">${viewSvg(model, figures, state, size)}</div>` +
    `<form class="folded-controls" method="get" action="#${esc(id)}" autocomplete="off">${kept.join('')}` +
    slider(
      FIELD.turn,
      'Turn',
      '<span class="soft needs-script">drag the box, or use the arrow keys</span>',
      `min="-180" max="180" step="1" value="${Math.round(state.turn)}"`,
      turnWords(state.turn),
    ) +
    slider(
      FIELD.fold,
      'Fold',
      '<span class="soft">flat … closed</span>',
      `min="0" max="100" step="1" value="${Math.round(state.share * 100)}"`,
      foldWords(state.share),
    ) +
    `<div class="folded-row"><div class="folded-sides" role="group" aria-label="See it from">` +
    FROM_SIDES.map(
      ({ side, label, turn, tilt }) =>
        `<button class="btn small-btn" name="${FIELD.from}" value="${side}" data-turn="${turn}" data-tilt="${tilt}">${label}</button>`,
    ).join('') +
    `</div>${check(FIELD.seeThrough, 'See through', state.seeThrough)}${check(FIELD.names, 'Names', state.names)}` +
    `<button class="btn small-btn without-script">Show</button></div></form></folded-view>`
  );
}
