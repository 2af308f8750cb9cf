import { explain, usualSizing, type Fault, type Figures, type Model, type Sizing } from '@/engine';
import { panelFor, type Panel } from '@/features/sizing/panel';
import { isSizingForm, readSizingForm, type FormReading } from '@/features/sizing/sizing-form';
import { readSizing, writeSizing } from '@/features/sizing/sizing-link';
import { judge } from '@/features/sizing/verdict';

/** A box worked out on a page that is not a project's: on the home page and in the handbook. */
export interface Example {
  readonly model: Model;
  readonly usual: Sizing;
  readonly asked: Sizing;
  /** At the size asked for or, while that cannot be made, at the nearest or last one that can. */
  readonly figures: Figures;
  readonly panel: Panel;
  /** What was typed where it does not read, by measure name. */
  readonly typed: Readonly<Record<string, string>>;
  /** What keeps the size asked for from being made, one sentence each; empty when it can. */
  readonly troubles: readonly string[];
}

/**
 * Works the box out from an address or from its form. Parameters that name nothing of the pattern are left alone.
 * Without `lastGood`, a size that cannot be made gives the nearest that can.
 */
export function workExample(model: Model, parameters: URLSearchParams, lastGood?: Sizing): Example {
  const usual = usualSizing(model);
  const { sizing, typed, faults } = read(model, parameters, usual);
  const unread = Object.entries(typed);
  // A field that does not read says nothing about the size, so the last good one stays.
  const asked = unread.length > 0 && lastGood ? lastGood : sizing;
  const verdict = judge(model, asked, lastGood ?? usual, { nearest: lastGood === undefined });
  return {
    model,
    usual,
    asked: sizing,
    figures: verdict.shown,
    panel: panelFor(model, verdict.figures),
    typed: Object.fromEntries(unread.map(([name, { text }]) => [name, text])),
    troubles: [
      ...faults.map(explain),
      ...unread.map(([, { sentence }]) => sentence),
      ...verdict.refusals.map(({ problem }) => problem.sentence),
    ],
  };
}

function read(
  model: Model,
  parameters: URLSearchParams,
  usual: Sizing,
): FormReading & { readonly faults: readonly Fault[] } {
  if (isSizingForm(parameters)) return { ...readSizingForm(model, parameters, usual), faults: [] };
  return { ...readSizing(model, parameters, usual), typed: {} };
}

/** The size that a form was drawn at, for its hidden field. */
export const drawnAt = ({ model, asked, usual }: Example): string =>
  writeSizing(model, asked, usual).replace(/^\?/, '');
