import type { Amount } from './amounts';
import type { Token } from './tokens';
import { DIRECTIONS, UNITS } from './words';

interface UnitSaid {
  /** The last token of the unit. */
  readonly end: number;
  readonly said: string;
}

/** The unit behind an amount: `3 in`, `half an inch`, `three-inch`, `3/4 of an inch`, `5″`; null when none stands there. */
export function unitAfter(tokens: readonly Token[], amount: Amount): UnitSaid | null {
  const at = amount.last + 1 + wordsBefore(tokens, amount);
  const token = tokens[at];
  if (token === undefined || UNITS[token.said] === undefined) return null;
  if (token.said === '"' && !token.close) return null;
  if (token.said === 'm' && !token.close) return null;
  if (token.said === 'in' && !isInch(tokens, at, amount)) return null;
  return { end: hasDot(tokens, at) ? at + 1 : at, said: token.said };
}

const said = (tokens: readonly Token[], i: number): string => tokens[i]?.said ?? '';

/** How many tokens stand between an amount and its unit: `of an`, `an`, a hyphen. */
function wordsBefore(tokens: readonly Token[], { form, last }: Amount): number {
  const [next, after] = [said(tokens, last + 1), said(tokens, last + 2)];
  if (next === '-') return tokens[last + 1]?.close && tokens[last + 2]?.close ? 1 : 0;
  if (form === 'whole' || form === 'decimal') return 0;
  if (next === 'of') return /^an?$/.test(after) ? 2 : 0;
  // "half and inch" is how half an inch is misheard.
  return form === 'part' && /^(an?|and)$/.test(next) && after === 'inch' ? 1 : 0;
}

const DETERMINER = /^(the|this|that|these|those|an?|my|your|our|half|total|all|place|front|order)$/;
const BEHIND_UNIT =
  /^(by|x|and|or|to|from|in|on|at|for|up|down|of|apart|each|along|into|with|then|is|off|inside|less|more)$/;

/** Whether `in` is the unit: "4 in wide", "a 4 in circle", "1/2 in from", and not "cut 4 in plum", "6 in total". */
function isInch(tokens: readonly Token[], at: number, { form, first }: Amount): boolean {
  const next = tokens[at + 1];
  if (next === undefined || next.is === 'mark') return true;
  if (DETERMINER.test(next.said)) return false;
  if (form !== 'whole' || tokens[at]?.close) return true;
  return (
    BEHIND_UNIT.test(next.said) ||
    DIRECTIONS.has(next.said) ||
    /^(an?|the|about|at|by|x)$/.test(said(tokens, first - 1))
  );
}

/** The dot of an abbreviation, where the sentence goes on: "5 in. wide". */
function hasDot(tokens: readonly Token[], at: number): boolean {
  if (!/^(in|mm|cm|ft|yd)$/.test(said(tokens, at)) || said(tokens, at + 1) !== '.' || !tokens[at + 1]?.close)
    return false;
  const next = said(tokens, at + 2);
  return !tokens[at + 2]?.capital && (BEHIND_UNIT.test(next) || DIRECTIONS.has(next));
}
