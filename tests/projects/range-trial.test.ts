import { describe, expect, it } from 'vitest';
import type { Pattern } from '@/engine';
import { narrowerRanges, tryRange, waysOf } from '@/features/projects/range-trial';
import { through } from '@/features/workroom/desk/use-play';
import { AUTHORS_SIZE, FOLDER } from '../server/published-project';

const choice = (name: string, ...options: string[]) => ({
  name,
  question: `Which ${name}?`,
  options,
  usual: options[0]!,
});
const withChoices = (...choices: ReturnType<typeof choice>[]): Pattern => ({ ...FOLDER, choices });

describe('trying the whole range', () => {
  it('goes through every way of choosing, the author’s own first', () => {
    const pattern = withChoices(choice('lid', 'flip', 'none'), choice('spine', 'curved', 'straight'));
    const ways = waysOf(pattern, { ...AUTHORS_SIZE, choices: { lid: 'none' } }).map(({ choices }) => choices);
    expect(ways).toHaveLength(4);
    expect(ways[0]).toEqual({ lid: 'none', spine: 'curved' });
    expect(ways).toContainEqual({ lid: 'flip', spine: 'straight' });
  });
  it('changes one option at a time where the ways would be too many', () => {
    const five = ['a', 'b', 'c', 'd', 'e'].map((name) => choice(name, 'one', 'two'));
    // 2 to the fifth is 32, more than 16: the author's own and one way for each of the five other options.
    expect(waysOf(withChoices(...five), AUTHORS_SIZE)).toHaveLength(6);
  });
  it('tells the first size that cannot be made and why', () => {
    const [tried] = [...tryRange(FOLDER, [AUTHORS_SIZE])];
    // 10 in tall and 2 in wide: taller than twice its width.
    expect(tried?.failing).toBeGreaterThan(0);
    expect(tried?.first?.sentence).toContain('falls over');
    expect(tried?.first?.size).toMatch(/^inside width .*, inside height /u);
  });
  it('says between which values nothing failed, where that is less than is asked for', () => {
    const way = (from: number, to: number) => ({ tried: 1, failing: 0, first: null, works: { depth: { from, to } } });
    const asked = [{ name: 'depth', from: 10, to: 100 }];
    expect(narrowerRanges([way(10, 80), way(20, 100)], asked, 1)).toEqual([{ name: 'depth', from: 20, to: 80 }]);
    expect(narrowerRanges([way(10, 100)], asked, 1)).toEqual([]);
  });
});

describe('playing a range', () => {
  const range = { from: 0, to: 100, at: 40 };
  // Up 60, down 100, up 40: 200 in all.
  it.each([
    [0, 40],
    [0.3, 100],
    [0.55, 50],
    [0.8, 0],
    [1, 40],
  ])('is at share %d at %d', (share, value) => expect(through(share, range)).toBeCloseTo(value, 9));
});
