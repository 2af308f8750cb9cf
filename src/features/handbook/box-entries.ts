import type { ShelfPattern } from '@/features/projects/pattern-shelf.server';

/** Boxes of one kind, as the handbook lists them. */
export interface BoxGroup {
  readonly group: string;
  readonly boxes: readonly ShelfPattern[];
}

/** The patterns that have an entry, by kind and then by name, both in the order of the alphabet. */
export function groupBoxes(
  patterns: readonly ShelfPattern[],
  entries: readonly { readonly id: string }[],
): readonly BoxGroup[] {
  const written = new Set(entries.map(({ id }) => id));
  const boxes = patterns
    .filter(({ slug }) => written.has(slug))
    .sort((a, b) => a.group.localeCompare(b.group) || a.name.localeCompare(b.name));
  const groups = [...new Set(boxes.map(({ group }) => group))];
  return groups.map((group) => ({ group, boxes: boxes.filter((box) => box.group === group) }));
}
