import { describe, expect, it } from 'vitest';
import { compilePattern, snap, STOCKS, usualSizing, type Model, type Sizing, type Stock } from '@/engine';
import { USUAL_CUT_FROM, type CutFrom } from '@/features/sheets/cut-from';
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
import { asItStands, waysUp } from '@/features/sizing/asks/thing';
import { getPatternModel } from '@/features/patterns/patterns.server';
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
const on = (stock: Stock, copies = 1): CutFrom => ({ ...USUAL_CUT_FROM, stock, copies });
const insideOf = (answer: Answer) => (answer.ok ? answer.figures.finished.inside.map(({ mm }) => mm) : answer.reason);

describe('a thing that must go in', () => {
  const thing = (fields: Record<string, string>, base: Sizing = inches) => {
    const read = readThing(model, base.units, form(fields));
    if (!read.ok) throw new Error(JSON.stringify(read.faults));
    return answerThing(model, base, read.value, USUAL_CUT_FROM);
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

describe('a thing that no box of its exact size can hold', () => {
  const offersFor = (sizes: readonly number[]) => {
    const answer = answerThing(model, inches, { sizes, ease: 0, up: null }, USUAL_CUT_FROM);
    return answer.ok
      ? []
      : answer.offers.map(({ figures, how }) => [...figures.finished.inside.map(({ mm }) => mm), how]);
  };

  it('is offered the one that is larger by as little as it takes', () => {
    // 3 × 8 in falls over: it may be at most twice as tall as wide, so 4 in wide stands.
    expect(offersFor([inch(3), inch(8)])).toEqual([
      [inch(4), inch(8), { is: 'looser', by: [{ name: 'wide', mm: inch(1) }] }],
    ]);
  });

  it('is offered the smallest of its kind when it is too small in both ways', () => {
    const [offer] = offersFor([inch(1), inch(2)]);
    expect(offer?.slice(0, 2)).toEqual([inch(2), inch(3)]);
  });

  it('is offered nothing that does not hold it', () => {
    // The widest is 8 in.
    expect(offersFor([inch(9), inch(6)])).toEqual([]);
  });

  it('may stand another way: a deep box for a thing that is laid down', () => {
    const bookBox = getPatternModel('book-box') as Model;
    const sizes = [inch(8), inch(6), inch(1.75)];
    expect(waysUp(bookBox)).toEqual([1, 2]);
    expect(asItStands(bookBox, { sizes, up: 2 })).toEqual([inch(1.75), inch(6), inch(8)]);
    expect(asItStands(bookBox, { sizes, up: 1 })).toEqual([inch(6), inch(8), inch(1.75)]);
    expect(asItStands(bookBox, { sizes, up: null })).toEqual(sizes);
  });

  it('does not stand another way where a box has no three sizes', () => {
    expect(waysUp(model)).toEqual([]);
    expect(asItStands(model, { sizes: [3, 5], up: 0 })).toEqual([3, 5]);
  });
});

describe('the largest from a pile', () => {
  const from = (pile: Pile, base: Sizing = inches) => answerPile(model, largestFrom(model, base, pile), pile);

  it('of one A4 sheet is stopped by the sheet’s short side', () => {
    // 2w × h is 4 : 3. 210 mm hold 132 sixteenths of height (209.55 mm); grown alike, the width stays below
    // 64 × 133 ∕ 96 = 88.67 sixteenths: 88 of them (139.7 mm).
    const answer = from({ cutFrom: on(STOCKS.a4, 1), count: 1 });
    expect(insideOf(answer)).toEqual([139.7, 209.55]);
    expect(answer.ok && answer.stops).toMatch(/^A step larger, Folder no longer fits A4\. /);
  });

  it('of two boxes from one square sheet is stopped by the number of sheets', () => {
    // Two cards of 8 × 6 in lie on 12 × 12 in one above the other; a sixteenth taller they do not.
    const answer = from({ cutFrom: on(STOCKS['12x12in'], 2), count: 1 });
    expect(insideOf(answer)).toEqual([inch(4), inch(6)]);
    expect(answer.ok && answer.stops).toBe('A step larger, it takes 2 sheets of 12 × 12 in.');
    expect(answer.ok && answer.plan.used).toBe(1);
  });

  it('heeds the grain: the fold runs along it', () => {
    // The fold is as long as the card is tall. Along the short side of A4 the height is at most 210 mm, as before; along
    // the long side 2w is at most 210: 64 g ≤ 66 sixteenths (209.55 / 2), g < 67 ∕ 64, and 96 g < 100.5: 100 of height.
    expect(insideOf(from({ cutFrom: on(readStock('a4-short')!, 1), count: 1 }))).toEqual([139.7, 209.55]);
    expect(insideOf(from({ cutFrom: on(readStock('a4-long')!, 1), count: 1 }))).toEqual([104.775, 158.75]);
  });

  it('is none when not even the smallest comes out of it', () => {
    // The smallest card is 4 × 3 in: two of them, not three, come out of 6 × 6 in.
    expect(insideOf(from({ cutFrom: on(STOCKS['6x6in'], 3), count: 1 }))).toContain('not even the smallest');
    expect(from({ cutFrom: on(STOCKS['6x6in'], 2), count: 1 }).ok).toBe(true);
  });

  it('takes whole numbers of sheets and boxes', () => {
    expect(readPile(on(STOCKS.a4), form({ [COUNT]: '3', [COPIES]: '2' }))).toEqual({
      ok: true,
      value: { cutFrom: on(STOCKS.a4, 2), count: 3 },
    });
    expect(readPile(on(STOCKS.a4), form({ [COUNT]: '0', [COPIES]: '13' }))).toEqual({
      ok: false,
      faults: {
        [COUNT]: 'Write a whole number from 1 to 999.',
        [COPIES]: '“13” is no number of boxes. Give a whole number from 1 to 12.',
      },
    });
  });
});

describe('an answer before it is taken', () => {
  const state: AskState = {
    links: { model, authors: inches, path: '/projects/folder' },
    asked: { ...inches, values: { 'inside width': inch(5) } },
    cutFrom: on(STOCKS.a4),
    sheets: [{ card: 'a4', count: 3 }],
    edition: 2,
    typed: { 'thing-wide': '"><b>' },
    faults: {},
  };

  it('leads to the size with its sheet, or back to the size as it was', () => {
    const answer = answerThing(model, inches, { sizes: [inch(3), inch(5)], ease: 0, up: null }, on(STOCKS.a4));
    const html = answerHtml('fit', answer, state);
    expect(html).toContain(
      'href="/projects/folder?inside-width=3in&amp;inside-height=5in&amp;card=a4&amp;edition=2">Use',
    );
    expect(html).toContain('data-leave href="/projects/folder?inside-width=5in"');
    expect(html).toContain('Takes 1 of your A4 sheets; you have 3.');
  });

  it('says why there is none, and offers nothing to use', () => {
    const html = answerHtml('fit', { ok: false, reason: 'it is <too> wide', offers: [] }, state);
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
