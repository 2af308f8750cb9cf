import { keyOf, type Model, type PieceFigure } from '@/engine';
import { readLive, type LiveFigures } from '../live';
import { stemsOf } from './stems';

export type Axis = 'across' | 'along';
/** One thing that a formula is in the pattern, with the words that people say of it. */
export interface Sense {
  readonly is: 'measure' | 'finished' | 'blank' | 'part' | 'score';
  /** "Floor", for what belongs to a piece. */
  readonly piece?: string;
  readonly axis?: Axis;
  readonly words: readonly string[];
}
/** A formula that a number in the text may stand for, with its values at the author's size, in millimetres. */
export interface Candidate {
  readonly formula: string;
  /** What it is, in words: "Floor, across". */
  readonly says: string;
  readonly exact: number;
  readonly cut: number;
  /** How many terms the formula has. */
  readonly terms: number;
  readonly asked: boolean;
  readonly finer: boolean;
  /** False for a measure whose condition does not hold at the author's size. */
  readonly inUse: boolean;
  readonly senses: readonly Sense[];
}

const known = new WeakMap<LiveFigures, readonly Candidate[]>();

/** Every length that a number in the text may mean: measures, sizes of pieces, of their columns and rows, and places of scores. */
export function candidatesOf(live: LiveFigures): readonly Candidate[] {
  const before = known.get(live);
  if (before) return before;
  const collected = new Map<string, { senses: Sense[]; says: string }>();
  const put = (formula: string, says: string, sense: Sense) => {
    const one = collected.get(formula);
    if (one) one.senses.push(sense);
    else collected.set(formula, { senses: [sense], says });
  };
  for (const figure of live.figures.measures)
    if (figure.kind === 'length') put(figure.name, figure.name, { is: 'measure', words: stemsOf(figure.name) });
  for (const where of ['inside', 'outside'] as const)
    for (const { def } of live.model.finished[where])
      put(def.formula, `${where}, ${def.name}`, { is: 'finished', words: [where, ...stemsOf(def.name)] });
  for (const piece of live.figures.pieces)
    sizesOfPiece(live.model, piece, put, (formula) => valueOf(live, formula)?.cut ?? null);

  const idle = new Set(live.figures.measures.filter(({ inUse }) => !inUse).map(({ name }) => name));
  const measures = new Map(live.model.measures.map(({ def }) => [def.name, def]));
  const candidates = [...collected].flatMap(([formula, { senses, says }]): Candidate[] => {
    const value = valueOf(live, formula);
    if (value === null || value.cut <= 0) return [];
    const ask = measures.get(formula)?.ask;
    const terms = formula.split(' + ').length;
    return [
      {
        formula,
        says,
        ...value,
        terms,
        asked: ask !== undefined,
        finer: ask?.finer ?? false,
        inUse: !idle.has(formula),
        senses,
      },
    ];
  });
  known.set(live, candidates);
  return candidates;
}

function valueOf(live: LiveFigures, formula: string): { readonly exact: number; readonly cut: number } | null {
  const read = readLive(live.model, formula);
  return read.ok && read.value.kind === 'length' ? read.value.value(live.figures) : null;
}

type Put = (formula: string, says: string, sense: Sense) => void;

function sizesOfPiece(model: Model, piece: PieceFigure, put: Put, lengthOf: (name: string) => number | null): void {
  const stem = keyOf(piece.name);
  const shape = model.pieces.find(({ def }) => def.name === piece.name)?.shape;
  if (shape?.builder === 'disc') {
    const diameter = nameOf(model, shape.diameter) ?? `${stem}.across`;
    return put(diameter, `${piece.name}, diameter`, { is: 'blank', piece: piece.name, words: ['diameter'] });
  }
  for (const axis of ['across', 'along'] as const)
    put(`${stem}.${axis}`, `${piece.name}, ${axis}`, { is: 'blank', piece: piece.name, axis, words: [axis] });
  if (shape?.builder !== 'grid') return;
  for (const [axis, tracks] of [
    ['across', shape.columns],
    ['along', shape.rows],
  ] as const) {
    const inUse = tracks
      .map((track) => ({ name: track.name, formula: formulaOf(model, stem, track) }))
      .filter(({ name }) => (lengthOf(`${stem}.${keyOf(name)}`) ?? 0) > 0);
    for (const { name, formula } of inUse)
      put(formula, `${piece.name}, ${name}`, { is: 'part', piece: piece.name, axis, words: stemsOf(name) });
    const last = inUse.at(-1);
    if (last && inUse.length > 1)
      put(last.formula, `${piece.name}, ${last.name}`, {
        is: 'score',
        piece: piece.name,
        axis,
        words: [axis === 'across' ? 'right' : 'bottom'],
      });
    // A score lies where a column ends: the sum of what stands before it.
    inUse.slice(0, -1).forEach(({ name }, n) => {
      const sum = inUse.slice(0, n + 1).map(({ formula }) => formula);
      put(sum.join(' + '), `${piece.name}, score after ${name}`, { is: 'score', piece: piece.name, axis, words: [] });
    });
  }
}

/** A column or row that is one measure is called by it. */
const formulaOf = (model: Model, stem: string, { name, size, when }: Track): string =>
  (when === undefined ? nameOf(model, size) : null) ?? `${stem}.${keyOf(name)}`;
type Track = Extract<Model['pieces'][number]['shape'], { builder: 'grid' }>['columns'][number];

/** The measure that a formula is and nothing else. */
const nameOf = (model: Model, { node }: Track['size']): string | null =>
  node.type === 'name' ? (model.measures.find(({ key }) => key === keyOf(node.name))?.def.name ?? null) : null;
