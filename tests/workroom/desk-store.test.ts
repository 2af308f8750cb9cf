import { beforeEach, describe, expect, it } from 'vitest';
import { changeMeasure } from '@/features/projects/pattern-edits';
import type { OpenProject } from '@/features/projects/project';
import { createDeskStore, type DeskStore } from '@/features/workroom/desk/desk-store';
import { cureFor } from '@/features/workroom/desk/cures';
import { collectUses } from '@/writeup/uses';
import { AUTHORS_SIZE, FOLDER, ONE_STEP, writeUpOf } from '../server/published-project';

const project: OpenProject = {
  id: 'folder',
  slug: 'folder',
  revision: 3,
  updatedAt: 0,
  author: { id: 'ines', name: 'Ines Thornbury' },
  standing: 'owner',
  stage: { stage: 'draft' },
  withdrawn: null,
  state: {
    title: 'Folder',
    summary: '',
    minutes: null,
    hero: null,
    pattern: FOLDER,
    sizing: AUTHORS_SIZE,
    writeUp: ONE_STEP,
  },
};
let store: DeskStore;
beforeEach(() => {
  store = createDeskStore(project);
});
const type = (formula: string) =>
  store.editPattern('blank width.formula', (pattern) => changeMeasure(pattern, 'blank width', { formula }));
const cut = (name: string) => store.$live.get()?.figures.measures.find((figure) => figure.name === name)?.cut;

const formulas = () => collectUses(store.$writeUp.get().doc).formulas.map(({ formula }) => formula);

describe('the desk', () => {
  it('works figures out at the author’s size', () => {
    // 2 × 4 in = 203.2 mm
    expect(cut('blank width')).toBeCloseTo(203.2, 6);
    store.editSizing(null, (sizing) => ({ ...sizing, values: { 'inside width': 127 } }));
    expect(cut('blank width')).toBeCloseTo(254, 6);
  });
  it('keeps the last good figures while a formula does not read, and says so', () => {
    type('2 * inside widt');
    expect(store.$work.get()).toMatchObject({ stale: true, compiled: { ok: false } });
    expect(cut('blank width')).toBeCloseTo(203.2, 6);
    type('3 * inside width');
    expect(store.$work.get().stale).toBe(false);
    // 3 × 4 in = 304.8 mm
    expect(cut('blank width')).toBeCloseTo(304.8, 6);
  });
  it('has no figures for a pattern that never read', () => {
    const pattern = changeMeasure(FOLDER, 'blank width', { formula: '' });
    const broken = createDeskStore({ ...project, state: { ...project.state, pattern } });
    expect(broken.$work.get()).toMatchObject({ live: null, stale: true });
    expect(broken.$proof.get()[0]).toMatchObject({ code: 'formula', place: { name: 'blank width' } });
  });
  it('cures a formula with the nearest name', () => {
    type('2 * inside widt');
    const item = store.$proof.get()[0];
    const cure = item === undefined ? null : cureFor(item, store);
    expect(cure?.label).toBe('Use inside width');
    cure?.apply();
    expect(store.$draft.get().pattern.measures[2]?.formula).toBe('2 * inside width');
    expect(store.$proof.get().filter((left) => left.blocking)).toEqual([]);
  });
  it('undoes measures and facts and leaves the write-up, which has an undo of its own', () => {
    const more = writeUpOf(...ONE_STEP.doc.content, { type: 'cutList' });
    store.edit('title', (draft) => ({ ...draft, title: 'List folder' }));
    store.setWriteUp(more);
    store.undo();
    expect(store.$state.get()).toMatchObject({ title: 'Folder', writeUp: more });
    store.redo();
    expect(store.$state.get()).toMatchObject({ title: 'List folder', writeUp: more });
  });
  it('begins the editor anew when the whole state is replaced, which can be undone too', () => {
    store.replace({ ...project.state, title: 'From the other tab' });
    expect([store.$generation.get(), store.$draft.get().title]).toEqual([1, 'From the other tab']);
    store.undo();
    expect(store.$draft.get().title).toBe('Folder');
  });
  it('shows a size that is played, keeps the author’s own, and ends with the next edit', () => {
    store.play({ ...AUTHORS_SIZE, values: { 'inside width': 127 } });
    expect(cut('blank width')).toBeCloseTo(254, 6);
    expect(store.$draft.get().sizing).toEqual(AUTHORS_SIZE);
    type('3 * inside width');
    expect(store.$played.get()).toBeNull();
    expect(cut('blank width')).toBeCloseTo(304.8, 6);
  });
  it('lights the selected measure first, then what follows it', () => {
    store.select('inside width');
    expect(store.$litNames.get()).toEqual(['inside width', 'blank width']);
    store.select(null);
    expect(store.$litNames.get()).toEqual([]);
  });
  it('renames a measure in pattern, size and write-up at once, and takes all three back with one undo', () => {
    store.editSizing(null, (sizing) => ({ ...sizing, values: { 'inside width': 127 } }));
    store.select('blank width');
    const before = store.$state.get();
    // Columns and sizes read the inside width alone; the step says the blank width.
    expect(store.rename({ what: 'measure', from: 'blank width', to: ' sheet  width ' })).toEqual({
      ok: true,
      value: { formulas: 0, fits: 0, steps: 1, others: 0 },
    });
    expect(formulas()).toEqual(['sheet width']);
    expect([cut('blank width'), store.$selected.get()]).toEqual([undefined, 'sheet width']);
    expect(cut('sheet width')).toBeCloseTo(254, 6);
    store.rename({ what: 'measure', from: 'inside width', to: 'clear width' });
    expect(store.$draft.get().sizing.values).toEqual({ 'clear width': 127 });
    store.undo();
    store.undo();
    expect(store.$state.get()).toEqual(before);
    expect([store.$renamed.get(), store.$selected.get()]).toEqual([before.writeUp, 'blank width']);
    store.redo();
    expect(formulas()).toEqual(['sheet width']);
    expect(store.$draft.get().pattern.measures[2]?.name).toBe('sheet width');
  });
  it('keeps what was written after a renaming that is undone', () => {
    store.rename({ what: 'measure', from: 'blank width', to: 'sheet' });
    store.setWriteUp(writeUpOf(...store.$writeUp.get().doc.content, { type: 'cutList' }));
    store.undo();
    expect(formulas()).toEqual(['blank width']);
    expect(store.$writeUp.get().doc.content.at(-1)).toEqual({ type: 'cutList' });
  });
  it('changes nothing when a name is refused', () => {
    const before = store.$state.get();
    const refused = store.rename({ what: 'measure', from: 'blank width', to: 'Inside height' });
    expect(refused).toMatchObject({ ok: false, faults: [{ code: 'rename taken' }] });
    expect([store.$state.get(), store.$history.get().past]).toEqual([before, []]);
  });
});
