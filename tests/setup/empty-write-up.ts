import { WRITE_UP_VERSION, type WriteUp } from '@/writeup/document';

/** A write-up with nothing in it yet: one empty paragraph to type in. */
export const emptyWriteUp = (): WriteUp => ({
  version: WRITE_UP_VERSION,
  doc: { type: 'doc', content: [{ type: 'paragraph' }] },
});
