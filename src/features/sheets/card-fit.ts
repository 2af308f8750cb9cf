import { foldsRun, planSheets, type PieceFigure } from '@/engine';
import { ICONS } from '@/components/icons';
import { esc } from '@/exports/escape';
import { cardUsed, haveWords, stocksOf, type MySheets } from './my-sheets';
import { planOn } from './stock-link';

/** The card that one box takes, as a list of projects carries it: across, along, how many, how most folds run. */
export type CardBlank = readonly [across: number, along: number, count: number, folds: 'across' | 'along' | null];

/** How a box comes out of what somebody has. */
export interface CardFit {
  readonly enough: boolean;
  readonly words: string;
}

/** A list shows many boxes: few trials each. Its page looks longer. */
const TRIES = 30;

export const blanksOf = (pieces: readonly PieceFigure[]): readonly CardBlank[] =>
  pieces
    .filter(({ stock }) => stock === 'card')
    .map(({ across, along, count, net }) => [across, along, count, foldsRun(net)]);

/** `2 of your 12 × 12 in sheets` of the first size that is enough, else what is missing; null when nothing was said. */
export function cardFit(blanks: readonly CardBlank[], sheets: MySheets): CardFit | null {
  if (sheets.length === 0 || blanks.length === 0) return null;
  let nearest: { readonly missing: number; readonly words: string } | null = null;
  for (const { stock, count } of stocksOf(sheets)) {
    const pieces = blanks.map(([across, along, each, folds], index) => ({
      name: String(index),
      stock: 'card' as const,
      across,
      along,
      count: each,
      ...(folds ? { foldsRun: folds } : {}),
    }));
    const plan = planSheets({ pieces }, { ...planOn(stock), tries: TRIES });
    if (plan.tooLarge.length > 0) continue;
    const words = haveWords(plan, sheets);
    const missing = cardUsed(plan) - count;
    if (missing <= 0) return { enough: true, words };
    if (!nearest || missing < nearest.missing) nearest = { missing, words };
  }
  return { enough: false, words: nearest?.words ?? 'too large for your sheets' };
}

/** The last line of a project's card, for the server and the browser alike. */
export function cardLineHtml({ enough, words }: CardFit): string {
  const icon = `<svg class="icon" viewBox="0 0 24 24" width="20" height="20" aria-hidden="true"><path d="${ICONS[enough ? 'check' : 'warning']}"/></svg>`;
  return `${icon} ${esc(words.charAt(0).toUpperCase() + words.slice(1))}`;
}
