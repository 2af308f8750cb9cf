import { describe, expect, it } from 'vitest';
import type { Pattern } from '@/engine';
import { completionsAt } from '@/features/projects/completions';
import { FOLDER } from '../server/published-project';

const PATTERN: Pattern = {
  ...FOLDER,
  choices: [{ name: 'lid', question: 'Which lid?', options: ['flip', 'no lid'], usual: 'flip' }],
};
const texts = (text: string, caret = text.length) => completionsAt(text, caret, PATTERN).map((one) => one.text);

describe('completion in a formula', () => {
  it('offers the names that begin with what is typed, over several words', () => {
    expect(texts('2 * insi')).toEqual(['inside width', 'inside height']);
    expect(texts('2 * inside  h')).toEqual(['inside height']);
    const [item] = completionsAt('2 * insi + 1 in', 8, PATTERN);
    expect(item).toEqual({ text: 'inside width', what: 'asked', from: 4, to: 8 });
  });
  it('also offers names with a later word that begins so', () => {
    expect(texts('heig')).toEqual(['inside height', 'Folder.height', 'arc height(']);
  });
  it('offers nothing for a name that is complete', () => {
    expect(texts('blank width')).toEqual([]);
    expect(texts('3')).toEqual([]);
  });
  it('offers the options of a choice after “is”', () => {
    expect(texts('lid is ')).toEqual(['flip', 'no lid']);
    expect(texts('(lid is not n')).toEqual(['no lid']);
    expect(texts('lid is flip')).toEqual([]);
  });
  it('offers sizes of pieces and functions', () => {
    expect(texts('folder.ac')).toEqual(['Folder.across']);
    expect(texts('arc le')).toEqual(['arc length(']);
  });
  it('shows what there is when it is asked with nothing typed', () => {
    expect(texts('2 * ')).toEqual([]);
    expect(completionsAt('2 * ', 4, PATTERN, { all: true })[0]).toEqual({
      text: 'inside width',
      what: 'asked',
      from: 4,
      to: 4,
    });
  });
});
