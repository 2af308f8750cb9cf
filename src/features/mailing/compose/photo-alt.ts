import type { BlockNode, DocNode } from '@/writeup/document';

/** The words that the write-up gives a picture; empty when it does not show it or says nothing. */
export function photoAlt(doc: DocNode, upload: string): string {
  for (const photo of photosIn(doc.content)) if (photo.upload === upload && photo.alt) return photo.alt;
  return '';
}

function* photosIn(blocks: readonly BlockNode[]): Generator<{ readonly upload: string; readonly alt: string }> {
  for (const block of blocks) {
    if (block.type === 'photo') yield block.attrs;
    else if (block.type === 'step' || block.type === 'tip' || block.type === 'caution' || block.type === 'materials')
      yield* photosIn(block.content);
    else if (block.type === 'bulletList' || block.type === 'orderedList')
      for (const item of block.content) yield* photosIn(item.content);
  }
}
