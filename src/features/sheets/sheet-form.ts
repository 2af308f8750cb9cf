import { MM_PER, readValue, STOCKS, UNITS, type Unit } from '@/engine';
import { isCount, MOST_OF_ONE, MOST_SIZES, withMore, without, type MySheets } from './my-sheets';
import { OWN_SIDES, ownStock, readStock, withGrain } from './stock-link';

/** The choice in the form that asks for a size of one's own. */
export const OWN_SIZE = 'own';
export const USUAL_COUNT = 10;
/** The fields of the form that adds a size. */
export const ADD_FIELDS = ['size', 'across', 'along', 'unit', 'count', 'grain'] as const;

/** What a form's field says; '' for one that was not sent. */
export type Field = (name: string) => string;
export type SheetFaults = Readonly<Record<string, string>>;
export type SheetOutcome =
  | { readonly ok: true; readonly sheets: MySheets; readonly done: 'added' | 'kept' | 'removed' }
  | { readonly ok: false; readonly faults: SheetFaults };

const refused = (faults: SheetFaults) => ({ ok: false, faults }) as const;

/** The field of a size's number in the list. */
export const countField = (card: string): string => `count-${card}`;

/** What the form of one's sheets asks for: the same on the server and in a browser. */
export function changeSheets(sheets: MySheets, field: Field): SheetOutcome {
  const removed = field('remove');
  if (removed !== '') return { ok: true, sheets: without(sheets, removed), done: 'removed' };
  return field('do') === 'add' ? add(sheets, field) : keepCounts(sheets, field);
}

function add(sheets: MySheets, field: Field): SheetOutcome {
  const count = Number(field('count').trim() || USUAL_COUNT);
  const faults: Record<string, string> = isCount(count) ? {} : { count: countFault(field('count')) };
  const size = readSize(field, faults);
  if (!size) return refused(faults);
  const grain = (['long', 'short'] as const).find((one) => one === field('grain'));
  const card = withGrain(size, grain).id;
  if (sheets.length >= MOST_SIZES && !sheets.some((one) => one.card === card))
    faults.size = `There is room for ${MOST_SIZES} sizes. Remove one that is used up first.`;
  if (Object.keys(faults).length > 0) return refused(faults);
  return { ok: true, sheets: withMore(sheets, { card, count }), done: 'added' };
}

/** The size that was chosen or typed; null, with the faults by field, when there is none. */
function readSize(field: Field, faults: Record<string, string>) {
  if (field('size') !== OWN_SIZE) {
    const stock = Object.keys(STOCKS).includes(field('size')) ? readStock(field('size')) : null;
    if (!stock) faults.size = 'Choose a size from the list.';
    return stock;
  }
  const unit: Unit = UNITS.find((one) => one === field('unit')) ?? 'in';
  const sides = (['across', 'along'] as const).map((name) => {
    const text = field(name);
    const read = readValue({ kind: 'length' }, text, { units: unit });
    if (!read.ok) {
      faults[name] =
        text.trim() === ''
          ? 'Say how long this side is.'
          : `“${text.trim()}” does not read as a length. Write it like 8 1/2 or 21.6 cm.`;
      return 0;
    }
    if (read.value < OWN_SIDES.least || read.value > OWN_SIDES.most) {
      faults[name] =
        `A side of a sheet is from ${OWN_SIDES.least} mm (about 2 in) to ${OWN_SIDES.most} mm (about 59 in).`;
      return 0;
    }
    return read.value;
  });
  if (faults.across !== undefined || faults.along !== undefined) return null;
  // Sides typed with units of their own are kept in the form's.
  const inUnit = (mm: number) => mm / MM_PER[unit];
  const [across = 0, along = 0] = sides;
  return ownStock({ across: inUnit(across), along: inUnit(along), unit });
}

function keepCounts(sheets: MySheets, field: Field): SheetOutcome {
  const faults: Record<string, string> = {};
  const counted = sheets.map((one) => {
    const text = field(countField(one.card)).trim();
    const count = text === '' ? one.count : Number(text);
    if (!isCount(count)) faults[countField(one.card)] = countFault(text);
    return { card: one.card, count };
  });
  return Object.keys(faults).length > 0 ? refused(faults) : { ok: true, sheets: counted, done: 'kept' };
}

const countFault = (text: string): string =>
  `“${text.trim()}” is no number of sheets. Write a whole number from 1 to ${MOST_OF_ONE}, or remove the size.`;
