import { describe, expect, it } from 'vitest';
import { sumAnswerHtml } from '@/features/handbook/sum-html';
import { SUMS, type SumId } from '@/features/handbook/sums';

/** What is shown, as one types it: `2 1/8 in`. */
const plain = (text: string) => text.replace(/[\u202f\u00a0]/g, ' ').replace('\u2044', '/');
function rows(id: SumId, said: Record<string, string>): Record<string, string> | string {
  const { fields, answer } = SUMS[id];
  const found = answer((name) => said[name] ?? fields.find((field) => field.name === name)?.usual ?? '');
  if (!found.ok) return found.sentence;
  return Object.fromEntries(found.rows.map(({ term, figure }) => [term, plain(figure)]));
}

describe('a strip round a curve', () => {
  it('over a chord of 2 in in a 4 in circle is cut 2 1/8 in', () => {
    // A sixth of the circle: 4π ∕ 6 = 2.0944 in, up to sixteenths 2 1/8; it stands out by 2 − √3 = 0.2679 in.
    expect(rows('curve-strip', { chord: '2', circle: '4' })).toEqual({
      'Cut the strip': '2 1/8 in',
      'The curve itself': '2.094 in',
      'It stands out by': '0.268 in',
    });
  });
  it('over the whole width of the circle is half round', () => {
    // 100 π ∕ 2 = 157.08 mm, up to whole millimetres 158; it stands out by the radius.
    expect(rows('curve-strip', { chord: '100', circle: '100', unit: 'mm', cut: '1mm' })).toEqual({
      'Cut the strip': '158 mm',
      'The curve itself': '157.1 mm',
      'It stands out by': '50 mm',
    });
  });
  it('is none where the chord is longer than the circle is wide, or something does not read', () => {
    expect(rows('curve-strip', { chord: '5' })).toContain('Take a wider circle.');
    expect(rows('curve-strip', { chord: 'long' })).toContain('“long” does not read as a length.');
    expect(rows('curve-strip', { circle: '' })).toBe('Say how wide the circle is.');
  });
});

describe('one length in every unit', () => {
  it.each([
    // 2 3/16 in = 2.1875 in, times 25.4.
    ['2 3/16', { '64ths': '2 3/16 in', Decimal: '2.1875 in', Milli: '55.563 mm', Centi: '5.5563 cm' }],
    // 10 mm ∕ 25.4 = 0.3937 in = 25.197 64ths, nearest 25.
    ['10 mm', { '64ths': '25/64 in', Decimal: '0.3937 in', Milli: '10 mm', Centi: '1 cm' }],
    ['1', { '64ths': '1 in', Decimal: '1 in', Milli: '25.4 mm', Centi: '2.54 cm' }],
  ])('%s', (length, expected) => {
    const found = rows('convert', { length }) as Record<string, string>;
    for (const [part, figure] of Object.entries(expected))
      expect(Object.entries(found).find(([term]) => term.includes(part))?.[1]).toBe(figure);
  });
});

describe('how many from a sheet', () => {
  const count = (said: Record<string, string>) => {
    const found = rows('how-many', said);
    return typeof found === 'string' ? found : Number(Object.values(found)[0]);
  };
  it('counts pieces that fill it', () => {
    // 12 × 12 in hold four across and three down of 3 × 4 in: 144 ∕ 12 = 12.
    expect(count({ wide: '3', tall: '4' })).toBe(12);
  });
  it('turns pieces where more come out so, unless they may not be turned', () => {
    // Letter, 8 1/2 × 11 in: 5 × 4 in as it is lies once across and twice down; turned, twice across and twice down.
    expect(count({ wide: '5', tall: '4', sheet: 'letter', turn: 'no' })).toBe(2);
    expect(count({ wide: '5', tall: '4', sheet: 'letter' })).toBe(4);
  });
  it('says when none does', () => {
    expect(count({ wide: '13', tall: '2' })).toBe('A piece of that size does not come out of 12 × 12 in.');
  });
});

it('turns pounds of cover stock into grams a square metre and back', () => {
  // As for the table of weights: 100 lb are 270.41 g/m².
  expect(rows('cover-weight', { weight: '100' })).toEqual({ '100 lb cover is': '270 g/m²' });
  expect(rows('cover-weight', { weight: '270.4', of: 'gsm' })).toEqual({ '270.4 g/m² is about': '100 lb cover' });
  expect(rows('cover-weight', { weight: 'heavy' })).toContain('is no weight');
});

it('shows what was typed as text', () => {
  expect(sumAnswerHtml('convert', (name) => (name === 'length' ? '<b>' : ''))).toContain('“&lt;b&gt;”');
});
