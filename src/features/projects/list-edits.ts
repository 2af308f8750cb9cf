/** Lists with one item changed; the list that was given stays as it was. */
export const replacedAt = <T>(list: readonly T[], index: number, item: T): readonly T[] =>
  list.map((one, i) => (i === index ? item : one));
export const removedAt = <T>(list: readonly T[], index: number): readonly T[] => list.filter((_, i) => i !== index);
export const insertedAt = <T>(list: readonly T[], index: number, item: T): readonly T[] => [
  ...list.slice(0, index),
  item,
  ...list.slice(index),
];
/** The item at `from` stands at `to` afterwards. A place outside the list changes nothing. */
export function movedTo<T>(list: readonly T[], from: number, to: number): readonly T[] {
  const item = list[from];
  if (item === undefined || to < 0 || to >= list.length || from === to) return list;
  return insertedAt(removedAt(list, from), to, item);
}

/** The first of `stem`, `stem 2`, `stem 3`… that is not taken, however it is written. */
export function freeName(stem: string, taken: Iterable<string>): string {
  const known = new Set([...taken].map((name) => name.trim().toLowerCase()));
  for (let n = 1; ; n += 1) {
    const name = n === 1 ? stem : `${stem} ${n}`;
    if (!known.has(name.toLowerCase())) return name;
  }
}
