import { describe, expect, it } from 'vitest';
import { firstWriteUp } from '@/features/projects/first-write-up';
import { matchesSearch } from '@/features/projects/project';
import { freeSlug, slugOf } from '@/features/projects/project-slug';
import { differenceWords, stageOf, stageWords } from '@/features/projects/project-stage';
import { etagOf, revisionIn } from '@/features/projects/revision';
import { readWriteUp } from '@/writeup/read-write-up';
import { AUTHORS_SIZE, FOLDER, ONE_STEP, writeUpOf } from '../server/published-project';

describe('an address from a title', () => {
  it.each([
    ['Seed keeper’s book box', 'seed-keepers-book-box'],
    ['Käse & Öl: 2 × 3', 'kase-ol-2-3'],
    ['  --  ', 'project'],
    ['A', 'project-a'],
    ['盒子', 'project'],
  ])('%s gives %s', (title, slug) => expect(slugOf(title)).toBe(slug));
  it('has at most 60 characters and no hyphen at its end', () => {
    expect(slugOf(`${'a'.repeat(59)} b`)).toBe('a'.repeat(59));
  });
  it('counts up until it is free', () => {
    const taken = new Set(['seed-box', 'seed-box-2']);
    expect(freeSlug('seed-box', (slug) => taken.has(slug))).toBe('seed-box-3');
    expect(freeSlug('tray', (slug) => taken.has(slug))).toBe('tray');
  });
});

describe('where a project stands', () => {
  it.each([
    [{ revision: 4, publishedRevision: null, editions: 0 }, 'Draft, never published'],
    [{ revision: 4, publishedRevision: 4, editions: 3 }, 'Published, edition 3'],
    [{ revision: 5, publishedRevision: 4, editions: 2 }, 'Changed since edition 2'],
  ])('%o is “%s”', (project, words) => expect(stageWords(stageOf(project))).toBe(words));
});

describe('what differs from the newest edition', () => {
  const edition = { title: 'Folder', summary: 'For lists.', pattern: FOLDER, sizing: AUTHORS_SIZE, writeUp: ONE_STEP };
  it('is nothing when nothing was changed', () => expect(differenceWords(edition, { ...edition })).toBe(''));
  it('counts measures and steps', () => {
    const measures = FOLDER.measures.map((measure) =>
      measure.name === 'blank width' ? { ...measure, rounds: 'up' as const } : measure,
    );
    const [step] = ONE_STEP.doc.content;
    const now = {
      ...edition,
      pattern: { ...FOLDER, measures },
      writeUp: writeUpOf(...(step ? [step, step, step] : [])),
    };
    expect(differenceWords(edition, now)).toBe('1 measure and 2 steps differ');
  });
  it('counts what was taken out', () => {
    expect(differenceWords(edition, { ...edition, pattern: { ...FOLDER, pieces: [] } })).toBe('1 piece differs');
  });
  it('says so when one thing alone differs', () => {
    expect(differenceWords(edition, { ...edition, title: 'List folder' })).toBe('the title or summary differs');
  });
});

describe('a revision in a header', () => {
  it.each([
    ['"48"', 48],
    ['W/"48"', 48],
    [etagOf(7), 7],
    ['*', null],
    ['48', null],
    ['"x"', null],
    ['', null],
    [null, null],
  ])('%s names %s', (header, revision) => expect(revisionIn(header)).toBe(revision));
});

describe('the search', () => {
  const project = {
    title: 'Seed keeper’s box',
    patternName: 'Book box',
    words: 'Lower spine arc',
    author: { id: 'i', name: 'Ines' },
  };
  it('finds words of title, pattern, pieces and measures, whatever their case', () => {
    expect(matchesSearch(project, 'ARC keeper')).toBe(true);
    expect(matchesSearch(project, ' ')).toBe(true);
  });
  it('wants the beginning of a word, not its middle', () => {
    expect(matchesSearch(project, 'keep')).toBe(true);
    expect(matchesSearch({ ...project, words: 'card thickness' }, 'thick')).toBe(true);
    expect(matchesSearch({ ...project, words: 'card' }, 'ar')).toBe(false);
  });
  it('wants every word', () => expect(matchesSearch(project, 'arc tray')).toBe(false));
});

describe('the write-up that a project begins with', () => {
  const made = firstWriteUp({ ...FOLDER, order: ['Cut the Folder, [[blank width]] wide.', 'Fold the folder.'] });
  it('is one that the editor takes', () => expect(readWriteUp(made)).toEqual({ ok: true, value: made }));
  it('has a step for each sentence, with live measures, and shows a piece where it is first named', () => {
    expect(made.doc.content.slice(2)).toEqual([
      {
        type: 'step',
        attrs: { title: '', mark: '' },
        content: [
          {
            type: 'paragraph',
            content: [
              { type: 'text', text: 'Cut the Folder, ' },
              { type: 'measure', attrs: { formula: 'blank width', bare: false } },
              { type: 'text', text: ' wide.' },
            ],
          },
          { type: 'pieceCard', attrs: { piece: 'Folder' } },
        ],
      },
      {
        type: 'step',
        attrs: { title: '', mark: '' },
        content: [{ type: 'paragraph', content: [{ type: 'text', text: 'Fold the folder.' }] }],
      },
    ]);
  });
});
