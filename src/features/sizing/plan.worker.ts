// By its path: what a worker is bundled with does not read the aliases.
import { planning, type Planned, type PlanOptions, type SheetPlan } from '../../engine';

/** What the page asks for: pieces, sheets, and how long to think, in trials. */
export interface PlanRequest {
  readonly planned: Planned;
  readonly options: PlanOptions;
}
/** A better plan, with how far the planning has come (0 to 1); the last one says that it is done. */
export interface PlanNews {
  readonly plan: SheetPlan | null;
  readonly share: number;
  readonly done: boolean;
}

/** Stretches of work between two messages: the page hears a few times a second, not a thousand. */
const STRETCHES = 64;

self.addEventListener('message', ({ data }: MessageEvent<PlanRequest>) => {
  const { planned, options } = data;
  let share = 0;
  const { tries = 1 } = options;
  const spent = (trials: number) => {
    share = trials / tries;
    return share;
  };
  const tell = (news: PlanNews) => self.postMessage(news);
  let plan: SheetPlan | null = null;
  let stretch = 0;
  for (const better of planning(planned, { ...options, spent })) {
    if (better) plan = better();
    stretch += 1;
    if (stretch % STRETCHES !== 0) continue;
    tell({ plan, share: Math.min(1, share), done: false });
    plan = null;
  }
  tell({ plan, share: 1, done: true });
});
