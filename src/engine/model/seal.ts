import { codeOf, nodeOf, workOf, type Formula, type Kind, type Scope } from '../formula';
import { keyOf } from '../pattern/names';
import type { PatternHead, PieceHead } from '../types';
import { sizeStep, sizesOf, stepOf, type CompiledMeasure, type CompiledPiece, type Model, type Step } from './model';

/**
 * A model as plain data, for a page that only works sizes out: its formulas are checked already, so the page needs neither
 * the reader of formulas nor what it says of faults. Made on the server from a compiled model, opened in the browser.
 */
export interface SealedModel {
  readonly pattern: PatternHead;
  /** By slot. */
  readonly names: readonly SealedName[];
  /** Slots in the order in which they are worked out. */
  readonly steps: readonly number[];
  /** The lists of the model, each formula as its code; definitions stand in the pattern. */
  readonly lists: Readonly<Record<string, unknown>>;
  /** Formulas of the text, by how they are written. */
  readonly texts: Readonly<Record<string, SealedFormula>>;
}
interface SealedName {
  readonly name: string;
  readonly kind: Kind;
  readonly options?: readonly string[];
}
export interface SealedFormula {
  readonly code: string;
  readonly kind: Kind;
}

/** A formula of the text for a page whose model is sealed; null when it does not read. */
export function sealFormula(model: Model, text: string): SealedFormula | null {
  const read = model.read(text);
  return read.ok ? sealed(read.value, model.scope) : null;
}
const sealed = ({ node, kind }: Formula, scope: Scope): SealedFormula => ({ code: codeOf(node, scope), kind });

/** `texts` are the live measures that the page shows; the names of measures need not be among them. */
export function sealModel(model: Model, texts: Iterable<string> = []): SealedModel {
  const { scope, measures, choices, pieces, fits, finished, order, materials, placements } = model;
  const names: SealedName[] = [];
  for (const name of scope.all()) {
    const options = scope.options(name);
    names[scope.slot(name)] = { name, kind: scope.kind(name), ...(options ? { options } : {}) };
  }
  const plain = (value: unknown): unknown => {
    if (typeof value !== 'object' || value === null) return value;
    if (Array.isArray(value)) return value.map(plain);
    if ('work' in value) return sealed(value as Formula, scope);
    const parts = Object.entries(value).filter(([key, part]) => key !== 'def' && part !== undefined);
    return Object.fromEntries(parts.map(([key, part]) => [key, plain(part)]));
  };
  const said = order.flatMap(({ says }) =>
    [...says.matchAll(/\[\[(.+?)\]\]/gu)].map((match) => (match[1] ?? '').trim()),
  );
  const read = [...new Set([...texts, ...said])].flatMap((text) => {
    const one = scope.has(keyOf(text)) ? null : sealFormula(model, text);
    return one ? [[text, one] as const] : [];
  });
  return {
    // Layers are worked out last, so the pieces stand in the model's order.
    pattern: { ...model.pattern, pieces: pieces.map(({ def }) => headOf(def)) },
    names,
    steps: model.steps.map(({ slot }) => slot),
    lists: plain({ measures, choices, pieces, fits, finished, order, materials, placements }) as SealedModel['lists'],
    texts: Object.fromEntries(read),
  };
}

export function openModel({ pattern, names, steps, lists, texts }: SealedModel): Model {
  const slots = new Map(names.map(({ name }, slot) => [name, slot]));
  const written = new Map(Object.entries(texts));
  const at = (name: string) => names[slots.get(name) ?? -1];
  const scope: Model['scope'] = {
    has: (name) => name === 'pi' || slots.has(name),
    all: () => slots.keys(),
    options: (name) => at(name)?.options,
    slot: (name) => slots.get(name) ?? -1,
    kind: (name) => at(name)?.kind ?? { type: 'quantity', power: 0, whole: false },
  };
  const formula = ({ code, kind }: SealedFormula): Formula => {
    const node = nodeOf(code, names);
    const uses = new Set([...code.matchAll(/(?:\$|\bis(?:nt)? )(\d+)/g)].map(([, slot]) => Number(slot)));
    return { node, kind, work: workOf(node, scope), uses: [...uses].map((slot) => names[slot]?.name ?? '') };
  };
  const opened = (value: unknown): unknown => {
    if (typeof value !== 'object' || value === null) return value;
    if (Array.isArray(value)) return value.map(opened);
    if ('code' in value) return formula(value as SealedFormula);
    return Object.fromEntries(Object.entries(value).map(([key, part]) => [key, opened(part)]));
  };
  const parts = opened(lists) as Omit<Model, 'pattern' | 'read' | 'scope' | 'slots' | 'steps'>;
  const measures: CompiledMeasure[] = withDefs(parts.measures, pattern.measures);
  const pieces: CompiledPiece[] = withDefs(parts.pieces, pattern.pieces);
  const bySlot = new Map<number, Step>(measures.map((measure) => [measure.slot, stepOf(measure)]));
  for (const piece of pieces)
    for (const { name, parts: tracks } of sizesOf(piece)) {
      const slot = scope.slot(name);
      if (!bySlot.has(slot)) bySlot.set(slot, sizeStep(slot, tracks));
    }
  const { inside, outside } = parts.finished;
  return {
    ...parts,
    pattern,
    scope,
    slots: names.length,
    steps: steps.flatMap((slot) => bySlot.get(slot) ?? []),
    measures,
    choices: withDefs(parts.choices, pattern.choices),
    pieces,
    fits: withDefs(parts.fits, pattern.fits),
    finished: {
      inside: withDefs(inside, pattern.finished.inside),
      outside: withDefs(outside, pattern.finished.outside),
    },
    materials: withDefs(parts.materials, pattern.materials ?? []),
    placements: withDefs(parts.placements, pattern.assembly),
    read: (text) => {
      const known = written.get(text);
      const slot = slots.get(keyOf(text));
      const sealed = known ?? (slot === undefined ? null : { code: `$${slot}`, kind: scope.kind(keyOf(text)) });
      if (sealed) return { ok: true, value: formula(sealed) };
      const fault = {
        code: 'not sealed',
        where: 'live measure',
        found: `“${text}”`,
        expected: 'a known formula',
        hint: '',
      };
      return { ok: false, faults: [fault] };
    },
  };
}

/** Definitions stand in the pattern, in the order of the list. */
function withDefs<T>(list: readonly T[], defs: readonly unknown[]): T[] {
  return list.map((one, index) => ({ ...one, def: defs[index] }));
}

/** What is still asked of a piece's definition once it is compiled. */
const HEAD: readonly string[] = [
  'name',
  'stock',
  'builder',
  'look',
  'remarks',
  'edges',
  'centre',
  'flap',
  'disc',
  'body',
];
const headOf = (def: PieceHead): PieceHead =>
  Object.fromEntries(Object.entries(def).filter(([key]) => HEAD.includes(key))) as unknown as PieceHead;
