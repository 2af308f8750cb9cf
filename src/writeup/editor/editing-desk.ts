import type { ReadableAtom } from 'nanostores';
import type { FiguresStore } from '../figures-store';
import type { StepNumbers } from './step-numbers';

/** What node views share with the React part round the editor. Values go this way, never into the document. */
export interface EditingDesk {
  readonly figures: FiguresStore;
  /** Names of the measures that are lit; the first is the one that the author picked, the rest follow it. */
  readonly lit: ReadableAtom<readonly string[]>;
  /** Opens the measure field for a live measure that stands in the text. */
  readonly changeMeasure: (pos: number) => void;
  /** Opens the measure field to put one in place of what stands there, if anything does. */
  readonly askMeasure: (range: { readonly from: number; readonly to: number }) => void;
  /** Numbers of the steps that the text speaks of. */
  readonly numbers: StepNumbers;
  /** Opens the field for when a step is there, or where it begins in a video. */
  readonly askStep: (pos: number, what: 'when' | 'moment') => void;
  /** Says something to those who listen to the screen. */
  readonly say: (sentence: string) => void;
}
