import { describe, expect, it } from 'vitest';
import type { MeasureDef } from '@/engine';
import { proofList, type ProofSubject } from '@/features/projects/proof';
import { checkRange, rangeItems } from '@/features/projects/proof-range';
import { fieldOfFault, placeOfFault } from '@/features/projects/proof-place';
import type { BlockNode } from '@/writeup/document';
import { AUTHORS_SIZE, FOLDER, ONE_STEP, writeUpOf } from '../server/published-project';

const MATERIALS: BlockNode = {
  type: 'materials',
  content: [{ type: 'paragraph', content: [{ type: 'text', text: 'Card' }] }],
};
const READY: ProofSubject = {
  title: 'Seed list folder',
  summary: 'Keeps a season of lists.',
  pattern: FOLDER,
  sizing: AUTHORS_SIZE,
  writeUp: writeUpOf(MATERIALS, ...ONE_STEP.doc.content),
};
const items = (change: Partial<ProofSubject>) =>
  proofList({ ...READY, ...change }).map(({ code, blocking, place }) => [code, blocking, place.label]);
const withMeasure = (measure: MeasureDef) => ({ pattern: { ...FOLDER, measures: [...FOLDER.measures, measure] } });
const inStep = (...content: BlockNode[]): BlockNode => ({
  type: 'step',
  attrs: { title: 'The lower spine', mark: '' },
  content,
});
const photo = (alt: string): BlockNode => ({ type: 'photo', attrs: { upload: 'u1', alt, width: 10, height: 10 } });

describe('the proof list', () => {
  it('is empty when all is ready', () => expect(proofList(READY)).toEqual([]));
  it('stops a project without a title', () => expect(items({ title: ' ' })).toEqual([['no title', true, 'Project']]));
  it('advises a summary', () => expect(items({ summary: '' })).toEqual([['no summary', false, 'Project']]));
  it('stops a formula that does not read, at its measure, and keeps its cure', () => {
    const [item, ...more] = proofList({
      ...READY,
      ...withMeasure({ name: 'strip width', formula: '2 * blank widht' }),
    });
    expect(more.map(({ code, blocking }) => [code, blocking])).toEqual([['measure unused', false]]);
    expect(item).toMatchObject({
      code: 'formula',
      blocking: true,
      title: 'strip width does not read',
      place: { column: 'measures', name: 'strip width' },
    });
    expect(item?.detail).toBe('No measure is called “blank widht”. The nearest name is “blank width”.');
    expect(item?.fault?.cure).toBe('blank width');
  });
  it('stops a size that is outside the range', () => {
    // 9 in is more than the 8 in that the folder allows.
    expect(items({ sizing: { ...AUTHORS_SIZE, values: { 'inside width': 228.6 } } })).toEqual([
      ['sizing', true, 'Measures · inside width'],
    ]);
  });
  it('stops a fit that fails at the size shown first', () => {
    // 9 in tall is more than twice 4 in.
    expect(items({ sizing: { ...AUTHORS_SIZE, values: { 'inside height': 228.6 } } })).toEqual([
      ['fit fails', true, 'Fits · it stands'],
    ]);
  });
  it('stops a project without steps, and advises materials', () => {
    expect(items({ writeUp: writeUpOf({ type: 'paragraph' }) })).toEqual([
      ['no steps', true, 'Write-up'],
      ['no materials', false, 'Write-up'],
      ['piece unused', false, 'Pieces · Folder'],
      ['measure unused', false, 'Measures · blank width'],
    ]);
  });
  it('stops a live measure that does not read, at its step', () => {
    const measure = { type: 'measure', attrs: { formula: 'no such measure', bare: false } } as const;
    const writeUp = writeUpOf(MATERIALS, ...ONE_STEP.doc.content, inStep({ type: 'paragraph', content: [measure] }));
    const [item] = proofList({ ...READY, writeUp });
    expect(item).toMatchObject({
      code: 'live measure',
      blocking: true,
      title: '“no such measure” in the text does not read',
      place: { label: 'Write-up, step 2, The lower spine', nth: 1, step: 2 },
    });
  });
  it('stops a photo without words and a card of a piece that is not there', () => {
    const writeUp = writeUpOf(
      MATERIALS,
      ...ONE_STEP.doc.content,
      inStep(photo('A strip'), photo(' '), { type: 'pieceCard', attrs: { piece: 'Lid' } }),
    );
    expect(items({ writeUp })).toEqual([
      ['unknown piece', true, 'Write-up, step 2, The lower spine'],
      ['no alt text', true, 'Write-up, step 2, The lower spine'],
    ]);
  });
  it('takes a cut list as using every piece', () => {
    const codes = items({ writeUp: writeUpOf(MATERIALS, { type: 'cutList' }, inStep({ type: 'paragraph' })) });
    expect(codes.map(([code]) => code)).toEqual(['measure unused']);
  });
  it('puts what blocks before what is advised', () => {
    expect(
      items({ title: '', summary: '', writeUp: writeUpOf({ type: 'paragraph' }) }).map(([, blocks]) => blocks),
    ).toEqual([true, true, false, false, false, false]);
  });
});

const say = (text: string, marks: object[] = []): BlockNode =>
  ({ type: 'paragraph', content: [{ type: 'text', text, ...(marks.length > 0 ? { marks } : {}) }] }) as BlockNode;
const link = (href: string) => ({ type: 'link', attrs: { href } });
const written = (...content: BlockNode[]) =>
  proofList({ ...READY, writeUp: writeUpOf(MATERIALS, ...ONE_STEP.doc.content, ...content) });

describe('what the proof list finds in the text', () => {
  it('is a condition that reads a figure instead of a yes or no', () => {
    const step = {
      ...inStep(say('Only then.')),
      attrs: { title: 'Wide ones', mark: '', when: 'blank width' },
    } as BlockNode;
    expect(written(step)).toMatchObject([
      { code: 'condition', blocking: true, place: { label: 'Write-up, step 2, Wide ones', step: 2 } },
    ]);
    const good = { ...step, attrs: { title: 'Wide ones', mark: '', when: 'blank width > 6 in' } } as BlockNode;
    expect(written(good)).toEqual([]);
  });
  it('is a reference to a step that is gone', () => {
    const reference = { type: 'paragraph', content: [{ type: 'stepRef', attrs: { key: 'gone00' } }] } as BlockNode;
    expect(written(inStep(reference))).toMatchObject([{ code: 'unknown step', blocking: true, place: { step: 2 } }]);
  });
  it.each([
    ['https://example.org/card', []],
    ['http://example.org', []],
    ['mailto:ines@quilletlane.example', []],
    ['/handbook/scoring', []],
    ['#step-2', []],
    ['#step-3', ['link broken']],
    ['#nowhere', ['link broken']],
    ['javascript:alert(1)', ['link broken']],
    ['example.org', ['link broken']],
    ['//example.org', ['link broken']],
  ])('of a link to %s is %j', (href, codes) => {
    expect(written(inStep(say('this', [link(href)]))).map(({ code }) => code)).toEqual(codes);
  });
  it('is a long step that shows nothing, and no short one', () => {
    expect(written(inStep(say('Press it flat. '.repeat(25)))).map(({ code, place }) => [code, place.step])).toEqual([
      ['no picture', 2],
    ]);
    expect(written(inStep(say('Press it flat.')))).toEqual([]);
    expect(
      written(inStep(say('Press it flat. '.repeat(25)), { type: 'pieceCard', attrs: { piece: 'Folder' } })),
    ).toEqual([]);
  });
  it('is a tool that can hurt without a caution that speaks of it, told once', () => {
    const items = written(
      inStep(say('Cut with a craft knife.')),
      inStep(say('Cut again with the blade, then use hot glue.')),
    );
    expect(items.map(({ code, title, place }) => [code, title, place.step])).toEqual([
      ['no caution', 'No caution speaks of blades', 2],
      ['no caution', 'No caution speaks of hot glue', 3],
    ]);
    const caution: BlockNode = { type: 'caution', content: [say('The knife is sharp: cap it. Hot glue burns.')] };
    expect(written(caution, inStep(say('Cut with a craft knife, then use a glue gun.')))).toEqual([]);
  });
  it('is a measure that nothing uses', () => {
    expect(proofList({ ...READY, ...withMeasure({ name: 'strip', formula: '2 * blank width' }) })).toMatchObject([
      {
        code: 'measure unused',
        blocking: false,
        title: 'Nothing uses strip',
        place: { column: 'measures', name: 'strip' },
      },
    ]);
  });
});

describe('sizes all over the range', () => {
  it('are told when some cannot be made, with the first and why', () => {
    // 10 in tall is more than twice 2 in wide: a corner of the range.
    const checked = checkRange(FOLDER, AUTHORS_SIZE);
    expect(checked?.failing).toBeGreaterThan(0);
    const [item] = rangeItems(checked!);
    expect(item).toMatchObject({ code: 'range fails', blocking: false });
    expect(item?.detail).toContain('it is taller than twice its width and falls over');
  });
  it('are no item when all can be made', () => {
    const pattern = { ...FOLDER, fits: [] };
    expect(checkRange(pattern, AUTHORS_SIZE)).toMatchObject({ failing: 0, first: null });
  });
  it('are told when a piece outgrows 12 × 12 in, A4 and Letter', () => {
    // Flat, the folder is twice its width: 8 by 6 in at 4 in, 16 in at the widest, 8 in.
    const pattern = { ...FOLDER, fits: [] };
    expect(checkRange(pattern, AUTHORS_SIZE)?.outgrown).toEqual([{ piece: 'Folder', when: 'largest' }]);
    const wide = { ...AUTHORS_SIZE, values: { 'inside width': 7 * 25.4 } };
    expect(checkRange(pattern, wide)?.outgrown).toEqual([{ piece: 'Folder', when: 'shown' }]);
    expect(rangeItems(checkRange(pattern, wide)!)).toMatchObject([
      { code: 'outgrows', title: 'Folder fits no common sheet', place: { column: 'pieces', name: 'Folder' } },
    ]);
  });
  it('are not tried while the pattern does not read', () => {
    expect(checkRange({ ...FOLDER, measures: [] }, AUTHORS_SIZE)).toBeNull();
  });
});

describe('the place of a fault', () => {
  it.each([
    ['measure “arc”', 'measures', 'arc', 'Measures · arc'],
    ['choice “spine”', 'measures', 'spine', 'Choices · spine'],
    ['fit “lid goes on”, left side', 'measures', 'lid goes on', 'Fits · lid goes on, left side'],
    ['piece “Floor”, row, “side”', 'pieces', 'Floor', 'Pieces · Floor, row, “side”'],
  ])('%s is in %s', (where, column, name, label) => expect(placeOfFault({ where })).toEqual({ column, name, label }));
  it.each([
    ['measure “arc”', 'formula'],
    ['measure “arc”, usual value', 'usual'],
    ['measure “arc”, smallest', 'from'],
    ['measure “arc”, largest', 'to'],
    ['measure “arc height”', null],
  ])('%s is in the field %s of arc', (where, field) => expect(fieldOfFault({ where }, 'arc')).toBe(field));
});
