import type { WriteUp } from '@/writeup/document';
import { collectUses } from '@/writeup/uses';

/** Ids of the pictures that a write-up and its hero show, each once; the hero first, the rest in reading order. */
export function uploadsIn(writeUp: WriteUp, heroUploadId: string | null): readonly string[] {
  const shown = collectUses(writeUp.doc).photos.map(({ upload }) => upload);
  return [...new Set(heroUploadId ? [heroUploadId, ...shown] : shown)];
}
