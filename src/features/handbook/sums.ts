import {
  GRIDS,
  lengthOf,
  planSheets,
  readValue,
  roundTo,
  show,
  STOCKS,
  stockOf,
  type GridId,
  type Stock,
  type Unit,
} from '@/engine';
import { gramsPerSquareMetre } from './cover-weights';

/** Small sums of the workbench, the same on the server and in a browser. */

export type SumId = 'curve-strip' | 'convert' | 'how-many' | 'cover-weight';

export interface SumField {
  readonly name: string;
  readonly label: string;
  readonly usual: string;
  /** A choice, by value; else what is typed. */
  readonly options?: readonly (readonly [value: string, words: string])[];
}
export interface SumRow {
  readonly term: string;
  readonly figure: string;
}
export type SumAnswer =
  | { readonly ok: true; readonly rows: readonly SumRow[]; readonly note: string }
  | { readonly ok: false; readonly sentence: string };
export interface Sum {
  readonly title: string;
  readonly fields: readonly SumField[];
  /** What a field says; '' for one that is empty. */
  readonly answer: (field: (name: string) => string) => SumAnswer;
}

type Field = Parameters<Sum['answer']>[0];

const UNIT: SumField = {
  name: 'unit',
  label: 'Units',
  usual: 'in',
  options: [
    ['in', 'inches'],
    ['mm', 'mm'],
  ],
};
const unitOf = (field: Field): Unit => (field('unit') === 'mm' ? 'mm' : 'in');
const refused = (sentence: string): SumAnswer => ({ ok: false, sentence });

/** A length in millimetres, more than nothing; or what to say. */
function lengthIn(field: Field, name: string, what: string): number | string {
  const text = field(name).trim();
  if (text === '') return `Say ${what}.`;
  const read = readValue({ kind: 'length' }, text, { units: unitOf(field) });
  if (!read.ok) return `“${text}” does not read as a length. Write it like 2 1/4, 2.25 in or 57 mm.`;
  return read.value > 0 ? read.value : 'A length is more than nothing.';
}

// ── A strip round a curve ────────────────────────────────────────────────────────────────────────────────────────────

const GRID_WORDS: readonly (readonly [GridId, string])[] = [
  ['1/8in', '1/8 in'],
  ['1/16in', '1/16 in'],
  ['1/32in', '1/32 in'],
  ['1mm', '1 mm'],
  ['0.5mm', '0.5 mm'],
];

function curveStrip(field: Field): SumAnswer {
  const chord = lengthIn(field, 'chord', 'how far apart the ends of the curve are, in a straight line');
  if (typeof chord === 'string') return refused(chord);
  const circle = lengthIn(field, 'circle', 'how wide the circle is');
  if (typeof circle === 'string') return refused(circle);
  if (chord > circle)
    return refused('No straight line across a circle is longer than the circle is wide. Take a wider circle.');
  const units = unitOf(field);
  const grid = GRID_WORDS.find(([id]) => id === field('cut'))?.[0] ?? '1/16in';
  const radius = circle / 2;
  const arc = lengthOf({
    type: 'arc',
    from: { x: 0, y: 0 },
    to: { x: chord, y: 0 },
    centre: { x: chord / 2, y: Math.sqrt(radius ** 2 - (chord / 2) ** 2) },
    radius,
    clockwise: true,
  });
  const cut = roundTo(arc, GRIDS[grid].step, 'up');
  const own = GRIDS[grid].unit;
  const rise = radius - Math.sqrt(radius ** 2 - (chord / 2) ** 2);
  return {
    ok: true,
    rows: [
      { term: 'Cut the strip', figure: show(cut, { units: own, grid }).typeset },
      { term: 'The curve itself', figure: exactly(arc, units) },
      { term: 'It stands out by', figure: exactly(rise, units) },
    ],
    note: 'For the curve alone, up to the next mark of your trimmer: add the tabs at both ends. Up to half a circle.',
  };
}
const exactly = (mm: number, units: Unit): string =>
  units === 'in' ? `${decimals(mm / 25.4, 3)}\u00a0in` : `${decimals(mm, 1)}\u00a0mm`;
const decimals = (value: number, digits: number): string => String(Number(value.toFixed(digits)));

// ── One length in every unit ─────────────────────────────────────────────────────────────────────────────────────────

function convert(field: Field): SumAnswer {
  const mm = lengthIn(field, 'length', 'a length');
  if (typeof mm === 'string') return refused(mm);
  const parts = roundTo((mm / 25.4) * 64, 1, 'nearest');
  const off = mm - (parts * 25.4) / 64;
  const near =
    Math.abs(off) < 5e-4 ? 'exactly' : `${decimals(Math.abs(off), 2)}\u00a0mm ${off > 0 ? 'less' : 'more'} than it is`;
  return {
    ok: true,
    rows: [
      { term: 'In 64ths of an inch', figure: `${sixtyFourths(parts)}\u00a0in` },
      { term: 'Decimal inches', figure: `${decimals(mm / 25.4, 4)}\u00a0in` },
      { term: 'Millimetres', figure: `${decimals(mm, 3)}\u00a0mm` },
      { term: 'Centimetres', figure: `${decimals(mm / 10, 4)}\u00a0cm` },
    ],
    note: `The fraction is ${near}. An inch is 25.4 mm exactly.`,
  };
}
/** A whole number of 64ths in its lowest terms, typeset as fractions are. */
function sixtyFourths(parts: number): string {
  const whole = Math.floor(parts / 64);
  let [top, bottom] = [parts % 64, 64];
  if (top === 0) return String(whole);
  while (top % 2 === 0) [top, bottom] = [top / 2, bottom / 2];
  return `${whole === 0 ? '' : `${whole}\u202f`}${top}\u2044${bottom}`;
}

// ── How many from a sheet ────────────────────────────────────────────────────────────────────────────────────────────

/** More of one piece is a day's work, and long to plan. */
const MOST = 150;
const TRIES = 60;

function howMany(field: Field): SumAnswer {
  const [across, along] = [lengthIn(field, 'wide', 'how wide a piece is'), lengthIn(field, 'tall', 'how tall it is')];
  if (typeof across === 'string') return refused(across);
  if (typeof along === 'string') return refused(along);
  const stock = stockOf(field('sheet')) ?? STOCKS['12x12in'];
  const sheet: Stock = stock;
  const turns = field('turn') !== 'no';
  const fits = (count: number): boolean => {
    // Folds say which way a piece lies where it may not be turned.
    const piece = { name: 'Piece', across, along, count, ...(turns ? {} : { foldsRun: 'along' as const }) };
    const folds = turns ? ('either' as const) : ('along the grain' as const);
    const plan = planSheets({ pieces: [piece] }, { stock: sheet, folds, tries: TRIES });
    return plan.tooLarge.length === 0 && plan.used === 1;
  };
  if (!fits(1)) return refused(`A piece of that size does not come out of ${sheet.name}.`);
  const area = Math.floor((sheet.across * sheet.along) / (across * along) + 1e-9);
  let [most, none] = [1, Math.min(area, MOST) + 1];
  while (none - most > 1) {
    const middle = Math.floor((most + none) / 2);
    if (fits(middle)) most = middle;
    else none = middle;
  }
  const used = (most * across * along) / (sheet.across * sheet.along);
  return {
    ok: true,
    rows: [
      { term: `From one sheet of ${sheet.name}`, figure: `${most}${area > MOST && most === MOST ? ' or more' : ''}` },
      { term: 'Used of the sheet', figure: `${decimals(used * 100, 0)}\u00a0%` },
    ],
    note: 'By straight cuts from edge to edge, as a trimmer makes them.',
  };
}

// ── Weights ──────────────────────────────────────────────────────────────────────────────────────────────────────────

function coverWeight(field: Field): SumAnswer {
  const text = field('weight').trim().replace(',', '.');
  const weight = /^\d{1,4}(?:\.\d{1,3})?$/.test(text) ? Number(text) : 0;
  if (weight <= 0)
    return refused(text === '' ? 'Say a weight.' : `“${text}” is no weight. Write a number such as 110 or 300.`);
  const pounds = field('of') !== 'gsm';
  const each = gramsPerSquareMetre(1);
  return {
    ok: true,
    rows: pounds
      ? [{ term: `${text} lb cover is`, figure: `${decimals(weight * each, 0)}\u00a0g/m²` }]
      : [{ term: `${text} g/m² is about`, figure: `${decimals(weight / each, 0)}\u00a0lb cover` }],
    note: 'Of cover stock only: index, tag and text stock are weighed in sheets of other sizes.',
  };
}

export const SUMS: Readonly<Record<SumId, Sum>> = {
  'curve-strip': {
    title: 'A strip round a curve',
    fields: [
      { name: 'chord', label: 'Ends apart, straight across', usual: '2' },
      { name: 'circle', label: 'Circle, across', usual: '4' },
      UNIT,
      { name: 'cut', label: 'My trimmer cuts to', usual: '1/16in', options: GRID_WORDS },
    ],
    answer: curveStrip,
  },
  convert: {
    title: 'One length, in inches and millimetres',
    fields: [
      { name: 'length', label: 'A length', usual: '2 3/16' },
      { ...UNIT, label: 'Where no unit is typed' },
    ],
    answer: convert,
  },
  'how-many': {
    title: 'How many from a sheet',
    fields: [
      { name: 'wide', label: 'A piece is wide', usual: '3' },
      { name: 'tall', label: 'and tall', usual: '4' },
      UNIT,
      {
        name: 'sheet',
        label: 'Cut it from',
        usual: '12x12in',
        options: Object.values(STOCKS).map(({ id, name }) => [id, name]),
      },
      {
        name: 'turn',
        label: 'May pieces be turned?',
        usual: 'yes',
        options: [
          ['yes', 'yes'],
          ['no', 'no, for the grain or a print'],
        ],
      },
    ],
    answer: howMany,
  },
  'cover-weight': {
    title: 'Pounds and grams',
    fields: [
      { name: 'weight', label: 'Weight', usual: '100' },
      {
        name: 'of',
        label: 'Given in',
        usual: 'lb',
        options: [
          ['lb', 'lb, cover'],
          ['gsm', 'g/m²'],
        ],
      },
    ],
    answer: coverWeight,
  },
};

/** A field's name in the form and the address: a page may hold several sums. */
export const sumField = (id: SumId, name: string): string => `${id}-${name}`;
