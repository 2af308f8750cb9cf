import { type Fault, type Model } from '@/engine';
import type { DocNode, InlineNode, StepNode } from './document';
import { readLive, type LiveFigures } from './live';

/** Whether a condition holds at these figures. One that is empty, does not read or has no answer holds: nothing is lost unseen. */
export function holds({ model, figures }: LiveFigures, when: string | undefined): boolean {
  if (when === undefined || when === '') return true;
  const read = readLive(model, when);
  if (!read.ok || read.value.kind !== 'yes/no') return true;
  return read.value.value(figures)?.cut !== 0;
}

/** Why a text is no condition; null when it is one. */
export function conditionFault(model: Model, when: string): Fault | null {
  const read = readLive(model, when);
  if (!read.ok) return read.faults[0] ?? null;
  if (read.value.kind === 'yes/no') return null;
  return {
    code: 'not a condition',
    where: 'condition',
    found: 'This works out a figure, not a yes or no',
    expected: 'a condition',
    hint: 'Compare it with something, as in “inside width > 6 in”, or name a choice, as in “lid is flip”.',
  };
}

/** The condition that a phrase stands under; empty for plain text. */
export function whenOf(node: InlineNode): string {
  const marks = 'marks' in node ? (node.marks ?? []) : [];
  for (const mark of marks) if (mark.type === 'onlyWhen') return mark.attrs.when;
  return '';
}

/** The text without the phrases that do not apply. */
export const inlinesShown = (content: readonly InlineNode[], live: LiveFigures): readonly InlineNode[] =>
  content.filter((node) => holds(live, whenOf(node)));

export interface NumberedStep {
  readonly step: StepNode;
  /** Among all steps of the write-up, from 1: it stays whatever the reader chooses, so addresses are made of it. */
  readonly place: number;
  /** As the reader counts, from 1; null for a step that does not apply. */
  readonly number: number | null;
}

/** Every step with the number that it has at these figures. */
export function numberSteps(doc: DocNode, live: LiveFigures): readonly NumberedStep[] {
  const steps = doc.content.filter((node) => node.type === 'step');
  const numbers = countSteps(
    steps.map(({ attrs }) => attrs.when),
    live,
  );
  return steps.map((step, index) => ({ step, place: index + 1, number: numbers[index] ?? null }));
}

/** The numbers of steps, given their conditions in order. */
export function countSteps(conditions: readonly (string | undefined)[], live: LiveFigures): readonly (number | null)[] {
  let number = 0;
  return conditions.map((when) => (holds(live, when) ? (number += 1) : null));
}
