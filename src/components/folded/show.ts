import type { Figures, Model } from '@/engine';

/** An element asks for figures by this event when somebody reaches for it before the page gave any. */
export const WANTS_FIGURES = 'folded-view:wants-figures';

/** What a folded view takes from the page round it. */
export interface ShowsBox extends Element {
  show: (model: Model, figures: Figures) => void;
}

/** Gives every folded view inside `place` the box as it now is; the way it is turned and folded stays. */
export function showFolded(place: ParentNode, model: Model, figures: Figures): void {
  const views = place.querySelectorAll<ShowsBox>('folded-view');
  if (views.length === 0) return;
  void customElements.whenDefined('folded-view').then(() => views.forEach((view) => view.show(model, figures)));
}
