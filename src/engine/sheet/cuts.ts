import { atLeast, isZero, snap, toNanometres } from '../measure';
import { boxOf, type Box, type Piecework } from './layout';
import type { Stock } from './stock';

export interface Part extends Box {
  readonly piece: string;
  /** Laid with its across along the sheet's along. */
  readonly turned: boolean;
}
export interface Offcut extends Box {
  /** A letter. */
  readonly name: string;
}
/** What a cut sets free, and its size. A strip is cut further; slivers are too narrow to keep; an edge is the margin. */
export interface Freed {
  readonly is: 'piece' | 'offcut' | 'strip' | 'sliver' | 'edge';
  /** Of the piece; the offcut's letter; empty otherwise. */
  readonly name: string;
  readonly across: number;
  readonly along: number;
}
/** A straight cut from edge to edge of what is in the hand. `across`: the blade runs left to right, at `at` from the top. */
export interface Cut {
  readonly n: number;
  readonly runs: 'across' | 'along';
  readonly at: number;
  /** How far from the left or top edge of what is in the hand it is measured. */
  readonly measure: number;
  readonly from: { readonly x: number; readonly y: number };
  readonly to: { readonly x: number; readonly y: number };
  /** What is in the hand: a strip of this size, or the whole sheet. */
  readonly of: { readonly across: number; readonly along: number };
  /** What lies between the edge and the blade, and what lies beyond. */
  readonly off: Freed;
  readonly rest: Freed;
}

/** Narrower than this, what is left over is no use: less than a glue tab. */
const SLIVER = 12;

interface Sheet {
  readonly stock: Stock;
  readonly margin: number;
  /** Of the piece that each blank is. */
  readonly names: readonly string[];
  readonly nextName: () => string;
}

/** A strip of a sheet as it is cut, in millimetres on the sheet. */
type Strip = Box &
  (
    | { readonly is: 'piece' | 'offcut' | 'sliver' | 'edge'; readonly name: string }
    | { readonly is: 'strip'; readonly name: ''; readonly runs: 'across' | 'along'; readonly strips: readonly Strip[] }
  );

/** Parts, cuts and lettered offcuts of a sheet. Strips come off in one direction first, then each is cut further. */
export function cutsOf(work: Piecework, sheet: Sheet) {
  const parts: Part[] = [];
  const offcuts: Offcut[] = [];
  const margin = toNanometres(sheet.margin);
  const stripOf = (one: Piecework): Strip => {
    const box = boxOf(one.region, margin);
    if (one.is === 'strips')
      return { ...box, is: 'strip', name: '', runs: one.across ? 'along' : 'across', strips: one.strips.map(stripOf) };
    if (one.is === 'over') {
      if (!atLeast(Math.min(box.across, box.along), SLIVER)) return { ...box, is: 'sliver', name: '' };
      const offcut = { name: sheet.nextName(), ...box };
      offcuts.push(offcut);
      return { ...box, is: 'offcut', name: offcut.name };
    }
    const piece = sheet.names[one.blank] as string;
    parts.push({ piece, ...box, turned: one.turned });
    return { ...box, is: 'piece', name: piece };
  };
  const whole = withEdges(stripOf(work), sheet);
  const cuts: Omit<Cut, 'n'>[] = [];
  cutStrip(whole, cuts);
  return { parts, offcuts, cuts: cuts.map((cut, index): Cut => ({ n: index + 1, ...cut })) };
}

function cutStrip(strip: Strip, cuts: Omit<Cut, 'n'>[]): void {
  if (strip.is !== 'strip') return;
  const along = strip.runs === 'along';
  let { x, y, across: wide, along: tall } = strip;
  strip.strips.slice(0, -1).forEach((off, index) => {
    const measure = along ? off.across : off.along;
    const last = index === strip.strips.length - 2;
    const left = along ? { across: snap(wide - measure), along: tall } : { across: wide, along: snap(tall - measure) };
    const at = snap((along ? x : y) + measure);
    cuts.push({
      runs: strip.runs,
      at,
      measure,
      from: along ? { x: at, y } : { x, y: at },
      to: along ? { x: at, y: snap(y + tall) } : { x: snap(x + wide), y: at },
      of: { across: wide, along: tall },
      off: freed(off),
      rest: last ? freed(strip.strips.at(-1) as Strip) : { is: 'strip', name: '', ...left },
    });
    [x, y, wide, tall] = along ? [at, y, left.across, tall] : [x, at, wide, left.along];
  });
  for (const one of strip.strips) cutStrip(one, cuts);
}
const freed = ({ is, name, across, along }: Strip): Freed => ({ is, name, across, along });

/** The four strips of the margin come off before anything else. */
function withEdges(inner: Strip, { stock, margin }: Sheet): Strip {
  if (isZero(margin)) return inner;
  const [wide, tall] = [snap(stock.across - 2 * margin), snap(stock.along - 2 * margin)];
  const edge = (x: number, y: number, across: number, along: number): Strip => ({
    x,
    y,
    across,
    along,
    is: 'edge',
    name: '',
  });
  const column: Strip = {
    ...{ x: margin, y: 0, across: wide, along: stock.along, is: 'strip', name: '', runs: 'across' },
    strips: [edge(margin, 0, wide, margin), inner, edge(margin, snap(margin + tall), wide, margin)],
  };
  return {
    ...{ x: 0, y: 0, across: stock.across, along: stock.along, is: 'strip', name: '', runs: 'along' },
    strips: [edge(0, 0, margin, stock.along), column, edge(snap(margin + wide), 0, margin, stock.along)],
  };
}
