import { describe, expect, it } from 'vitest';
import { readClock } from '@/features/bringing-in/clock';
import { stepsOfDocument } from '@/features/bringing-in/document-steps';
import { fillerIn, withoutFiller } from '@/features/bringing-in/filler';
import { kindOf, readSource } from '@/features/bringing-in/read-source';
import { sayFault, type SourceKind } from '@/features/bringing-in/source';
import { splitIntoSteps } from '@/features/bringing-in/split-steps';

const read = (text: string, kind: Exclude<SourceKind, 'html'> = kindOf(text) as 'plain') => {
  const source = readSource(text, kind);
  return source.ok ? source.value : sayFault(source.faults[0] as (typeof source.faults)[0]);
};

describe('WebVTT', () => {
  // The format as the W3C describes it: header, notes, style blocks, names of cues, settings, voices, entities.
  it('is read without its notes, styles, names, places and voices', () => {
    const text = [
      'WEBVTT - the lid',
      '',
      'NOTE not said',
      '',
      'STYLE',
      '::cue { color: red }',
      '',
      'intro',
      '00:01.000 --> 00:04.500 line:80% align:start',
      '<v Ines>Cut <i>two</i> &amp; fold</v>',
      'them <00:00:03.000>once.',
      '',
      '01:00:05.000 --> 01:00:06.000',
      'Next.',
    ].join('\r\n');
    expect(read(text)).toEqual([
      { from: 1, to: 4.5, text: 'Cut two & fold them once.' },
      { from: 3605, to: 3606, text: 'Next.' },
    ]);
  });

  it('says once what rolling captions repeat', () => {
    const text =
      'WEBVTT\n\n00:01.000 --> 00:02.000\ncut the lid\n\n00:02.000 --> 00:03.000\ncut the lid\nthen score it\n\n00:03.000 --> 00:04.000\nthen score it\n';
    expect(read(text)).toEqual([
      { from: 1, to: 2, text: 'cut the lid' },
      { from: 2, to: 3, text: 'then score it' },
    ]);
  });

  it.each([
    [
      '00:01.000 --> 00:02.000\nx',
      'webvtt',
      'Line 1: a WebVTT file begins with WEBVTT. Put that word on the first line, or save it as SRT.',
    ],
    [
      'WEBVTT\n\n00:01.000 -->\nx',
      'webvtt',
      'Line 3: “00:01.000 -->” has no two times. Write them as 00:01:05.000 --> 00:01:08.000.',
    ],
    ['WEBVTT\n\n00:01.000 --> 00:75.000\nx', 'webvtt', 'Line 3: “00:75.000” is no time. Write it as 00:01:05.000.'],
    [
      'WEBVTT\n\nname\nwords',
      'webvtt',
      'Line 3: no times stand at “name”. Write them as 00:01:05.000 --> 00:01:08.000.',
    ],
    [
      'WEBVTT\n\n00:03.000 --> 00:02.000\nx',
      'webvtt',
      'Line 3: the caption ends before it begins. Swap the two times.',
    ],
    [
      'WEBVTT\n\n00:09.000 --> 00:10.000\nx\n\n00:01.000 --> 00:02.000\ny',
      'webvtt',
      'Line 6: this caption begins before the one above it. Sort the captions by time.',
    ],
    ['WEBVTT\n', 'webvtt', 'The text: no captions were found. Check that the file is whole.'],
    ['  ', 'plain', 'The text: there is nothing in it. Paste the text, or choose another file.'],
    ['a\0b', 'plain', 'The text: this is no text file. Save it as plain text, WebVTT or SRT.'],
    ['[0:05] a\n[0:75] b', 'stamped', 'Line 2: “0:75” is no time. Write it as 4:05 or 1:04:05.'],
    [
      '[1:05] a\n[0:55] b',
      'stamped',
      'Line 2: 0:55 comes before the time above it. Put the lines in the order of the film.',
    ],
  ] as const)('%j is refused with its line', (text, kind, sentence) => expect(read(text, kind)).toBe(sentence));
});

it('SRT is read with commas in its times and without its styling', () => {
  const text =
    '1\n00:00:01,000 --> 00:00:03,250\n<i>Cut</i> {\\an8}the lid.\n\n2\n00:00:04,000 --> 00:00:05,000\nFold it.\n';
  expect(kindOf(text)).toBe('srt');
  expect(read(text)).toEqual([
    { from: 1, to: 3.25, text: 'Cut the lid.' },
    { from: 4, to: 5, text: 'Fold it.' },
  ]);
});

it('lines that begin with a time are cues, each up to the next', () => {
  expect(read('[0:05] Cut the lid.\nFold it.\n(1:10) - Glue.\n1:02:00 Done.')).toEqual([
    { from: 5, to: 70, text: 'Cut the lid. Fold it.' },
    { from: 70, to: 3720, text: 'Glue.' },
    { from: 3720, to: null, text: 'Done.' },
  ]);
});

it('a size is no time: plain text stays plain', () => {
  expect(kindOf('Cut at 3:20 or so.\nThen fold.')).toBe('plain');
  expect(read('One.\ntwo\n\nThree.')).toEqual([
    { from: null, to: null, text: 'One. two' },
    { from: null, to: null, text: 'Three.' },
  ]);
});

it('a clock is hours, minutes and seconds', () => {
  expect([readClock('1:02:03.5'), readClock('2:03'), readClock('2:60'), readClock('1:60:00'), readClock('12')]).toEqual(
    [3723.5, 123, null, null, null],
  );
});

describe('steps', () => {
  const pieces = ['Spine', 'Lower spine', 'Lid'];
  const titles = (text: string) =>
    splitIntoSteps(read(text) as never, { pieces }).map(({ title, moment }) => [title, moment]);

  it('begin at a stamped line that opens something new or names another piece, and are called by the piece', () => {
    const filling =
      'Take your time with this one, and look at it from both sides before you cut anything at all, please.';
    const text = `[0:05] Cut the lid first. ${filling}\n[0:40] It should be straight.\n[1:00] Next, the lower spine. ${filling}\n[2:00] Now fold it.`;
    expect(titles(text)).toEqual([
      ['The lid', 5],
      ['The lower spine', 60],
      ['', 120],
    ]);
  });

  it('do not begin in the middle of a sentence that runs over two captions', () => {
    const text =
      'WEBVTT\n\n00:01.000 --> 00:05.000\nCut the lid as we said before and keep all of what is left over for later, then put the\n\n00:30.000 --> 00:35.000\nlower spine on the board. Now score it.\n';
    expect(splitIntoSteps(read(text) as never, { pieces }).map(({ paragraphs }) => paragraphs[0])).toEqual([
      'Cut the lid as we said before and keep all of what is left over for later, then put the lower spine on the board. Now score it.',
    ]);
  });

  it('of a document begin at its headings and at the items of its numbered lists', () => {
    const text = (words: string) => [{ type: 'text', text: words } as const];
    const item = (words: string) =>
      ({ type: 'listItem', content: [{ type: 'paragraph', content: text(words) }] }) as const;
    expect(
      stepsOfDocument({
        type: 'doc',
        content: [
          { type: 'paragraph', content: text('A box.') },
          { type: 'heading', attrs: { level: 2 }, content: text('The lid') },
          { type: 'paragraph', content: text('Cut it.') },
          { type: 'orderedList', content: [item('Fold.'), item('Glue.')] },
        ],
      }),
    ).toEqual([
      { title: '', moment: null, paragraphs: ['A box.'] },
      { title: 'The lid', moment: null, paragraphs: ['Cut it.'] },
      { title: '', moment: null, paragraphs: ['Fold.'] },
      { title: '', moment: null, paragraphs: ['Glue.'] },
    ]);
  });
});

describe('filler', () => {
  it.each([
    ['Um, cut the lid.', 'Cut the lid.'],
    ['Okay, so we fold it, you know, and, uh, glue it.', 'We fold it, and, glue it.'],
    ['Cut the the lid. So basically that is it.', 'Cut the lid. That is it.'],
    ['It is very very thin, right?', 'It is very very thin?'],
  ])('%j becomes %j', (text, plain) => expect(withoutFiller(text)).toBe(plain));

  it('is no part of a sentence that needs the word', () => {
    for (const text of [
      'Cut it like a fan.',
      'You know the lid.',
      'The right side, then the left.',
      'Score so that it folds.',
    ])
      expect(fillerIn(text)).toEqual([]);
  });
});
