import { planSheets, type Figures, type Model, type SheetPlan } from '@/engine';
import { planOptions } from '@/features/sheets/cut-from';
import { articleDrawings } from './article-drawings';
import { markChanged } from './article-figures';
import { sheetsWords } from './facts';
import { closesWords, type Links } from './live-html';
import { morphInto } from './morph';
import { showSheets } from './panel-dom';
import { createPlanClient } from './plan-client';
import { factsHtml, fitsHtml } from './plan-html';
import type { ReaderState } from './reader-store';

/** Trials for the plan that comes with every change; better ones follow from beside the page. */
const WHILE_SIZING = 100;

export interface DrawnPage {
  /** Brings drawings and sheets to a state and gives the plan in words. */
  show(state: ReaderState, links: Links): string;
  /** The sheets alone: the reader's own were found in the browser. */
  showSheets(state: ReaderState): void;
}

/** What of a reader's page follows a size in drawings and on sheets; fetched after what follows in figures. */
export function drawnPage(
  page: HTMLElement,
  panel: HTMLElement,
  { model, minutes, lost }: { readonly model: Model; readonly minutes: number | null; readonly lost: () => void },
): DrawnPage {
  const article = articleDrawings(page, model, lost);
  const planner = createPlanClient();
  const put = (name: string, html: string) =>
    document
      .querySelectorAll<HTMLElement>(`[data-${name}]`)
      .forEach((element) => morphInto(element, html, markChanged));
  const showPlan = (shown: Figures, plan: SheetPlan, links: Links) => {
    put('facts', factsHtml(shown, plan, minutes));
    put('fits', fitsHtml(shown, plan, links));
    put('dock-closes', `${closesWords(shown)} · ${sheetsWords(plan)}`);
    article.showPlan(shown, plan);
  };
  const optionsOf = ({ cutFrom, verdict }: ReaderState) => planOptions(cutFrom, verdict.shown.pieces);
  const firstPlan = (state: ReaderState) =>
    planSheets(state.verdict.shown, { ...optionsOf(state), tries: WHILE_SIZING });

  return {
    show(state, links) {
      const { verdict } = state;
      const { shown } = verdict;
      const plan = firstPlan(state);
      article.show(shown);
      showPlan(shown, plan, links);
      showSheets(panel, { plan, verdict }, state);
      planner.think(shown, optionsOf(state), plan, (better) => {
        showPlan(shown, better, links);
        showSheets(panel, { plan: better, verdict }, state);
      });
      return sheetsWords(plan);
    },
    showSheets: (state) => showSheets(panel, { plan: firstPlan(state), verdict: state.verdict }, state),
  };
}
