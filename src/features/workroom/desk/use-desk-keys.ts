import { useEffect, useRef } from 'react';
import type { Column } from './Desk';
import type { DeskStore } from './desk-store';
import type { FinderDialog } from './find/DeskFinder';

export interface DeskKeys {
  readonly store: DeskStore;
  readonly focusColumn: (column: Column) => void;
  readonly toggleProof: () => void;
  readonly find: (dialog: FinderDialog) => void;
}
const FINDER_KEYS: Readonly<Record<string, FinderDialog>> = { KeyG: 'go to', KeyK: 'keys' };
const COLUMN_KEYS: Readonly<Record<string, Column>> = { Digit1: 'measures', Digit2: 'pieces', Digit3: 'write-up' };

/** Alt 1, 2, 3 go to a column, Alt P opens the proof list, Alt G finds a place, Alt K shows the keys, Ctrl Z and Ctrl Shift Z step back and forth outside the editor, Escape puts the light out. */
export function useDeskKeys(keys: DeskKeys): void {
  const latest = useRef(keys);
  latest.current = keys;
  useEffect(() => {
    const press = (event: KeyboardEvent) => {
      const { store, focusColumn, toggleProof, find } = latest.current;
      const target = event.target instanceof Element ? event.target : null;
      if (target?.closest('dialog')) return;
      // By place on the keyboard: on some layouts Alt turns digits into other signs.
      if (event.altKey && !event.shiftKey && !event.ctrlKey && !event.metaKey) {
        const column = COLUMN_KEYS[event.code];
        if (column !== undefined) {
          event.preventDefault();
          return focusColumn(column);
        }
        const dialog = FINDER_KEYS[event.code];
        if (dialog !== undefined) {
          event.preventDefault();
          return find(dialog);
        }
        if (event.code === 'KeyP') {
          event.preventDefault();
          return toggleProof();
        }
      }
      const inEditor = target?.closest('[data-column="write-up"]') != null;
      if (inEditor) return;
      if (event.key === 'Escape' && !event.defaultPrevented) return store.select(null);
      if ((event.ctrlKey || event.metaKey) && !event.altKey && event.key.toLowerCase() === 'z') {
        event.preventDefault();
        return event.shiftKey ? store.redo() : store.undo();
      }
      if (event.ctrlKey && !event.altKey && event.key.toLowerCase() === 'y') {
        event.preventDefault();
        store.redo();
      }
    };
    document.addEventListener('keydown', press);
    return () => document.removeEventListener('keydown', press);
  }, []);
}
