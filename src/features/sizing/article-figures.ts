import type { Figures, Model, SheetPlan } from '@/engine';
import { holds } from '@/writeup/condition';
import { curvesInside } from '@/writeup/curve-template';
import { amountInside, amountsInside, foldedInside, sheetPlanInside, sizesInside } from '@/writeup/render-blocks';
import { cutListInside, measureInside, pieceCardInside, stepRefInside } from '@/writeup/render-figures';
import { morphInto } from './morph';

/** Keeps an article's live measures, piece cards and cut lists at a sizing. */
export interface ArticleFigures {
  /** Brings everything to these figures; what differs is marked as just changed. */
  show(figures: Figures): void;
  /** Amounts and blocks that are worked out whole, at a plan of these figures. */
  showPlan(figures: Figures, plan: SheetPlan): void;
}

const MARK = 'changed';
const MARKED_FOR = 600;

/**
 * Looks once for what is live under `root` (spans in text and captions, cards, lists). A live measure's HTML is compared
 * with what was put there last, never read back from the page, so that a change writes only where a figure differs.
 */
export function articleFigures(root: ParentNode, model: Model): ArticleFigures {
  const spans = [...root.querySelectorAll<HTMLElement>('[data-live]')].map((element) => ({
    element,
    text: { formula: element.dataset.live ?? '', bare: element.dataset.bare !== undefined },
    html: element.innerHTML,
  }));
  const cards = [...root.querySelectorAll<HTMLElement>('[data-piece]')].map((element) => ({
    element,
    piece: element.dataset.piece ?? '',
    html: '',
  }));
  const lists = [...root.querySelectorAll<HTMLElement>('[data-cut-list]')];
  const apply = conditions(root, model);

  return {
    showPlan: workedBlocks(root, model),
    show(figures) {
      apply(figures);
      const inside = new Map<string, string>();
      for (const span of spans) {
        const key = `${span.text.bare ? 'bare ' : ''}${span.text.formula}`;
        let html = inside.get(key);
        if (html === undefined) inside.set(key, (html = measureInside({ model, figures }, span.text)));
        if (html === span.html) continue;
        span.html = html;
        span.element.innerHTML = html;
        span.element.classList.toggle('unknown', html.includes('unknown-mark'));
        markChanged(span.element);
      }
      const drawn = new Map<string, string>();
      for (const card of cards) {
        let html = drawn.get(card.piece);
        if (html === undefined) drawn.set(card.piece, (html = pieceCardInside(figures, card.piece)));
        if (html === card.html) continue;
        card.html = html;
        morphInto(card.element, html, markChanged);
      }
      for (const list of lists) morphInto(list, cutListInside(figures), markChanged);
    },
  };
}

/** Amounts in the text and blocks that are worked out whole. */
function workedBlocks(root: ParentNode, model: Model): ArticleFigures['showPlan'] {
  const all = (mark: string) => [...root.querySelectorAll<HTMLElement>(`[data-${mark}]`)];
  const [amounts, lists, sheets] = [all('amount'), all('amounts'), all('sheet-plan')];
  const [folded, sizes, curves] = [all('folded-view'), all('size-summary'), all('curve-of')];
  return (figures, plan) => {
    for (const amount of amounts)
      morphInto(amount, amountInside(figures, plan, amount.dataset.amount ?? ''), markChanged);
    for (const list of lists) morphInto(list, amountsInside(figures, plan), markChanged);
    for (const sheet of sheets) morphInto(sheet, sheetPlanInside(figures, plan));
    for (const view of folded) morphInto(view, foldedInside({ model, figures }));
    for (const size of sizes) morphInto(size, sizesInside(figures), markChanged);
    for (const curve of curves) morphInto(curve, curvesInside(figures, curve.dataset.curveOf ?? ''));
  };
}

/** Shows and hides steps and phrases by their conditions, and counts the steps anew where that changes anything. */
function conditions(root: ParentNode, model: Model): (figures: Figures) => void {
  const parts = [...root.querySelectorAll<HTMLElement>('[data-when]')];
  const steps = [...root.querySelectorAll<HTMLElement>('.step')];
  const references = [...root.querySelectorAll<HTMLAnchorElement>('[data-step-ref]')];
  return (figures) => {
    let counted = false;
    for (const part of parts) {
      const hidden = !holds({ model, figures }, part.dataset.when);
      if (hidden === part.hidden) continue;
      part.hidden = hidden;
      counted ||= part.matches('.step');
      if (!hidden && part.matches('span')) markChanged(part);
    }
    if (!counted) return;
    let number = 0;
    for (const step of steps) {
      if (!step.hidden) number += 1;
      for (const place of step.querySelectorAll(':scope > [data-number], .step-title [data-number]'))
        place.textContent = step.hidden ? '' : String(number);
    }
    for (const reference of references) {
      const target = steps.find((step) => `#${step.id}` === reference.hash);
      const n = Number(target?.querySelector('[data-number]')?.textContent) || null;
      const html = stepRefInside(reference.dataset.stepRef ?? '', n);
      if (reference.innerHTML === html) continue;
      reference.innerHTML = html;
      markChanged(reference);
    }
  };
}

/** Tints what just changed and lets it fade; a second change begins anew. */
export function markChanged(element: Element): void {
  const figure = element.closest('.measure, .dr-figure, td, em, dd, span[data-when], [data-step-ref]') ?? element;
  clearTimeout(fading.get(figure));
  figure.classList.add(MARK);
  fading.set(
    figure,
    setTimeout(() => figure.classList.remove(MARK), MARKED_FOR),
  );
}
const fading = new WeakMap<Element, ReturnType<typeof setTimeout>>();
