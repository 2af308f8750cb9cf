import type { Editor } from '@tiptap/core';
import { NodeSelection } from '@tiptap/pm/state';
import type { VideoMoment } from '../document';
import type { LiveFigures, LiveText } from '../live';
import { stepAt } from './steps';
import { strayAt, type StrayAt } from './stray-numbers';
import { linkAt, phraseAt } from './writing';

interface Range {
  readonly from: number;
  readonly to: number;
}
/** What is asked for below the caret. Ranges move with the text while it is open. */
export type Opened =
  | (Range & { readonly type: 'measure'; readonly begin: LiveText; readonly changing: boolean })
  | (Range & { readonly type: 'stray'; readonly stray: StrayAt; readonly live: LiveFigures })
  | (Range & { readonly type: 'phrase'; readonly when: string })
  | (Range & { readonly type: 'when'; readonly when: string; readonly optional: boolean })
  | (Range & { readonly type: 'moment'; readonly moment: VideoMoment | null })
  | { readonly type: 'piece' }
  | { readonly type: 'step number' }
  | { readonly type: 'note' }
  | { readonly type: 'block' }
  | { readonly type: 'amount' }
  | { readonly type: 'outline' }
  | { readonly type: 'link'; readonly href: string };

export const OPENED_LABELS: Readonly<Record<Opened['type'], string>> = {
  measure: 'Live measure',
  stray: 'Typed number',
  phrase: 'Said only when',
  when: 'When the step is there',
  moment: 'Video moment',
  piece: 'Pieces',
  'step number': 'Steps',
  note: 'Notes',
  block: 'Blocks',
  amount: 'Amounts',
  outline: 'Outline',
  link: 'Link',
};

export function openMeasure(editor: Editor, range: Range): Opened {
  const text = editor.state.doc.textBetween(range.from, range.to, ' ');
  const formula = /^:*$/.test(text) || text.length > 60 ? '' : text;
  return { type: 'measure', ...range, begin: { formula, bare: false }, changing: false };
}

/** Asks which measure the typed number at the caret is; null where none stands. */
export function openStray(editor: Editor, live: LiveFigures | null): Opened | null {
  const { doc, selection } = editor.state;
  // Two colons ask for a measure of their own.
  const asked = doc.textBetween(Math.max(0, selection.from - 2), selection.from, ' ') === '::';
  if (!live || asked) return null;
  const stray = strayAt(editor.state, live);
  return stray ? { type: 'stray', from: stray.from, to: stray.to, stray, live } : null;
}

export function changeMeasure(editor: Editor, pos: number): Opened | null {
  const node = editor.state.doc.nodeAt(pos);
  return node?.type.name === 'measure'
    ? { type: 'measure', from: pos, to: pos + 1, begin: node.attrs as LiveText, changing: true }
    : null;
}

export function openStep(editor: Editor, pos: number, what: 'when' | 'moment'): Opened | null {
  const node = editor.state.doc.nodeAt(pos);
  if (node?.type.name !== 'step') return null;
  const { when, optional, moment } = node.attrs as { when: string; optional: boolean; moment: VideoMoment | null };
  const range = { from: pos, to: pos + node.nodeSize };
  return what === 'when' ? { type: 'when', ...range, when, optional } : { type: 'moment', ...range, moment };
}

/** The selected words, the phrase or the step that the caret stands in; null where nothing can have a condition. */
export function openCondition(editor: Editor): Opened | null {
  const phrase = editor.state.selection instanceof NodeSelection ? null : phraseAt(editor);
  if (phrase) return { type: 'phrase', ...phrase };
  const pos = stepAt(editor);
  return pos === null ? null : openStep(editor, pos, 'when');
}

export const openLink = (editor: Editor): Opened => ({ type: 'link', href: linkAt(editor) });

/** What is asked for keeps its place while the text round it changes, as when a photo arrives. */
export const movedBy = (
  opened: Opened | null,
  mapping: { readonly map: (pos: number, assoc?: number) => number },
): Opened | null =>
  opened !== null && 'from' in opened
    ? { ...opened, from: mapping.map(opened.from, -1), to: mapping.map(opened.to, 1) }
    : opened;
