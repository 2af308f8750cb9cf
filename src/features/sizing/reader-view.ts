import { evaluate, planSheets, STOCKS, type Figures, type Model, type SheetPlan, type Stock } from '@/engine';
import { planOn, readStock as readLinked } from '@/features/sheets/stock-link';
import { insideWords, sheetsWords } from './facts';
import { onWholeSteps } from './reader-store';
import type { Verdict } from './verdict';

/** All that a reader's page works out from one verdict; the same on the server and in the browser. */
export interface ReaderView {
  readonly verdict: Verdict;
  readonly stock: Stock;
  readonly plan: SheetPlan;
  /** The asked size moved onto the ruler's whole steps, where that is another size and can be made. */
  readonly whole: Figures | null;
  readonly insideWords: string;
  readonly sheetsWords: string;
}

/** Cardstock is mostly sold in scrapbook squares. */
export const USUAL_STOCK: Stock = STOCKS['12x12in'];

/** With fewer `tries` than usual the plan comes sooner; the page looks for better ones afterwards. */
export function readerView(model: Model, verdict: Verdict, stock: Stock, tries?: number): ReaderView {
  const plan = planSheets(verdict.shown, { ...planOn(stock), ...(tries === undefined ? {} : { tries }) });
  const moved = verdict.good ? onWholeSteps(model, verdict.asked, verdict.figures) : null;
  const whole = moved ? evaluate(model, moved) : null;
  return {
    verdict,
    stock,
    plan,
    whole: whole && whole.problems.length === 0 ? whole : null,
    insideWords: insideWords(verdict.shown),
    sheetsWords: sheetsWords(plan),
  };
}

/** The sheet that a link says; the usual one for what does not read. */
export function readStock(text: string | null): Stock {
  return (text === null ? null : readLinked(text)) ?? USUAL_STOCK;
}

/** What stays in every link on the page beside the sizing: the sheet, and an edition that is not the newest. */
export function keepParams(stock: Stock, edition: number | string | null): string {
  const params = new URLSearchParams();
  if (stock.id !== USUAL_STOCK.id) params.set('card', stock.id);
  if (edition !== null) params.set('edition', String(edition));
  return params.toString();
}
