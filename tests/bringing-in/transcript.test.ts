import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { acceptCertain, numbersOf, prepareSteps, stepNodes } from '@/features/bringing-in/prepare';
import { kindOf, readSource } from '@/features/bringing-in/read-source';
import { splitIntoSteps } from '@/features/bringing-in/split-steps';
import { liveAt, readMarks } from './read-sentences';
import { sameMeasure } from './same-measure';

// An invented talk of nine and a half minutes about the lidded box at this size.
const live = liveAt('lidded-box', 'in', ['inside length = 8 in', 'inside width = 5 in', 'inside height = 2 in']);
const { text: vtt, marks } = readMarks(
  readFileSync(new URL('./lidded-box.vtt.txt', import.meta.url), 'utf8').replace(/^NOTE.*$/m, 'NOTE An invented talk.'),
);
const pieces = live.figures.pieces.map(({ name }) => name);
const isPlain = (formula: string): boolean => /^[\d./ ]+ in$/.test(formula);

function bringIn() {
  const cues = readSource(vtt, 'webvtt');
  if (!cues.ok) throw new Error(cues.faults[0]?.found);
  const steps = splitIntoSteps(cues.value, { pieces });
  return { cues: cues.value, steps, prepared: prepareSteps(steps, { live, trimFiller: false }) };
}

describe('a talk of ten minutes with its times', () => {
  const { cues, steps, prepared } = bringIn();
  const numbers = numbersOf(prepared);

  it('is known for what it is, and nothing that was said is lost', () => {
    expect(kindOf(vtt)).toBe('webvtt');
    const said = cues.map(({ text }) => text).join(' ');
    expect(steps.flatMap(({ paragraphs }) => paragraphs).join(' ')).toBe(said);
  });

  it('is split where the maker begins something new', () => {
    // Read off the talk: what follows each long silence, with its time.
    expect(steps.map(({ moment }) => (moment === null ? null : Math.floor(moment)))).toEqual([
      1, 32, 70, 118, 185, 250, 290, 340, 400, 450, 500, 550,
    ]);
  });

  it('has just the lengths found that stand in it', () => {
    expect(numbers.map(({ text }) => text)).toEqual([
      ...marks.slice(0, 3).map(({ from, to }) => vtt.slice(from, to)),
      '3',
      '5',
      ...marks.slice(3).map(({ from, to }) => vtt.slice(from, to)),
    ]);
  });

  it('needs no more than 4 corrections by hand once the certain ones are accepted', () => {
    const decisions = acceptCertain(prepared, new Map());
    // "a 3 by 5 card" is a length, and no measure of the box.
    const meant = [
      ...marks.slice(0, 3).map(({ formula }) => formula),
      '3 in',
      '5 in',
      ...marks.slice(3).map(({ formula }) => formula),
    ];
    const outcome = numbers.map(({ id, matches }, n) => {
      const formula = meant[n] ?? '';
      const decided = decisions.get(id);
      const taken = typeof decided === 'object' ? decided.take.formula : null;
      const right = (name: string | undefined) => name !== undefined && sameMeasure(live, name, formula);
      if (isPlain(formula)) return taken === null ? 'left' : 'wrong';
      if (taken !== null) return right(taken) ? 'accepted' : 'wrong';
      return right(matches[0]?.formula) ? 'first' : 'chosen';
    });
    const count = (what: string) => outcome.filter((one) => one === what).length;
    const corrections = count('wrong') + count('chosen') + count('first');
    expect({ wrong: count('wrong'), certain: count('accepted') >= 24 }).toEqual({ wrong: 0, certain: true });
    expect(corrections, outcome.map((one, n) => `${one}: ${numbers[n]?.text}`).join('\n')).toBeLessThanOrEqual(4);
  });

  it('becomes steps with their moments and live measures', () => {
    const nodes = stepNodes(prepared, acceptCertain(prepared, new Map()), 'https://video.example/lidded');
    expect(nodes[1]?.attrs).toEqual({
      title: 'The base',
      mark: '',
      moment: { seconds: 32, address: 'https://video.example/lidded' },
    });
    expect(JSON.stringify(nodes[2])).toContain('"formula":"inside height + inside length"');
    expect(stepNodes(prepared, new Map(), null)[1]?.attrs.moment).toEqual({ seconds: 32, address: null });
  });
});
