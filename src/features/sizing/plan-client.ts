import type { Planned, PlanOptions, SheetPlan } from '@/engine';
import type { PlanNews, PlanRequest } from './plan.worker';

/** How long the worker thinks for each material, in trials: about a second on a desk, two or three on a phone. */
const TRIES = 30_000;
/** A size that is still being changed is not worth thinking about, nor worth loading the planner for. */
const REST = 1500;

/** Looks for better plans beside the page. One at a time: asking again drops what was asked before. */
export interface PlanClient {
  /** `found` is called for every plan that is better than `first`: fewer sheets, or as many and a larger offcut. */
  think(planned: Planned, options: PlanOptions, first: SheetPlan, found: (plan: SheetPlan) => void): void;
  stop(): void;
}

export function createPlanClient(): PlanClient {
  let worker: Worker | null = null;
  let resting: ReturnType<typeof setTimeout> | undefined;
  const stop = () => {
    clearTimeout(resting);
    worker?.terminate();
    worker = null;
  };
  return {
    stop,
    think(planned, options, first, found) {
      stop();
      // A browser without workers keeps the plan that it has.
      if (typeof Worker === 'undefined' || first.used === 0) return;
      resting = setTimeout(() => {
        let best = first;
        worker = new Worker(new URL('./plan.worker.ts', import.meta.url), { type: 'module' });
        worker.addEventListener('message', ({ data }: MessageEvent<PlanNews>) => {
          if (data.plan && isBetter(data.plan, best)) {
            best = data.plan;
            found(best);
          }
          if (data.done) stop();
        });
        worker.addEventListener('error', stop);
        worker.postMessage({ planned: plainOf(planned), options: { ...options, tries: TRIES } } satisfies PlanRequest);
      }, REST);
    },
  };
}

const usefulness = ({ offcut }: SheetPlan): number => (offcut ? offcut.offcut.across * offcut.offcut.along : 0);
/** Fewer sheets; with as many, a larger offcut by more than a square millimetre. */
export const isBetter = (a: SheetPlan, b: SheetPlan): boolean =>
  a.used < b.used || (a.used === b.used && usefulness(a) > usefulness(b) + 1);

/** What the planner reads, without sentences and drawings that would only be copied. */
function plainOf({ pieces, sizing }: Planned): Planned {
  return {
    pieces: pieces.map(({ name, count, across, along, stock, net, thickness }) => ({
      name,
      count,
      across,
      along,
      ...(stock ? { stock } : {}),
      ...(net ? { net } : {}),
      ...(thickness === undefined ? {} : { thickness }),
    })),
    ...(sizing ? { sizing: { grid: sizing.grid } } : {}),
  };
}
