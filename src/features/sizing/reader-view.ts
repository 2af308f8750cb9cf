import { planSheets, type Model, type SheetPlan } from '@/engine';
import { planOptions, type CutFrom } from '@/features/sheets/cut-from';
import { sheetsWords } from './facts';
import { sizeView, type SizeView } from './size-view';
import type { Verdict } from './verdict';

/** All that a reader's page shows of one verdict, as the server draws it. */
export interface ReaderView extends SizeView {
  readonly cutFrom: CutFrom;
  readonly plan: SheetPlan;
  readonly sheetsWords: string;
}

export function readerView(model: Model, verdict: Verdict, cutFrom: CutFrom): ReaderView {
  const plan = planSheets(verdict.shown, planOptions(cutFrom, verdict.shown.pieces));
  return { ...sizeView(model, verdict), cutFrom, plan, sheetsWords: sheetsWords(plan) };
}
