import { describe, expect, it } from 'vitest';
import { compilePattern, type Rename } from '@/engine';
import type { ProjectState } from '@/features/projects/project';
import { proofList } from '@/features/projects/proof';
import { renamedWords, renameInProject } from '@/features/projects/rename';
import { FOLDER, ONE_STEP, writeUpOf } from '../server/published-project';

const width: Rename = { what: 'measure', from: 'inside width', to: 'clear width' };
const state: ProjectState = {
  title: 'Folder',
  summary: 'Keeps lists.',
  minutes: null,
  hero: null,
  pattern: FOLDER,
  sizing: { values: { 'inside width': 127 }, choices: {}, units: 'in', grid: '1/16in' },
  writeUp: writeUpOf(
    { type: 'paragraph', content: [{ type: 'measure', attrs: { formula: 'inside width', bare: false } }] },
    ...ONE_STEP.doc.content,
  ),
};
const renamed = (rename: Rename, from = state) => {
  const result = renameInProject(from, rename);
  if (!result.ok) throw new Error(result.faults[0]!.found);
  return result.value;
};

describe('renaming in a project', () => {
  it('changes pattern, author’s size and write-up together, so that nothing is left to mend', () => {
    const { state: after } = renamed(width);
    expect(after.sizing.values).toEqual({ 'clear width': 127 });
    expect(JSON.stringify([after.pattern, after.writeUp])).not.toContain('inside width');
    expect(compilePattern(after.pattern).ok).toBe(true);
    expect(proofList(after).filter((item) => item.blocking)).toEqual([]);
    expect(after).toMatchObject({ title: 'Folder', summary: 'Keeps lists.', minutes: null, hero: null });
  });
  it('counts what followed', () => {
    // Formulas: blank width, both columns, one inside and one outside size; the fit's right side; the paragraph before the step.
    expect(renamed(width).places).toEqual({ formulas: 5, fits: 1, steps: 0, others: 1 });
    expect(renamed({ ...width, from: 'blank width', to: 'sheet' }).places).toEqual({
      formulas: 0,
      fits: 0,
      steps: 1,
      others: 0,
    });
  });
  it('lets a question that was made from the name follow it, and leaves one that was worded', () => {
    const asked = (question: string) => ({
      ...state,
      pattern: {
        ...FOLDER,
        measures: FOLDER.measures.map((measure) =>
          measure.name === 'inside width' && measure.ask ? { ...measure, ask: { ...measure.ask, question } } : measure,
        ),
      },
    });
    const after = (question: string) => renamed(width, asked(question)).state.pattern.measures[0]?.ask?.question;
    expect(after('How much is the inside width?')).toBe('How much is the clear width?');
    expect(after('How wide is the inside width?')).toBe('How wide is the inside width?');
  });
  it('changes nothing when it is refused', () => {
    expect(renameInProject(state, { ...width, to: 'blank width' })).toMatchObject({
      ok: false,
      faults: [{ code: 'rename taken' }],
    });
    const stray = writeUpOf({
      type: 'paragraph',
      content: [{ type: 'measure', attrs: { formula: '#', bare: false } }],
    });
    expect(renameInProject({ ...state, writeUp: stray }, width)).toMatchObject({
      ok: false,
      faults: [{ code: 'formula stray mark', where: 'write-up, outside the steps' }],
    });
  });
  it.each([
    [{ formulas: 7, fits: 2, steps: 3, others: 0 }, 'Renamed in 7 formulas, 2 fits and 3 steps.'],
    [{ formulas: 1, fits: 0, steps: 0, others: 0 }, 'Renamed in 1 formula.'],
    [{ formulas: 0, fits: 1, steps: 1, others: 2 }, 'Renamed in 1 fit, 1 step and 2 other places of the text.'],
    [{ formulas: 0, fits: 0, steps: 0, others: 1 }, 'Renamed in 1 place of the text.'],
    [{ formulas: 0, fits: 0, steps: 0, others: 0 }, 'Renamed; nothing else spoke of it.'],
  ])('says of %j “%s”', (places, words) => expect(renamedWords(places)).toBe(words));
});
