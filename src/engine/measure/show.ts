import type { GridId, KindName, Unit } from '../types';
import { GRIDS, MM_PER } from './round';
import { same, snap } from './tolerance';

export interface ShowOptions {
  readonly units: Unit;
  readonly grid?: GridId;
  /** Show in this unit whatever `units` says (card thickness stays in millimetres). */
  readonly unit?: Unit;
  /** Leave the unit's name away. */
  readonly bare?: boolean;
}
/** One value, three ways: plain text to type, typeset text to read, words to hear. */
export interface Shown {
  readonly text: string;
  /** Fractions as numerator, fraction slash U+2044, denominator, with a narrow no-break space after the whole number. */
  readonly typeset: string;
  readonly spoken: string;
}

const NARROW = '\u202f';
const SLASH = '\u2044';
const ORDINALS: Readonly<Record<number, readonly [string, string]>> = {
  2: ['half', 'halves'],
  4: ['quarter', 'quarters'],
  8: ['eighth', 'eighths'],
  16: ['sixteenth', 'sixteenths'],
  32: ['thirty-second', 'thirty-seconds'],
  64: ['sixty-fourth', 'sixty-fourths'],
};
const UNIT_WORDS: Readonly<Record<Unit, readonly [string, string]>> = {
  in: ['inch', 'inches'],
  mm: ['millimetre', 'millimetres'],
  cm: ['centimetre', 'centimetres'],
};

/**
 * A length as a person with the reader's ruler reads it: inches as reduced fractions, to the grid's own fineness when the
 * value lies on it and to a sixty-fourth otherwise; millimetres to a tenth, centimetres to a hundredth.
 *
 * @example show(60.325, { units: 'in' }).text === '2 3/8 in'
 */
export function show(mm: number, options: ShowOptions): Shown {
  const unit = options.unit ?? options.units;
  if (!Number.isFinite(mm)) return { text: '?', typeset: '?', spoken: 'not known' };
  return unit === 'in' ? showInches(mm, options) : showDecimal(mm, unit, options);
}

function showInches(mm: number, { grid, bare }: ShowOptions): Shown {
  const sign = mm < 0 ? '−' : '';
  const { whole, top, bottom } = fractionOf(Math.abs(mm), grid);
  const unit = bare ? '' : ' in';
  const fraction = top === 0 ? '' : `${top}/${bottom}`;
  const number = fraction === '' ? `${whole}` : whole === 0 ? fraction : `${whole} ${fraction}`;
  const typeset = fraction === '' ? `${whole}` : `${whole === 0 ? '' : `${whole}${NARROW}`}${top}${SLASH}${bottom}`;
  return {
    text: `${sign}${number}${unit}`,
    typeset: `${sign}${typeset}${bare ? '' : '\u00a0in'}`,
    spoken: `${sign === '' ? '' : 'minus '}${spokenFraction(whole, top, bottom, bare ?? false)}`,
  };
}

/** Whole inches and a reduced fraction: on the grid if it lies there, else to the nearest sixty-fourth. */
function fractionOf(mm: number, grid: GridId | undefined): { whole: number; top: number; bottom: number } {
  const inches = snap(mm) / MM_PER.in;
  const own = grid && GRIDS[grid].unit === 'in' ? GRIDS[grid].denominator : 16;
  let bottom = same(snap(Math.round(inches * own) / own) * MM_PER.in, mm) ? own : 64;
  let parts = Math.floor(snap(inches * bottom) + 0.5);
  const whole = Math.floor(parts / bottom);
  parts -= whole * bottom;
  while (parts !== 0 && parts % 2 === 0) {
    parts /= 2;
    bottom /= 2;
  }
  return { whole, top: parts, bottom };
}

function spokenFraction(whole: number, top: number, bottom: number, bare: boolean): string {
  const name = ORDINALS[bottom]?.[top === 1 ? 0 : 1] ?? '';
  if (top === 0) return bare ? `${whole}` : `${whole} ${UNIT_WORDS.in[whole === 1 ? 0 : 1]}`;
  const fraction = `${top} ${name}`;
  if (whole === 0) return bare ? fraction : `${fraction} of an inch`;
  return bare ? `${whole} and ${fraction}` : `${whole} and ${fraction} inches`;
}

function showDecimal(mm: number, unit: 'mm' | 'cm', { bare }: ShowOptions): Shown {
  const number = decimal(mm / MM_PER[unit], unit === 'mm' ? 1 : 2);
  const one = number === '1';
  return {
    text: bare ? number : `${number} ${unit}`,
    typeset: bare ? number : `${number}\u00a0${unit}`,
    spoken: bare ? number.replace('−', 'minus ') : `${number.replace('−', 'minus ')} ${UNIT_WORDS[unit][one ? 0 : 1]}`,
  };
}

/** At most `digits` decimals, no trailing noughts, a tie taken away from nought, a real minus sign. */
export function decimal(value: number, digits: number): string {
  const scale = 10 ** digits;
  const rounded = Math.floor(snap(Math.abs(value) * scale) + 0.5) / scale;
  const text = `${rounded}`;
  return value < 0 && rounded !== 0 ? `−${text}` : text;
}

/** Any kind of value for a person: lengths by {@link show}, areas in square inches or centimetres, angles in degrees. */
export function showValue(value: number, kind: KindName, options: ShowOptions): Shown {
  const plain = (text: string, spoken = text): Shown => ({ text, typeset: text, spoken });
  if (kind === 'length') return show(value, options);
  if (!Number.isFinite(value)) return plain('?', 'not known');
  if (kind === 'angle') return plain(`${decimal(value, 1)}°`, `${decimal(value, 1)} degrees`);
  const inches = (options.unit ?? options.units) === 'in';
  if (kind === 'area') {
    const number = decimal(value / (inches ? 645.16 : 100), 1);
    return plain(
      options.bare ? number : `${number} ${inches ? 'sq in' : 'cm²'}`,
      options.bare ? number : `${number} square ${inches ? 'inches' : 'centimetres'}`,
    );
  }
  if (kind === 'volume') {
    const number = decimal(value / (inches ? 16387.064 : 1000), 1);
    return plain(`${number} ${inches ? 'cu in' : 'cm³'}`, `${number} cubic ${inches ? 'inches' : 'centimetres'}`);
  }
  if (kind === 'yes/no') return plain(value === 0 ? 'no' : 'yes');
  return plain(decimal(value, 3));
}
