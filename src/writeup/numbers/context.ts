import type { Axis } from './candidates';
import type { FoundNumber } from './find-numbers';
import { stemOf, stemsOf } from './stems';
import { THING, tokensOf } from './tokens';

/** What is said round one number. */
export interface Context {
  /** 1 right beside the number, less further away, 0 when the word is not said. */
  readonly near: (stem: string) => number;
  /** The piece that it speaks of; weaker when it was named in an earlier sentence. */
  readonly piece: { readonly name: string; readonly strength: number } | null;
  readonly role: 'score' | 'cut' | null;
  /** Of a pair "A by B": 0 or 1. */
  readonly nth: number | null;
  readonly axis: Axis | null;
  readonly ofMaterial: boolean;
}

interface Word {
  readonly stem: string;
  readonly said: string;
  readonly at: number;
  /** Numbers and commas that stand before it in the text. */
  readonly numbers: number;
  readonly commas: number;
  readonly sentence: number;
}

const MATERIAL =
  /^(sheet|sheets|card|cards|cardstock|paper|envelope|envelopes|twine|cord|string|ribbon|tape|photo|photos|ruler|board)$/;
const ACROSS = /^(wide|width|across)$/;
const ALONG = /^(tall|high|height|long|length|deep)$/;

/** The context of each number that was found in a text. */
export function contextsOf(
  text: string,
  found: readonly FoundNumber[],
  pieces: readonly string[],
  earlier: string,
): readonly Context[] {
  const { words, spots } = wordsIn(text, found);
  const round = { words, mentions: mentionsIn(words, pieces), before: lastMention(earlier, pieces) };
  const contexts = found.map((number, n) =>
    contextOf(number, spots[n] ?? START, { ...round, nth: placeInPair(text, number) }),
  );
  // "12 by 12 cardstock": what is said behind the last of a pair is said of both.
  const ofMaterial = new Set(
    found.flatMap(({ group, joined }, n) => (joined === 'by' && contexts[n]?.ofMaterial ? [group] : [])),
  );
  return contexts.map((context, n) => ({
    ...context,
    ofMaterial: context.ofMaterial || ofMaterial.has(found[n]?.group ?? -1),
  }));
}

/** Which of a pair it is: of two numbers, or of a number and a live measure. */
function placeInPair(text: string, { from, to, joined, nth }: FoundNumber): number | null {
  if (joined === 'by') return nth;
  if (BEHIND_LIVE.test(text.slice(0, from))) return 1;
  return BEFORE_LIVE.test(text.slice(to)) ? 0 : null;
}
const BEHIND_LIVE = new RegExp(`${THING}\\s*(?:by|x|×)\\s*$`, 'i');
const BEFORE_LIVE = new RegExp(`^\\s*(?:by|x|×)\\s*${THING}`, 'i');

interface Round {
  readonly words: readonly Word[];
  readonly mentions: readonly Mention[];
  readonly before: string | null;
  readonly nth: Context['nth'];
}
interface Mention {
  readonly piece: string;
  readonly at: number;
  readonly sentence: number;
}

function contextOf(number: FoundNumber, place: Spot, { words, mentions, before, nth }: Round): Context {
  const own = words.filter(({ sentence }) => sentence === place.sentence);
  const distance = (word: Word) => {
    const steps = word.at < place.at ? place.at - word.at - 1 : word.at - place.at;
    const numbers = word.at < place.at ? place.numbers - word.numbers : word.numbers - place.numbers - 1;
    const commas = Math.abs(word.commas - place.commas);
    return steps + 3 * numbers + 2 * commas;
  };
  const nearness = new Map<string, number>();
  for (const word of own) {
    const near = 1 / (1 + distance(word) / 6);
    if (near > (nearness.get(word.stem) ?? 0)) nearness.set(word.stem, near);
  }
  const directly = own.filter((word) => word.at >= place.at && word.numbers === place.numbers + 1).slice(0, 3);
  const direction = directly.find(({ said }) => ACROSS.test(said) || ALONG.test(said));
  return {
    near: (stem) => nearness.get(stem) ?? 0,
    piece: pieceOf(place, mentions, before),
    role: roleOf(
      own.filter((word) => word.at < place.at),
      nth,
    ),
    nth,
    axis: direction === undefined ? null : ACROSS.test(direction.said) ? 'across' : 'along',
    ofMaterial: directly.some(({ said }) => MATERIAL.test(said)),
  };
}

/** The verb that governs the number: the last one before it. */
function roleOf(before: readonly Word[], nth: Context['nth']): Context['role'] {
  const verb = before.findLast(({ said }) => /^(scor|cut|trim|slit|measur)/.test(said))?.said;
  if (verb?.startsWith('scor')) return 'score';
  if (nth !== null) return 'cut';
  return null;
}

interface Spot {
  /** Words before it. */
  readonly at: number;
  readonly numbers: number;
  readonly commas: number;
  readonly sentence: number;
}
const START: Spot = { at: 0, numbers: 0, commas: 0, sentence: 0 };

/** The words of a text without its numbers, and where among them each number stands. */
function wordsIn(
  text: string,
  found: readonly FoundNumber[],
): { readonly words: readonly Word[]; readonly spots: readonly Spot[] } {
  const words: Word[] = [];
  const spots: Spot[] = [];
  let [numbers, commas, sentence] = [0, 0, 0];
  let next = 0;
  for (const token of tokensOf(text)) {
    const number = found[next];
    if (number && token.from >= number.from) {
      spots.push({ at: words.length, numbers, commas, sentence });
      numbers += 1;
      next += 1;
    }
    if (found.some(({ from, to }) => token.from >= from && token.to <= to)) continue;
    if (token.is === 'word')
      words.push({ stem: stemOf(token.said), said: token.said, at: words.length, numbers, commas, sentence });
    else if (/^[.!?;]$/.test(token.said)) sentence += 1;
    else if (token.said === ',') commas += 1;
  }
  return { words, spots };
}

function mentionsIn(words: readonly Word[], pieces: readonly string[]): readonly Mention[] {
  const names = pieces
    .map((piece) => ({ piece, stems: stemsOf(piece) }))
    .sort((a, b) => b.stems.length - a.stems.length);
  const mentions: Mention[] = [];
  for (let i = 0; i < words.length; i += 1) {
    const name = names.find(({ stems }) => stems.every((stem, n) => words[i + n]?.stem === stem));
    if (name === undefined) continue;
    mentions.push({ piece: name.piece, at: i, sentence: words[i]?.sentence ?? 0 });
    i += name.stems.length - 1;
  }
  return mentions;
}

/** The last piece named before the number in its sentence, else the next one in it, else the last one of the sentences before. */
function pieceOf(place: Spot, mentions: readonly Mention[], before: string | null): Context['piece'] {
  const own = mentions.filter(({ sentence }) => sentence === place.sentence);
  const named = own.findLast(({ at }) => at < place.at) ?? own.find(({ at }) => at >= place.at);
  if (named) return { name: named.piece, strength: 1 };
  const earlier = mentions.findLast(({ sentence }) => sentence < place.sentence)?.piece ?? before;
  return earlier === null ? null : { name: earlier, strength: 0.6 };
}

const lastMention = (text: string, pieces: readonly string[]): string | null =>
  text === '' ? null : (mentionsIn(wordsIn(text, []).words, pieces).at(-1)?.piece ?? null);
