import { GRIDS, same, show } from '@/engine';
import type { LiveFigures } from '../live';
import { candidatesOf, type Candidate, type Sense } from './candidates';
import { contextsOf, type Context } from './context';
import type { FoundNumber, Reading } from './find-numbers';

/** A measure that a number may stand for. */
export interface Match {
  readonly formula: string;
  /** "arc", "Floor, across". */
  readonly says: string;
  readonly cut: number;
  readonly exact: number;
  /** How far what was said lies from it, in millimetres; 0 is the same as cut, or as worked out where that was said. */
  readonly off: number;
  readonly reading: Reading;
}
export interface MatchedNumber extends FoundNumber {
  /** The likeliest first: those of the same value, then near ones. */
  readonly matches: readonly Match[];
  /** The first may be taken without being looked at. */
  readonly certain: boolean;
  /** Said of a bought sheet, a ribbon, a cord: most likely no measure of the box. */
  readonly ofMaterial: boolean;
}

/** Near ones are offered up to this far off, and no more than this many in all. */
const NEAR = 25.4 / 16;
const MOST = 9;

/**
 * Which measures the numbers of a text may stand for, by value first, then by what is said round them: names of measures and
 * pieces, wide and tall, "score at", which number of a pair it is. `earlier` is the text before this one, for the piece that it speaks of.
 */
export function matchNumbers(
  text: string,
  found: readonly FoundNumber[],
  live: LiveFigures,
  earlier = '',
): readonly MatchedNumber[] {
  const candidates = candidatesOf(live);
  const weight = rarity(candidates);
  const contexts = contextsOf(
    text,
    found,
    live.figures.pieces.map(({ name }) => name),
    earlier,
  );
  return found.map((number, n) => {
    const context = contexts[n] as Context;
    const ranked = number.readings
      .flatMap((reading) =>
        candidates.flatMap((candidate) => rank({ number, reading, candidate, context, weight, live })),
      )
      .sort((a, b) => a.tier - b.tier || b.score - a.score || a.match.off - b.match.off);
    const matches = distinct(ranked).slice(0, MOST);
    return {
      ...number,
      matches: matches.map(({ match }) => match),
      certain: !number.doubtful && !context.ofMaterial && isCertain(matches),
      ofMaterial: context.ofMaterial,
    };
  });
}

interface Ranked {
  readonly match: Match;
  readonly tier: number;
  readonly score: number;
}
interface Ranking {
  readonly number: FoundNumber;
  readonly reading: Reading;
  readonly candidate: Candidate;
  readonly context: Context;
  readonly weight: (word: string) => number;
  readonly live: LiveFigures;
}

function rank({ number, reading, candidate, context, weight, live }: Ranking): Ranked[] {
  const { formula, says, cut, exact } = candidate;
  const away = (mm: number) => Math.max(0, Math.abs(mm - reading.mm) - number.within);
  const step = GRIDS[live.figures.sizing.grid].step;
  const shown = show(cut, { units: reading.unit, grid: live.figures.sizing.grid });
  const equal = same(away(cut), 0) || same(away(exact), 0) || shown.text === reading.says;
  // A finer or coarser ruler than the author's gives the nearest mark to the same length.
  const rounded = away(exact) <= Math.min(step, NEAR) / 2;
  const off = equal ? 0 : Math.min(away(cut), away(exact));
  if (off > NEAR) return [];
  const score = Math.max(...candidate.senses.map((sense) => senseScore(sense, context, weight))) + prior(candidate);
  const later = number.readings.indexOf(reading) * 4;
  const tier = (equal ? 0 : rounded ? 1 : 2) + later;
  return [{ match: { formula, says, cut, exact, off, reading }, tier, score }];
}

const prior = ({ asked, finer, terms }: Candidate): number =>
  (asked ? 0.4 : 0) - (finer ? 0.5 : 0) - 0.12 * (terms - 1);

/** How well what is said round a number fits one thing that a formula is. */
function senseScore(sense: Sense, context: Context, weight: (word: string) => number): number {
  let [heard, unheard, said] = [0, 0, 0];
  for (const word of sense.words) {
    const near = context.near(word);
    said += near * weight(word);
    if (near > 0) heard += weight(word);
    else unheard += weight(word);
  }
  // A name that was said whole counts for more than half of one.
  const whole = heard + unheard > 0 ? heard / (heard + unheard) : 0;
  let score = 2.4 * said * (0.5 + 0.5 * whole) - (0.9 * unheard) / Math.max(1, sense.words.length);
  if (sense.piece !== undefined && context.piece !== null)
    score += sense.piece === context.piece.name ? 1.6 * context.piece.strength : -1.6 * context.piece.strength;
  return score + roleScore(sense, context);
}

function roleScore({ is, axis }: Sense, { role, nth, axis: said }: Context): number {
  let score = 0;
  if (role === 'score') score += is === 'score' ? 1.6 : is === 'part' ? 0.6 : is === 'blank' ? -2 : 0;
  if (role === 'cut') score += is === 'blank' ? 1.8 : is === 'score' ? -0.8 : 0;
  if (is === 'blank' && role !== 'score') {
    if (said !== null) score += said === axis ? 0.8 : -0.5;
    if (nth !== null) score += (nth === 0) === (axis === 'across') ? 0.9 : -0.6;
  }
  return score;
}

/** A word that many candidates have says little. */
function rarity(candidates: readonly Candidate[]): (word: string) => number {
  const having = new Map<string, number>();
  for (const { senses } of candidates)
    for (const word of new Set(senses.flatMap((sense) => sense.words))) having.set(word, (having.get(word) ?? 0) + 1);
  const all = candidates.length;
  return (word) => Math.log(1 + all / (having.get(word) ?? 1)) / Math.log(1 + all);
}

function distinct(ranked: readonly Ranked[]): readonly Ranked[] {
  const seen = new Set<string>();
  return ranked.filter(({ match: { formula, reading } }) => {
    const key = `${formula} ${reading.mm}`;
    return seen.has(key) ? false : seen.add(key);
  });
}

function isCertain([first, second]: readonly Ranked[]): boolean {
  if (first === undefined || first.tier !== 0) return false;
  const margin = second === undefined || second.tier > 0 ? Infinity : first.score - second.score;
  return (first.score >= 1 && margin >= 1) || (first.score >= 0.4 && margin === Infinity);
}
