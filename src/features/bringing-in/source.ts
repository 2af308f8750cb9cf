import type { Fault, Result } from '@/engine';

/** What someone spoke or wrote, in the order of the film; times in seconds from its beginning. */
export interface Cue {
  /** Null where the text carries no time. */
  readonly from: number | null;
  readonly to: number | null;
  readonly text: string;
}
export type SourceKind = 'webvtt' | 'srt' | 'stamped' | 'plain' | 'html';

/** More than a day of talking, or a book. */
export const LONGEST_SOURCE = 1_000_000;
export const MOST_CUES = 20_000;

/** `line` counts from 1; none where the whole is meant. */
export function sourceFault(code: string, line: number | null, found: string, hint: string): Result<never> {
  const fault: Fault = {
    code: `source ${code}`,
    where: line === null ? 'the text' : `line ${line}`,
    found,
    expected: '',
    hint,
  };
  return { ok: false, faults: [fault] };
}

/** A fault as one sentence: "Line 14: … . Write it …" */
export const sayFault = ({ where, found, hint }: Fault): string =>
  `${where.charAt(0).toUpperCase()}${where.slice(1)}: ${found}. ${hint}`;
