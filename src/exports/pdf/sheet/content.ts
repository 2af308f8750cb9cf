import type { Figures, Model, SheetPlan } from '@/engine';

/** Everything on a measurement sheet that the figures do not say themselves, in the reader's words. */
export interface SheetContent {
  readonly title: string;
  /** Who wrote it up, which edition, of which day; empty for a bare pattern. */
  readonly byline: readonly string[];
  readonly model: Model;
  /** Pieces as they are cut: for all boxes of the plan, and joined ones in two parts. */
  readonly figures: Figures;
  /** The one box, its pieces whole: what folds. */
  readonly box: Figures;
  readonly plan: SheetPlan;
  readonly facts: readonly Fact[];
  /** `9 × 6 × 2 1/4 in inside, cut to the nearest 1/16 in` */
  readonly sizeWords: string;
  /** The address of this very size; null when there is none. */
  readonly address: string | null;
  readonly steps: readonly StepLine[];
  readonly cautions: readonly string[];
  /** The day the edition was published. */
  readonly date: Date;
}
/** What templates say of it. */
export type TemplatesContent = Pick<SheetContent, 'title' | 'byline' | 'figures' | 'sizeWords' | 'date'>;
export interface Fact {
  readonly term: string;
  readonly value: string;
  /** Smaller, below the value. */
  readonly more: string;
}
export interface StepLine {
  readonly title: string;
  /** `optional` */
  readonly mark: string;
}
