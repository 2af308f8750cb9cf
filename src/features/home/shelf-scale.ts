/**
 * Pixels a millimetre at which every picture fits the largest place: the widest and the tallest decide.
 * With no pictures, or pictures without size, 1.
 */
export function shelfScale(
  pictures: readonly { readonly across: number; readonly up: number }[],
  largest: { readonly across: number; readonly up: number },
): number {
  const across = Math.max(0, ...pictures.map((picture) => picture.across));
  const up = Math.max(0, ...pictures.map((picture) => picture.up));
  if (across === 0 || up === 0) return 1;
  return Math.min(largest.across / across, largest.up / up);
}
