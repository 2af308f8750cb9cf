import type { BlockNode, InlineNode, StepNode } from '@/writeup/document';
import type { LiveFigures } from '@/writeup/live';
import { findNumbers } from '@/writeup/numbers/find-numbers';
import { matchNumbers, type Match, type MatchedNumber } from '@/writeup/numbers/match-numbers';
import { withoutFiller } from './filler';
import type { DraftStep } from './split-steps';

export interface PreparedParagraph {
  readonly text: string;
  readonly numbers: readonly PreparedNumber[];
}
export interface PreparedNumber extends MatchedNumber {
  /** Its place among all numbers that were brought in. */
  readonly id: number;
}
export interface PreparedStep {
  readonly title: string;
  readonly moment: number | null;
  readonly paragraphs: readonly PreparedParagraph[];
}
export interface PrepareOptions {
  readonly live: LiveFigures;
  readonly trimFiller: boolean;
}

/** Steps with their numbers found and matched; nothing is changed but the filler, where that was asked for. */
export function prepareSteps(
  steps: readonly DraftStep[],
  { live, trimFiller }: PrepareOptions,
): readonly PreparedStep[] {
  const { units } = live.figures.sizing;
  let id = 0;
  let earlier = '';
  return steps.map((step) => {
    earlier = step.title === '' ? earlier : `${earlier} ${step.title}.`;
    const texts = trimFiller ? step.paragraphs.map(withoutFiller) : step.paragraphs;
    const paragraphs = texts
      .filter((text) => text !== '')
      .map((text): PreparedParagraph => {
        const numbers = matchNumbers(text, findNumbers(text, { units }), live, earlier);
        earlier = `${earlier} ${text}`.slice(-EARLIER);
        return { text, numbers: numbers.map((number) => ({ ...number, id: id++ })) };
      });
    return { title: step.title, moment: step.moment, paragraphs };
  });
}
/** How much of the text before is looked at for the piece that is spoken of. */
const EARLIER = 600;

/** What the author said of a number: which measure it is, or that it stays as it is. */
export type Decision = { readonly take: Match } | 'plain';
export type Decisions = ReadonlyMap<number, Decision>;

export const numbersOf = (steps: readonly PreparedStep[]): readonly PreparedNumber[] =>
  steps.flatMap(({ paragraphs }) => paragraphs.flatMap(({ numbers }) => numbers));

/** The decisions with the first match taken for every certain number that nothing is decided of yet. */
export function acceptCertain(steps: readonly PreparedStep[], decisions: Decisions): Decisions {
  const all = new Map(decisions);
  for (const { id, certain, matches } of numbersOf(steps)) {
    const [first] = matches;
    if (certain && first && !all.has(id)) all.set(id, { take: first });
  }
  return all;
}

/** Steps of the write-up. A number that nothing was decided of stays as it was said. `video` is the film's address. */
export function stepNodes(
  steps: readonly PreparedStep[],
  decisions: Decisions,
  video: string | null,
): readonly StepNode[] {
  return steps.map(({ title, moment, paragraphs }) => ({
    type: 'step',
    attrs: {
      title,
      mark: '',
      ...(moment === null ? {} : { moment: { seconds: Math.floor(moment), address: video } }),
    },
    content:
      paragraphs.length === 0
        ? [{ type: 'paragraph' }]
        : paragraphs.map((paragraph): BlockNode => ({ type: 'paragraph', content: inline(paragraph, decisions) })),
  }));
}

function inline({ text, numbers }: PreparedParagraph, decisions: Decisions): readonly InlineNode[] {
  const nodes: InlineNode[] = [];
  const say = (words: string) => {
    if (words !== '') nodes.push({ type: 'text', text: words });
  };
  let at = 0;
  numbers.forEach((number, n) => {
    const decision = decisions.get(number.id);
    if (decision === undefined) return;
    const { from, to } = decision === 'plain' ? number : decision.take.reading;
    say(text.slice(at, from));
    if (decision === 'plain') nodes.push({ type: 'text', text: text.slice(from, to), marks: [{ type: 'asTyped' }] });
    else
      nodes.push({ type: 'measure', attrs: { formula: decision.take.formula, bare: isBare(number, numbers[n + 1]) } });
    at = to;
  });
  say(text.slice(at));
  return nodes;
}

/** "6 by 8 inches" says its unit once; so does what was said without any: at its end. */
const isBare = (number: PreparedNumber, next: PreparedNumber | undefined): boolean =>
  !number.hasUnit && next !== undefined && next.group === number.group;
