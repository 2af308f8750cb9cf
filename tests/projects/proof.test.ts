import { describe, expect, it } from 'vitest';
import type { MeasureDef } from '@/engine';
import { proofList, type ProofSubject } from '@/features/projects/proof';
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
    expect(more).toEqual([]);
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
    expect(items({ writeUp: writeUpOf(MATERIALS, { type: 'cutList' }, inStep({ type: 'paragraph' })) })).toEqual([]);
  });
  it('puts what blocks before what is advised', () => {
    expect(
      items({ title: '', summary: '', writeUp: writeUpOf({ type: 'paragraph' }) }).map(([, blocks]) => blocks),
    ).toEqual([true, true, false, false, false]);
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
