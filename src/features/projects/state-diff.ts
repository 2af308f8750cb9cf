import { diffWordsWithSpace } from 'diff';
import type { Pattern } from '@/engine';
import type { WriteUp } from '@/writeup/document';
import { align } from './align';
import type { ProjectState } from './project';
import { alikeBlocks, blockName, blockWords, fieldLines, isStep, type LooseNode } from './state-words';

/** One thing that differs between two states: empty before when it was put in, empty after when it was taken out. */
export interface StateChange {
  /** "Step 3, The lower spine", "strip width". */
  readonly where: string;
  readonly before: string;
  readonly after: string;
}
export interface ChangeGroup {
  readonly title: string;
  readonly changes: readonly StateChange[];
}
/** A run of words that is the same in both, or stands in one of them only. */
export interface WordRun {
  readonly kind: 'same' | 'gone' | 'new';
  readonly text: string;
}

/** What differs between two states of a project, in the order of the desk; groups without a change are left out. */
export function stateChanges(before: ProjectState, after: ProjectState): readonly ChangeGroup[] {
  const groups: ChangeGroup[] = [
    { title: 'Facts', changes: factChanges(before, after) },
    { title: 'Measures', changes: named(before.pattern.measures, after.pattern.measures) },
    { title: 'Choices', changes: named(before.pattern.choices, after.pattern.choices) },
    { title: 'Pieces', changes: named(before.pattern.pieces, after.pattern.pieces) },
    { title: 'Fits', changes: named(before.pattern.fits, after.pattern.fits) },
    { title: 'Rest of the pattern', changes: restChanges(before.pattern, after.pattern) },
    { title: 'Size shown first', changes: sizingChanges(before, after) },
    { title: 'Write-up', changes: writeUpChanges(before.writeUp, after.writeUp) },
  ];
  return groups.filter(({ changes }) => changes.length > 0);
}

/** The words of a change in order, what is gone before what is new. Texts that have little in common stand one after the other. */
export function wordRuns({ before, after }: Pick<StateChange, 'before' | 'after'>): readonly WordRun[] {
  const runs = diffWordsWithSpace(before, after).map(
    ({ value, added, removed }): WordRun => ({ kind: added ? 'new' : removed ? 'gone' : 'same', text: value }),
  );
  const shared = runs.reduce((sum, { kind, text }) => sum + (kind === 'same' ? text.trim().length : 0), 0);
  if (before === '' || after === '' || shared * 3 >= Math.min(before.length, after.length)) return runs;
  return [
    { kind: 'gone', text: before },
    { kind: 'same', text: '\n' },
    { kind: 'new', text: after },
  ];
}

const same = (a: unknown, b: unknown): boolean => JSON.stringify(a) === JSON.stringify(b);
const one = (where: string, before: string, after: string): StateChange[] =>
  before === after ? [] : [{ where, before, after }];

function factChanges(before: ProjectState, after: ProjectState): StateChange[] {
  const minutes = (state: ProjectState) => (state.minutes === null ? '' : String(state.minutes));
  return [
    ...one('Title', before.title, after.title),
    ...one('Summary', before.summary, after.summary),
    ...one('Minutes at the table', minutes(before), minutes(after)),
    ...(before.hero === after.hero ? [] : [{ where: 'First picture', ...pictureWords(before.hero, after.hero) }]),
  ];
}

const pictureWords = (before: string | null, after: string | null) => ({
  before: before === null ? 'The folded box' : 'A photo',
  after: after === null ? 'The folded box' : before === null ? 'A photo' : 'Another photo',
});

/** Things with names; one that was renamed counts as taken out and put in. */
function named(before: readonly { name: string }[], after: readonly { name: string }[]): StateChange[] {
  const old = new Map(before.map((item) => [item.name, item]));
  const now = new Map(after.map((item) => [item.name, item]));
  return [...new Set([...now.keys(), ...old.keys()])].flatMap((name) => {
    const [was, is] = [old.get(name), now.get(name)];
    return same(was, is) ? [] : [changeOf(name, was, is)];
  });
}

/** Of a thing that stays only the fields that differ, so that a large piece reads in a few lines. */
function changeOf(where: string, was: unknown, is: unknown): StateChange {
  const [before, after] = [fieldLines(was), fieldLines(is)];
  if (was === undefined || is === undefined) return { where, before: before.join('\n'), after: after.join('\n') };
  return {
    where,
    before: before.filter((line) => !after.includes(line)).join('\n'),
    after: after.filter((line) => !before.includes(line)).join('\n'),
  };
}

const SAID_ABOVE = new Set<string>(['measures', 'choices', 'pieces', 'fits']);

function restChanges(before: Pattern, after: Pattern): StateChange[] {
  const fields = [...new Set([...Object.keys(before), ...Object.keys(after)])] as (keyof Pattern)[];
  return fields
    .filter((field) => !SAID_ABOVE.has(field) && !same(before[field], after[field]))
    .map((field) => changeOf(field, before[field] ?? '', after[field] ?? ''));
}

function sizingChanges({ sizing: before }: ProjectState, { sizing: after }: ProjectState): StateChange[] {
  const said = (value: number | string | undefined) =>
    value === undefined ? 'usual' : typeof value === 'number' ? `${Number(value.toFixed(4))} mm` : value;
  const both = (a: object, b: object) => [...new Set([...Object.keys(a), ...Object.keys(b)])];
  return [
    ...both(before.values, after.values).flatMap((name) =>
      one(name, said(before.values[name]), said(after.values[name])),
    ),
    ...both(before.choices, after.choices).flatMap((name) =>
      one(name, said(before.choices[name]), said(after.choices[name])),
    ),
    ...one('Units', before.units, after.units),
    ...one('Cut grid', before.grid, after.grid),
  ];
}

const SAME_WORDS = 'The words are the same; bold, links, units or a picture changed.';

function writeUpChanges(before: WriteUp, after: WriteUp): StateChange[] {
  const [was, is] = [before.doc.content as readonly LooseNode[], after.doc.content as readonly LooseNode[]];
  const number = (blocks: readonly LooseNode[]) => {
    let n = 0;
    return new Map(blocks.map((block) => [block, isStep(block) ? (n += 1) : null]));
  };
  const numbers = new Map([...number(was), ...number(is)]);
  return align(was, is, { key: (block) => JSON.stringify(block), alike: alikeBlocks }).flatMap((pair) => {
    if (same(pair.before, pair.after)) return [];
    const block = pair.after ?? pair.before;
    const where = blockName(block, numbers.get(block) ?? null);
    const change = {
      where,
      before: pair.before ? blockWords(pair.before) : '',
      after: pair.after ? blockWords(pair.after) : '',
    };
    return change.before === change.after ? [{ where, before: '', after: SAME_WORDS }] : [change];
  });
}
