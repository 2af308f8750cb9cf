import { evaluate, showValue, type Figures, type Model, type Sizing, type SizingProblem } from '@/engine';
import { withValue } from './sizing-values';

/** A sizing that works, offered in place of one that does not. */
export interface Cure {
  /** `Use 4 1/2 in`, `Back to 2 1/4 in`. */
  readonly label: string;
  readonly sizing: Sizing;
}
export interface Refusal {
  readonly problem: SizingProblem;
  readonly cures: readonly Cure[];
}
/** What a reader asked for, and what the page may show for it. */
export interface Verdict {
  readonly asked: Sizing;
  /** The asked sizing can be made. */
  readonly good: boolean;
  /** Figures of the asked sizing, also when it cannot be made. */
  readonly figures: Figures;
  /** Figures that can be made: those of the asked sizing or, when it cannot be made, the last good ones. */
  readonly shown: Figures;
  /** Whose figures are shown: the nearest size that works, or the fallback's. */
  readonly instead: 'nothing' | 'nearest' | 'fallback';
  readonly refusals: readonly Refusal[];
}

/** Cures are followed this often before the fallback is taken: each may uncover one more problem. */
const ROUNDS = 4;

/**
 * Judges a sizing. When it cannot be made, `fallback` keeps the page on figures that can: the last good sizing in a
 * browser, the author's size on the server (where the nearest that works is tried first: `nearest`).
 */
export function judge(model: Model, asked: Sizing, fallback: Sizing, { nearest = false } = {}): Verdict {
  const figures = evaluate(model, asked);
  if (figures.problems.length === 0)
    return { asked, good: true, figures, shown: figures, instead: 'nothing', refusals: [] };
  const near = nearest ? nearestGood(model, figures) : null;
  const shown = near ?? evaluate(model, inUnitsOf(fallback, asked));
  return {
    asked,
    good: false,
    figures,
    shown,
    instead: near ? 'nearest' : 'fallback',
    refusals: figures.problems.map((problem) => ({ problem, cures: curesFor(problem, asked, figures, shown) })),
  };
}

function nearestGood(model: Model, from: Figures): Figures | null {
  let figures = from;
  for (let round = 0; round < ROUNDS && figures.problems.length > 0; round += 1) {
    const curable = figures.problems.filter((problem) => problem.nearest !== null);
    if (curable.length === 0) return null;
    figures = evaluate(
      model,
      curable.reduce((sizing, { measure, nearest }) => withValue(sizing, measure, nearest), figures.sizing),
    );
  }
  return figures.problems.length === 0 ? figures : null;
}

function curesFor(problem: SizingProblem, asked: Sizing, figures: Figures, shown: Figures): readonly Cure[] {
  const measure = figures.measures.find(({ name }) => name === problem.measure);
  if (!measure?.asked) return [];
  const good = shown.measures.find(({ name }) => name === problem.measure);
  const named = (value: number) =>
    showValue(value, measure.kind, { units: asked.units, grid: asked.grid, unit: measure.unit }).typeset;
  const cures: Cure[] = [];
  if (problem.nearest !== null)
    cures.push({ label: `Use ${named(problem.nearest)}`, sizing: withValue(asked, problem.measure, problem.nearest) });
  if (
    good &&
    good.exact !== measure.exact &&
    named(good.exact) !== (problem.nearest === null ? '' : named(problem.nearest))
  ) {
    cures.push({ label: `Back to ${named(good.exact)}`, sizing: withValue(asked, problem.measure, good.exact) });
  }
  return cures;
}

/** The same box, spoken of in the asked sizing's units and cut to its grid. */
function inUnitsOf(sizing: Sizing, asked: Sizing): Sizing {
  return { ...sizing, units: asked.units, grid: asked.grid };
}
