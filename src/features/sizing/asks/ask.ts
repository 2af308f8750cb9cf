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
  type PlanOptions,
  type SheetPlan,
  type Sizing,
  type Solved,
  type Unit,
} from '@/engine';
import { cardUsed, isCount, MOST_OF_ONE } from '@/features/sheets/my-sheets';
import { CUT_FIELD, planOptions, readCutFrom, type CutFrom } from '@/features/sheets/cut-from';
import { slugOf } from '../sizing-link';
import { asItStands, otherBoxes, waysUp, type Offer, type Thing } from './thing';

/** Two ways to ask for a size: round a thing that must go in, and as large as one's sheets allow. */
export type Ask = 'fit' | 'largest';

/** An answer before it is taken, or why there is none. */
export type Answer =
  | {
      readonly ok: true;
      readonly figures: Figures;
      readonly plan: SheetPlan;
      readonly cutFrom: CutFrom;
      /** What keeps it from being larger; null where that was not asked. */
      readonly stops: string | null;
    }
  | { readonly ok: false; readonly reason: string; readonly offers: readonly Offer[] };

/** Sentences by the name of their field. */
export type AskFaults = Readonly<Record<string, string>>;
export type AskRead<T> = { readonly ok: true; readonly value: T } | { readonly ok: false; readonly faults: AskFaults };
export type Field = (name: string) => string;

// ── A thing ──────────────────────────────────────────────────────────────────────────────────────────────────────────

/** Fields of the forms; no measure of a pattern is called so. */
export const EASE = 'thing-ease';
export const STANDS = 'thing-stands';
export const COUNT = 'pile-sheets';
export const COPIES = CUT_FIELD.copies;
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
  const up = waysUp(model).find((way) => slugOf(thingNames(model)[way] ?? '') === field(STANDS)) ?? null;
  return Object.keys(faults).length > 0 ? { ok: false, faults } : { ok: true, value: { sizes, ease, up } };
}

/** The box round a thing. That its pieces are too large for the sheet is said by the plan; the size is an answer all the same. */
export function answerThing(model: Model, base: Sizing, thing: Thing, cutFrom: CutFrom): Answer {
  const solved = around(model, base, asItStands(model, thing), thing.ease);
  if (!solved.ok) return { ...solved, offers: otherBoxes(model, base, thing) };
  const figures = evaluate(model, solved.sizing);
  return { ok: true, figures, plan: planSheets(figures, planOptions(cutFrom, figures.pieces)), cutFrom, stops: null };
}

// ── One's sheets ─────────────────────────────────────────────────────────────────────────────────────────────────────

export interface Pile {
  readonly cutFrom: CutFrom;
  /** Sheets of card that may be used. */
  readonly count: number;
}

export function readPile(cutFrom: CutFrom, field: Field): AskRead<Pile> {
  const text = field(COUNT).trim();
  const count = text === '' ? 1 : Number(text);
  // Without a length among them the units do not matter.
  const boxes = readCutFrom(new URLSearchParams({ [COPIES]: field(COPIES) }), { units: 'mm', before: cutFrom });
  const faults: Record<string, string> = {};
  if (!isCount(count)) faults[COUNT] = `Write a whole number from 1 to ${MOST_OF_ONE}.`;
  const fault = boxes.typed[COPIES];
  if (fault) faults[COPIES] = fault.sentence;
  return Object.keys(faults).length > 0 ? { ok: false, faults } : { ok: true, value: { cutFrom: boxes.value, count } };
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

function comesOutOf(model: Model, sizing: Sizing, { cutFrom, count }: Pile, tries?: number): boolean {
  const { pieces } = evaluate(model, sizing);
  const { stock, margin, copies } = cutFrom;
  const card = pieces.filter((piece) => piece.stock === 'card');
  const area = card.reduce((sum, piece) => sum + piece.across * piece.along * piece.count * copies, 0);
  if (moreThan(area, (stock.across - 2 * margin) * (stock.along - 2 * margin) * count)) return false;
  // The first plan that is good enough is enough.
  for (const better of planning({ pieces: card, sizing }, pileOptions(cutFrom, card, tries))) {
    const plan = better?.();
    if (plan && plan.tooLarge.length > 0) return false;
    if (plan && cardUsed(plan) <= count) return true;
  }
  return false;
}

const pileOptions = (cutFrom: CutFrom, pieces: Figures['pieces'], tries: number | undefined): PlanOptions => ({
  ...planOptions(cutFrom, pieces),
  ...(tries === undefined ? {} : { tries }),
});

/** What was found, with its plan and what keeps it from being a step larger. */
export function answerPile(model: Model, solved: Solved, pile: Pile, tries?: number): Answer {
  if (!solved.ok) return { ...solved, offers: [] };
  const figures = evaluate(model, solved.sizing);
  return {
    ok: true,
    figures,
    plan: planSheets(figures, pileOptions(pile.cutFrom, figures.pieces, tries)),
    cutFrom: pile.cutFrom,
    stops: whatStops(model, figures, pile, tries),
  };
}

/** The same shape with its first inside size one step of the cut grid larger: what is wrong with it. */
function whatStops(
  model: Model,
  { sizing, finished }: Figures,
  { cutFrom, count }: Pile,
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
  const plan = planSheets(figures, pileOptions(cutFrom, figures.pieces, tries));
  const { name } = cutFrom.stock;
  const [large] = plan.tooLarge;
  if (large) return `A step larger, ${large.name} no longer fits ${name}. ${say(helpWithTooLarge(large), sizing)}`;
  const used = cardUsed(plan);
  return used > count ? `A step larger, it takes ${used} sheets of ${name}.` : null;
}
