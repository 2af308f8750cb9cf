/** Characters of a text, the end not counted in. */
export interface Stretch {
  readonly from: number;
  readonly to: number;
}

/** Sounds, and words that say nothing where they stand. */
const FILLER = [
  String.raw`\b(?:u+m+|u+h+|e+r+m*|hm+|mm+-?hmm)\b,?`,
  String.raw`,\s+(?:you know|i mean|sort of|kind of|like|basically|right)(?=,)`,
  String.raw`(?:^|[.!?]\s+)(?:(?:(?:okay|ok|so(?! (?:that|far|much|many|long)\b))\b,?|(?:alright|all right|right|well|yeah|anyway|basically|you know|i mean),)\s+)(?:(?:so|okay|ok|basically|anyway|well|you know|i mean)\b,?\s+)*(?=\p{L})`,
  String.raw`,\s+(?:right|okay|you know|yeah)(?=\s*[?.!])`,
  String.raw`\b(\p{L}{1,12})(?:\s+\1\b)+`,
];
const PATTERN = new RegExp(FILLER.map((source) => `(?:${source})`).join('|'), 'giu');
/** Said twice because it is meant twice. */
const MEANT_TWICE = /^(very|really|had|that|no|two|one|so)\b/i;

/** What may be left out of speech without losing anything: sounds, empty openings, words said twice by mistake. */
export function fillerIn(text: string): readonly Stretch[] {
  return [...text.matchAll(PATTERN)].flatMap((match): Stretch[] => {
    const [whole, doubled] = match;
    const from = match.index;
    if (doubled !== undefined) {
      if (MEANT_TWICE.test(doubled)) return [];
      return [{ from: from + doubled.length, to: from + whole.length }];
    }
    // The end of the sentence before stays.
    const kept = /^[.!?]\s+/.exec(whole)?.[0].length ?? 0;
    return [{ from: from + kept, to: from + whole.length }];
  });
}

/** The text without those stretches, its spaces closed and its sentences begun with a capital where they were. */
export function withoutFiller(text: string): string {
  let kept = '';
  let at = 0;
  for (const { from, to } of fillerIn(text)) {
    kept += text.slice(at, from);
    at = to;
    if (/^\p{Lu}/u.test(text.slice(from).trimStart()) && /(^|[.!?]\s*)$/.test(kept)) {
      const next = /^\s*/.exec(text.slice(to))?.[0].length ?? 0;
      kept += text.slice(to, to + next) + text.slice(to + next, to + next + 1).toUpperCase();
      at = to + next + 1;
    }
  }
  return (kept + text.slice(at))
    .replace(/\s+/g, ' ')
    .replace(/\s+([,.!?;])/g, '$1')
    .trim();
}
