import { show, snap, type Unit } from '@/engine';
import { amountAt, type Amount } from './amounts';
import { hasCue, isRefused, mayEndHere } from './cues';
import { tokensOf, type Token } from './tokens';
import { unitAfter } from './unit-after';
import { DIRECTIONS, UNITS } from './words';

/** One way to read a number of the text. */
export interface Reading {
  readonly mm: number;
  /** The unit that was said or taken over from its neighbours. */
  readonly unit: Unit;
  /** Characters that this reading stands for. */
  readonly from: number;
  readonly to: number;
  /** As it is understood: "6 1/4 in". */
  readonly says: string;
}
/** A length in the text, written or spoken. */
export interface FoundNumber {
  readonly from: number;
  readonly to: number;
  readonly text: string;
  /** The likeliest first; a second one where the words can be taken another way. */
  readonly readings: readonly [Reading, ...Reading[]];
  /** Heard or typed so that it may mean another thing. */
  readonly doubtful: boolean;
  /** A unit stands inside `text`. */
  readonly hasUnit: boolean;
  /** How far the writing itself may be off, in millimetres: half of the last decimal. */
  readonly within: number;
  /** Numbers said in one breath have one group: "6 by 8 and a quarter", "at 1/2 and 3 1/4". */
  readonly group: number;
  readonly joined: 'alone' | 'by' | 'list';
  /** Its place in the group, from 0. */
  readonly nth: number;
}
export interface FindOptions {
  /** What a number without a unit is taken for. */
  readonly units: Unit;
}

/** An amount with what stands around it. */
interface Seen extends Amount {
  /** Last token with its unit. */
  readonly end: number;
  readonly unitSaid: string | null;
}
type Link = 'by' | 'list';

/**
 * Every length in a text, in order, none overlapping: `6 1/4`, `two and five eighths of an inch`, `12 by 12`, `6.25″`, `40 mm`.
 * Counts, steps, pages, times, weights and angles are no lengths. A bare whole number is one only where the words say so:
 * "score at 3", "8 by 10", "4 wide". What speech recognition garbles (`6 1.4 inches`) is read and doubtful.
 */
export function findNumbers(text: string, { units }: FindOptions): readonly FoundNumber[] {
  const tokens = tokensOf(text);
  const seen = amountsIn(tokens);
  const links = seen.slice(1).map((next, n) => linkBetween(tokens, seen[n] as Seen, next));
  const taken = lengthsAmong(tokens, seen, links);
  const found: FoundNumber[] = [];
  let group = -1;
  let nth = 0;
  seen.forEach((amount, n) => {
    if (!taken[n]) return;
    const link = n > 0 && taken[n - 1] ? (links[n - 1] ?? null) : null;
    if (link === null) group += 1;
    nth = link === null ? 0 : nth + 1;
    const joined = link ?? (taken[n + 1] ? links[n] : null) ?? 'alone';
    const unit = amount.unitSaid ?? unitNearby(seen, links, taken, n);
    found.push({ ...described(text, tokens, amount, unit, units), group, joined, nth });
  });
  return found;
}

function amountsIn(tokens: readonly Token[]): readonly Seen[] {
  const seen: Seen[] = [];
  for (let i = 0; i < tokens.length; i += 1) {
    const amount = amountAt(tokens, i);
    const whole = amount === null ? null : withUnit(tokens, amount);
    if (whole === null) continue;
    seen.push(whole);
    i = whole.end;
  }
  return seen;
}

function withUnit(tokens: readonly Token[], amount: Amount): Seen | null {
  if (amount.unit !== undefined) return { ...amount, end: amount.last, unitSaid: amount.unit };
  const unit = unitAfter(tokens, amount);
  if (unit === null)
    return amount.needsUnit ? withoutSlip(tokens, amount) : { ...amount, end: amount.last, unitSaid: null };
  // "6 inches and a half": the rest comes behind the unit, and has none of its own.
  const rest = amount.form === 'whole' && tokens[unit.end + 1]?.said === 'and' ? amountAt(tokens, unit.end + 2) : null;
  if (
    rest !== null &&
    rest.value < 1 &&
    rest.unit === undefined &&
    unitAfter(tokens, rest) === null &&
    /^an?$|^\d/.test(tokens[rest.first]?.said ?? '')
  )
    return {
      ...amount,
      value: amount.value + rest.value,
      form: 'mixed',
      last: rest.last,
      end: rest.last,
      unitSaid: unit.said,
    };
  return { ...amount, end: unit.end, unitSaid: unit.said };
}
/** Figures that only a unit would have made a fraction stand each for itself. */
function withoutSlip(tokens: readonly Token[], { first }: Amount): Seen | null {
  const token = tokens[first];
  if (token?.is !== 'digits') return null;
  return { first, last: first, end: first, value: Number(token.said), form: 'whole', decimals: 0, unitSaid: null };
}

type Taken = readonly boolean[];

/** How two amounts hang together: `6 by 8`, `4 wide x 6 tall`, `1/2, 3 1/2 and 5`, `2 to 3`. Null when they do not. */
function linkBetween(tokens: readonly Token[], one: Seen, next: Seen): Link | null {
  const between = tokens
    .slice(one.end + 1, next.first)
    .map((token) => token.said)
    .filter((word) => !DIRECTIONS.has(word));
  const words = between.filter((word) => !/^(then|at|again|also|another|about|a|is|it)$/.test(word)).join(' ');
  if (/^(by|x|times)$/.test(words)) return 'by';
  return /^(,|and|, and|or|to|-|&|, or)$/.test(words) ||
    (words === '' && between.length > 0 && between.includes('then'))
    ? 'list'
    : null;
}

/** Which amounts are lengths: by their unit, by what is said before and behind, or by the company they keep. */
function lengthsAmong(tokens: readonly Token[], seen: readonly Seen[], links: readonly (Link | null)[]): Taken {
  const refused = seen.map((amount, n) => {
    const inPair = links[n] === 'by' || links[n - 1] === 'by';
    return amount.unitSaid === null && isRefused(tokens, amount, inPair);
  });
  const taken = seen.map((amount, n) => amount.unitSaid !== null || (!refused[n] && hasCue(tokens, amount)));
  links.forEach((link, n) => {
    if (link === 'by' && !refused[n] && !refused[n + 1]) taken[n] = taken[n + 1] = true;
  });
  const spread = (n: number, from: number, link: Link | null | undefined) => {
    const amount = seen[n];
    if (link == null || taken[n] || !taken[from] || refused[n] || amount === undefined) return;
    // "cut 2, 3 inch squares" are two squares.
    const counts = from > n && amount.form === 'whole' && tokens[amount.end + 1]?.said === ',';
    if (!counts && (from > n || mayEndHere(tokens, amount.end + 1))) taken[n] = true;
  };
  for (let n = 1; n < seen.length; n += 1) spread(n, n - 1, links[n - 1]);
  for (let n = seen.length - 2; n >= 0; n -= 1) spread(n, n + 1, links[n]);
  return taken;
}

/** The unit that a bare number shares: said later in its group, else earlier in it. */
function unitNearby(seen: readonly Seen[], links: readonly (Link | null)[], taken: Taken, n: number): string | null {
  for (let at = n; links[at] != null && taken[at + 1]; at += 1) {
    const said = seen[at + 1]?.unitSaid;
    if (said) return said;
  }
  for (let at = n; at > 0 && links[at - 1] != null && taken[at - 1]; at -= 1) {
    const said = seen[at - 1]?.unitSaid;
    if (said) return said;
  }
  return null;
}

type Described = Omit<FoundNumber, 'group' | 'joined' | 'nth'>;
function described(text: string, tokens: readonly Token[], amount: Seen, unit: string | null, usual: Unit): Described {
  const to = tokens[amount.end]?.to ?? text.length;
  const from = startOf(tokens, amount);
  const scale = (said: string | null) =>
    (said === null ? undefined : UNITS[said]) ?? UNITS[usual] ?? { mm: 1, unit: usual };
  const reading = (value: number, start: number, said: string | null): Reading => {
    const { mm, unit: shownIn } = scale(said);
    const length = snap(value * mm);
    return { mm: length, unit: shownIn, from: start, to, says: show(length, { units: shownIn }).text };
  };
  const { other } = amount;
  const first = reading(amount.value, from, unit);
  const second = other && reading(other.value, tokens[other.first]?.from ?? from, other.unit ?? unit);
  const own = scale(unit).mm;
  return {
    from,
    to,
    text: text.slice(from, to),
    readings: second ? [first, second] : [first],
    doubtful: second !== undefined,
    hasUnit: amount.unitSaid !== null,
    within: amount.form === 'decimal' ? (own / 2) * 10 ** -amount.decimals : 0,
  };
}

/** "a half inch tab" keeps its article, "at a half inch" does not need it any more. */
function startOf(tokens: readonly Token[], { first, end }: Seen): number {
  const stands = mayEndHere(tokens, end + 1) || tokens[end + 1]?.said === 'of';
  const article = /^an?$/.test(tokens[first]?.said ?? '') && !stands ? 1 : 0;
  return tokens[first + article]?.from ?? 0;
}
