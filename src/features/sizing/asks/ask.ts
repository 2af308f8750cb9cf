import {
  around,
  evaluate,
  GRIDS,
  helpWithTooLarge,
  largest,
  moreThan,
  planning,
  planSheets,
  readValue,
  roundTo,
  say,
  type Figures,
  type Model,
  type SheetPlan,
  type Sizing,
  type Solved,
  type Stock,
  type Unit,
} from '@/engine';
import { cardUsed, MOST_OF_ONE } from '@/features/sheets/my-sheets';
import { planOn } from '@/features/sheets/stock-link';
import { slugOf } from '../sizing-link';

/** Two ways to ask for a size: round a thing that must go in, and as large as one's sheets allow. */
export type Ask = 'fit' | 'largest';

/** An answer before it is taken, or why there is none. */
export type Answer =
  | {
      readonly ok: true;
      readonly figures: Figures;
      readonly plan: SheetPlan;
      /** What keeps it from being larger; null where that was not asked. */
      readonly stops: string | null;
    }
  | { readonly ok: false; readonly reason: string };

/** Sentences by the name of their field. */
export type AskFaults = Readonly<Record<string, string>>;
export type AskRead<T> = { readonly ok: true; readonly value: T } | { readonly ok: false; readonly faults: AskFaults };
export type Field = (name: string) => string;

// ── A thing ──────────────────────────────────────────────────────────────────────────────────────────────────────────

export interface Thing {
  /** Millimetres, in the order of the box's finished inside sizes. */
  readonly sizes: readonly number[];
  /** Room on every side, millimetres. */
  readonly ease: number;
}

/** Fields of the forms; no measure of a pattern is called so. */
export const EASE = 'thing-ease';
export const COUNT = 'pile-sheets';
export const COPIES = 'pile-boxes';
export const thingField = (name: string): string => `thing-${slugOf(name)}`;
export const thingNames = (model: Model): readonly string[] => model.finished.inside.map(({ def }) => def.name);
/** Room for a finger beside a tin. */
export const usualEase = (units: Unit): string => ({ in: '1/8', mm: '3', cm: '0.3' })[units];
/** More room than this is a slip of the pen. */
const MOST_EASE = 100;

export function readThing(model: Model, units: Unit, field: Field): AskRead<Thing> {
  const faults: Record<string, string> = {};
  const length = (name: string, text: string): number => {
    const read = readValue({ kind: 'length' }, text, { units });
    if (!read.ok)
      faults[name] = text.trim() === '' ? 'Measure this too.' : `“${text.trim()}” does not read as a length.`;
    return read.ok ? read.value : 0;
  };
  const sizes = thingNames(model).map((name) => {
    const mm = length(thingField(name), field(thingField(name)));
    if (mm <= 0) faults[thingField(name)] ??= 'A thing is more than nothing.';
    return mm;
  });
  const ease = length(EASE, field(EASE).trim() === '' ? usualEase(units) : field(EASE));
  if (ease < 0 || ease > MOST_EASE) faults[EASE] = `Ease is from nothing to ${MOST_EASE} mm (about 4 in).`;
  return Object.keys(faults).length > 0 ? { ok: false, faults } : { ok: true, value: { sizes, ease } };
}

/** The box round a thing. That its pieces are too large for the sheet is said by the plan; the size is an answer all the same. */
export function answerThing(model: Model, base: Sizing, { sizes, ease }: Thing, stock: Stock): Answer {
  const solved = around(model, base, sizes, ease);
  if (!solved.ok) return solved;
  const figures = evaluate(model, solved.sizing);
  return { ok: true, figures, plan: planSheets(figures, planOn(stock)), stops: null };
}

// ── One's sheets ─────────────────────────────────────────────────────────────────────────────────────────────────────

export interface Pile {
  readonly stock: Stock;
  /** Sheets of card that may be used. */
  readonly count: number;
  /** How many of the whole box. */
  readonly copies: number;
}

/** More boxes at once keep a phone thinking too long. */
export const MOST_COPIES = 12;

export function readPile(stock: Stock, field: Field): AskRead<Pile> {
  const faults: Record<string, string> = {};
  const whole = (name: string, most: number, usual: number): number => {
    const text = field(name).trim();
    const n = text === '' ? usual : Number(text);
    if (!Number.isInteger(n) || n < 1 || n > most) faults[name] = `Write a whole number from 1 to ${most}.`;
    return n;
  };
  const count = whole(COUNT, MOST_OF_ONE, 1);
  const copies = whole(COPIES, MOST_COPIES, 1);
  return Object.keys(faults).length > 0 ? { ok: false, faults } : { ok: true, value: { stock, count, copies } };
}

/** The largest size of the box's shape that comes out of a pile. `tries` bounds the planning of every size that is tried. */
export function largestFrom(model: Model, base: Sizing, pile: Pile, tries?: number): Solved {
  // Sizes go by steps of the cut grid, so that the search comes to the same one again and again.
  const known = new Map<string, boolean>();
  return largest(model, base, (sizing) => {
    const key = JSON.stringify(sizing.values);
    const fits = known.get(key) ?? comesOutOf(model, sizing, pile, tries);
    known.set(key, fits);
    return fits;
  });
}

function comesOutOf(model: Model, sizing: Sizing, { stock, count, copies }: Pile, tries?: number): boolean {
  const { pieces } = evaluate(model, sizing);
  const card = pieces.filter((piece) => piece.stock === 'card');
  const area = card.reduce((sum, piece) => sum + piece.across * piece.along * piece.count * copies, 0);
  if (moreThan(area, stock.across * stock.along * count)) return false;
  const options = { ...planOn(stock), copies, ...(tries === undefined ? {} : { tries }) };
  // The first plan that is good enough is enough.
  for (const better of planning({ pieces: card, sizing }, options)) {
    const plan = better?.();
    if (plan && plan.tooLarge.length > 0) return false;
    if (plan && cardUsed(plan) <= count) return true;
  }
  return false;
}

/** What was found, with its plan and what keeps it from being a step larger. */
export function answerPile(model: Model, solved: Solved, pile: Pile, tries?: number): Answer {
  if (!solved.ok) return solved;
  const figures = evaluate(model, solved.sizing);
  const { stock, copies } = pile;
  const options = { ...planOn(stock), copies, ...(tries === undefined ? {} : { tries }) };
  return {
    ok: true,
    figures,
    plan: planSheets(figures, options),
    stops: whatStops(model, figures, pile, tries),
  };
}

/** The same shape with its first inside size one step of the cut grid larger: what is wrong with it. */
function whatStops(
  model: Model,
  { sizing, finished }: Figures,
  { stock, count, copies }: Pile,
  tries?: number,
): string | null {
  const [first] = finished.inside;
  if (!first) return null;
  const { step } = GRIDS[sizing.grid];
  const larger = around(
    model,
    sizing,
    finished.inside.map(({ mm }) => roundTo((mm * (first.mm + step)) / first.mm, step, 'up')),
    0,
  );
  if (!larger.ok) return larger.reason;
  const figures = evaluate(model, larger.sizing);
  const plan = planSheets(figures, { ...planOn(stock), copies, ...(tries === undefined ? {} : { tries }) });
  const [large] = plan.tooLarge;
  if (large)
    return `A step larger, ${large.name} no longer fits ${stock.name}. ${say(helpWithTooLarge(large), sizing)}`;
  const used = cardUsed(plan);
  return used > count ? `A step larger, it takes ${used} sheets of ${stock.name}.` : null;
}
