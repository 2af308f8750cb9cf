/** Checks on attribute values, for ProseMirror's `check()`: each throws a plain sentence when the value is not one that we store. */

/** A text of at most `most` characters. */
export const textUpTo = (most: number) => (value: unknown) => {
  if (typeof value !== 'string') throw new RangeError('a text is wanted');
  if (value.length > most) throw new RangeError(`at most ${most} characters are kept`);
};

export const yesNo = (value: unknown) => {
  if (typeof value !== 'boolean') throw new RangeError('yes or no is wanted');
};

/** A whole number of pixels. */
export const pixels = (value: unknown) => {
  if (typeof value !== 'number' || !Number.isInteger(value) || value < 1 || value > 20_000) {
    throw new RangeError('a whole number of pixels from 1 to 20000 is wanted');
  }
};

/** The id of a stored picture: it stands in addresses and file names, so nothing but letters, digits, hyphens and underscores. */
export const uploadId = (value: unknown) => {
  if (typeof value !== 'string' || !/^[\w-]{1,64}$/.test(value))
    throw new RangeError('the id of a stored picture is wanted');
};
