import { compilePattern, explain, usualSizing, type Figures, type Model, type Pattern, type Sizing } from '@/engine';
import { panelFor, type Panel } from '@/features/sizing/panel';
import { isSizingForm, FROM, parameterName, readSizingForm } from '@/features/sizing/sizing-form';
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

/** The pattern as a model. Patterns in content/ were checked when they were loaded, so a fault here is a bug. */
export function exampleModel(pattern: Pattern): Model {
  const compiled = compilePattern(pattern);
  if (!compiled.ok) throw new Error(`${pattern.slug}: ${compiled.faults.map(explain).join(' ')}`);
  return compiled.value;
}

/** Works the box out from the parameters that belong to it; others are left alone. */
export function workExample(model: Model, parameters: URLSearchParams, lastGood?: Sizing): Example {
  const usual = usualSizing(model);
  const own = ownParameters(model, parameters);
  const read = isSizingForm(own)
    ? readSizingForm(model, own, usual)
    : { ...readSizing(model, own, usual), typed: {} };
  const verdict = judge(model, read.sizing, lastGood ?? usual, { nearest: lastGood === undefined });
  const unread = Object.entries(read.typed);
  return {
    model,
    usual,
    asked: read.sizing,
    figures: verdict.shown,
    panel: panelFor(model, verdict.figures),
    typed: Object.fromEntries(unread.map(([name, { text }]) => [name, text])),
    troubles: [
      ...('faults' in read ? read.faults.map(explain) : []),
      ...unread.map(([, { sentence }]) => sentence),
      ...verdict.refusals.map(({ problem }) => problem.sentence),
    ],
  };
}

/** The size that a form was drawn at, for its hidden field. */
export const drawnAt = ({ model, asked, usual }: Example): string => writeSizing(model, asked, usual).replace(/^\?/, '');

function ownParameters(model: Model, parameters: URLSearchParams): URLSearchParams {
  const names = new Set([FROM, 'units', 'cut']);
  for (const { name } of [...model.pattern.measures, ...model.pattern.choices]) names.add(parameterName(name));
  return new URLSearchParams([...parameters].filter(([name]) => names.has(name)));
}
