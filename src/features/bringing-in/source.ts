import type { Fault, Result } from '@/engine';

/** What someone spoke or wrote, in the order of the film; times in seconds from its beginning. */
export interface Cue {
  /** Null where the text carries no time. */
  readonly from: number | null;
  readonly to: number | null;
  readonly text: string;
}
export type SourceKind = 'webvtt' | 'srt' | 'stamped' | 'plain' | 'html';

/** Characters: ten hours of talking. */
export const LONGEST_SOURCE = 600_000;
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

export const SOURCE_KINDS = ['webvtt', 'srt', 'stamped', 'plain', 'html'] as const satisfies readonly SourceKind[];
/** What a kind is called on the screen. */
export const KIND_WORDS: Readonly<Record<SourceKind, string>> = {
  webvtt: 'WebVTT captions',
  srt: 'SRT captions',
  stamped: 'lines with times',
  plain: 'plain text',
  html: 'a document',
};

/** An original that is kept beside the write-up, without its text. */
export interface KeptSource {
  readonly id: string;
  readonly name: string;
  readonly kind: SourceKind;
  readonly characters: number;
  readonly createdAt: number;
}
export const SOURCE_NAME_LIMIT = 120;
/** Originals that one project keeps. */
export const MOST_SOURCES = 30;
