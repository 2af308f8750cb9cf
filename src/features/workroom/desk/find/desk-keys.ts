/** One line of the keyboard map: what is pressed, and what it does. */
export interface DeskKey {
  readonly keys: string;
  readonly does: string;
}
export interface DeskKeyGroup {
  readonly where: string;
  readonly keys: readonly DeskKey[];
}

/** Keys that work wherever the focus is on the desk. */
export const DESK_KEYS: readonly DeskKey[] = [
  { keys: 'Alt G', does: 'Go to a measure, piece or step, or do something, by its name' },
  { keys: 'Alt K', does: 'This list' },
  { keys: 'Alt 1', does: 'To the measures' },
  { keys: 'Alt 2', does: 'To the pieces' },
  { keys: 'Alt 3', does: 'To the write-up' },
  { keys: 'Alt P', does: 'Open or close the proof list' },
];

/** Keys beside the write-up: there undo is the editor's own. */
export const COLUMN_KEYS: readonly DeskKey[] = [
  { keys: 'Ctrl Z', does: 'Undo in the measures and pieces' },
  { keys: 'Ctrl Shift Z, Ctrl Y', does: 'Do it again' },
  { keys: 'Ctrl Space', does: 'In a formula: the names that may stand there' },
  { keys: 'Escape', does: 'Put the light on a selected measure out' },
];

/** Keys of the write-up without a button. */
export const WRITING_KEYS: readonly DeskKey[] = [
  { keys: 'Enter', does: 'On a live measure: change it' },
  { keys: 'Alt Shift ↑, Alt Shift ↓', does: 'Move the step up or down' },
  { keys: '↑', does: 'In the first line of a step: to its title' },
];
