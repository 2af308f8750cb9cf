import type { PhotoCrop, PhotoNode, VideoMoment } from '../document';
import { videoHref } from '../links';

/** Checks on attribute values, for ProseMirror's `check()`: each throws a plain sentence when the value is not one that we store. */

/** A text of at most `most` characters. */
export const textUpTo = (most: number) => (value: unknown) => {
  if (typeof value !== 'string') throw new RangeError('a text is wanted');
  if (value.length > most) throw new RangeError(`at most ${most} characters are kept`);
};

/** The longest condition that is kept. */
export const CONDITION_LENGTH = 300;

/** What references call a step by, or nothing. */
export const stepKey = (value: unknown) => {
  if (typeof value !== 'string' || !/^[a-z\d]{0,12}$/.test(value))
    throw new RangeError('at most 12 small letters and digits are wanted');
};

export const yesNo = (value: unknown) => {
  if (typeof value !== 'boolean') throw new RangeError('yes or no is wanted');
};

/** Nothing, or a place in a video of less than a day. */
export const videoMoment = (value: unknown) => {
  if (value !== null && !isMoment(value))
    throw new RangeError('a moment is whole seconds from 0 to 86399, with an https address or none');
};
export const isMoment = (value: unknown): value is VideoMoment => {
  if (typeof value !== 'object' || value === null) return false;
  const { seconds, address, ...others } = value as Partial<VideoMoment>;
  return (
    typeof seconds === 'number' &&
    Number.isInteger(seconds) &&
    seconds >= 0 &&
    seconds < 86_400 &&
    (address === null || (typeof address === 'string' && videoHref(address) === address)) &&
    Object.keys(others).length === 0
  );
};

/** What an attribute of pasted HTML holds as JSON, when it is what is wanted; else null. */
export function readJson<T>(text: string | null, wanted: (value: unknown) => value is T): T | null {
  try {
    const value: unknown = text === null ? null : JSON.parse(text);
    return wanted(value) ? value : null;
  } catch {
    return null;
  }
}

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

/** Where a photo is cropped round: tenths across and down, or nothing. */
export const photoFocus = (value: unknown) => {
  if (value !== null && !isFocus(value)) throw new RangeError('two whole tenths from 0 to 10 are wanted, or nothing');
};
export const isFocus = (value: unknown): value is NonNullable<PhotoNode['attrs']['focus']> => {
  if (typeof value !== 'object' || value === null) return false;
  const { across, down, ...others } = value as Record<string, unknown>;
  return (
    [across, down].every((n) => Number.isInteger(n) && Number(n) >= 0 && Number(n) <= 10) &&
    Object.keys(others).length === 0
  );
};

const CROPS: readonly unknown[] = ['whole', 'wide', 'square'] satisfies readonly PhotoCrop[];
export const isCrop = (value: unknown): value is PhotoCrop => CROPS.includes(value);
export const photoCrop = (value: unknown) => {
  if (!isCrop(value)) throw new RangeError('whole, wide or square is wanted');
};

/** How many columns or rows a cell covers. */
export const span = (value: unknown) => {
  if (typeof value !== 'number' || !Number.isInteger(value) || value < 1 || value > 20)
    throw new RangeError('a whole number from 1 to 20 is wanted');
};
