import type { Amount } from './amounts';
import type { Token } from './tokens';
import { BENCH_VERBS, CLOSING, COUNTED, DIRECTIONS, NUMBERED, SIZES, THINGS } from './words';

const said = (tokens: readonly Token[], i: number): string => tokens[i]?.said ?? '';

/** Whether a number is said to be something else than a length: "5 minutes", "step 3", "half of the sleeve", "in half". */
export function isRefused(tokens: readonly Token[], { first, last, form }: Amount, inPair: boolean): boolean {
  const [before, next, after] = [said(tokens, first - 1), said(tokens, last + 1), said(tokens, last + 2)];
  if (tokens[last + 1]?.is === 'other' || tokens[first - 1]?.is === 'other') return true;
  if (THINGS.has(next) && !inPair) return true;
  if (COUNTED.has(next) || (next === '-' && COUNTED.has(after))) return true;
  if (next === 'out' && after === 'of') return true;
  if (NUMBERED.has(before) && form === 'whole') return true;
  if (form === 'part' || form === 'fraction') {
    if (form === 'part' && /^(an?|the|as|that|its|their|my|your|our)$/.test(next)) return true;
    if (next === 'of') return form === 'part' || /^(the|these|those|this|that|them|it|my|your|our|all)$/.test(after);
  }
  // "in half", "cut it in two".
  return before === 'in' && (form === 'part' || form === 'whole');
}

/** Whether the words round a number without a unit say that it is a length. */
export function hasCue(tokens: readonly Token[], amount: Amount): boolean {
  if (amount.form === 'fraction' || amount.form === 'mixed') return true;
  const next = amount.last + 1;
  // "that one", "one wide": seldom an inch.
  if (amount.form === 'whole' && said(tokens, amount.first) === 'one') return false;
  const direction = said(tokens, next);
  // "four thick" are four layers.
  if (DIRECTIONS.has(direction) && direction !== 'thick' && mayEndHere(tokens, next + 1)) return true;
  return mayEndHere(tokens, next) && isLedTo(tokens, amount);
}

/** "score at 3", "set the board to 40", "the width is 9", "tapers by a quarter". */
function isLedTo(tokens: readonly Token[], { first, form }: Amount): boolean {
  const about = /^(about|around|exactly|just|roughly|only|both)$/.test(said(tokens, first - 1)) ? 1 : 0;
  const lead = said(tokens, first - 1 - about);
  const sentence = sentenceBefore(tokens, first - 1 - about);
  const works = sentence.some((word) => BENCH_VERBS.has(word));
  if (lead === 'at' || lead === 'to') return works;
  if (lead === 'by') return works;
  if (lead === 'measures' || lead === 'measure') return true;
  return (
    /^(is|are|of|:|=|than|a|an)$/.test(lead) &&
    (lead !== 'a' || form === 'part') &&
    sentence.slice(-5).some((word) => SIZES.has(word))
  );
}

/** The words of the sentence before token `i`. */
function sentenceBefore(tokens: readonly Token[], i: number): readonly string[] {
  let from = i;
  while (from > 0 && !/^[.;!?]$/.test(said(tokens, from - 1))) from -= 1;
  return tokens.slice(from, Math.max(from, i)).map((token) => token.said);
}

/** Nothing follows that the number could count: the text ends, a mark stands there, or a word that opens what comes next. */
export function mayEndHere(tokens: readonly Token[], i: number): boolean {
  const token = tokens[i];
  if (token === undefined || CLOSING.has(token.said)) return true;
  return token.is === 'mark' ? token.said !== '-' || !token.close : false;
}
