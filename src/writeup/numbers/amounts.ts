import { readLength } from '@/engine';
import type { Token } from './tokens';
import { MISHEARD, NUMBER_WORDS, PARTS, RULER_PARTS } from './words';

/** A number in the text, from token to token (both counted in), before anything is known of what it measures. */
export interface Amount {
  readonly first: number;
  readonly last: number;
  readonly value: number;
  /** `part`: a half, a third, a quarter, which people also say of other things. */
  readonly form: 'whole' | 'decimal' | 'fraction' | 'mixed' | 'part';
  /** Decimals that were written, for how exactly it is meant. */
  readonly decimals: number;
  /** Another way to take the same words, from the token `first` on. */
  readonly other?: { readonly first: number; readonly value: number; readonly unit?: string };
  /** The unit, when it stands inside: "an inch and a half". */
  readonly unit?: string;
  /** Only a length when a unit follows. */
  readonly needsUnit?: boolean;
}

/** The number that begins at token `i`, in figures or words; null when none does. */
export function amountAt(tokens: readonly Token[], i: number): Amount | null {
  return fractionAmount(tokens, i) ?? mishearing(tokens, i) ?? slipOfFigures(tokens, i) ?? wholeAmount(tokens, i);
}

const said = (tokens: readonly Token[], i: number): string => tokens[i]?.said ?? '';
const numberIn = (words: string): number | null => {
  const read = readLength(words, { units: 'mm' });
  return read.ok ? read.value.mm : null;
};

interface Part {
  readonly last: number;
  readonly value: number;
  /** Said with its own number above the line, or typed. */
  readonly plain: boolean;
  readonly below: number;
}

/** `5/8`, `five eighths`, `5 16ths`, `a quarter`, `half`: less than one. */
function partAt(tokens: readonly Token[], i: number): Part | null {
  const token = tokens[i];
  if (token === undefined) return null;
  if (token.is === 'fraction') {
    const [above = 0, below = 0] = token.said.split('/').map(Number);
    const known = RULER_PARTS.has(below) || (below <= 10 && below >= 3) || below === 12;
    return known && above > 0 && above < below ? { last: i, value: above / below, plain: true, below } : null;
  }
  const article = token.said === 'a' || token.said === 'an' ? 1 : 0;
  const alone = PARTS[said(tokens, i + article)];
  if (alone !== undefined && !said(tokens, i + article).endsWith('s'))
    return { last: i + article, value: 1 / alone, plain: false, below: alone };
  if (article === 1) return null;
  const above = wholeAt(tokens, i);
  if (above === null) return null;
  const dash = said(tokens, above.last + 1) === '-' ? 1 : 0;
  const named = above.last + 1 + dash;
  const below = PARTS[said(tokens, named)] ?? thirtySecondAt(tokens, named);
  if (below === undefined || above.value < 1) return null;
  const last = below === 32 && PARTS[said(tokens, named)] === undefined ? named + 2 : named;
  // "two half inch tabs" are two tabs: nobody says two halves of an inch.
  const countsThem = !said(tokens, last).endsWith('s') && above.value > 1 && above.value % 2 === 0;
  if (above.value >= below || countsThem || (below === 2 && above.value > 1)) return null;
  return { last, value: above.value / below, plain: above.value > 1 || below > 4, below };
}
/** `thirty-second(s)` with its hyphen: "thirty seconds" are time. */
const thirtySecondAt = (tokens: readonly Token[], i: number): number | undefined =>
  said(tokens, i) === 'thirty' && said(tokens, i + 1) === '-' && /^seconds?$/.test(said(tokens, i + 2))
    ? 32
    : undefined;

/** Figures, or as many number words as make one number. */
function wholeAt(tokens: readonly Token[], i: number): { readonly last: number; readonly value: number } | null {
  const token = tokens[i];
  if (token === undefined) return null;
  if (token.is === 'digits') return token.said.length <= 4 ? { last: i, value: Number(token.said) } : null;
  let found: { last: number; value: number } | null = null;
  let words = '';
  for (let at = i; at < tokens.length && at < i + 6; at += 1) {
    const word = said(tokens, at);
    if (word === '-' || (word === 'and' && words.endsWith('hundred '))) continue;
    if (!NUMBER_WORDS.has(word)) break;
    words += `${word} `;
    const value = numberIn(words);
    if (value === null) break;
    found = { last: at, value };
  }
  return found;
}

function fractionAmount(tokens: readonly Token[], i: number): Amount | null {
  const lost = lostSpace(tokens, i);
  if (lost !== null) return lost;
  const part = partAt(tokens, i);
  if (part === null) return null;
  const soft = !part.plain && part.below <= 4;
  const form = soft || part.below === 3 ? 'part' : 'fraction';
  return { first: i, last: part.last, value: part.value, form, decimals: 0 };
}

/** `61/4` for 6 1/4: nobody writes an inch and more above the line, but the other way is kept. */
function lostSpace(tokens: readonly Token[], i: number): Amount | null {
  const token = tokens[i];
  const match = token?.is === 'fraction' ? /^(\d{1,2})(\d)\/(\d+)$/.exec(token.said) : null;
  if (match === null) return null;
  const [whole, above, below] = match.slice(1).map(Number) as [number, number, number];
  if (!RULER_PARTS.has(below) || above % 2 === 0 || above >= below || whole * 10 + above < below) return null;
  return {
    first: i,
    last: i,
    value: whole + above / below,
    form: 'mixed',
    decimals: 0,
    other: { first: i, value: (whole * 10 + above) / below },
  };
}

/** `for and a half` is four and a half, misheard. */
function mishearing(tokens: readonly Token[], i: number): Amount | null {
  const meant = MISHEARD[said(tokens, i)];
  if (meant === undefined || said(tokens, i + 1) !== 'and') return null;
  const part = partAt(tokens, i + 2);
  const whole = numberIn(meant);
  if (part === null || whole === null) return null;
  return {
    first: i,
    last: part.last,
    value: whole + part.value,
    form: 'mixed',
    decimals: 0,
    other: { first: i + 2, value: part.value },
  };
}

/** Fractions whose line was not heard: `6 1.4`, `6 1 4`, `6 and 1 4`, `6 14`, `5 8 inches`, `7:16 inches`. */
function slipOfFigures(tokens: readonly Token[], i: number): Amount | null {
  const [one, two] = [tokens[i], tokens[i + 1]];
  if (one?.is === 'time') return slip({ figures: one.said.split(':'), first: i, last: i });
  if (one?.is !== 'digits' || one.said.length > 2 || two === undefined || two.close) return null;
  const whole = Number(one.said);
  if (two.is === 'decimal')
    return slip({ figures: two.said.split('.'), first: i, last: i + 1, whole, apart: Number(two.said) });
  const and = two.said === 'and' ? 1 : 0;
  const [above, below] = [tokens[i + 1 + and], tokens[i + 2 + and]];
  if (above?.is === 'digits' && below?.is === 'digits' && !below.close)
    return slip({ figures: [above.said, below.said], first: i, last: i + 2 + and, whole });
  if (two.is !== 'digits') return null;
  if (two.said.length === 1) return slip({ figures: [one.said, two.said], first: i, last: i + 1 });
  return slip({
    figures: [two.said.slice(0, 1), two.said.slice(1)],
    first: i,
    last: i + 1,
    whole,
    apart: Number(two.said),
  });
}
interface Slip {
  /** Above and below the line. */
  readonly figures: readonly string[];
  readonly first: number;
  readonly last: number;
  readonly whole?: number;
  /** What the last token is when it stands for itself; usual: what is below the line. */
  readonly apart?: number;
}
function slip({ figures: [above = '', below = ''], first, last, whole, apart }: Slip): Amount | null {
  const [a, b] = [Number(above), Number(below)];
  if (!RULER_PARTS.has(b) || a % 2 === 0 || a >= b || below.startsWith('0')) return null;
  return {
    first,
    last,
    value: (whole ?? 0) + a / b,
    form: whole === undefined ? 'fraction' : 'mixed',
    decimals: 0,
    other: { first: last, value: apart ?? b },
    needsUnit: whole === undefined || last === first + 1,
  };
}

function wholeAmount(tokens: readonly Token[], i: number): Amount | null {
  const token = tokens[i];
  if (token?.is === 'decimal') {
    const decimals = (token.said.split('.')[1] ?? '').length;
    return { first: i, last: i, value: Number(token.said), form: 'decimal', decimals };
  }
  const unitFirst = unitAndPart(tokens, i);
  if (unitFirst !== null) return unitFirst;
  const whole = wholeAt(tokens, i);
  if (whole === null) return null;
  return (
    spokenDecimal(tokens, i, whole) ?? mixed(tokens, i, whole) ?? { first: i, ...whole, form: 'whole', decimals: 0 }
  );
}

/** `six point two five` */
function spokenDecimal(tokens: readonly Token[], i: number, whole: { last: number; value: number }): Amount | null {
  if (said(tokens, whole.last + 1) !== 'point') return null;
  let digits = '';
  let last = whole.last + 1;
  for (let at = last + 1; at < tokens.length && digits.length < 4; at += 1) {
    const token = tokens[at];
    const value =
      token?.is === 'digits' ? token.said : NUMBER_WORDS.has(said(tokens, at)) ? numberIn(said(tokens, at)) : null;
    if (value === null || `${value}`.length > 2) break;
    digits += `${value}`;
    last = at;
  }
  if (digits === '') return null;
  return { first: i, last, value: Number(`${whole.value}.${digits}`), form: 'decimal', decimals: digits.length };
}

/** `3 1/4`, `3-1/4`, `two and five eighths`, `6 and 1/4`; `two in a half` is a mishearing of two and a half. */
function mixed(tokens: readonly Token[], i: number, whole: { last: number; value: number }): Amount | null {
  const next = tokens[whole.last + 1];
  if (next === undefined) return null;
  const joined = next.said === 'and' || next.said === '&' || (next.said === '-' && next.close) ? 1 : 0;
  const misheard = next.said === 'in' && /^an?$/.test(said(tokens, whole.last + 2)) ? 1 : 0;
  const part = partAt(tokens, whole.last + 1 + joined + misheard);
  if (part === null || part.value >= 1) return null;
  // "4 half inch tabs" are four of them.
  if (joined === 0 && misheard === 0 && !part.plain) return null;
  const value = whole.value + part.value;
  const base = { first: i, last: part.last, value, form: 'mixed', decimals: 0 } as const;
  if (misheard === 1) return { ...base, other: { first: i, value: whole.value, unit: 'in' } };
  const inWords = next.is !== 'fraction' && joined === 0;
  return inWords ? { ...base, other: { first: whole.last + 1, value: part.value } } : base;
}

/** `an inch`, `an inch and a quarter`, `inch and a half`: the unit stands first. */
function unitAndPart(tokens: readonly Token[], i: number): Amount | null {
  const article = /^an?$/.test(said(tokens, i)) ? 1 : 0;
  const unit = said(tokens, i + article);
  if (!/^(inch|foot|yard|centimet(er|re)|met(er|re))$/.test(unit)) return null;
  const part = said(tokens, i + article + 1) === 'and' ? partAt(tokens, i + article + 2) : null;
  if (part !== null) return { first: i, last: part.last, value: 1 + part.value, form: 'mixed', decimals: 0, unit };
  // "a foot that glue can hold" is another foot.
  const alone = unit === 'inch' || /^(of|long|wide|tall|high|deep|apart)$/.test(said(tokens, i + 2));
  return article === 1 && alone ? { first: i, last: i + 1, value: 1, form: 'whole', decimals: 0, unit } : null;
}
