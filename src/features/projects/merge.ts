import { compilePattern, type Pattern } from '@/engine';
import { readLive } from '@/writeup/live';
import { collectUses } from '@/writeup/uses';
import type { WriteUp } from '@/writeup/document';
import { mergeWriteUps } from './merge-write-up';
import { createJudge, type Choices, type Clash, type Judge } from './merge-clash';
import type { ProjectState } from './project';
import { fieldLines } from './state-words';

export type { Choices, Clash } from './merge-clash';
export interface Merged {
  readonly state: ProjectState;
  /** Parts that both changed differently. In `state` they stand as `choices` say, else as mine. */
  readonly clashes: readonly Clash[];
}
export interface Versions {
  /** What both were made from; null when it is not known, then everything that differs is a clash. */
  readonly base: ProjectState | null;
  readonly mine: ProjectState;
  readonly other: ProjectState;
}

/**
 * Puts two versions of a project together. What one of them changed is taken over; what both changed is a clash, told with
 * both readings. Nothing that one of them put in is left out, and what one changed while the other took it out stays. Where
 * each version reads by itself and the merged one does not (a measure renamed here, used anew there), the pattern and the
 * write-up are a clash as a whole.
 */
export function mergeStates(versions: Versions, choices: Choices = {}): Merged {
  const judge = createJudge(choices);
  const state = mergeWith(versions, judge);
  if (reads(state) || !reads(versions.mine) || !reads(versions.other)) return { state, clashes: judge.clashes() };
  const together = whole(versions, judge);
  return { state: { ...state, ...together }, clashes: judge.clashes() };
}

/** The same part by part, without asking whether what comes out reads. */
export function mergeParts(versions: Versions, choices: Choices = {}): Merged {
  const judge = createJudge(choices);
  const state = mergeWith(versions, judge);
  return { state, clashes: judge.clashes() };
}

function mergeWith({ base, mine, other }: Versions, judge: Judge): ProjectState {
  const field = <K extends 'title' | 'summary' | 'minutes' | 'hero'>(key: K, where: string): ProjectState[K] =>
    judge.three(where, { base: base?.[key], mine: mine[key], other: other[key] }, (value) => String(value ?? ''));
  const sizing = <K extends 'units' | 'grid'>(key: K, where: string) =>
    judge.three(where, { base: base?.sizing[key], mine: mine.sizing[key], other: other.sizing[key] }, String);
  return {
    title: field('title', 'Title'),
    summary: field('summary', 'Summary'),
    minutes: field('minutes', 'Minutes at the table'),
    hero: field('hero', 'First picture'),
    pattern: mergePatterns(base?.pattern, mine.pattern, other.pattern, judge),
    sizing: {
      values: mergeRecords('Size shown first', [base?.sizing.values, mine.sizing.values, other.sizing.values], judge),
      choices: mergeRecords(
        'Choice shown first',
        [base?.sizing.choices, mine.sizing.choices, other.sizing.choices],
        judge,
      ),
      units: sizing('units', 'Units'),
      grid: sizing('grid', 'Cut grid'),
    },
    writeUp: mergeWriteUps(base?.writeUp, mine.writeUp, other.writeUp, judge),
  };
}

const NAMED = { measures: 'Measure', choices: 'Choice', pieces: 'Piece', fits: 'Fit', materials: 'Material' } as const;

function mergePatterns(base: Pattern | undefined, mine: Pattern, other: Pattern, judge: Judge): Pattern {
  const fields = [...new Set([...Object.keys(mine), ...Object.keys(other)])] as (keyof Pattern)[];
  const merged = fields.map((field): [string, unknown] => {
    const word = NAMED[field as keyof typeof NAMED] as string | undefined;
    if (word === undefined)
      return [
        field,
        judge.three(`Pattern, ${field}`, { base: base?.[field], mine: mine[field], other: other[field] }, words),
      ];
    const list = (pattern: Pattern | undefined) => pattern?.[field] as readonly Thing[] | undefined;
    return [field, mergeNamed(word, [list(base), list(mine), list(other)], judge)];
  });
  return Object.fromEntries(merged.filter(([, value]) => value !== undefined)) as unknown as Pattern;
}

type NamedLists = readonly [
  base: readonly Thing[] | undefined,
  mine: readonly Thing[] | undefined,
  other: readonly Thing[] | undefined,
];
interface Thing {
  readonly name: string;
}
const words = (value: unknown): string => fieldLines(value).join('\n');

/** Things with names, in the order of whichever side changed it; what the other put in follows what it follows there. */
function mergeNamed(word: string, [base, mine, other]: NamedLists, judge: Judge): readonly Thing[] | undefined {
  if (mine === undefined && other === undefined) return undefined;
  const names = (list: readonly Thing[] | undefined) => (list ?? []).map(({ name }) => name);
  const of = (list: readonly Thing[] | undefined, name: string) => list?.find((thing) => thing.name === name);
  const merged = new Map<string, Thing>();
  for (const name of new Set([...names(mine), ...names(other)])) {
    const thing = judge.kept(
      `${word} ${name}`,
      { base: of(base, name), mine: of(mine, name), other: of(other, name) },
      words,
    );
    if (thing !== undefined) merged.set(name, thing);
  }
  const common = (list: readonly Thing[] | undefined) => names(list).filter((name) => of(base, name) !== undefined);
  const movedByMe =
    common(mine).join('\n') !==
    common(base)
      .filter((name) => of(mine, name))
      .join('\n');
  const [first, second] = movedByMe || base === undefined ? [names(mine), names(other)] : [names(other), names(mine)];
  return interleave(first, second).flatMap((name) => merged.get(name) ?? []);
}

/** The first list with what only the second has, each after what it follows there. */
function interleave(first: readonly string[], second: readonly string[]): readonly string[] {
  const order = [...first];
  second.forEach((name, i) => {
    if (order.includes(name)) return;
    const before = second.slice(0, i).findLast((earlier) => order.includes(earlier));
    order.splice(before === undefined ? 0 : order.indexOf(before) + 1, 0, name);
  });
  return order;
}

type Records<T> = readonly [
  Readonly<Record<string, T>> | undefined,
  Readonly<Record<string, T>>,
  Readonly<Record<string, T>>,
];

function mergeRecords<T extends number | string>(
  where: string,
  [base, mine, other]: Records<T>,
  judge: Judge,
): Record<string, T> {
  const merged: Record<string, T> = {};
  for (const name of new Set([...Object.keys(mine), ...Object.keys(other)])) {
    const value = judge.three(
      `${where}, ${name}`,
      { base: base?.[name], mine: mine[name], other: other[name] },
      (said) =>
        said === undefined ? 'usual' : typeof said === 'number' ? `${Number(said.toFixed(4))} mm` : String(said),
    );
    if (value !== undefined) merged[name] = value;
  }
  return merged;
}

function reads({ pattern, writeUp }: { readonly pattern: Pattern; readonly writeUp: WriteUp }): boolean {
  const compiled = compilePattern(pattern);
  return compiled.ok && collectUses(writeUp.doc).formulas.every(({ formula }) => readLive(compiled.value, formula).ok);
}

/** Pattern and write-up of one side, chosen as one. */
function whole({ mine, other }: Versions, judge: Judge): Pick<ProjectState, 'pattern' | 'writeUp'> {
  const side = judge.side({
    where: 'Measures, pieces and write-up together',
    mine: 'Yours reads by itself, and so does the other; put together, a name in it leads nowhere.',
    other: 'Both stay among the revisions, whichever you choose.',
  });
  return side === 'other'
    ? { pattern: other.pattern, writeUp: other.writeUp }
    : { pattern: mine.pattern, writeUp: mine.writeUp };
}
