import type { BlockNode, DocNode, InlineNode } from './document';

/** Where something stands: the step (from 1) it is in, or null before, between and after the steps. */
export interface Place {
  readonly step: number | null;
}
/** What a write-up leans on, each in order of appearance. */
export interface Uses {
  /** Live measures, as written. */
  readonly formulas: readonly (Place & { readonly formula: string })[];
  readonly pieces: readonly (Place & { readonly piece: string })[];
  readonly photos: readonly (Place & { readonly upload: string; readonly alt: string })[];
  readonly cutLists: readonly Place[];
  readonly materials: readonly Place[];
  /** How many steps there are. */
  readonly steps: number;
}

/** Everything in the write-up that points outside it: for the proof list, for publishing, for lighting up what belongs together. */
export function collectUses(doc: DocNode): Uses {
  const formulas: (Place & { formula: string })[] = [];
  const pieces: (Place & { piece: string })[] = [];
  const photos: (Place & { upload: string; alt: string })[] = [];
  const cutLists: Place[] = [];
  const materials: Place[] = [];
  let steps = 0;

  const inline = (content: readonly InlineNode[] | undefined, step: number | null) => {
    for (const node of content ?? []) if (node.type === 'measure') formulas.push({ step, formula: node.attrs.formula });
  };
  const blocks = (content: readonly BlockNode[], step: number | null) => {
    for (const node of content) block(node, step);
  };
  const block = (node: BlockNode, step: number | null): void => {
    switch (node.type) {
      case 'step':
        steps += 1;
        return blocks(node.content, steps);
      case 'paragraph':
      case 'heading':
        return inline(node.content, step);
      case 'bulletList':
      case 'orderedList':
        return node.content.forEach((item) => blocks(item.content, step));
      case 'pieceCard':
        return void pieces.push({ step, piece: node.attrs.piece });
      case 'cutList':
        return void cutLists.push({ step });
      case 'photo':
        photos.push({ step, upload: node.attrs.upload, alt: node.attrs.alt });
        return inline(node.content, step);
      case 'materials':
        materials.push({ step });
        return blocks(node.content, step);
      case 'tip':
      case 'caution':
        return blocks(node.content, step);
      default:
        return node satisfies never;
    }
  };
  blocks(doc.content, null);
  return { formulas, pieces, photos, cutLists, materials, steps };
}
