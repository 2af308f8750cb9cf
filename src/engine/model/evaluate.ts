import { LENGTH, diagnose, sameKind, type Formula } from '../formula';
import { GRIDS, decimal, atLeast, moreThan, roundTo, same, showValue, snap } from '../measure';
import { keyOf } from '../pattern/names';
import type { Figures, FitFigure, MeasureFigure, Sizing, SizingProblem, Unit } from '../types';
import { materialsOf } from './materials';
import { formulasOf, tracksOf, type CompiledFit, type CompiledMeasure, type Model } from './model';
import { piecesOf } from './pieces';
import { answerTo, isInUse, workOut, type BothValues } from './values';

/** Values behind figures that were worked out, for live measures; figures made elsewhere have none. */
const behind = new WeakMap<Figures, BothValues>();
export const valuesBehind = (figures: Figures): BothValues | undefined => behind.get(figures);

/**
 * Everything that follows from a size: measures exact and as cut, pieces, fits judged as cut, departure. Never throws: what
 * keeps the box from being made stands in `problems`, each with the measure to change and the nearest value that works.
 */
export function evaluate(model: Model, sizing: Sizing): Figures {
  const { figures, values } = judge(model, sizing);
  const problems = figures.problems.map((problem) => ({
    ...problem,
    nearest: nearestThatWorks(model, sizing, figures, problem),
  }));
  const whole = problems.length === 0 ? figures : { ...figures, problems };
  behind.set(whole, values);
  return whole;
}

/** A sizing with nothing answered: the usual size. */
export function usualSizing(model: Model, units: Unit, grid: Sizing['grid']): Sizing {
  return {
    values: {},
    choices: Object.fromEntries(model.choices.map(({ def }) => [keyOf(def.name), def.usual])),
    units,
    grid,
  };
}

/** A sizing judged without looking for the nearest that works. */
export function judge(model: Model, sizing: Sizing): { figures: Figures; values: BothValues } {
  const values = workOut(model, sizing);
  const problems: SizingProblem[] = [];
  const measures = model.measures.map((measure) => measureFigure(measure, sizing, values));
  for (const measure of model.measures) {
    const problem = valueProblem(model, measure, sizing, values);
    if (problem) problems.push(problem);
  }
  const { pieces, uncut } = problems.some((problem) => problem.code === 'cannot be worked out')
    ? { pieces: [], uncut: [] }
    : piecesOf(model, values, sizing);
  for (const { piece, reason } of uncut)
    problems.push({
      code: 'piece fails',
      measure: firstAskedOf(model, formulasOf(piece.shape)),
      sentence: `The ${piece.def.name.toLowerCase()} cannot be cut at this size: ${reason}.`,
      nearest: null,
    });
  const fits =
    pieces.length === 0 ? [] : model.fits.flatMap((fit) => (isInUse(fit, values.cut) ? [fitFigure(fit, values)] : []));
  for (const fit of fits) {
    if (!fit.holds && !fit.advice)
      problems.push({
        code: 'fit fails',
        measure: fit.change[0] ?? '',
        sentence: `${capital(fit.name)} fails: ${fit.otherwise}`,
        nearest: null,
      });
  }
  const sizes = (list: Model['finished']['inside']) =>
    list.map(({ def, formula }) => ({ name: def.name, mm: snap(formula.work(values.cut)) }));
  let materials: Figures['materials'] | undefined;
  return {
    figures: {
      sizing,
      measures,
      pieces,
      fits,
      finished: { inside: sizes(model.finished.inside), outside: sizes(model.finished.outside) },
      // Worked out when first asked for, as areas are.
      get materials() {
        materials ??= materialsOf(model, pieces, values.cut);
        return materials;
      },
      departure: departureOf(model, values),
      problems,
    },
    values,
  };
}

// ── Measures ─────────────────────────────────────────────────────────────────────────────────────────────────────────

function measureFigure(measure: CompiledMeasure, sizing: Sizing, { exact, cut }: BothValues): MeasureFigure {
  const { def, slot, says, from, to, formula } = measure;
  const exactly = snap(exact[slot] as number);
  // Already snapped when it was rounded.
  const asCut = cut[slot] as number;
  const inUse = isInUse(measure, cut);
  const { name, unit } = def;
  // Spelled out, not spread: a size makes hundreds of these.
  if (from === undefined || to === undefined)
    return unit
      ? { name, kind: says, asked: false, exact: exactly, cut: asCut, inUse, unit }
      : { name, kind: says, asked: false, exact: exactly, cut: asCut, inUse };
  const figure = {
    name,
    kind: says,
    asked: true,
    exact: exactly,
    cut: asCut,
    inUse,
    from: from.work(exact),
    to: to.work(exact),
    usual: formula.work(exact),
    set: answerTo(measure, sizing) !== undefined,
  };
  return unit ? { ...figure, unit } : figure;
}

/** Out of its range, or without a value at this size. */
function valueProblem(
  model: Model,
  measure: CompiledMeasure,
  sizing: Sizing,
  { exact, cut }: BothValues,
): SizingProblem | null {
  const { name } = measure.def;
  const value = exact[measure.slot] as number;
  if (!isInUse(measure, cut)) return null;
  if (!Number.isFinite(value) || !Number.isFinite(cut[measure.slot] as number)) {
    const at = Number.isFinite(value) ? cut : exact;
    // What it needs fails first and says so itself.
    if (measure.formula.uses.some((need) => !Number.isFinite(at[model.scope.slot(need)] as number))) return null;
    const why = diagnose(measure.formula, model.scope, at, { units: sizing.units, grid: sizing.grid });
    return {
      code: 'cannot be worked out',
      measure: askedBehind(model, measure) ?? name,
      sentence: `“${name}” cannot be worked out at this size: ${why}.`,
      nearest: null,
    };
  }
  if (!measure.from || !measure.to) return null;
  if (measure.def.kind === 'whole number' && !same(value, Math.round(value))) {
    return {
      code: 'not whole',
      measure: name,
      sentence: `${capital(name)} is ${decimal(value, 3)}; it must be a whole number.`,
      nearest: null,
    };
  }
  const [from, to] = [measure.from.work(exact), measure.to.work(exact)];
  const says = (mm: number) =>
    showValue(mm, measure.def.kind ?? 'length', { ...sizing, ...(measure.def.unit ? { unit: measure.def.unit } : {}) })
      .text;
  if (Number.isFinite(from) && !atLeast(value, from)) {
    return {
      code: 'below range',
      measure: name,
      sentence: `${capital(name)} is ${says(value)}; here it must be at least ${says(from)}.`,
      nearest: null,
    };
  }
  if (Number.isFinite(to) && !atLeast(to, value)) {
    return {
      code: 'above range',
      measure: name,
      sentence: `${capital(name)} is ${says(value)}; here it can be at most ${says(to)}.`,
      nearest: null,
    };
  }
  return null;
}

/** The first asked measure that a worked one depends on, directly or through others. */
function askedBehind(model: Model, measure: CompiledMeasure): string | null {
  const seen = new Set<string>();
  const queue = [...measure.formula.uses];
  for (let name = queue.shift(); name !== undefined; name = queue.shift()) {
    if (seen.has(name)) continue;
    seen.add(name);
    const found = model.measures.find((one) => keyOf(one.def.name) === name);
    if (found?.def.ask) return found.def.name;
    queue.push(...(found?.formula.uses ?? []));
  }
  return null;
}

const firstAskedOf = (model: Model, formulas: readonly Formula[]): string =>
  model.measures.find(
    (measure) => measure.def.ask && formulas.some((formula) => formula.uses.includes(keyOf(measure.def.name))),
  )?.def.name ??
  model.measures[0]?.def.name ??
  '';

/**
 * The largest difference that cutting to the grid makes to any column or row; to any length that a piece without columns and
 * rows is drawn from.
 */
function departureOf(model: Model, { exact, cut }: BothValues): Figures['departure'] {
  let worst = { mm: 0, where: '' };
  const compare = (before: number, after: number, where: string): void => {
    const mm = snap(after - before);
    if (Math.abs(mm) > Math.abs(worst.mm)) worst = { mm, where };
  };
  for (const piece of model.pieces) {
    if (!isInUse(piece, cut)) continue;
    if (piece.shape.builder !== 'grid') {
      const used = new Set(formulasOf(piece.shape).flatMap((formula) => formula.uses));
      for (const { def, slot, kind } of model.measures) {
        if (!used.has(keyOf(def.name)) || !sameKind(kind, LENGTH)) continue;
        compare(exact[slot] as number, cut[slot] as number, `${piece.def.name}, ${def.name}`);
      }
      continue;
    }
    for (const track of tracksOf(piece)) {
      if (!isInUse(track, cut) || !isInUse(track, exact)) continue;
      compare(track.size.work(exact), track.size.work(cut), `${piece.def.name}, ${track.name}`);
    }
  }
  return worst;
}

// ── Fits ─────────────────────────────────────────────────────────────────────────────────────────────────────────────

function fitFigure({ def, left, right, tolerance }: CompiledFit, { cut }: BothValues): FitFigure {
  const [a, b] = [left.work(cut), right.work(cut)];
  const allowed = tolerance?.work(cut) ?? 0;
  const gap = {
    'at least': a - b,
    'more than': a - b,
    'at most': b - a,
    'less than': b - a,
    'same as': allowed - Math.abs(a - b),
  }[def.is];
  const slack = def.is === 'same as' ? gap : gap + allowed;
  const holds =
    Number.isFinite(slack) &&
    (def.is === 'more than' || def.is === 'less than' ? moreThan(slack, 0) : atLeast(slack, 0));
  return {
    name: def.name,
    holds,
    gap: Number.isFinite(gap) ? snap(def.is === 'same as' ? a - b : gap) : null,
    is: def.is,
    advice: def.advice ?? false,
    otherwise: def.otherwise,
    change: def.change ?? [],
  };
}

// ── The nearest size that works ──────────────────────────────────────────────────────────────────────────────────────

/** Steps of the grid to try outwards from the asked value; the first few one by one, then in growing strides. */
const STRIDES = [
  ...Array.from({ length: 16 }, (_, index) => index + 1),
  20,
  24,
  32,
  40,
  48,
  64,
  80,
  96,
  128,
  160,
  192,
  256,
  384,
  512,
  768,
  1024,
];

/** The value of the problem's measure nearest to the asked one at which nothing fails; null when none in its range does. */
function nearestThatWorks(model: Model, sizing: Sizing, figures: Figures, problem: SizingProblem): number | null {
  const figure = figures.measures.find((one) => keyOf(one.name) === keyOf(problem.measure));
  if (!figure?.asked || figure.from === undefined || figure.to === undefined) return null;
  const step = figure.kind === 'length' ? GRIDS[sizing.grid].step : 1;
  const [low, high] = [roundTo(figure.from, step, 'up'), roundTo(figure.to, step, 'down')];
  const alone = (value: number): Sizing => ({ ...sizing, values: { ...sizing.values, [keyOf(figure.name)]: value } });
  const works = (value: number): boolean => {
    const { problems } = judge(model, alone(value)).figures;
    // Problems of other measures that were there before are not this one's to mend.
    return problems.every(
      (other) =>
        keyOf(other.measure) !== keyOf(problem.measure) &&
        figures.problems.some((before) => before.sentence === other.sentence),
    );
  };
  if (problem.code === 'below range' && works(low)) return low;
  if (problem.code === 'above range' && works(high)) return high;
  const start = roundTo(Math.min(Math.max(figure.exact, low), high), step, 'nearest');
  const inRange = (value: number) => atLeast(value, low) && atLeast(high, value);
  const tried = [
    start,
    ...STRIDES.flatMap((stride) => [snap(start - stride * step), snap(start + stride * step)]),
  ].filter(inRange);
  const found = tried.find(works);
  if (found === undefined) return null;
  // Strides skip values: walk back towards the asked one while it still works.
  let nearest = found;
  for (
    let closer = snap(nearest + (nearest < start ? step : -step));
    nearest !== start && inRange(closer) && works(closer) && Math.abs(closer - start) < Math.abs(nearest - start);
    closer = snap(closer + (closer < start ? step : -step))
  )
    nearest = closer;
  return nearest;
}

const capital = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);
