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
  { name: 'forward', label: 'While it is still flat', small: 'Done now for a later step', key: 'F' },
  { name: 'correction', label: 'Correction', small: 'What an earlier edition had wrong here' },
];
export const BLOCKS: readonly InsertablePart[] = [
  { name: 'materials', label: 'Materials', small: 'Card, glue: a list of your own', key: 'M' },
  { name: 'cutList', label: 'Cut list', small: 'Every piece with its size and scores', key: 'L' },
  { name: 'tools', label: 'Tools', small: 'What to have at hand' },
  { name: 'amounts', label: 'What it takes', small: 'Sheets, glue and the rest, worked out' },
  { name: 'sheetPlan', label: 'Sheet plan', small: 'How the pieces lie on the sheets' },
  { name: 'curveTemplate', label: 'Curve template', small: 'A curve at full size, to print' },
  { name: 'foldedView', label: 'Folded view', small: 'The box as it will stand' },
  { name: 'sizeSummary', label: 'Sizes', small: 'Finished, inside and outside' },
  { name: 'table', label: 'Table', small: 'Rows and columns of your own' },
];
