import type { PartName } from './writing';

/** A part that can be put in at the caret, in the order of its list. */
export interface InsertablePart {
  readonly name: PartName;
  readonly label: string;
  readonly small: string;
  /** The letter that puts it in together with Alt and Shift, by its place on the keyboard. */
  readonly key?: string;
}

export const NOTES: readonly InsertablePart[] = [
  { name: 'tip', label: 'Tip', small: 'What makes it easier', key: 'T' },
  { name: 'caution', label: 'Caution', small: 'What can hurt, and how not to be hurt', key: 'C' },
];
export const BLOCKS: readonly InsertablePart[] = [
  { name: 'materials', label: 'Materials', small: 'Card, glue: what it takes', key: 'M' },
  { name: 'cutList', label: 'Cut list', small: 'Every piece with its size and scores', key: 'L' },
];
