import { evaluate, planSheets, type Figures, type Model, type SheetPlan } from '@/engine';
import { planOptions, writeCutFrom, type CutFrom } from '@/features/sheets/cut-from';
import { insideWords, sheetsWords } from './facts';
import { onWholeSteps } from './reader-store';
import type { Verdict } from './verdict';

/** All that a reader's page works out from one verdict; the same on the server and in the browser. */
export interface ReaderView {
  readonly verdict: Verdict;
  readonly cutFrom: CutFrom;
  readonly plan: SheetPlan;
  /** The asked size moved onto the ruler's whole steps, where that is another size and can be made. */
  readonly whole: Figures | null;
  readonly insideWords: string;
  readonly sheetsWords: string;
}

/** With fewer `tries` than usual the plan comes sooner; the page looks for better ones afterwards. */
export function readerView(model: Model, verdict: Verdict, cutFrom: CutFrom, tries?: number): ReaderView {
  const plan = planSheets(verdict.shown, {
    ...planOptions(cutFrom, verdict.shown.pieces),
    ...(tries === undefined ? {} : { tries }),
  });
  const moved = verdict.good ? onWholeSteps(model, verdict.asked, verdict.figures) : null;
  const whole = moved ? evaluate(model, moved) : null;
  return {
    verdict,
    cutFrom,
    plan,
    whole: whole && whole.problems.length === 0 ? whole : null,
    insideWords: insideWords(verdict.shown),
    sheetsWords: sheetsWords(plan),
  };
}

/** What stays in every link on the page beside the sizing: the sheets, and an edition that is not the newest. */
export function keepParams(cutFrom: CutFrom, edition: number | string | null): string {
  const params = new URLSearchParams();
  writeCutFrom(params, cutFrom);
  if (edition !== null) params.set('edition', String(edition));
  return params.toString();
}
