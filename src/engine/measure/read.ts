import type { Fault, Result, Unit } from '../types';
import { SMALL_NUMBERS } from './number-words';
import { MM_PER } from './round';
import { snap } from './tolerance';

export interface ReadLength {
  readonly mm: number;
  /** The unit that was written, or the one that was assumed. */
  readonly unit: Unit;
}
export interface ReadOptions {
  /** What a number without a unit is taken for. */
  readonly units: Unit;
}

const UNIT_NAMES: Readonly<Record<string, Unit>> = {
  in: 'in',
  'in.': 'in',
  inch: 'in',
  inches: 'in',
  '"': 'in',
  '″': 'in',
  '”': 'in',
  "''": 'in',
  mm: 'mm',
  'mm.': 'mm',
  millimetre: 'mm',
  millimetres: 'mm',
  millimeter: 'mm',
  millimeters: 'mm',
  cm: 'cm',
  'cm.': 'cm',
  centimetre: 'cm',
  centimetres: 'cm',
  centimeter: 'cm',
  centimeters: 'cm',
};
/** Fractions that are one character, as they are typed without it. */
export const FRACTION_SIGNS: Readonly<Record<string, string>> = {
  '½': '1/2',
  '⅓': '1/3',
  '⅔': '2/3',
  '¼': '1/4',
  '¾': '3/4',
  '⅕': '1/5',
  '⅖': '2/5',
  '⅗': '3/5',
  '⅘': '4/5',
  '⅙': '1/6',
  '⅚': '5/6',
  '⅛': '1/8',
  '⅜': '3/8',
  '⅝': '5/8',
  '⅞': '7/8',
};
const TENS = ['', '', 'twenty', 'thirty', 'forty', 'fifty', 'sixty', 'seventy', 'eighty', 'ninety'];
const PARTS: Readonly<Record<string, number>> = {
  half: 2,
  halves: 2,
  third: 3,
  thirds: 3,
  quarter: 4,
  quarters: 4,
  fourth: 4,
  fourths: 4,
  eighth: 8,
  eighths: 8,
  sixteenth: 16,
  sixteenths: 16,
  thirtysecond: 32,
  thirtyseconds: 32,
  sixtyfourth: 64,
  sixtyfourths: 64,
};
/** Longer text is not a length. */
const LONGEST = 80;

/**
 * Reads a length as people type and say it: `5 3/8`, `5-3/8`, `5⅜`, `5.375`, `5 3/8 in`, `5 3/8"`, `136 mm`, `13.6 cm`, `.5`,
 * `five and three eighths`, `two and five eighths inches`, `four and a half`, `half an inch`, `2 1/2 inches`.
 * A number without a unit is in `units`. The fault says what was understood and what was not.
 */
export function readLength(text: string, { units }: ReadOptions): Result<ReadLength> {
  const typed = text.trim();
  if (typed === '') return refuse('empty', 'nothing', 'a length', 'Type a length, such as 5 3/8 in or 136 mm.');
  if (typed.length > LONGEST)
    return refuse('too long', `${typed.length} characters`, 'a length', 'Type one length only.');
  const { body, unit, rest } = splitUnit(normalise(typed));
  if (rest !== '') {
    return refuse('unknown unit', `“${rest}” after the number`, 'in, mm or cm', 'Write the unit as in, mm or cm.');
  }
  const assumed = unit ?? units;
  const number = readFigures(body) ?? readWords(body);
  if (number === null) {
    return refuse('not a length', `“${typed}”`, 'a length', 'Write it like 5 3/8 in, 5.375 in, 136 mm or 13.6 cm.');
  }
  if (typeof number === 'string') return refuse('senseless', `“${typed}”`, 'a length', number);
  const mm = snap(number * MM_PER[assumed]);
  if (Math.abs(mm) > 100_000) return refuse('too large', `“${typed}”`, 'a length below 100 metres', 'Check the unit.');
  return { ok: true, value: { mm, unit: assumed } };
}

function refuse(code: string, found: string, expected: string, hint: string): Result<never> {
  const fault: Fault = { code: `length ${code}`, where: 'length', found, expected, hint };
  return { ok: false, faults: [fault] };
}

function normalise(text: string): string {
  let plain = text
    .toLowerCase()
    .replace(/[\u00a0\u2009\u200a\u202f]/g, ' ')
    .replace(/\u2044/g, '/')
    .replace(/[−–—]/g, '-')
    .replace(/[’‘]/g, "'");
  for (const [mark, fraction] of Object.entries(FRACTION_SIGNS)) plain = plain.replaceAll(mark, ` ${fraction}`);
  return plain
    .replace(/(\d),(\d{1,2})(?!\d)/g, '$1.$2')
    .replace(/\s+/g, ' ')
    .trim();
}

function splitUnit(text: string): { body: string; unit: Unit | null; rest: string } {
  const match =
    /^(.*?)\s*(?:of an? |an? )?("|″|”|''|inches|inch|in\.?|millimet(?:re|er)s?|mm\.?|centimet(?:re|er)s?|cm\.?)$/.exec(
      text,
    );
  if (match && match[1] !== undefined && match[2] !== undefined && (match[1] !== '' || /^an? /.test(text))) {
    // "an inch" is one inch; "half an inch" keeps its half.
    return { body: match[1] === '' ? '1' : match[1].trim(), unit: UNIT_NAMES[match[2]] ?? null, rest: '' };
  }
  const stray = /^([-+]?[\d./ ]*\d)\s*([a-z"']+.*)$/.exec(text);
  if (
    stray &&
    stray[1] !== undefined &&
    stray[2] !== undefined &&
    readWords(stray[2]) === null &&
    !/^and\b/.test(stray[2])
  ) {
    return { body: stray[1], unit: null, rest: stray[2] };
  }
  return { body: text, unit: null, rest: '' };
}

/** A number, a sentence that says why it makes no sense, or null when these are not figures. */
function readFigures(body: string): number | string | null {
  const match =
    /^(-)?\s*(\d+(?:\.\d*)?|\.\d+)(?:\s*(?:-|&)\s*|\s+and\s+|\s+)(\d+)\s*\/\s*(\d+)$/.exec(body) ??
    /^(-)?\s*()(\d+)\s*\/\s*(\d+)$/.exec(body) ??
    /^(-)?\s*(\d+(?:\.\d*)?|\.\d+)$/.exec(body);
  if (!match) return null;
  const [, minus, whole = '', top, bottom] = match;
  let value = Number(whole);
  if (top !== undefined && bottom !== undefined) {
    if (Number(bottom) === 0) return 'A fraction cannot have 0 below the line.';
    if (whole.includes('.')) return `Write either a decimal or a fraction, not “${whole} ${top}/${bottom}”.`;
    if (whole !== '' && Number(top) >= Number(bottom)) {
      return `After a whole number the fraction must be less than 1, and ${top}/${bottom} is not.`;
    }
    value += Number(top) / Number(bottom);
  }
  return minus ? -value : value;
}

/** `five and three eighths`, `four and a half`, `half`, `twenty-one`, `2 and a half`, `3 quarters`. */
function readWords(body: string): number | null {
  const joined = body
    .replaceAll('-', ' ')
    .replace(/(thirty) (seconds?)|(sixty) (fourths?)/g, (pair) => pair.replace(' ', ''));
  const words = joined.split(' ').filter((word) => word !== 'of' && word !== '');
  if (words.length === 0 || words.length > 9) return null;
  const and = words.lastIndexOf('and');
  if (and > 0) {
    const whole = wholeNumber(words.slice(0, and));
    const part = fractionWords(words.slice(and + 1));
    return whole === null || part === null || part >= 1 ? null : whole + part;
  }
  const part = fractionWords(words);
  if (part !== null) return part;
  for (let split = 1; split < words.length; split += 1) {
    const whole = wholeNumber(words.slice(0, split));
    const rest = fractionWords(words.slice(split));
    if (whole !== null && rest !== null && rest < 1) return whole + rest;
  }
  return wholeNumber(words);
}

function fractionWords(words: readonly string[]): number | null {
  const last = words.at(-1);
  const bottom = last === undefined ? undefined : PARTS[last];
  if (bottom === undefined) return null;
  const before = words.slice(0, -1).filter((word) => word !== 'a' && word !== 'an');
  if (before.length === 0) return 1 / bottom;
  const top = wholeNumber(before);
  return top === null || top === 0 ? null : top / bottom;
}

function wholeNumber(words: readonly string[]): number | null {
  if (words.length === 1 && /^\d+$/.test(words[0] ?? '')) return Number(words[0]);
  let total = 0;
  let seen = 0;
  for (const word of words) {
    const small = SMALL_NUMBERS.indexOf(word);
    const ten = TENS.indexOf(word);
    if (word === 'hundred' && seen === 1 && total > 0 && total < 10) total *= 100;
    else if (word === 'a' && seen === 0 && words[1] === 'hundred') total = 1;
    else if (small >= 0 && (total === 0 || (total % 10 === 0 && small < 10 && total >= 20) || total >= 100))
      total += small;
    else if (word !== '' && ten >= 2 && (total === 0 || total % 100 === 0)) total += ten * 10;
    else return null;
    seen += 1;
  }
  return seen === 0 ? null : total;
}
