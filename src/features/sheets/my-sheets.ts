import type { SheetPlan, Stock } from '@/engine';
import { readStock } from './stock-link';

/** A size of sheet that a reader has, and how many. */
export interface MySheet {
  /** The sheet as it stands in links: `a4`, `8.5x13in-long`. */
  readonly card: string;
  readonly count: number;
}
export type MySheets = readonly MySheet[];

export const MOST_SIZES = 12;
export const MOST_OF_ONE = 999;

export const isCount = (count: unknown): count is number =>
  Number.isInteger(count) && (count as number) >= 1 && (count as number) <= MOST_OF_ONE;

/** What was kept in a browser, where anything may have become of it: entries that do not read are left out. */
export function readKept(kept: unknown): MySheets {
  if (!Array.isArray(kept)) return [];
  const sheets: MySheet[] = [];
  for (const entry of kept as readonly unknown[]) {
    if (typeof entry !== 'object' || entry === null) continue;
    const { card, count } = entry as Partial<Record<keyof MySheet, unknown>>;
    const stock = typeof card === 'string' ? readStock(card) : null;
    if (stock && isCount(count) && !sheets.some((one) => one.card === stock.id)) sheets.push({ card: stock.id, count });
  }
  return sheets.slice(0, MOST_SIZES);
}

/** With so many more of a size: those of a size that is there already are counted together. */
export function withMore(sheets: MySheets, { card, count }: MySheet): MySheets {
  if (!sheets.some((one) => one.card === card)) return [...sheets, { card, count }];
  return sheets.map((one) => (one.card === card ? { card, count: Math.min(MOST_OF_ONE, one.count + count) } : one));
}

export const without = (sheets: MySheets, card: string): MySheets => sheets.filter((one) => one.card !== card);

/**
 * Two lists as one. A size that stands in both is taken for the same pile, written down twice: the larger number counts.
 * What is past `MOST_SIZES` falls away from the end of `others`.
 */
export function merged(sheets: MySheets, others: MySheets): MySheets {
  const larger = sheets.map(({ card, count }) => ({
    card,
    count: Math.max(count, others.find((one) => one.card === card)?.count ?? 0),
  }));
  const more = others.filter(({ card }) => !sheets.some((one) => one.card === card));
  return [...larger, ...more].slice(0, MOST_SIZES);
}

/** The sheets as the planner knows them, in the reader's order. */
export const stocksOf = (sheets: MySheets): readonly { readonly stock: Stock; readonly count: number }[] =>
  sheets.flatMap(({ card, count }) => {
    const stock = readStock(card);
    return stock ? [{ stock, count }] : [];
  });

/** How many of the plan's sheets are the reader's own card: patterned paper and board come from other piles. */
export const cardUsed = ({ takes }: Pick<SheetPlan, 'takes'>): number =>
  takes.find(({ material }) => material === 'card')?.used ?? 0;

/** `2 of your 12 × 12 in sheets`, `needs 3 sheets of A4, you have 2`; empty when the reader has none of that size. */
export function haveWords(plan: Pick<SheetPlan, 'takes' | 'tooLarge' | 'stock'>, sheets: MySheets): string {
  const mine = sheets.find(({ card }) => card === plan.stock.id);
  if (!mine || plan.tooLarge.length > 0) return '';
  const used = cardUsed(plan);
  const { name } = plan.stock;
  if (used <= mine.count) return `${used} of your ${name} sheets`;
  return `needs ${used} sheets of ${name}, you have ${mine.count}`;
}
