import { describe, expect, it } from 'vitest';
import type { Pattern } from '@/engine';
import { litBy } from '@/features/projects/followers';
import { namesIn } from '@/features/projects/formula-names';
import { FOLDER } from '../server/published-project';

const names = ['depth', 'inside depth', 'tab', 'spine'];
const found = (formula: string) => namesIn(formula, names).map(({ name, from, to }) => [name, from, to]);

describe('names in a formula', () => {
  it('takes the longest name that stands there', () => {
    //       0123456789012345
    expect(found('inside depth + 2 * tab')).toEqual([
      ['inside depth', 0, 12],
      ['tab', 19, 22],
    ]);
  });
  it('finds a name whatever its case and however wide its gaps', () => {
    expect(found('Inside  Depth')).toEqual([['inside depth', 0, 13]]);
  });
  it('does not find a name inside a longer word', () => {
    expect(found('tabs + table + stab + tab2')).toEqual([]);
  });
  it('leaves alone what a piece measures', () => {
    expect(found('floor.tab + tab')).toEqual([['tab', 12, 15]]);
  });
  it('leaves alone a name that begins the name of a function', () => {
    expect(namesIn('arc length(tab, arc) + arc', ['arc', 'tab']).map(({ name, from }) => [name, from])).toEqual([
      ['tab', 11],
      ['arc', 16],
      ['arc', 23],
    ]);
    expect(namesIn('if arc > tab and (tab) then arc else (arc)', ['arc', 'tab'])).toHaveLength(5);
  });
  it('works in a formula that does not read', () => {
    expect(found('if spine is ( tab +')).toEqual([
      ['spine', 3, 8],
      ['tab', 14, 17],
    ]);
  });
  it('finds nothing when there are no names', () => {
    expect(namesIn('tab', [])).toEqual([]);
  });
});

describe('what follows a measure', () => {
  const pattern: Pattern = {
    ...FOLDER,
    measures: [
      ...FOLDER.measures,
      { name: 'cover width', formula: 'blank width + 1/8 in' },
      { name: 'ribbon', ask: { question: 'How long?', usual: 'inside height * 2', from: '1 in', to: '40 in' } },
    ],
  };
  it('reaches through other measures, in the order of the pattern', () => {
    expect(litBy(pattern, 'inside width').followers).toEqual(['blank width', 'cover width']);
  });
  it('counts a usual value worked out from it', () => {
    expect(litBy(pattern, 'inside height').followers).toEqual(['ribbon']);
  });
  it('lights the pieces whose columns or rows use it or what follows it', () => {
    expect(litBy(pattern, 'inside height').pieces).toEqual(['Folder']);
    expect(litBy(pattern, 'ribbon').pieces).toEqual([]);
  });
  it('ends where measures go round in a circle', () => {
    const circle: Pattern = {
      ...FOLDER,
      measures: [
        { name: 'a', formula: 'b' },
        { name: 'b', formula: 'a' },
      ],
    };
    expect(litBy(circle, 'a').followers).toEqual(['b']);
  });
});
