import { compilePattern, evaluate, keyOf, showValue, sweep, type Model, type Pattern, type Sizing } from '@/engine';

/** What came of trying the range for one way of choosing. */
export interface WayTried {
  readonly tried: number;
  readonly failing: number;
  /** The first size that cannot be made, in words and as a sizing, and why. */
  readonly first: { readonly sizing: Sizing; readonly size: string; readonly sentence: string } | null;
  /** For each measure asked first, between which values nothing failed; in mm or plain. */
  readonly works: Readonly<Record<string, { readonly from: number; readonly to: number }>>;
}

const MOST_WAYS = 16;
/** For each way of choosing: the corners and edges of the range, and as many sizes between. */
const SIZES = 200;

/**
 * The author's size with every way of choosing, the author's own first; where those would be more than sixteen, each option
 * once with the others as the author has them.
 */
export function waysOf(pattern: Pattern, sizing: Sizing): readonly Sizing[] {
  const own = pattern.choices.map(({ name, usual, options }) => ({
    name,
    options,
    chosen: Object.entries(sizing.choices).find(([key]) => keyOf(key) === keyOf(name))?.[1] ?? usual,
  }));
  const withChoices = (choices: Readonly<Record<string, string>>): Sizing => ({ ...sizing, choices });
  const asIs = Object.fromEntries(own.map(({ name, chosen }) => [name, chosen]));
  const all = own.reduce((n, { options }) => n * options.length, 1);
  if (all > MOST_WAYS)
    return [
      asIs,
      ...own.flatMap(({ name, options, chosen }) =>
        options.filter((option) => option !== chosen).map((option) => ({ ...asIs, [name]: option })),
      ),
    ]
      .slice(0, MOST_WAYS)
      .map(withChoices);
  const ways = own.reduce<readonly Readonly<Record<string, string>>[]>(
    (so, { name, options, chosen }) =>
      [chosen, ...options.filter((option) => option !== chosen)].flatMap((option) =>
        so.map((way) => ({ ...way, [name]: option })),
      ),
    [{}],
  );
  return ways.map(withChoices);
}

/** Tries the ways one after the other, so that whoever waits hears of each. Nothing for a pattern that does not read. */
export function* tryRange(pattern: Pattern, ways: readonly Sizing[]): Generator<WayTried> {
  const compiled = compilePattern(pattern);
  if (!compiled.ok) return;
  for (const way of ways) {
    const { tried, failing, first, works } = sweep(compiled.value, way, { count: SIZES });
    yield {
      tried,
      failing,
      works,
      first: first && {
        sizing: first.sizing,
        size: sizeWords(compiled.value, first.sizing),
        sentence: first.problem.sentence,
      },
    };
  }
}

/** "inside width 2 in, inside height 10 in, lid none": what was answered. */
function sizeWords(model: Model, sizing: Sizing): string {
  const { measures } = evaluate(model, sizing);
  const values = measures
    .filter(({ asked, inUse, set }) => asked && inUse && set)
    .map(
      ({ name, exact, kind, unit }) =>
        `${name} ${showValue(exact, kind, { units: sizing.units, grid: sizing.grid, unit }).text}`,
    );
  const choices = model.choices.flatMap(({ def }) => {
    const option = sizing.choices[def.name];
    return option === undefined || option === def.usual ? [] : [`${def.name} ${option}`];
  });
  return [...values, ...choices].join(', ');
}

/** Between which values nothing failed, whatever was chosen, where that is less than what is asked for. */
export function narrowerRanges(
  tried: readonly WayTried[],
  asked: readonly { readonly name: string; readonly from?: number; readonly to?: number }[],
  step: number,
): readonly { readonly name: string; readonly from: number; readonly to: number }[] {
  return asked.flatMap(({ name, from, to }) => {
    const works = tried.flatMap(({ works: way }) => way[name] ?? []);
    if (from === undefined || to === undefined || works.length === 0) return [];
    const [low, high] = [Math.max(...works.map((one) => one.from)), Math.min(...works.map((one) => one.to))];
    return low < high && (low > from + step || high < to - step) ? [{ name, from: low, to: high }] : [];
  });
}
