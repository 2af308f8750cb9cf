/** Whole numbers below twenty, as people say them. */
export const SMALL_NUMBERS: readonly string[] =
  'zero one two three four five six seven eight nine ten eleven twelve thirteen fourteen fifteen sixteen seventeen eighteen nineteen'.split(
    ' ',
  );

/** A small count in words, a larger one in figures: `three`, `sixteen`, `24`. */
export const inWords = (count: number): string => SMALL_NUMBERS[count] ?? `${count}`;
