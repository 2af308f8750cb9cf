import type { Cue } from './source';

/** A sentence, or a whole caption where nothing is punctuated, with the time it begins at. */
export interface Sentence {
  readonly text: string;
  readonly from: number | null;
  /** Seconds of silence before it; null where no times tell. */
  readonly pause: number | null;
  /** A paragraph or a stamped line begins with it. */
  readonly opens: boolean;
}

/** The least share of captions that end a sentence, for the text to count as punctuated. */
const PUNCTUATED = 0.15;

/** Cues as sentences. One that runs over several cues begins where its first word falls, reckoned by characters. */
export function sentencesOf(cues: readonly Cue[]): readonly Sentence[] {
  const ends = cues.filter(({ text }) => /[.!?…]["”’)]?$/.test(text.trim())).length;
  const punctuated = cues.some(({ text }) => /[.!?]\s+\p{Lu}/u.test(text)) || ends >= cues.length * PUNCTUATED;
  const sentences: Sentence[] = [];
  let open: { text: string; from: number | null; pause: number | null; opens: boolean } | null = null;
  cues.forEach((cue, n) => {
    const before = cues[n - 1];
    const pause = before?.to != null && cue.from !== null ? Math.max(0, cue.from - before.to) : null;
    // Captions that follow one another without a gap are one stream; lines with a stamp, and paragraphs, stand for themselves.
    const apart = cue.from === null || before?.to === cue.from;
    let at = 0;
    for (const part of punctuated ? partsOf(cue.text) : [cue.text]) {
      const first = at === 0;
      const goesOn: boolean = open !== null && !(first && (cue.from === null || ended(open.text)));
      if (goesOn && open) open.text = `${open.text} ${part}`;
      else {
        if (open) sentences.push(open);
        open = { text: part, from: timeAt(cue, at), pause: first ? pause : null, opens: first && apart };
      }
      at += part.length + 1;
      if (open && (ended(open.text) || !punctuated)) {
        sentences.push(open);
        open = null;
      }
    }
  });
  if (open) sentences.push(open);
  return sentences;
}

const ended = (text: string): boolean => /[.!?…]["”’)]?$/.test(text);

/** `1 1/2 in. wide` and `3.5` are no ends of sentences. */
const partsOf = (text: string): readonly string[] => text.split(/(?<=[.!?…]["”’)]?)\s+(?=["“‘(]?[\p{Lu}\d])/u);

const timeAt = ({ from, to, text }: Cue, at: number): number | null =>
  from === null || to === null || text.length === 0 ? from : from + ((to - from) * at) / text.length;
