import type { DocNode } from '@/writeup/document';
import { collectUses } from '@/writeup/uses';

/** The words that the write-up gives a picture; empty when it does not show it or says nothing. */
export const photoAlt = (doc: DocNode, upload: string): string =>
  collectUses(doc).photos.find((photo) => photo.upload === upload && photo.alt !== '')?.alt ?? '';
