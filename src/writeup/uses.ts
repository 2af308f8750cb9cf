import { whenOf } from './condition';
import type { BlockNode, DocNode, InlineNode } from './document';

/** Where something stands: the step (from 1) it is in, or null before, between and after the steps. */
export interface Place {
  readonly step: number | null;
}
/** What a write-up leans on, each in order of appearance. */
export interface Uses {
  /** Live measures, as written. */
  readonly formulas: readonly (Place & { readonly formula: string })[];
  /** What steps and phrases depend on, as written; a phrase that is marked up inside counts once. */
  readonly conditions: readonly (Place & { readonly when: string })[];
  /** Steps that the text speaks of by number; `found` when there is one of that key. */
  readonly references: readonly (Place & { readonly key: string; readonly found: boolean })[];
  readonly pieces: readonly (Place & { readonly piece: string })[];
  /** Pieces whose curves are drawn at full size. */
  readonly curves: readonly (Place & { readonly piece: string })[];
  readonly photos: readonly (Place & { readonly upload: string; readonly alt: string })[];
  readonly cutLists: readonly Place[];
  readonly materials: readonly Place[];
  /** How many steps there are. */
  readonly steps: number;
}

/** Everything in the write-up that points outside it: for the proof list, for publishing, for lighting up what belongs together. */
export function collectUses(doc: DocNode): Uses {
  const formulas: (Place & { formula: string })[] = [];
  const conditions: (Place & { when: string })[] = [];
  const references: (Place & { key: string; found: boolean })[] = [];
  const keys = new Set(doc.content.flatMap((node) => (node.type === 'step' && node.attrs.key ? [node.attrs.key] : [])));
  const pieces: (Place & { piece: string })[] = [];
  const curves: (Place & { piece: string })[] = [];
  const photos: (Place & { upload: string; alt: string })[] = [];
  const cutLists: Place[] = [];
  const materials: Place[] = [];
  let steps = 0;

  const inline = (content: readonly InlineNode[] | undefined, step: number | null) => {
    let before = '';
    for (const node of content ?? []) {
      const when = whenOf(node);
      if (when !== '' && when !== before) conditions.push({ step, when });
      before = when;
      if (node.type === 'measure') formulas.push({ step, formula: node.attrs.formula });
      if (node.type === 'stepRef') references.push({ step, key: node.attrs.key, found: keys.has(node.attrs.key) });
    }
  };
  const blocks = (content: readonly BlockNode[], step: number | null) => {
    for (const node of content) block(node, step);
  };
  const block = (node: BlockNode, step: number | null): void => {
    switch (node.type) {
      case 'step':
        steps += 1;
        if (node.attrs.when) conditions.push({ step: steps, when: node.attrs.when });
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
      case 'forward':
        if (node.attrs.key !== '') references.push({ step, key: node.attrs.key, found: keys.has(node.attrs.key) });
        return blocks(node.content, step);
      case 'tools':
      case 'tip':
      case 'caution':
      case 'correction':
        return blocks(node.content, step);
      case 'table':
        return node.content.forEach((row) => row.content.forEach((cell) => blocks(cell.content, step)));
      case 'curveTemplate':
        return void curves.push({ step, piece: node.attrs.piece });
      case 'amounts':
      case 'sheetPlan':
      case 'foldedView':
      case 'sizeSummary':
        return;
      default:
        return node satisfies never;
    }
  };
  blocks(doc.content, null);
  return { formulas, conditions, references, pieces, curves, photos, cutLists, materials, steps };
}

/** Every formula that a page of the write-up works out, conditions among them, for a model that is sealed for it. */
export function formulasToSeal(doc: DocNode): readonly string[] {
  const { formulas, conditions } = collectUses(doc);
  return [...new Set([...formulas.map(({ formula }) => formula), ...conditions.map(({ when }) => when)])];
}
