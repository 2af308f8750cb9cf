import { FUNCTION_NAMES, keyOf, type Pattern } from '@/engine';
import { searchFor } from './formula-names';

export interface Completion {
  /** What is put in place of the characters from `from` to `to`. */
  readonly text: string;
  readonly from: number;
  readonly to: number;
  readonly what: 'asked' | 'worked' | 'choice' | 'option' | 'size' | 'function';
}
type Known = Pick<Completion, 'text' | 'what'>;

const MOST = 8;

/**
 * What may be meant by the letters before the caret: names that begin with them, the longest stretch of words first, then
 * names with a word that begins with the last of them. After `choice is`, that choice's options. `all` also answers where
 * nothing is typed yet.
 */
export function completionsAt(
  text: string,
  caret: number,
  pattern: Pattern,
  { all = false }: { readonly all?: boolean } = {},
): readonly Completion[] {
  const before = text.slice(0, caret);
  const options = optionsAt(before, caret, pattern);
  if (options !== null) return options.slice(0, MOST);
  const known = knownIn(pattern);
  const words = /(?:[\p{L}\p{N}.]+ *)*$/u.exec(before)?.[0] ?? '';
  const starts = [...words.matchAll(/(?<=^| )\p{L}/gu)].map((match) => caret - words.length + match.index);
  for (const from of starts) {
    const typed = before.slice(from).replace(/ +/gu, ' ').toLowerCase();
    if (typed.trim() === '') continue;
    const found = matches(known, typed);
    // A whole name leaves nothing to offer; its last word alone is not meant.
    if (found.length === 0 && known.some(({ text }) => keyOf(text) === typed.trim())) return [];
    if (found.length > 0) return found.slice(0, MOST).map((one) => ({ ...one, from, to: caret }));
  }
  return all && (starts.length === 0 || / $/u.test(before))
    ? known.slice(0, MOST).map((one) => ({ ...one, from: caret, to: caret }))
    : [];
}

/** Those that begin with what is typed, then those with a later word that does; what is already complete is no completion. */
function matches(known: readonly Known[], typed: string): readonly Known[] {
  const open = known.filter(({ text }) => keyOf(text) !== typed.trim());
  const begins = open.filter(({ text }) => keyOf(text).startsWith(typed));
  const within = open.filter(
    ({ text }) =>
      !begins.some((one) => one.text === text) && [' ', '.'].some((mark) => keyOf(text).includes(mark + typed)),
  );
  return [...begins, ...within];
}

function optionsAt(before: string, caret: number, pattern: Pattern): readonly Completion[] | null {
  for (const choice of pattern.choices) {
    const typed = new RegExp(`(?<![\\p{L}\\p{N}])${searchFor(choice.name)} +is +(?:not +)?([^()]*)$`, 'iu').exec(
      before,
    )?.[1];
    if (typed === undefined) continue;
    const found = choice.options.filter(
      (option) => keyOf(option).startsWith(typed.toLowerCase()) && keyOf(option) !== keyOf(typed),
    );
    if (found.length > 0 || choice.options.some((option) => keyOf(option) === keyOf(typed)))
      return found.map((text) => ({ text, what: 'option', from: caret - typed.length, to: caret }));
  }
  return null;
}

function knownIn(pattern: Pattern): readonly Known[] {
  return [
    ...pattern.measures.map(({ name, ask }): Known => ({ text: name, what: ask ? 'asked' : 'worked' })),
    ...pattern.choices.map(({ name }): Known => ({ text: name, what: 'choice' })),
    ...pattern.pieces.flatMap((piece): readonly Known[] =>
      piece.builder === 'grid'
        ? ['across', 'along', ...[...piece.columns, ...piece.rows].map((track) => track.name)].map((size) => ({
            text: `${piece.name}.${size}`,
            what: 'size',
          }))
        : [],
    ),
    ...[...FUNCTION_NAMES].map((name): Known => ({ text: `${name}(`, what: 'function' })),
  ];
}
