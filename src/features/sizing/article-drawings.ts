import type { Figures, Model, SheetPlan } from '@/engine';
import { curvesInside } from '@/writeup/curve-template';
import { amountInside, amountsInside, sheetPlanInside, sizesInside } from '@/writeup/render-blocks';
import { cutListInside, pieceCardInside } from '@/writeup/render-figures';
import { markChanged } from './article-figures';
import { later } from './later';
import { morphInto } from './morph';

/** What of an article is drawn or worked out whole: piece cards, cut lists, amounts, sheets, curves. */
export interface ArticleDrawings {
  show(figures: Figures): void;
  /** Amounts and blocks that follow the plan, at a plan of these figures. */
  showPlan(figures: Figures, plan: SheetPlan): void;
}

/** Looks once for what is drawn under `root`; a card's HTML is compared with what was put there last. `lost` as for `later`. */
export function articleDrawings(root: ParentNode, model: Model, lost: () => void): ArticleDrawings {
  const all = (mark: string) => [...root.querySelectorAll<HTMLElement>(`[data-${mark}]`)];
  const cards = all('piece').map((element) => ({ element, piece: element.dataset.piece ?? '', html: '' }));
  const cutLists = all('cut-list');
  const [amounts, lists, sheets] = [all('amount'), all('amounts'), all('sheet-plan')];
  const [folded, sizes, curves] = [all('folded-view'), all('size-summary'), all('curve-of')];
  const fold = folded.length > 0 ? later(import('@/writeup/folded-block'), lost) : null;
  return {
    show(figures) {
      const drawn = new Map<string, string>();
      for (const card of cards) {
        let html = drawn.get(card.piece);
        if (html === undefined) drawn.set(card.piece, (html = pieceCardInside(figures, card.piece)));
        if (html === card.html) continue;
        card.html = html;
        morphInto(card.element, html, markChanged);
      }
      for (const list of cutLists) morphInto(list, cutListInside(figures), markChanged);
      fold?.(({ foldedInside }) => folded.forEach((view) => morphInto(view, foldedInside({ model, figures }))));
      for (const size of sizes) morphInto(size, sizesInside(figures), markChanged);
      for (const curve of curves) morphInto(curve, curvesInside(figures, curve.dataset.curveOf ?? ''));
    },
    showPlan(figures, plan) {
      for (const amount of amounts)
        morphInto(amount, amountInside(figures, plan, amount.dataset.amount ?? ''), markChanged);
      for (const list of lists) morphInto(list, amountsInside(figures, plan), markChanged);
      for (const sheet of sheets) morphInto(sheet, sheetPlanInside(figures, plan));
    },
  };
}
