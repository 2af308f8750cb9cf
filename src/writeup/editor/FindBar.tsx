import type { Editor } from '@tiptap/core';
import { closeHistory } from '@tiptap/pm/history';
import { TextSelection } from '@tiptap/pm/state';
import { useEffect, useId, useMemo, useState, type KeyboardEvent } from 'react';
import { useEditorState } from '@tiptap/react';
import { Icon } from '@/components/Icon';
import { findAll, replaceAll, seek, type Found, type Sought } from './find';

export interface FindBarProps {
  readonly editor: Editor;
  /** Words that were selected when it was opened. */
  readonly begin: string;
  readonly onClose: () => void;
}

/** Finds words in the write-up and puts others in their place. Live measures stay as they are. */
export function FindBar({ editor, begin, onClose }: FindBarProps) {
  const id = useId();
  const [query, setQuery] = useState(begin);
  const [words, setWords] = useState('');
  const [matchCase, setMatchCase] = useState(false);
  const [at, setAt] = useState(0);
  const [said, setSaid] = useState('');
  // The same document is the same object: comparing all that is in it would be slow.
  const doc = useEditorState({ editor, selector: ({ editor: now }) => now.state.doc, equalityFn: Object.is });
  const sought = useMemo((): Sought => ({ query, matchCase }), [query, matchCase]);
  const found = useMemo(() => findAll(doc, sought), [doc, sought]);
  const current = found.length === 0 ? 0 : Math.min(at, found.length - 1);

  useEffect(() => {
    editor.view.dispatch(seek(editor.state.tr, sought, current));
  }, [editor, sought, current]);
  useEffect(
    () => () => {
      if (!editor.isDestroyed) editor.view.dispatch(seek(editor.state.tr, null));
    },
    [editor],
  );

  const go = (to: number) => {
    if (found.length === 0) return;
    const next = (to + found.length) % found.length;
    setAt(next);
    const one = found[next];
    if (one) scrollTo(editor, one);
  };
  const replace = (some: readonly Found[]) => {
    if (some.length === 0) return;
    editor.view.dispatch(closeHistory(replaceAll(editor.state.tr, some, words)));
    setSaid(some.length === 1 ? 'Replaced 1 place.' : `Replaced ${some.length} places.`);
  };
  const close = () => {
    const one = found[current];
    onClose();
    if (one?.in === 'text')
      editor.view.dispatch(editor.state.tr.setSelection(TextSelection.create(editor.state.doc, one.from, one.to)));
    editor.commands.focus();
  };
  const keys = (event: KeyboardEvent) => {
    if (event.nativeEvent.isComposing) return;
    if (event.key === 'Escape') {
      event.preventDefault();
      event.stopPropagation();
      close();
    }
  };

  return (
    <div className="find-bar" role="search" aria-label="Find in the write-up" onKeyDown={keys}>
      <label htmlFor={`${id}-find`} className="visually-hidden">
        Find
      </label>
      <input
        id={`${id}-find`}
        className="input"
        autoFocus
        autoComplete="off"
        placeholder="Find"
        maxLength={200}
        value={query}
        onFocus={(event) => event.target.select()}
        onChange={(event) => {
          setQuery(event.target.value);
          setAt(0);
          setSaid('');
        }}
        onKeyDown={(event) => {
          if (event.key !== 'Enter' || event.nativeEvent.isComposing) return;
          event.preventDefault();
          go(current + (event.shiftKey ? -1 : 1));
        }}
      />
      <span className="find-count" aria-live="polite">
        {said || (query === '' ? '' : found.length === 0 ? 'nowhere' : `${current + 1} of ${found.length}`)}
      </span>
      <button
        type="button"
        className="icon-button"
        title="Previous (Shift Enter)"
        aria-label="Previous"
        onClick={() => go(current - 1)}
      >
        <Icon name="chevron-up" />
      </button>
      <button
        type="button"
        className="icon-button"
        title="Next (Enter)"
        aria-label="Next"
        onClick={() => go(current + 1)}
      >
        <Icon name="chevron-down" />
      </button>
      <label className="check">
        <input type="checkbox" checked={matchCase} onChange={(event) => setMatchCase(event.target.checked)} />
        As written
      </label>
      <label htmlFor={`${id}-words`} className="visually-hidden">
        Put in its place
      </label>
      <input
        id={`${id}-words`}
        className="input"
        autoComplete="off"
        placeholder="Put in its place"
        maxLength={200}
        value={words}
        onChange={(event) => setWords(event.target.value)}
        onKeyDown={(event) => {
          if (event.key !== 'Enter' || event.nativeEvent.isComposing) return;
          event.preventDefault();
          replace(found.slice(current, current + 1));
        }}
      />
      <button
        type="button"
        className="btn small-btn"
        disabled={found.length === 0}
        onClick={() => replace(found.slice(current, current + 1))}
      >
        Replace
      </button>
      <button type="button" className="btn small-btn" disabled={found.length === 0} onClick={() => replace(found)}>
        Replace all
      </button>
      <button type="button" className="icon-button" title="Close (Esc)" aria-label="Close" onClick={close}>
        <Icon name="close" />
      </button>
      <p className="hint">Live measures are left alone.</p>
    </div>
  );
}

function scrollTo(editor: Editor, found: Found) {
  if (found.in === 'title') {
    const dom = editor.view.nodeDOM(found.pos);
    if (dom instanceof HTMLElement) dom.querySelector('.step-head')?.scrollIntoView({ block: 'center' });
    return;
  }
  const { node } = editor.view.domAtPos(found.from);
  const element = node instanceof Element ? node : node.parentElement;
  element?.scrollIntoView({ block: 'center' });
}
