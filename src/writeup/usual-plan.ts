import { planSheets, type Figures, type SheetPlan } from '@/engine';

const plans = new WeakMap<Figures, SheetPlan>();

/** How the pieces lie on the sheets that cardstock is mostly sold in, where no reader has said which they have. */
export function usualPlan(figures: Figures): SheetPlan {
  let plan = plans.get(figures);
  if (!plan) plans.set(figures, (plan = planSheets(figures, { stock: '12x12in', tries: 100 })));
  return plan;
}
