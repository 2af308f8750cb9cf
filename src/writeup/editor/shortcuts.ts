import type { Editor } from '@tiptap/core';
import type { KeyboardEvent } from 'react';
import { insertPart } from './writing';

/** What a key does that ProseMirror does not know of; also from a step's title or a photo's words. */
export function shortcut(
  { altKey, shiftKey, ctrlKey, metaKey, code, key }: KeyboardEvent,
  editor: Editor,
  open: { readonly openLink: () => void; readonly openPiece: () => void; readonly choosePhoto: () => void },
): (() => void) | undefined {
  if ((ctrlKey || metaKey) && !altKey) return key.toLowerCase() === 'k' ? open.openLink : undefined;
  if (!altKey || !shiftKey || ctrlKey || metaKey) return undefined;
  // By place on the keyboard: on some layouts Alt turns letters into other signs.
  return {
    KeyP: open.openPiece,
    KeyO: open.choosePhoto,
    KeyT: () => insertPart(editor, 'tip'),
    KeyC: () => insertPart(editor, 'caution'),
    KeyM: () => insertPart(editor, 'materials'),
    KeyL: () => insertPart(editor, 'cutList'),
  }[code];
}
