import type { NodeViewRenderer } from '@tiptap/core';
import type { IconName } from '@/components/icons';
import { iconSvg } from '../editor/dom';

/** Blocks that say in a word what they are: the word is no text of the author's and cannot be typed over. */
export function wordedBlockView(given: {
  className: string;
  word: string;
  wordClass: string;
  icon?: IconName;
}): NodeViewRenderer {
  return () => {
    const dom = document.createElement('div');
    dom.className = given.className;
    const word = document.createElement('b');
    word.className = given.wordClass;
    word.contentEditable = 'false';
    if (given.icon) word.append(iconSvg(given.icon), ' ');
    word.append(given.word);
    const contentDOM = document.createElement('div');
    contentDOM.className = 'worded-content';
    dom.append(word, contentDOM);
    return {
      dom,
      contentDOM,
      ignoreMutation: (mutation) => mutation.type !== 'selection' && !contentDOM.contains(mutation.target),
    };
  };
}
