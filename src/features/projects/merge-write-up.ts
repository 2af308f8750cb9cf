import type { BlockNode, WriteUp } from '@/writeup/document';
import { align } from './align';
import { same, type Judge } from './merge-clash';
import { alikeBlocks, blockName, blockWords, isStep, type LooseNode } from './state-words';

/**
 * Two write-ups block by block; what both changed is gone through inside, down to a paragraph. Blocks put in by both sides all
 * stay. Without a base, blocks that are alike and differ are clashes.
 */
export function mergeWriteUps(base: WriteUp | undefined, mine: WriteUp, other: WriteUp, judge: Judge): WriteUp {
  const content = mergeBlocks(
    base ? loose(base.doc.content) : null,
    { mine: loose(mine.doc.content), other: loose(other.doc.content) },
    { judge, path: '' },
  );
  return { ...mine, doc: { ...mine.doc, content: content as unknown as readonly BlockNode[] } };
}
const loose = (blocks: readonly BlockNode[]) => blocks as readonly LooseNode[];

interface At {
  readonly judge: Judge;
  /** "Step 3, The lower spine, " inside a step. */
  readonly path: string;
}

/** What one side made of the base: for each of its blocks what it is now, and what was put in before it. */
interface Fate {
  readonly now: readonly (LooseNode | undefined)[];
  /** One longer than the base: what was put in before each block, and at the end. */
  readonly putIn: readonly (readonly LooseNode[])[];
}

function fateOf(base: readonly LooseNode[], side: readonly LooseNode[]): Fate {
  const now: (LooseNode | undefined)[] = [];
  const putIn: LooseNode[][] = [[]];
  for (const { before, after } of align(base, side, { key: (block) => JSON.stringify(block), alike: alikeBlocks })) {
    if (before === undefined) putIn.at(-1)?.push(after);
    else {
      now.push(after);
      putIn.push([]);
    }
  }
  return { now, putIn };
}

/** Blocks that hold blocks, and may hold more or fewer of them. */
const HOLDERS = new Set(['step', 'materials', 'tip', 'caution', 'bulletList', 'orderedList', 'listItem']);

function mergeBlocks(
  base: readonly LooseNode[] | null,
  { mine, other }: { readonly mine: readonly LooseNode[]; readonly other: readonly LooseNode[] },
  at: At,
): readonly LooseNode[] {
  if (same(mine, other) || same(other, base)) return mine;
  if (same(mine, base)) return other;
  if (base === null) return mergeWithoutBase(mine, other, at);
  const [here, there] = [fateOf(base, mine), fateOf(base, other)];
  const merged: LooseNode[] = [];
  const putIn = (i: number) => {
    const [ours, theirs] = [here.putIn[i] ?? [], there.putIn[i] ?? []];
    merged.push(...theirs.filter((block) => !ours.some((own) => same(own, block))), ...ours);
  };
  let step = 0;
  base.forEach((block, i) => {
    putIn(i);
    if (isStep(block)) step += 1;
    merged.push(
      ...mergeBlock(
        { base: block, mine: here.now[i], other: there.now[i] },
        { ...at, path: `${at.path}${blockName(here.now[i] ?? block, isStep(block) ? step : null)}` },
      ),
    );
  });
  putIn(base.length);
  return merged.length > 0 ? merged : mine;
}

function mergeWithoutBase(mine: readonly LooseNode[], other: readonly LooseNode[], at: At): readonly LooseNode[] {
  let step = 0;
  return align(mine, other, { key: (block) => JSON.stringify(block), alike: alikeBlocks }).flatMap(
    ({ before, after }) => {
      const block = before ?? after;
      if (isStep(block)) step += 1;
      if (before === undefined || after === undefined) return [block];
      const path = `${at.path}${blockName(block, isStep(block) ? step : null)}`;
      return mergeBlock({ base: null, mine: before, other: after }, { ...at, path });
    },
  );
}

function mergeBlock(
  {
    base,
    mine,
    other,
  }: { readonly base: LooseNode | null; readonly mine: LooseNode | undefined; readonly other: LooseNode | undefined },
  at: At,
): readonly LooseNode[] {
  if (mine === undefined) return other === undefined || same(other, base) ? [] : [other];
  if (other === undefined) return same(mine, base) ? [] : [mine];
  if (same(mine, other) || same(other, base)) return [mine];
  if (same(mine, base)) return [other];
  if (HOLDERS.has(mine.type) && mine.type === other.type) return [mergeHolder({ base, mine, other }, at)];
  const { judge, path } = at;
  const side = judge.side({ where: path, mine: blockWords(mine), other: blockWords(other), bothCanStand: true });
  return side === 'both' ? [mine, other] : [side === 'other' ? other : mine];
}

function mergeHolder(
  { base, mine, other }: { readonly base: LooseNode | null; readonly mine: LooseNode; readonly other: LooseNode },
  { judge, path }: At,
): LooseNode {
  const names = [...new Set([...Object.keys(mine.attrs ?? {}), ...Object.keys(other.attrs ?? {})])];
  const attrs = Object.fromEntries(
    names.map((name) => [
      name,
      judge.three(
        `${path}, its ${name}`,
        { base: base?.attrs?.[name], mine: mine.attrs?.[name], other: other.attrs?.[name] },
        (value) => (typeof value === 'object' ? JSON.stringify(value) : String(value ?? '')),
      ),
    ]),
  );
  const content = mergeBlocks(
    base === null ? null : (base.content ?? []),
    { mine: mine.content ?? [], other: other.content ?? [] },
    { judge, path: `${path}, ` },
  );
  return { ...mine, ...(names.length > 0 ? { attrs } : {}), content };
}
