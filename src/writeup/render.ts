import type { SheetPlan } from '@/engine';
import { curvesInside } from './curve-template';
import type {
  ForwardNode,
  BlockNode,
  DocNode,
  InlineNode,
  MarkNode,
  PhotoNode,
  StepNode,
  VideoMoment,
} from './document';
import { holds, numberSteps, whenOf, type NumberedStep } from './condition';
import { esc } from '@/exports/escape';
import { safeHref } from './links';
import type { LiveFigures } from './live';
import { momentHref, momentText } from './video-moment';
import { focusClasses, pictureSources, pictureUrl } from './pictures';
import { foldedInside } from './folded-block';
import { amountInside, amountsInside, sheetPlanInside, sizesInside } from './render-blocks';
import { renderTable } from './render-table';
import { usualPlan } from './usual-plan';
import { CARD_WIDTH, renderCutList, renderPieceCard } from './render-figures';
import { renderMeasure, stepRefInside } from './render-measure';

export interface RenderContext extends LiveFigures {
  /** How the pieces lie on the reader's sheets; usual: on those that cardstock is mostly sold in. */
  readonly plan?: SheetPlan;
  /** Pixels that pieces are drawn in. */
  readonly cardWidth?: number;
}

/** The page's scale of headings: the title is 1, a heading of the write-up 2. */
type Level = 2 | 3 | 4;

interface Surroundings extends RenderContext {
  readonly plan: SheetPlan;
  readonly ids: Set<string>;
  /** Headings of this level and above are spoken for by what stands round the node. */
  readonly above: 1 | 2 | 3;
  readonly steps: readonly NumberedStep[];
}

const CAUTION_ICON =
  '<svg class="icon" viewBox="0 0 24 24" width="20" height="20" aria-hidden="true"><path d="M12 4 2.5 20h19zM12 10v5M12 17.5v.3"/></svg>';

const PENCIL_ICON =
  '<svg class="icon" viewBox="0 0 24 24" width="20" height="20" aria-hidden="true"><path d="m4.5 19.5 1-4.5L16.5 4l3.5 3.5L9 18.5zM14 6.5l3.5 3.5"/></svg>';
const PLAY_ICON =
  '<svg class="icon" viewBox="0 0 24 24" width="20" height="20" aria-hidden="true"><path d="M3.5 5.5h17v13h-17zM10 9v6l5-3z"/></svg>';

/**
 * The write-up as HTML for the article, complete and escaped; nothing of it needs a program to be read. Works without a
 * DOM and without the editor, so the browser may call it too. Empty paragraphs and headings are left away; steps and
 * phrases that do not apply are there and hidden, since another size may need them.
 */
export function renderWriteUp(doc: DocNode, context: RenderContext): string {
  const around = { ...context, ...planOf(context), ids: new Set<string>(), steps: numberSteps(doc, context) };
  let above: 1 | 2 = 1;
  return doc.content
    .map((node) => {
      if (node.type === 'heading' && node.attrs.level === 2) above = 2;
      return block(node, { ...around, above: node.type === 'step' ? above : 1 });
    })
    .join('\n');
}

/** Worked out when something asks for it: most write-ups do not. */
const planOf = ({ plan, figures }: RenderContext) => ({
  get plan(): SheetPlan {
    return plan ?? usualPlan(figures);
  },
});

/** Photos that follow one another stand side by side; everything else below. */
function blocks(content: readonly BlockNode[], around: Surroundings): string {
  let html = '';
  for (let at = 0; at < content.length; ) {
    const row: PhotoNode[] = [];
    for (let node = content[at]; node?.type === 'photo'; node = content[(at += 1)]) row.push(node);
    if (row.length > 1) html += `<div class="photos">${row.map((one) => photo(one, around, true)).join('')}</div>`;
    else if (row[0]) html += photo(row[0], around, false);
    const next = content[at];
    if (next) html += block(next, around);
    at += 1;
  }
  return html;
}

const liveBlock = (name: string, mark: string, inside: string): string =>
  `<div class="live-block ${name}" ${mark}>${inside}</div>`;

function block(node: BlockNode, around: Surroundings): string {
  switch (node.type) {
    case 'step':
      return step(node, around);
    case 'paragraph': {
      const when = commonWhen(node);
      const text = inlines(node.content, around, when);
      return text === '' ? '' : `<p${conditionOf(when, around)}>${text}</p>`;
    }
    case 'heading': {
      const text = inlines(node.content, around);
      if (text === '') return '';
      const level = Math.min(Math.max(node.attrs.level === 3 ? 3 : 2, around.above + 1), 4) as Level;
      return `<h${level} id="${headingId(node.content ?? [], around.ids)}">${text}</h${level}>`;
    }
    case 'bulletList':
    case 'orderedList': {
      const items = node.content.map((item) => listItem(item.content, around)).join('');
      const start = node.attrs && node.attrs.start !== 1 ? ` start="${Math.trunc(node.attrs.start)}"` : '';
      return node.type === 'bulletList' ? `<ul>${items}</ul>` : `<ol${start}>${items}</ol>`;
    }
    case 'pieceCard':
      return renderPieceCard(around.figures, node.attrs.piece, around.cardWidth ?? CARD_WIDTH);
    case 'cutList':
      return renderCutList(around.figures);
    case 'photo':
      return photo(node, around, false);
    case 'correction':
      return `<div class="correction" role="note"><b class="note-word">${PENCIL_ICON} Corrected</b>${blocks(node.content, around)}</div>`;
    case 'forward':
      return forward(node, around);
    case 'tip':
      return `<div class="tip" role="note"><b class="note-word">Tip</b>${blocks(node.content, around)}</div>`;
    case 'caution':
      return `<div class="caution" role="note"><b class="note-word">${CAUTION_ICON} Caution</b>${blocks(node.content, around)}</div>`;
    case 'materials':
    case 'tools': {
      const word = node.type === 'tools' ? 'Tools' : 'Materials';
      return `<div class="materials" role="group" aria-label="${word}"><p class="materials-word">${word}</p>${blocks(node.content, around)}</div>`;
    }
    case 'amounts':
      return liveBlock('amounts', 'data-amounts', amountsInside(around.figures, around.plan));
    case 'sheetPlan':
      return liveBlock('sheet-plan', 'data-sheet-plan', sheetPlanInside(around.figures, around.plan));
    case 'foldedView':
      return liveBlock('folded-view', 'data-folded-view', foldedInside(around));
    case 'sizeSummary':
      return liveBlock('size-summary', 'data-size-summary', sizesInside(around.figures));
    case 'curveTemplate':
      return liveBlock(
        'curve-template',
        `data-curve-of="${esc(node.attrs.piece)}"`,
        curvesInside(around.figures, node.attrs.piece),
      );
    case 'table':
      return renderTable(node, (content) => blocks(content, around));
    default:
      return node satisfies never;
  }
}

/** An item that is one phrase under a condition goes with it, bullet and all. */
function listItem(content: readonly BlockNode[], around: Surroundings): string {
  const when = content.length === 1 && content[0] ? commonWhen(content[0]) : '';
  return `<li${conditionOf(when, around)}>${blocks(content, around)}</li>`;
}

function step(node: StepNode, around: Surroundings): string {
  const { attrs, content } = node;
  const { place, number } = around.steps.find((one) => one.step === node) ?? { place: 0, number: null };
  const level = (around.above + 1) as 2 | 3;
  const id = `step-${place}`;
  const title = attrs.title.trim();
  const marks = [...(attrs.optional ? ['optional'] : []), attrs.mark.trim()].filter((words) => words !== '');
  const marked = marks.map((words) => ` <span class="step-mark">${esc(words)}</span>`).join('');
  const counted = `Step <span data-number>${number ?? ''}</span>`;
  const heading =
    title === '' && marked === ''
      ? `<h${level} class="step-title visually-hidden" id="${id}-title">${counted}</h${level}>`
      : `<h${level} class="step-title" id="${id}-title"><span class="visually-hidden">${counted}${title === '' ? '' : ': '}</span>${esc(title)}${marked}</h${level}>`;
  return (
    `<section class="step" id="${id}" aria-labelledby="${id}-title"${conditionOf(attrs.when, around)}><div class="step-number" data-number aria-hidden="true">${number ?? ''}</div>` +
    `<div class="step-body">${heading}${momentLine(attrs.moment)}${earlierLine(node, around)}${blocks(content, { ...around, above: level })}</div></section>`
  );
}

/** What hides an element while its condition does not hold: the page takes it from there. */
const conditionOf = (when: string | undefined, around: Surroundings): string =>
  when ? ` data-when="${esc(when)}"${holds(around, when) ? '' : ' hidden'}` : '';

/** The condition that all of a paragraph stands under, so that nothing of it is left when it does not hold. */
function commonWhen(node: BlockNode): string {
  const [first, ...rest] = node.type === 'paragraph' ? (node.content ?? []) : [];
  const when = first ? whenOf(first) : '';
  return rest.every((other) => whenOf(other) === when) ? when : '';
}

/** A link out, and never a player: nothing is asked of another site before the reader follows it. */
function momentLine(moment: VideoMoment | null | undefined): string {
  if (!moment) return '';
  const href = momentHref(moment);
  const words = `${PLAY_ICON} ${href === null ? 'In the video from' : 'Watch this step from'} ${momentText(moment.seconds)}`;
  if (href === null) return `<p class="step-moment">${words}</p>`;
  const host = new URL(href).hostname.replace(/^www\./, '');
  return `<p class="step-moment"><a href="${esc(href)}" rel="noopener noreferrer">${words}</a> <span class="soft">${esc(host)}</span></p>`;
}

/** `beside` others: cropped to one shape, so that they stand in line. */
function photo({ attrs, content }: PhotoNode, around: Surroundings, beside: boolean): string {
  const { upload, alt, width, height, focus, crop = 'whole' } = attrs;
  const caption = inlines(content, around);
  const cropped = crop !== 'whole' || beside ? ` photo-cropped photo-${crop}${focus ? focusClasses(focus) : ''}` : '';
  const sizes = beside ? '(min-width: 1000px) 340px, 50vw' : '(min-width: 1000px) 700px, 100vw';
  return (
    `<figure class="photo${cropped}"><img src="${esc(pictureUrl(upload, 960))}" srcset="${esc(pictureSources(upload, width))}" ` +
    `sizes="${sizes}" width="${Math.trunc(width)}" height="${Math.trunc(height)}" alt="${esc(alt)}" loading="lazy" decoding="async">` +
    `${caption === '' ? '' : `<figcaption>${caption}</figcaption>`}</figure>`
  );
}

/** Done now for the sake of a later step, which says so too. */
function forward({ attrs, content }: ForwardNode, around: Surroundings): string {
  const later = attrs.key === '' ? '' : ` <span class="note-for">for ${stepRef(attrs.key, around, false)}</span>`;
  return `<div class="forward" role="note"><b class="note-word">${esc(attrs.word.trim() || 'Now')}${later}</b>${blocks(content, around)}</div>`;
}

/** At a step: the earlier ones in which something was done for it. */
function earlierLine(node: StepNode, around: Surroundings): string {
  const { key } = node.attrs;
  if (!key) return '';
  const earlier = around.steps.filter(({ step: { content } }) =>
    content.some((block) => block.type === 'forward' && block.attrs.key === key),
  );
  return earlier
    .map(({ step: { attrs }, place, number }) => {
      const link = `<a class="step-ref" href="#step-${place}" data-step-ref="step">${stepRefInside('step', number)}</a>`;
      return `<p class="step-earlier"${conditionOf(attrs.when, around)}>Needs what was done for it in ${link}.</p>`;
    })
    .join('');
}

/** Phrases under one condition are one element; what stands under the condition `given` has it said already. */
function inlines(content: readonly InlineNode[] | undefined, around: Surroundings, given = ''): string {
  let html = '';
  let phrase = { when: given, inside: '' };
  const close = () => {
    const { when, inside } = phrase;
    html += when === given || inside === '' ? inside : `<span${conditionOf(when, around)}>${inside}</span>`;
  };
  content?.forEach((node, index) => {
    const when = whenOf(node) || given;
    if (when !== phrase.when) {
      close();
      phrase = { when, inside: '' };
    }
    phrase.inside += inline(node, around, content[index - 1]);
  });
  close();
  return html;
}

function inline(node: InlineNode, around: Surroundings, before: InlineNode | undefined): string {
  switch (node.type) {
    case 'text':
      return marked(esc(node.text), node.marks);
    case 'measure':
      return marked(renderMeasure(around, node.attrs), node.marks);
    case 'amount':
      return marked(
        `<span class="measure" data-amount="${esc(node.attrs.of)}">${amountInside(around.figures, around.plan, node.attrs.of)}</span>`,
        node.marks,
      );
    case 'stepRef':
      return marked(stepRef(node.attrs.key, around, beginsSentence(before)), node.marks);
    case 'hardBreak':
      return '<br>';
    default:
      return node satisfies never;
  }
}

const beginsSentence = (before: InlineNode | undefined): boolean =>
  before === undefined || before.type === 'hardBreak' || (before.type === 'text' && /[.!?:]\s+$/u.test(before.text));

function stepRef(key: string, { steps }: Surroundings, capital: boolean): string {
  const found = steps.find(({ step: { attrs } }) => key !== '' && attrs.key === key);
  if (!found) return '<span class="unknown">a step that is gone</span>';
  const word = capital ? 'Step' : 'step';
  return `<a class="step-ref" href="#step-${found.place}" data-step-ref="${word}">${stepRefInside(word, found.number)}</a>`;
}

/** Italic inside bold inside a link, whatever order they are stored in; conditions are whole phrases round them. */
const OUTSIDE_IN: readonly MarkNode['type'][] = ['asTyped', 'italic', 'bold', 'link', 'onlyWhen'];

const marked = (html: string, marks: readonly MarkNode[] = []): string =>
  [...marks]
    .sort((a, b) => OUTSIDE_IN.indexOf(a.type) - OUTSIDE_IN.indexOf(b.type))
    .reduce((inner, mark) => wrap(inner, mark), html);

function wrap(html: string, mark: MarkNode): string {
  switch (mark.type) {
    case 'bold':
      return `<strong>${html}</strong>`;
    case 'italic':
      return `<em>${html}</em>`;
    case 'link': {
      const href = safeHref(mark.attrs.href);
      return href === null ? html : `<a href="${esc(href)}" rel="noopener">${html}</a>`;
    }
    case 'onlyWhen':
    case 'asTyped':
      return html;
    default:
      return mark satisfies never;
  }
}

/** `part-cut-and-score`: from the words alone, so that it stays when a measure in the heading changes; never twice. */
function headingId(content: readonly InlineNode[], taken: Set<string>): string {
  const words = content
    .map((node) => (node.type === 'text' ? node.text : ' '))
    .join('')
    .normalize('NFKD')
    .toLowerCase()
    .replace(/[^\p{L}\p{N}]+/gu, '-')
    .replace(/^-+|-+$/g, '')
    .slice(0, 60);
  const base = `part-${words || 'heading'}`;
  let id = base;
  for (let n = 2; taken.has(id); n += 1) id = `${base}-${n}`;
  taken.add(id);
  return id;
}
