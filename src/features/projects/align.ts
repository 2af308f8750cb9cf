import { diffArrays } from 'diff';

/** Two items that are one and the same before and after, or one that was put in or taken out. */
export type Pair<T> =
  | { readonly before: T; readonly after: T }
  | { readonly before: T; readonly after?: undefined }
  | { readonly before?: undefined; readonly after: T };

/**
 * Which item of one list is which of the other, in order: first those that are the same, as many as can be; then, between
 * them, those that are alike. Every item of both lists comes once.
 */
export function align<T>(
  before: readonly T[],
  after: readonly T[],
  { key, alike }: { readonly key: (item: T) => string; readonly alike: (a: T, b: T) => boolean },
): readonly Pair<T>[] {
  const pairs: Pair<T>[] = [];
  let [i, j] = [0, 0];
  let gone: T[] = [];
  let come: T[] = [];
  const close = () => {
    pairs.push(...pairAlike(gone, come, alike));
    gone = [];
    come = [];
  };
  for (const part of diffArrays(before.map(key), after.map(key))) {
    const { length } = part.value;
    if (part.removed) gone.push(...before.slice(i, (i += length)));
    else if (part.added) come.push(...after.slice(j, (j += length)));
    else {
      close();
      for (let k = 0; k < length; k += 1) pairs.push({ before: before[i + k] as T, after: after[j + k] as T });
      i += length;
      j += length;
    }
  }
  close();
  return pairs;
}

function pairAlike<T>(gone: readonly T[], come: readonly T[], alike: (a: T, b: T) => boolean): Pair<T>[] {
  const pairs: Pair<T>[] = [];
  let from = 0;
  for (const before of gone) {
    const at = come.findIndex((item, n) => n >= from && alike(before, item));
    if (at < 0) {
      pairs.push({ before });
      continue;
    }
    for (const after of come.slice(from, at)) pairs.push({ after });
    pairs.push({ before, after: come[at] as T });
    from = at + 1;
  }
  for (const after of come.slice(from)) pairs.push({ after });
  return pairs;
}
