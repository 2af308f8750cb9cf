import type { Editor } from '@tiptap/core';
import { BLOCKS, NOTES } from './blocks';
import type { EditingDesk } from './editing-desk';
import { markTools, partTools, type Opens, type ToolState } from './tools';

/** Tools are only read here, never used: they need no editor. */
const [NO_EDITOR, NO_DESK, NO_OPENS, NO_STATE] = [{} as Editor, {} as EditingDesk, {} as Opens, {} as ToolState];
/** What the write-up's buttons and lists do by key, in their order. */
export function editorKeys(): readonly { readonly keys: string; readonly does: string }[] {
  const tools = [...partTools(NO_EDITOR, NO_DESK, NO_OPENS), ...markTools(NO_EDITOR, NO_STATE, NO_OPENS)];
  const parts = [...NOTES, ...BLOCKS].flatMap(({ key, label }) =>
    key === undefined ? [] : [{ keys: `Alt Shift ${key}`, does: label }],
  );
  return [...tools.flatMap(({ keys, label }) => (keys ? [{ keys, does: label }] : [])), ...parts];
}
