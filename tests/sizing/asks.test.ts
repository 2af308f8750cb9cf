import { describe, expect, it } from 'vitest';
import { compilePattern, snap, STOCKS, usualSizing, type Model, type Sizing } from '@/engine';
import { readStock } from '@/features/sheets/stock-link';
import {
  answerPile,
  answerThing,
  COPIES,
  COUNT,
  EASE,
  largestFrom,
  readPile,
  readThing,
  type Answer,
  type Pile,
} from '@/features/sizing/asks/ask';
import { answerHtml, askFormHtml, type AskState } from '@/features/sizing/asks/ask-html';
import { FOLDER } from '../server/published-project';

/** A card folded once: inside width w (2 to 8 in, usual 4) and height h (3 to 10 in, usual 6), cut 2w × h; h at most 2w. */
const model = ((): Model => {
  const compiled = compilePattern(FOLDER);
  if (!compiled.ok) throw new Error(JSON.stringify(compiled.faults));
  return compiled.value;
})();
const inches = usualSizing(model);
const metric = usualSizing(model, 'mm');
const inch = (n: number) => snap(n * 25.4);
const form = (fields: Record<string, string>) => (name: string) => fields[name] ?? '';
const insideOf = (answer: Answer) => (answer.ok ? answer.figures.finished.inside.map(({ mm }) => mm) : answer.reason);

describe('a thing that must go in', () => {
  const thing = (fields: Record<string, string>, base: Sizing = inches) => {
    const read = readThing(model, base.units, form(fields));
    if (!read.ok) throw new Error(JSON.stringify(read.faults));
    return answerThing(model, base, read.value, STOCKS['12x12in']);
  };

  it('gets a box of its own size and twice the ease', () => {
    const answer = thing({ 'thing-wide': '3', 'thing-tall': '5', [EASE]: '1/8' });
    // 3 + 1/4 and 5 + 1/4; the card is cut 6 1/2 × 5 1/4, one sheet.
    expect(insideOf(answer)).toEqual([inch(3.25), inch(5.25)]);
    expect(answer.ok && answer.plan.used).toBe(1);
  });

  it('gets the usual ease when none is said, and the next step of the trimmer', () => {
    // 100.2 + 2 × 3 = 106.2, up to 107; 150 + 6 = 156.
    expect(insideOf(thing({ 'thing-wide': '100.2', 'thing-tall': '150' }, metric))).toEqual([107, 156]);
  });

  it('may be measured in another unit than the page’s', () => {
    expect(insideOf(thing({ 'thing-wide': '76.2 mm', 'thing-tall': '12.7cm', [EASE]: '0' }))).toEqual([
      inch(3),
      inch(5),
    ]);
  });

  it('that is too large for the kind of box is told what stops it', () => {
    expect(insideOf(thing({ 'thing-wide': '9', 'thing-tall': '9' }))).toMatch(/Inside width.*at most 8/);
    // 8 in tall round a 3 in wide thing: taller than twice its width.
    expect(insideOf(thing({ 'thing-wide': '3', 'thing-tall': '8', [EASE]: '0' }))).toContain('falls over');
  });

  it('that does not read is asked for again, field by field', () => {
    expect(readThing(model, 'in', form({ 'thing-wide': 'wide', 'thing-tall': '', [EASE]: '9' }))).toEqual({
      ok: false,
      faults: {
        'thing-wide': '“wide” does not read as a length.',
        'thing-tall': 'Measure this too.',
        [EASE]: 'Ease is from nothing to 100 mm (about 4 in).',
      },
    });
    expect(readThing(model, 'in', form({ 'thing-wide': '0', 'thing-tall': '3' }))).toMatchObject({
      faults: { 'thing-wide': 'A thing is more than nothing.' },
    });
  });
});

describe('the largest from a pile', () => {
  const from = (pile: Pile, base: Sizing = inches) => answerPile(model, largestFrom(model, base, pile), pile);

  it('of one A4 sheet is stopped by the sheet’s short side', () => {
    // 2w × h is 4 : 3. 210 mm hold 132 sixteenths of height (209.55 mm); grown alike, the width stays below
    // 64 × 133 ∕ 96 = 88.67 sixteenths: 88 of them (139.7 mm).
    const answer = from({ stock: STOCKS.a4, count: 1, copies: 1 });
    expect(insideOf(answer)).toEqual([139.7, 209.55]);
    expect(answer.ok && answer.stops).toMatch(/^A step larger, Folder no longer fits A4\. /);
  });

  it('of two boxes from one square sheet is stopped by the number of sheets', () => {
    // Two cards of 8 × 6 in lie on 12 × 12 in one above the other; a sixteenth taller they do not.
    const answer = from({ stock: STOCKS['12x12in'], count: 1, copies: 2 });
    expect(insideOf(answer)).toEqual([inch(4), inch(6)]);
    expect(answer.ok && answer.stops).toBe('A step larger, it takes 2 sheets of 12 × 12 in.');
    expect(answer.ok && answer.plan.used).toBe(1);
  });

  it('heeds the grain: the fold runs along it', () => {
    // The fold is as long as the card is tall. Along the short side of A4 the height is at most 210 mm, as before; along
    // the long side 2w is at most 210: 64 g ≤ 66 sixteenths (209.55 / 2), g < 67 ∕ 64, and 96 g < 100.5: 100 of height.
    expect(insideOf(from({ stock: readStock('a4-short')!, count: 1, copies: 1 }))).toEqual([139.7, 209.55]);
    expect(insideOf(from({ stock: readStock('a4-long')!, count: 1, copies: 1 }))).toEqual([104.775, 158.75]);
  });

  it('is none when not even the smallest comes out of it', () => {
    // The smallest card is 4 × 3 in: two of them, not three, come out of 6 × 6 in.
    expect(insideOf(from({ stock: STOCKS['6x6in'], count: 1, copies: 3 }))).toContain('not even the smallest');
    expect(from({ stock: STOCKS['6x6in'], count: 1, copies: 2 }).ok).toBe(true);
  });

  it('takes whole numbers of sheets and boxes', () => {
    expect(readPile(STOCKS.a4, form({ [COUNT]: '3', [COPIES]: '2' }))).toEqual({
      ok: true,
      value: { stock: STOCKS.a4, count: 3, copies: 2 },
    });
    expect(readPile(STOCKS.a4, form({ [COUNT]: '0', [COPIES]: '13' }))).toEqual({
      ok: false,
      faults: { [COUNT]: 'Write a whole number from 1 to 999.', [COPIES]: 'Write a whole number from 1 to 12.' },
    });
  });
});

describe('an answer before it is taken', () => {
  const state: AskState = {
    links: { model, authors: inches, path: '/projects/folder' },
    asked: { ...inches, values: { 'inside width': inch(5) } },
    stock: STOCKS.a4,
    sheets: [{ card: 'a4', count: 3 }],
    edition: 2,
    typed: { 'thing-wide': '"><b>' },
    faults: {},
  };

  it('leads to the size with its sheet, or back to the size as it was', () => {
    const answer = answerThing(model, inches, { sizes: [inch(3), inch(5)], ease: 0 }, STOCKS.a4);
    const html = answerHtml('fit', answer, state);
    expect(html).toContain(
      'href="/projects/folder?inside-width=3in&amp;inside-height=5in&amp;card=a4&amp;edition=2">Use',
    );
    expect(html).toContain('data-leave href="/projects/folder?inside-width=5in"');
    expect(html).toContain('Takes 1 of your A4 sheets; you have 3.');
  });

  it('says why there is none, and offers nothing to use', () => {
    const html = answerHtml('fit', { ok: false, reason: 'it is <too> wide' }, state);
    expect(html).toContain('It is &lt;too&gt; wide.');
    expect(html).not.toContain('data-use');
  });

  it('comes from a form that brings the size and the edition along, and shows again what was typed', () => {
    const html = askFormHtml('fit', state);
    expect(html).toContain('action="/projects/folder/fit"');
    expect(html).toContain('<input type="hidden" name="inside-width" value="5in">');
    expect(html).toContain('<input type="hidden" name="edition" value="2">');
    expect(html).toContain('value="&quot;&gt;&lt;b&gt;"');
  });
});
