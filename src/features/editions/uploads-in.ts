import type { BlockNode, WriteUp } from '@/writeup/document';

/** Ids of the pictures that a write-up and its hero show, each once, in reading order; the hero first. */
export function uploadsIn(writeUp: WriteUp, heroUploadId: string | null): readonly string[] {
  const found = new Set<string>(heroUploadId ? [heroUploadId] : []);
  collect(writeUp.doc.content, found);
  return [...found];
}

function collect(blocks: readonly BlockNode[], found: Set<string>): void {
  for (const block of blocks) {
    switch (block.type) {
      case 'photo':
        found.add(block.attrs.upload);
        break;
      case 'bulletList':
      case 'orderedList':
        for (const item of block.content) collect(item.content, found);
        break;
      case 'step':
      case 'tip':
      case 'caution':
      case 'materials':
        collect(block.content, found);
        break;
      case 'paragraph':
      case 'heading':
      case 'pieceCard':
      case 'cutList':
        break;
    }
  }
}
