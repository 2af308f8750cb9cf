import { describe, expect, it } from 'vitest';
import {
  addMeasure,
  changeAsk,
  nameTrouble,
  removeMeasure,
  turnOver,
  usersOf,
} from '@/features/projects/pattern-edits';
import { curedText } from '@/features/workroom/desk/cured-text';
import { FOLDER } from '../server/published-project';

const measure = (pattern: typeof FOLDER, name: string) => pattern.measures.find((known) => known.name === name);

describe('editing a pattern', () => {
  it('changes one field of a question and nothing else', () => {
    const changed = changeAsk(FOLDER, 'inside width', { to: '9 in' });
    expect(measure(changed, 'inside width')?.ask).toEqual({
      question: 'How wide is what goes in?',
      usual: '4 in',
      from: '2 in',
      to: '9 in',
    });
    expect(measure(changed, 'blank width')).toBe(measure(FOLDER, 'blank width'));
  });
  it('makes the usual value of an asked measure its formula when it is to be worked out', () => {
    expect(measure(turnOver(FOLDER, 'inside width'), 'inside width')).toEqual({
      name: 'inside width',
      formula: '4 in',
    });
  });
  it('makes the formula of a worked measure its usual value when the reader is to be asked', () => {
    const turned = measure(turnOver(FOLDER, 'blank width'), 'blank width');
    expect(turned?.formula).toBeUndefined();
    expect(turned?.ask?.usual).toBe('2 * inside width');
  });
  it('says what uses a measure before it is taken out', () => {
    expect(usersOf(FOLDER, 'inside width')).toEqual([
      'the inside size “wide”',
      'the outside size “wide”',
      'measure “blank width”',
      'piece “Folder”',
      'fit “it stands”',
    ]);
    expect(usersOf(addMeasure(FOLDER, { name: 'spare', formula: '1 in' }), 'spare')).toEqual([]);
    expect(removeMeasure(FOLDER, 'blank width').measures.map((known) => known.name)).toEqual([
      'inside width',
      'inside height',
    ]);
  });
  it.each([
    ['', 'Give the measure a name, such as “rib height”.'],
    [
      '2 ribs',
      '“2 ribs” cannot be a name. A name is made of letters, digits and single spaces, and begins with a letter; it has 60 characters at most.',
    ],
    ['more or less', '“more or less” holds “or”, a word that formulas use. Leave “or” out, or choose another word.'],
    ['Blank  Width', 'There is a measure called “blank width” already. Choose another, or rename that one first.'],
    ['rib height', null],
  ])('of the name “%s” says %s', (name, sentence) => expect(nameTrouble(FOLDER, name)).toBe(sentence));
});

describe('a cure', () => {
  it('is put in the place of what does not read', () => {
    expect(curedText({ span: { from: 10, to: 14 }, cure: 'tab' }, 'arc + 2 * tabs')).toBe('arc + 2 * tab');
  });
  it('is none without a place', () => expect(curedText({ cure: 'tab' }, 'tabs')).toBeNull());
});
