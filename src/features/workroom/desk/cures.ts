import { changeMeasure } from '@/features/projects/pattern-edits';
import type { ProofItem } from '@/features/projects/proof';
import type { DeskStore } from './desk-store';
import { curedText } from './cured-text';

/** The one-click cure of a proof item, where there is one: the nearest name put into a worked measure's formula. */
export function cureFor(
  item: ProofItem,
  store: DeskStore,
): { readonly label: string; readonly apply: () => void } | null {
  const { fault, place } = item;
  if (fault?.cure === undefined || place.column !== 'measures' || place.name === undefined) return null;
  const name = place.name;
  const measure = store.$draft.get().pattern.measures.find((known) => known.name === name);
  const formula = measure?.formula === undefined ? null : curedText(fault, measure.formula);
  if (formula === null) return null;
  return {
    label: `Use ${fault.cure}`,
    apply: () => store.editPattern(null, (pattern) => changeMeasure(pattern, name, { formula })),
  };
}
