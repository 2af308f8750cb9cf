import type { ProofItem } from '@/features/projects/proof';
import type { DeskStore } from './desk-store';

type Goal = Pick<ProofItem, 'place'> & Partial<Pick<ProofItem, 'code'>>;

/** Brings a proof item's place into view and puts the focus there, once the column that holds it is shown. */
export function goToPlace(item: Goal, store: DeskStore): void {
  const { column, name } = item.place;
  if (
    column === 'measures' &&
    name !== undefined &&
    store.$draft.get().pattern.measures.some((measure) => measure.name === name)
  )
    store.select(name);
  // Two frames: one for the column or dialog to be shown, one for what opens inside it.
  requestAnimationFrame(() => requestAnimationFrame(() => focusOn(placeOf(item))));
}

function placeOf({ code, place }: Goal): HTMLElement | null {
  const find = (selector: string) => document.querySelector<HTMLElement>(selector);
  if (place.column === 'write-up') return inWriteUp(code, place) ?? find('[data-column="write-up"] .ProseMirror');
  if (place.column === 'facts') return find(`[data-place="fact:${place.name}"]`);
  const name = CSS.escape(place.name ?? '');
  const kinds = place.column === 'pieces' ? ['piece'] : ['measure', 'fit', 'name'];
  return (
    kinds.map((kind) => find(`[data-place="${kind}:${name}"]`)).find((element) => element !== null) ??
    find(`[data-column="${place.column}"]`)
  );
}

const NTH: Partial<Record<ProofItem['code'], string>> = {
  'live measure': '.measure',
  'no alt text': '.photo',
  'unknown piece': '.piece-card',
  'typed number': '.stray-number',
  'unknown step': '[data-step-ref]',
  'link broken': 'a[href]:not([data-step-ref])',
};

function inWriteUp(code: ProofItem['code'] | undefined, { nth, step }: ProofItem['place']): HTMLElement | null {
  const all = (selector: string) => [
    ...document.querySelectorAll<HTMLElement>(`[data-column="write-up"] .ProseMirror ${selector}`),
  ];
  const selector = code === undefined ? undefined : NTH[code];
  const exact = selector === undefined || nth === undefined ? undefined : all(selector)[nth];
  return exact ?? (step === undefined ? null : (all('.step')[step - 1] ?? null));
}

function focusOn(element: HTMLElement | null): void {
  if (element === null) return;
  const target = element.matches('input, textarea, select, button, [tabindex], [contenteditable]')
    ? element
    : (element.querySelector<HTMLElement>('input, textarea, button') ?? element);
  element.scrollIntoView({ block: 'center' });
  target.focus({ preventScroll: true });
  element.animate?.([{ outline: '3px solid var(--plum)' }, { outline: '3px solid transparent' }], { duration: 1200 });
}
