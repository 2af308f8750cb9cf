import type { Editor } from '@tiptap/core';
import { closeHistory } from '@tiptap/pm/history';
import { TextSelection } from '@tiptap/pm/state';
import type { Match } from '../numbers/match-numbers';
import type { StrayAt } from './stray-numbers';
import { putMeasure } from './writing';

interface Asked {
  readonly from: number;
  readonly to: number;
  readonly stray: StrayAt;
}

/** Puts the measure in place of the number, or of the part of it that the reading stands for. */
export function takeStray(editor: Editor, { from, to, stray }: Asked, { formula, reading }: Match): void {
  // A reading that leaves words aside begins later.
  const late = reading.to - reading.from < to - from ? to - (reading.to - reading.from) : from;
  putMeasure(editor, { from: late, to }, { formula, bare: !stray.hasUnit });
}

/** Marks the number as meant: it is not underlined any more, and not in the proof list. */
export function keepAsTyped({ state, view }: Editor, { from, to }: Asked): void {
  const type = state.schema.marks.asTyped;
  if (!type) return;
  const tr = state.tr.addMark(from, to, type.create()).removeStoredMark(type);
  view.dispatch(closeHistory(tr).setSelection(TextSelection.create(tr.doc, to)));
}
