import type { Figures, Model } from '@/engine';
import { cutListInside, measureInside, pieceCardInside } from '@/writeup/render-figures';
import { morphInto } from './morph';

/** Keeps an article's live measures, piece cards and cut lists at a sizing. */
export interface ArticleFigures {
  /** Brings everything to these figures; what differs is marked as just changed. */
  show(figures: Figures): void;
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

  return {
    show(figures) {
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

/** Tints what just changed and lets it fade; a second change begins anew. */
export function markChanged(element: Element): void {
  const figure = element.closest('.measure, .dr-figure, td, em, dd') ?? element;
  clearTimeout(fading.get(figure));
  figure.classList.add(MARK);
  fading.set(
    figure,
    setTimeout(() => figure.classList.remove(MARK), MARKED_FOR),
  );
}
const fading = new WeakMap<Element, ReturnType<typeof setTimeout>>();
