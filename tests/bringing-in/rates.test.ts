import { describe, expect, it } from 'vitest';
import { compileLive } from '@/engine';
import { findNumbers } from '@/writeup/numbers/find-numbers';
import { matchNumbers, type MatchedNumber } from '@/writeup/numbers/match-numbers';
import { sentencesIn, type Mark, type SentenceFile } from './read-sentences';
import { sameMeasure } from './same-measure';

interface Seen {
  readonly file: SentenceFile;
  readonly mark: Mark;
  /** What was found at just these characters. */
  readonly found: MatchedNumber | undefined;
}
/** A mark that is a length and no measure: `12 in`. */
const isPlain = ({ formula }: Mark): boolean => /^[\d./ ]+ (in|mm|cm)$/.test(formula);

function look(folder: 'sentences' | 'held-out') {
  const files = sentencesIn(folder);
  const seen: Seen[] = [];
  const wrong: string[] = [];
  for (const file of files) {
    for (const { text, marks } of file.sentences) {
      const found = matchNumbers(text, findNumbers(text, { units: file.units }), file.live);
      const at = (mark: Mark) => found.find(({ from, to }) => from === mark.from && to === mark.to);
      for (const mark of marks) seen.push({ file, mark, found: at(mark) });
      for (const number of found)
        if (!marks.some((mark) => at(mark) === number)) wrong.push(`${number.text} in ${text}`);
    }
  }
  const counted = files.reduce((sum, { sentences }) => sum + sentences.length, 0);
  return { seen, wrong, counted, patterns: files.length };
}

/** The value that the marked measure has, as cut or as worked out, to the nearest 1/32 in: what a speaker reads off a ruler. */
function readsRight({ file, mark, found }: Seen): boolean {
  const live = compileLive(file.live.model, mark.formula);
  const value = live.ok ? live.value.value(file.live.figures) : null;
  if (value === null) throw new Error(`${file.name}: ${mark.formula}`);
  const read = found?.readings[0].mm ?? NaN;
  return Math.min(Math.abs(value.cut - read), Math.abs(value.exact - read)) <= 25.4 / 64 + 1e-6;
}

const percent = (part: number, whole: number): number => (100 * part) / whole;

describe.each([
  { folder: 'sentences', least: 150 },
  { folder: 'held-out', least: 40 },
] as const)('invented sentences with marked measurements: $folder', ({ folder, least }) => {
  const { seen, wrong, counted, patterns } = look(folder);
  const found = seen.filter(readsRight);
  const measures = seen.filter(({ mark }) => !isPlain(mark));
  const isRight = ({ file, mark, found: number }: Seen) =>
    number?.matches[0] !== undefined && sameMeasure(file.live, number.matches[0].formula, mark.formula);

  it(`are at least ${least}, about at least six patterns`, () => {
    expect(counted).toBeGreaterThanOrEqual(least);
    expect(patterns).toBeGreaterThanOrEqual(6);
  });

  it('has at least 98 % of its measurements found, with just the words that say them', () => {
    const missed = seen.filter((one) => !found.includes(one)).map(({ file, mark }) => `${file.name}: ${mark.formula}`);
    expect(percent(found.length, seen.length), missed.join('\n')).toBeGreaterThanOrEqual(98);
  });

  it('has at most 2 % found where there is none', () => {
    expect(percent(wrong.length, found.length + wrong.length), wrong.join('\n')).toBeLessThanOrEqual(2);
  });

  it('has the right measure first for at least 90 %', () => {
    const others = measures.filter((one) => !isRight(one)).map(({ file, mark }) => `${file.name}: ${mark.formula}`);
    expect(percent(measures.length - others.length, measures.length), others.join('\n')).toBeGreaterThanOrEqual(90);
  });

  it('has no more than 2 % wrong among those that are taken without being looked at', () => {
    const certain = seen.filter(({ found: number }) => number?.certain);
    expect(percent(certain.filter((one) => !isRight(one)).length, certain.length)).toBeLessThanOrEqual(2);
    // Else the one button for all of them would be of no use.
    expect(percent(certain.length, measures.length)).toBeGreaterThanOrEqual(60);
  });
});
