import type { Figures, Model } from '@/engine';
import { holds } from '@/writeup/condition';
import { measureInside, stepRefInside } from '@/writeup/render-measure';

const MARK = 'changed';
const MARKED_FOR = 600;

/**
 * Looks once for live measures, conditions and counted steps under `root`, and brings them to figures; what differs is marked
 * as just changed. A live measure's HTML is compared with what was put there last, never read back from the page, so that a
 * change writes only where a figure differs.
 */
export function articleFigures(root: ParentNode, model: Model): (figures: Figures) => void {
  const spans = [...root.querySelectorAll<HTMLElement>('[data-live]')].map((element) => ({
    element,
    text: { formula: element.dataset.live ?? '', bare: element.dataset.bare !== undefined },
    html: element.innerHTML,
  }));
  const apply = conditions(root, model);

  return (figures) => {
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
