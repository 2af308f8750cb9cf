import type { Editor } from '@tiptap/core';
import type { KeyboardEvent } from 'react';
import { BLOCKS, NOTES } from './blocks';
import type { Opens } from './tools';
import { insertPart } from './writing';

/** What a key does that ProseMirror does not know of; also from a step's title or a photo's words. */
export function shortcut(
  { altKey, shiftKey, ctrlKey, metaKey, code, key }: KeyboardEvent,
  editor: Editor,
  opens: Opens,
): (() => void) | undefined {
  if ((ctrlKey || metaKey) && !altKey) return { k: opens.link, f: opens.find }[key.toLowerCase()];
  if (!altKey || !shiftKey || ctrlKey || metaKey) return undefined;
  // By place on the keyboard: on some layouts Alt turns letters into other signs.
  const part = [...NOTES, ...BLOCKS].find((one) => one.key !== undefined && code === `Key${one.key}`);
  if (part) return () => insertPart(editor, part.name);
  return {
    KeyP: () => opens.list('piece'),
    KeyO: opens.photo,
    KeyV: opens.moment,
    KeyN: () => opens.list('note'),
    KeyB: () => opens.list('block'),
    KeyA: () => opens.list('amount'),
    KeyU: () => opens.list('outline'),
    KeyW: opens.condition,
    KeyS: () => opens.list('step number'),
  }[code];
}
