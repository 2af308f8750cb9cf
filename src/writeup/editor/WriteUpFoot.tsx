import type { Editor } from '@tiptap/core';
import { useEffect, useState } from 'react';
import { Icon } from '@/components/Icon';
import { countsOf, type Counts } from './outline';

export interface WriteUpFootProps {
  readonly editor: Editor;
  readonly onOutline: () => void;
  readonly onFind: () => void;
}

/** How long the typing has to rest before words are counted. */
const REST = 600;

/** What the write-up comes to, and the ways to go about in it. */
export function WriteUpFoot({ editor, onOutline, onFind }: WriteUpFootProps) {
  const [counts, setCounts] = useState<Counts>(() => countsOf(editor.state.doc));
  useEffect(() => {
    let resting: ReturnType<typeof setTimeout> | undefined;
    const changed = () => {
      clearTimeout(resting);
      resting = setTimeout(() => setCounts(countsOf(editor.state.doc)), REST);
    };
    editor.on('update', changed);
    return () => {
      clearTimeout(resting);
      editor.off('update', changed);
    };
  }, [editor]);
  const counted = (n: number, word: string) => `${n.toLocaleString('en')} ${word}${n === 1 ? '' : 's'}`;
  return (
    <div className="writeup-foot">
      <button type="button" title="Outline (Alt Shift U)" aria-keyshortcuts="Alt+Shift+U" onClick={onOutline}>
        <Icon name="list" /> Outline
      </button>
      <button type="button" title="Find and replace (Ctrl F)" aria-keyshortcuts="Control+F" onClick={onFind}>
        <Icon name="search" /> Find
      </button>
      <p>
        {counted(counts.words, 'word')} · {counted(counts.live, 'live measure')} · {counted(counts.steps, 'step')}
      </p>
    </div>
  );
}
