import { keyOf, type CreaseDef, type GridPieceDef, type Side } from '@/engine';
import type { CellKind } from '@/features/projects/grid-edits';

/** The lists of a grid piece whose items belong to a cell. */
export interface Features {
  readonly corners: NonNullable<GridPieceDef['corners']>[number];
  readonly notches: NonNullable<GridPieceDef['notches']>[number];
  readonly slots: NonNullable<GridPieceDef['slots']>[number];
  readonly holes: NonNullable<GridPieceDef['holes']>[number];
  readonly creases: CreaseDef;
  readonly rolls: NonNullable<GridPieceDef['rolls']>[number];
  readonly edges: NonNullable<GridPieceDef['edges']>[number];
}
export type FeatureList = keyof Features;

/** One field of an item: a formula, words from a few, or a name. */
export interface FeatureField<T> {
  readonly label: string;
  readonly is: 'formula' | 'name' | readonly string[];
  readonly get: (item: T) => string | undefined;
  readonly set: (item: T, value: string) => T;
}
export interface FeatureSpec<L extends FeatureList> {
  readonly list: L;
  readonly add: string;
  readonly heading: string;
  /** Which kinds of cell may have one. */
  readonly on: readonly CellKind[];
  /** One at most. */
  readonly single?: boolean;
  readonly fresh: (cell: string, taken: readonly string[]) => Features[L];
  readonly fields: readonly FeatureField<Features[L]>[];
  /** Where its faults stand, after the piece. */
  readonly place: (item: Features[L]) => string;
}

function field<T extends object>(key: keyof T & string, label: string, is: FeatureField<T>['is'] = 'formula') {
  return {
    label,
    is,
    get: (item: T) => item[key] as string | undefined,
    set: (item: T, value: string): T => ({ ...item, [key]: value }),
  };
}
/** Left away when it is empty. */
function spare<T extends object>(key: keyof T & string, label: string, is: FeatureField<T>['is'] = 'formula') {
  return {
    ...field<T>(key, label, is),
    set: (item: T, value: string): T => ({ ...item, [key]: value.trim() === '' ? undefined : value }),
  };
}
const end = (key: 'from' | 'to', axis: 0 | 1, label: string): FeatureField<CreaseDef> => ({
  label,
  is: 'formula',
  get: (item) => item[key][axis],
  set: (item, value) => ({ ...item, [key]: axis === 0 ? [value, item[key][1]] : [item[key][0], value] }),
});

const SIDES: readonly Side[] = ['top', 'right', 'bottom', 'left'];
const CORNERS = ['top left', 'top right', 'bottom right', 'bottom left'] as const;

export const FEATURES: { readonly [L in FeatureList]: FeatureSpec<L> } = {
  corners: {
    list: 'corners',
    add: 'Rounded corner',
    heading: 'Rounded corner',
    on: ['panel'],
    fresh: (cell) => ({ cell, corner: 'top left', radius: '1/4 in' }),
    fields: [field('corner', 'Corner', CORNERS), field('radius', 'Radius'), spare('when', 'Only when')],
    place: (item) => `${item.corner} corner of “${item.cell}”`,
  },
  notches: {
    list: 'notches',
    add: 'Thumb notch',
    heading: 'Thumb notch',
    on: ['panel'],
    fresh: (cell) => ({ cell, side: 'top', at: '1 in', radius: '3/8 in' }),
    fields: [
      field('side', 'Side', SIDES),
      field('at', 'Middle at'),
      field('radius', 'Radius'),
      spare('when', 'Only when'),
    ],
    place: (item) => `notch of “${item.cell}”`,
  },
  slots: {
    list: 'slots',
    add: 'Slot or window',
    heading: 'Slot or window',
    on: ['panel', 'tab', 'flap'],
    fresh: (cell) => ({ cell, across: '1 in', along: '1 in', width: '1 in', height: '1/2 in' }),
    fields: [
      field('across', 'Middle from left'),
      field('along', 'Middle from top'),
      field('width', 'Wide'),
      field('height', 'Tall'),
      spare('when', 'Only when'),
    ],
    place: (item) => `slot of “${item.cell}”`,
  },
  holes: {
    list: 'holes',
    add: 'Round hole',
    heading: 'Round hole',
    on: ['panel', 'tab', 'flap'],
    fresh: (cell) => ({ cell, across: '1 in', along: '1 in', diameter: '1/4 in' }),
    fields: [
      field('across', 'Middle from left'),
      field('along', 'Middle from top'),
      field('diameter', 'Diameter'),
      spare('when', 'Only when'),
    ],
    place: (item) => `hole of “${item.cell}”`,
  },
  creases: {
    list: 'creases',
    add: 'Crease',
    heading: 'Crease',
    on: ['panel', 'flap'],
    fresh: (cell) => ({ cell, is: 'valley', from: ['0 in', '0 in'], to: ['1 in', '1 in'] }),
    fields: [
      field('is', 'Folds', ['valley', 'mountain']),
      end('from', 0, 'From, across'),
      end('from', 1, 'From, along'),
      end('to', 0, 'To, across'),
      end('to', 1, 'To, along'),
      spare('parts', 'Parts off', 'name'),
      spare('angle', 'Turn'),
      spare('when', 'Only when'),
    ],
    place: (item) => `crease of “${item.cell}”`,
  },
  rolls: {
    list: 'rolls',
    add: 'Roll it',
    heading: 'Rolled',
    on: ['panel'],
    single: true,
    fresh: (cell) => ({ cell, radius: '1 in' }),
    fields: [field('radius', 'Radius'), spare('when', 'Only when')],
    place: (item) => `roll of “${item.cell}”`,
  },
  edges: {
    list: 'edges',
    add: 'Name an edge for fits',
    heading: 'Edge for fits',
    on: ['panel', 'cap', 'tab', 'flap'],
    fresh: (cell, taken) => ({ name: freeEdge(taken), cell, side: 'bottom' }),
    fields: [field('name', 'Called', 'name'), field('side', 'Side', SIDES)],
    place: (item) => `edge “${item.name}”`,
  },
};

function freeEdge(taken: readonly string[]): string {
  const known = taken.map(keyOf);
  return ['edge', ...known.map((_, i) => `edge ${i + 2}`)].find((name) => !known.includes(name)) ?? 'edge';
}
