import { sentencesOf, type Sentence } from './sentences';
import type { Cue } from './source';

/** A step as it is brought in, before its numbers are looked at. */
export interface DraftStep {
  readonly title: string;
  /** Where it begins in the film, in seconds. */
  readonly moment: number | null;
  readonly paragraphs: readonly string[];
}
export interface SplitOptions {
  /** Names of the pattern's pieces. */
  readonly pieces: readonly string[];
}

/** Words that open something new. */
const OPENERS =
  /^(?:(?:so|and|ok|okay|alright|all right|right|well|um+|uh+)\b,?\s+)*(?:next\b|now\b|now that\b|moving on\b|step (?:\d+|one|two|three|four|five|six|seven|eight|nine|ten)\b|finally\b|last(?:ly)?\b|first(?:ly)?\b|second(?:ly)?\b|to (?:start|begin|finish)\b|let's (?:start|move|go|make|do|cut)\b|once (?:that|those|the|it)\b|when (?:that|the glue)\b|for the (?!most|moment)\w+)/i;
const WEAK_OPENERS =
  /^(?:(?:so|and)\b,?\s+)?(?:then\b|after that\b|take\b|grab\b|here\b|I'm going\b|we(?:'re| are) going\b)/i;

/** What makes a new step likely, and how much of it is enough. */
const ENOUGH = 3;
/** The hands are at work and nobody speaks. */
const SILENCE = 8;
const LONG_PAUSE = 2.5;
const SHORT_PAUSE = 1.2;
const SHORTEST = 90;
const LONGEST = 800;

/**
 * Cues into steps, by time and sense: a pause, a word that opens something new, the name of a piece that was not spoken of
 * yet, a paragraph or a stamped line of its own; never in the middle of a sentence, and not so short that it says nothing.
 */
export function splitIntoSteps(cues: readonly Cue[], { pieces }: SplitOptions): readonly DraftStep[] {
  const names = pieces.map((name) => ({ name, pattern: wordsOf(name) }));
  const steps: Sentence[][] = [];
  let piece: string | null = null;
  for (const sentence of sentencesOf(cues)) {
    const step = steps.at(-1);
    const named = pieceIn(sentence.text, names);
    const score = step
      ? likelihood(sentence, { length: lengthOf(step), turns: named !== null && named !== piece })
      : ENOUGH;
    if (step && score < ENOUGH) step.push(sentence);
    else steps.push([sentence]);
    piece = named ?? piece;
  }
  return steps.map((sentences) => ({
    title: titleOf(sentences, names),
    moment: sentences[0]?.from ?? null,
    paragraphs: paragraphsOf(sentences),
  }));
}

function likelihood(
  { text, pause, opens }: Sentence,
  step: { readonly length: number; readonly turns: boolean },
): number {
  let score = 0;
  if (pause !== null) score += pause >= SILENCE ? 3 : pause >= LONG_PAUSE ? 2 : pause >= SHORT_PAUSE ? 1 : 0;
  if (OPENERS.test(text)) score += 2;
  else if (WEAK_OPENERS.test(text)) score += 1;
  if (step.turns) score += 1.5;
  if (opens) score += 1;
  if (step.length < SHORTEST) score -= 1;
  if (step.length > LONGEST) score += 1;
  return score;
}

const lengthOf = (sentences: readonly Sentence[]): number =>
  sentences.reduce((sum, { text }) => sum + text.length + 1, 0);

interface Named {
  readonly name: string;
  readonly pattern: RegExp;
}
const wordsOf = (name: string): RegExp => new RegExp(`(?<!\\p{L})${name.replace(/\s+/g, '\\s+')}s?(?!\\p{L})`, 'iu');

/** The piece that is named first; of two at one place the longer name, so that a lower spine is no spine. */
function pieceIn(text: string, names: readonly Named[]): string | null {
  let best: { name: string; at: number } | null = null;
  for (const { name, pattern } of names) {
    const at = text.search(pattern);
    if (at < 0) continue;
    if (best === null || at < best.at || (at === best.at && name.length > best.name.length)) best = { name, at };
  }
  return best?.name ?? null;
}

/** The piece that a step names in its first sentence that names one. */
function titleOf(sentences: readonly Sentence[], names: readonly Named[]): string {
  for (const { text } of sentences.slice(0, 2)) {
    const piece = pieceIn(text, names);
    if (piece !== null) return `The ${piece.charAt(0).toLowerCase()}${piece.slice(1)}`;
  }
  return '';
}

/** A paragraph ends where one ended in the source, or after a good many words. */
const PARAGRAPH = 420;
function paragraphsOf(sentences: readonly Sentence[]): readonly string[] {
  const paragraphs: string[] = [];
  for (const { text, opens } of sentences) {
    const last = paragraphs.at(-1);
    if (last === undefined || opens || last.length > PARAGRAPH) paragraphs.push(text);
    else paragraphs[paragraphs.length - 1] = `${last} ${text}`;
  }
  return paragraphs;
}
