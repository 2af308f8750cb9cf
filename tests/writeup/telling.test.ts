import type { Editor } from '@tiptap/core';
import { EditorState, type Transaction } from '@tiptap/pm/state';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import type { DocNode } from '@/writeup/document';
import { takeDocument, toldNow } from '@/writeup/editor/take-document';
import { createTeller } from '@/writeup/editor/teller';
import { writeUpSchema } from '@/writeup/schema';

describe('what was typed', () => {
  beforeEach(() => void vi.useFakeTimers());
  afterEach(() => void vi.useRealTimers());

  it('is told once in the pause behind it', () => {
    const tell = vi.fn();
    const teller = createTeller(tell);
    for (let key = 0; key < 5; key += 1) {
      teller.changed();
      vi.advanceTimersByTime(100);
    }
    expect(tell).not.toHaveBeenCalled();
    vi.advanceTimersByTime(100);
    expect(tell).toHaveBeenCalledTimes(1);
  });

  it('is told after a second at the latest, and at once when it is asked for', () => {
    const tell = vi.fn();
    const teller = createTeller(tell);
    for (let key = 0; key < 11; key += 1) {
      teller.changed();
      vi.advanceTimersByTime(100);
    }
    expect(tell).toHaveBeenCalledTimes(1);
    teller.flush();
    expect(tell).toHaveBeenCalledTimes(2);
    teller.flush();
    vi.advanceTimersByTime(5000);
    expect(tell).toHaveBeenCalledTimes(2);
  });

  it('is forgotten when another document takes its place', () => {
    const tell = vi.fn();
    const teller = createTeller(tell);
    teller.changed();
    teller.stop();
    vi.advanceTimersByTime(5000);
    expect(tell).not.toHaveBeenCalled();
  });
});

/** An editor without a page: what is dispatched changes its state. */
function editorOf(...paragraphs: string[]) {
  const made = {
    state: EditorState.create({ doc: writeUpSchema().nodeFromJSON(docOf(...paragraphs)) }),
    view: {
      dispatch(tr: Transaction) {
        made.state = made.state.apply(tr);
      },
    },
  };
  return made as unknown as Editor & typeof made;
}
const docOf = (...paragraphs: string[]): DocNode => ({
  type: 'doc',
  content: paragraphs.map((text) => ({ type: 'paragraph', content: [{ type: 'text', text }] })),
});
const shown = ({ state }: Editor) => state.doc.content.content.map((node) => node.textContent);

describe('a document that was put together elsewhere', () => {
  it('keeps what was typed since the editor told last', () => {
    const editor = editorOf('One', 'Two', 'Three');
    const told = toldNow(editor);
    // "Two" begins at 6: its end is at 9.
    const typed = editor.state.tr.insertText(' and a half', 9);
    told.since.appendMapping(typed.mapping);
    editor.view.dispatch(typed);
    takeDocument(editor, docOf('One of theirs', 'Two', 'Three'), told);
    expect(shown(editor)).toEqual(['One of theirs', 'Two and a half', 'Three']);
  });

  it('takes the place of the text when nothing was typed', () => {
    const editor = editorOf('One', 'Two');
    takeDocument(editor, docOf('One', 'Two', 'Three'));
    expect(shown(editor)).toEqual(['One', 'Two', 'Three']);
  });
});
