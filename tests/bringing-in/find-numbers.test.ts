import { describe, expect, it } from 'vitest';
import { findNumbers } from '@/writeup/numbers/find-numbers';

/** What is found, as the words and what they are read as. */
const found = (text: string, units: 'in' | 'mm' | 'cm' = 'in') =>
  findNumbers(text, { units }).map((number) => [number.text, ...number.readings.map(({ says }) => says)].join(' = '));

describe('lengths in a text', () => {
  // Expected values follow from what the words mean: 1 in = 25.4 mm, a foot is 12 in.
  it.each([
    ['two and five eighths of an inch', ['two and five eighths of an inch = 2 5/8 in']],
    ['four and a half', ['four and a half = 4 1/2 in']],
    ['Score it at half.', ['half = 1/2 in']],
    ['6 by 8 and a quarter', ['6 = 6 in', '8 and a quarter = 8 1/4 in']],
    ['scored at 3/4 and 3 1/4', ['3/4 = 3/4 in', '3 1/4 = 3 1/4 in']],
    ['12 by 12 card', ['12 = 12 in', '12 = 12 in']],
    ['a 12x12 sheet', ['12 = 12 in', '12 = 12 in']],
    ['5⅜″ wide', ['5⅜″ = 5 3/8 in']],
    ['6¼ × 9½ inches', ['6¼ = 6 1/4 in', '9½ inches = 9 1/2 in']],
    ['an inch and three eighths', ['an inch and three eighths = 1 3/8 in']],
    ['three-quarter inch strips', ['three-quarter inch = 3/4 in']],
    ['six point two five inches', ['six point two five inches = 6 1/4 in']],
    ['5/8ths of an inch', ['5/8ths of an inch = 5/8 in']],
    ['6 inches and a half', ['6 inches and a half = 6 1/2 in']],
    ['136 mm or 13,6 cm', ['136 mm = 136 mm', '13,6 cm = 13.6 cm']],
    ['a foot and a half of cord', ['a foot and a half = 18 in']],
    ['from 2 to 3 inches', ['2 = 2 in', '3 inches = 3 in']],
    ['5 in. wide', ['5 in. = 5 in']],
    ['It is 5 in. Then fold.', ['5 in = 5 in']],
  ])('reads “%s”', (text, expected) => expect(found(text)).toEqual(expected));

  it('takes a number without a unit for the unit of its neighbours, else for the author’s', () => {
    expect(found('Cut it 28 by 23 cm')).toEqual(['28 = 28 cm', '23 cm = 23 cm']);
    expect(found('Score at 40 and 190', 'mm')).toEqual(['40 = 40 mm', '190 = 190 mm']);
  });

  it.each([
    'Step 3 is on page 4.',
    'Wait 5 minutes, or ten.',
    'See 3:20 in the film, or 1:02:03.',
    'Turn it by 45° or 45 degrees, at 350 °F.',
    'Use 80 lb or 216 gsm card, A4 or 8 sheets of it.',
    'In 2026 I made 12 of them for $4 each, 50 % off.',
    'Fold it in half, a third of the way, then half of that.',
    'Cut 4 in plum and 2 in white, 6 in total.',
    'Four corners, two tabs, one lid; do this three times.',
    'Give it a quarter turn, half an hour later.',
    'Write to me at 3@example.org or https://example.org/3/4.',
    'Version 2.0 has 24/7 help and 1,200 users.',
    'Come back at 4.',
    'Cut at half a right angle, in two across the back.',
  ])('finds none in “%s”', (text) => expect(found(text)).toEqual([]));
});

describe('slips of speech recognition', () => {
  it.each([
    ['6 1.4 inches', '6 1.4 inches = 6 1/4 in = 1 13/32 in'],
    ['6 1 4 inches', '6 1 4 inches = 6 1/4 in = 4 in'],
    ['61/4 inches', '61/4 inches = 6 1/4 in = 15 1/4 in'],
    ['5 8 inches', '5 8 inches = 5/8 in = 8 in'],
    ['3 14 inches', '3 14 inches = 3 1/4 in = 14 in'],
    ['for and a half inches', 'for and a half inches = 4 1/2 in = 1/2 in'],
    ['two in a half inches', 'two in a half inches = 2 1/2 in = 2 in'],
    ['7:16 inches', '7:16 inches = 7/16 in = 16 in'],
  ])('“%s” is doubtful and offered both ways', (text, expected) => {
    expect(found(text)).toEqual([expected]);
    expect(findNumbers(text, { units: 'in' })[0]?.doubtful).toBe(true);
  });

  it('the other way stands for fewer words where it leaves some aside', () => {
    const [number] = findNumbers('Cut 6 1.4 inches.', { units: 'in' });
    expect(number?.readings.map(({ from, to }) => 'Cut 6 1.4 inches.'.slice(from, to))).toEqual([
      '6 1.4 inches',
      '1.4 inches',
    ]);
  });
});

describe('what is replaced', () => {
  it('leaves the article of a noun and takes that of a length', () => {
    expect(found('Leave a half inch tab.')).toEqual(['half inch = 1/2 in']);
    expect(found('Score at a half inch.')).toEqual(['a half inch = 1/2 in']);
  });

  it('says which numbers were said in one breath', () => {
    const numbers = findNumbers('Cut it 6 by 8 inches, then score at 1/2 and 3.', { units: 'in' });
    expect(numbers.map(({ group, nth, joined }) => `${group}.${nth} ${joined}`)).toEqual([
      '0.0 by',
      '0.1 by',
      '1.0 list',
      '1.1 list',
    ]);
  });
});
