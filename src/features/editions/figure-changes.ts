import {
  evaluate,
  instructionsOf,
  keyOf,
  say,
  show,
  showValue,
  type Figures,
  type Model,
  type PieceFigure,
  type Sizing,
} from '@/engine';

import { align } from '@/features/projects/align';
import { alikeBlocks, blockName, isStep, type LooseNode } from '@/features/projects/state-words';
import type { WriteUp } from '@/writeup/document';
import { showLive, type LiveFigures } from '@/writeup/live';

/** A figure that is not what it was, as the maker reads it on a ruler. */
export interface FigureChange {
  /** "Lower spine", "strip width". */
  readonly name: string;
  /** Typeset; empty when there was none, or is none any more. */
  readonly was: string;
  readonly is: string;
}
export interface FigureChanges {
  readonly pieces: readonly FigureChange[];
  /** Measures that differ, whether or not a piece shows them. */
  readonly measures: readonly FigureChange[];
  /** Live figures of the text, by the step that they stand in: another measure may stand there now. */
  readonly text: readonly FigureChange[];
}
/** What figures follow from. */
export interface Figured {
  readonly model: Model;
  readonly writeUp: WriteUp;
}

/**
 * What somebody who cut by `before` finds different in `after`, both at the same answers, units and cut grid. Figures are
 * compared as cut: what a ruler does not show is no change. A measure that one of them does not have is left out, a piece
 * is told.
 */
export function figureChanges(before: Figured, after: Figured, sizing: Sizing): FigureChanges {
  const [was, is] = [before, after].map(({ model, writeUp }) => ({
    live: { model, figures: evaluate(model, answersOf(model, sizing)) },
    writeUp,
  })) as [Worked, Worked];
  return {
    pieces: pieceChanges(was.live.figures, is.live.figures),
    measures: measureChanges(was.live.figures, is.live.figures),
    text: textChanges(was, is),
  };
}
interface Worked {
  readonly live: LiveFigures;
  readonly writeUp: WriteUp;
}

export const noFigureChanged = ({ pieces, measures, text }: FigureChanges): boolean =>
  pieces.length === 0 && measures.length === 0 && text.length === 0;

/** Only what this pattern asks: an older one may ask less, or other things. */
function answersOf({ pattern }: Model, sizing: Sizing): Sizing {
  const asked = new Set(pattern.measures.flatMap(({ name, ask }) => (ask ? [keyOf(name)] : [])));
  const chosen = new Map(pattern.choices.map(({ name, options }) => [keyOf(name), options]));
  return {
    ...sizing,
    values: Object.fromEntries(Object.entries(sizing.values).filter(([name]) => asked.has(keyOf(name)))),
    choices: Object.fromEntries(
      Object.entries(sizing.choices).filter(([name, option]) => chosen.get(keyOf(name))?.includes(option)),
    ),
  };
}

function pieceChanges(before: Figures, after: Figures): FigureChange[] {
  const names = [...new Set([...after.pieces, ...before.pieces].map(({ name }) => name))];
  return names.flatMap((name) => {
    const [was, is] = [before, after].map((figures) => {
      const piece = figures.pieces.find((one) => one.name === name);
      return piece && piece.count > 0 ? { size: sizeWords(piece, figures), cuts: cutWords(piece, figures) } : null;
    });
    if (!was || !is) return was || is ? [{ name, was: was?.size ?? '', is: is?.size ?? '' }] : [];
    if (was.size !== is.size) return [{ name, was: was.size, is: is.size }];
    return was.cuts === is.cuts ? [] : [{ name, was: was.cuts, is: is.cuts }];
  });
}

/** "2 of 3 5/16 × 9 in" */
function sizeWords({ count, across, along }: PieceFigure, { sizing: { units, grid } }: Figures): string {
  const size = `${show(across, { units, grid, bare: true }).typeset} × ${show(along, { units, grid }).typeset}`;
  return count === 1 ? size : `${count} of ${size}`;
}

/** All that the maker is told to do to it, as one text. */
const cutWords = (piece: PieceFigure, { sizing: { units, grid } }: Figures): string =>
  instructionsOf(piece)
    .map((sentence) => say(sentence, { units, grid }))
    .join(' ');

function measureChanges(before: Figures, after: Figures): FigureChange[] {
  const { units, grid } = after.sizing;
  return after.measures.flatMap(({ name, kind, cut, inUse, unit }) => {
    const old = before.measures.find((measure) => keyOf(measure.name) === keyOf(name));
    if (!old?.inUse || !inUse || old.kind !== kind) return [];
    const [was, is] = [old.cut, cut].map((value) => showValue(value, kind, { units, grid, unit }).typeset);
    return was === is ? [] : [{ name, was: was ?? '', is: is ?? '' }];
  });
}

/** Block by block, figures that took the place of others; those that were only added or taken out say nothing of a cut. */
function textChanges(before: Worked, after: Worked): FigureChange[] {
  const blocks = ({ writeUp }: Worked) => writeUp.doc.content as readonly LooseNode[];
  const steps = blocks(after).filter(isStep);
  const pairs = align(blocks(before), blocks(after), { key: (block) => JSON.stringify(block), alike: alikeBlocks });
  return pairs.flatMap((pair) => {
    if (pair.before === undefined || pair.after === undefined) return [];
    const [old, now] = [figuresIn(pair.before, before.live), figuresIn(pair.after, after.live)];
    const name = blockName(pair.after, isStep(pair.after) ? steps.indexOf(pair.after) + 1 : null);
    return align(old, now, { key: (figure) => figure, alike: () => true }).flatMap((figure) =>
      figure.before === undefined || figure.after === undefined || figure.before === figure.after
        ? []
        : [{ name, was: figure.before, is: figure.after }],
    );
  });
}

function figuresIn(block: LooseNode, live: LiveFigures): readonly string[] {
  if (block.type === 'measure') {
    const shown = showLive(live, { formula: String(block.attrs?.['formula']), bare: false });
    return shown ? [shown.typeset] : [];
  }
  return (block.content ?? []).flatMap((inner) => figuresIn(inner, live));
}
