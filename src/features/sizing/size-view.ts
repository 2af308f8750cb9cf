import { evaluate, type Figures, type Model } from '@/engine';
import { insideWords } from './facts';
import { onWholeSteps } from './reader-store';
import type { Verdict } from './verdict';

/** What a reader's page works out from one verdict but for the sheets; the same on the server and in the browser. */
export interface SizeView {
  readonly verdict: Verdict;
  /** The asked size moved onto the ruler's whole steps, where that is another size and can be made. */
  readonly whole: Figures | null;
  readonly insideWords: string;
}

export function sizeView(model: Model, verdict: Verdict): SizeView {
  const moved = verdict.good ? onWholeSteps(model, verdict.asked, verdict.figures) : null;
  const whole = moved ? evaluate(model, moved) : null;
  return {
    verdict,
    whole: whole && whole.problems.length === 0 ? whole : null,
    insideWords: insideWords(verdict.shown),
  };
}
