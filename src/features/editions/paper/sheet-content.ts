import { orderOf, show, showValue, type Figures, type Model, type SheetPlan } from '@/engine';
import { figuresAsCut } from '@/exports/as-cut';
import type { Fact, SheetContent, StepLine } from '@/exports/pdf/sheet/content';
import type { Edition } from '@/features/editions/editions.server';
import { dayWords } from '@/features/editions/dates';
import { cutWords, departureSize, insideWords, sheetsWords, sizesTogether, timeWords } from '@/features/sizing/facts';
import { panelFor } from '@/features/sizing/panel';
import { holds, inlinesShown, numberSteps } from '@/writeup/condition';
import type { BlockNode, InlineNode, WriteUp } from '@/writeup/document';
import { liveParts, showLive, type LiveFigures } from '@/writeup/live';
import { CAUTIONS } from '../sheet/cautions';

export interface SheetSource {
  readonly model: Model;
  readonly figures: Figures;
  readonly plan: SheetPlan;
}
export type EditionOnPaper = Pick<Edition, 'title' | 'n' | 'author' | 'publishedAt' | 'minutes' | 'writeUp'>;

/** The sheet of a published edition; `address` is that of this very size. */
export function editionSheet(source: SheetSource, edition: EditionOnPaper, address: string): SheetContent {
  return {
    ...common(source, edition.minutes),
    title: edition.title,
    byline: [edition.author.name, `Edition ${edition.n}, ${dayWords(edition.publishedAt)}`],
    address,
    steps: stepsOf(edition.writeUp, source),
    cautions: [...cautionsOf(edition.writeUp, source), ...CAUTIONS],
    date: edition.publishedAt,
  };
}

/** A pattern comes from no edition and of no day; a file has to name one. */
const NO_DAY = new Date(Date.UTC(2000, 0, 1));

/** The sheet of a bare pattern. */
export function patternSheet(source: SheetSource): SheetContent {
  const { pattern } = source.model;
  return {
    ...common(source, null),
    title: pattern.name,
    byline: [pattern.summary],
    address: null,
    steps: orderOf(source.model, source.figures).map((sentence) => ({ title: orderText(sentence, source), mark: '' })),
    cautions: CAUTIONS,
    date: NO_DAY,
  };
}

function common(source: SheetSource, minutes: number | null) {
  const { figures, plan } = source;
  return {
    ...source,
    figures: figuresAsCut(figures, plan),
    box: figures,
    facts: factsOf(source, minutes),
    sizeWords: `${insideWords(figures)} inside, cut to ${cutWords(figures).to}`,
  };
}

function factsOf({ model, figures, plan }: SheetSource, minutes: number | null): readonly Fact[] {
  const { sizing, departure } = figures;
  const panel = panelFor(model, figures);
  const inside = figures.finished.inside
    .map(({ name, mm }) => `${show(mm, { ...sizing, bare: true }).typeset} ${name}`)
    .join(' · ');
  const asked = panel.fields
    .filter((field) => field.inUse && (field.set || !field.finer) && !/^inside /.test(field.name))
    .map(({ name, value, kind, unit }) => `${name} ${showValue(value, kind, { ...sizing, unit }).typeset}`);
  const choices = panel.choices.map(({ name, chosen }) => `${name} ${chosen}`);
  const off = Math.abs(departure.mm);
  const thickness = figures.pieces[0]?.thickness ?? 0;
  const facts: readonly Fact[] = [
    { term: 'Finished, outside', value: sizesTogether(figures.finished.outside, sizing), more: '' },
    { term: 'Your size, inside', value: `${inside} ${sizing.units}`, more: asked.join(', ') },
    { term: 'Made with', value: '', more: choices.join(', ') },
    {
      term: 'Cut to',
      value: cutWords(figures).to,
      more:
        off < 0.005
          ? 'nothing is off'
          : `within ${departureSize(off, sizing.units)}${departure.where ? `: ${departure.where}` : ''}`,
    },
    {
      term: 'Card',
      value: sheetsWords(plan),
      more: thickness > 0 ? `${show(thickness, { units: 'mm' }).typeset} thick` : '',
    },
    { term: 'Time', value: timeWords(minutes), more: '' },
  ];
  return facts.filter(({ value, more }) => value !== '' || more !== '');
}

/** The write-up's steps by title; one without a title goes by its first words. */
function stepsOf({ doc }: WriteUp, live: LiveFigures): readonly StepLine[] {
  return numberSteps(doc, live).flatMap(({ step: { attrs, content }, number }): StepLine[] => {
    if (number === null) return [];
    const title = attrs.title.trim() || firstSentence(textOf(content, live));
    const mark = [attrs.optional ? 'optional' : '', attrs.mark.trim()].filter((words) => words !== '').join(', ');
    return title === '' ? [] : [{ title, mark }];
  });
}

const firstSentence = (text: string): string => /^.*?[.!?](?=\s|$)/u.exec(text)?.[0] ?? text;

/** What the author warns of, wherever it stands. */
function cautionsOf({ doc }: WriteUp, live: LiveFigures): readonly string[] {
  const all: string[] = [];
  const visit = (nodes: readonly BlockNode[]): void =>
    nodes.forEach((node) => {
      if (node.type === 'caution') all.push(textOf(node.content, live));
      else if (node.type === 'step' && holds(live, node.attrs.when)) visit(node.content);
    });
  visit(doc.content);
  return all.filter((text) => text !== '');
}

/** The running text of blocks, paragraphs joined by a space; what is drawn is left away. */
function textOf(nodes: readonly BlockNode[], live: LiveFigures): string {
  return nodes
    .map((node) => {
      if (node.type === 'paragraph' || node.type === 'heading') return inlineText(node.content ?? [], live);
      if (node.type === 'bulletList' || node.type === 'orderedList')
        return node.content.map((item) => textOf(item.content, live)).join(' ');
      return '';
    })
    .join(' ')
    .replace(/[^\S\u00a0\u202f]+/gu, ' ')
    .trim();
}

function inlineText(nodes: readonly InlineNode[], live: LiveFigures): string {
  return inlinesShown(nodes, live)
    .map((node) => {
      if (node.type === 'text') return node.text;
      return node.type === 'measure' ? (showLive(live, node.attrs)?.typeset ?? node.attrs.formula) : ' ';
    })
    .join('');
}

const orderText = (sentence: string, live: LiveFigures): string =>
  liveParts(sentence)
    .map((part) =>
      'formula' in part ? (showLive(live, { formula: part.formula, bare: false })?.typeset ?? part.formula) : part.text,
    )
    .join('');
