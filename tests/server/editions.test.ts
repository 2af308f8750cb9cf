import { eq } from 'drizzle-orm';
import { afterEach, beforeEach, describe, expect, test, vi } from 'vitest';
import { db } from '@/db/client.server';
import { editions, projects } from '@/db/schema';
import {
  countByGroup,
  countPublished,
  editionHistory,
  getEdition,
  listPublished,
} from '@/features/editions/editions.server';
import { publishEdition, type PublishOutcome } from '@/features/editions/publish.server';
import { testDatabase } from '../setup/test-database';
import { addPerson, addProject, addUpload, FOLDER, ONE_STEP, writeUpOf } from './published-project';

let author: string;
beforeEach(() => {
  // Each publishing a second after the one before, so that "newest" has one answer.
  vi.useFakeTimers({ toFake: ['Date'], now: new Date('2026-03-01T09:00:00Z') });
  testDatabase();
  author = addPerson('Ines Thornbury');
});
afterEach(() => {
  vi.useRealTimers();
});

const project = (id: string) => {
  const row = db.select().from(projects).where(eq(projects.id, id)).get();
  if (!row) throw new Error('There is no such project.');
  return row;
};
const publish = (id: string, note?: string, by = author) => {
  vi.advanceTimersByTime(1000);
  return publishEdition(id, { by, note, revision: project(id).revision });
};
/** What a save in the workroom does to the row. */
const save = (id: string, facts: Partial<typeof projects.$inferInsert>) =>
  db
    .update(projects)
    .set({ ...facts, revision: project(id).revision + 1 })
    .where(eq(projects.id, id))
    .run();
const slugOf = (id: string) => project(id).slug;
const refusal = (outcome: PublishOutcome) => (outcome.ok ? null : outcome.refusal.code);

describe('publishing', () => {
  test('the first edition is 1 and needs no note', () => {
    const id = addProject(author);
    const outcome = publish(id);
    expect(outcome.ok && outcome.edition.n).toBe(1);
    expect(getEdition(slugOf(id))).toMatchObject({
      n: 1,
      newest: 1,
      title: 'Seed list folder',
      author: { name: 'Ines Thornbury' },
    });
    expect(project(id).publishedRevision).toBe(project(id).revision);
  });

  test('what is edited after publishing does not show until the next edition', () => {
    const id = addProject(author);
    publish(id);
    save(id, {
      title: 'Another title',
      pattern: { ...FOLDER, name: 'Another pattern' },
      writeUp: writeUpOf(...ONE_STEP.doc.content, {
        type: 'paragraph',
        content: [{ type: 'text', text: 'Later words.' }],
      }),
      heroUploadId: addUpload(author, 'late'),
    });
    expect(getEdition(slugOf(id))).toMatchObject({
      title: 'Seed list folder',
      pattern: { name: 'Folder' },
      writeUp: ONE_STEP,
      hero: null,
    });

    publish(id, 'The title was wrong.');
    expect(getEdition(slugOf(id))).toMatchObject({
      n: 2,
      title: 'Another title',
      pattern: { name: 'Another pattern' },
      hero: { id: 'late' },
    });
    expect(getEdition(slugOf(id), 1)).toMatchObject({ n: 1, newest: 2, title: 'Seed list folder', writeUp: ONE_STEP });
  });

  test('from edition 2 on a correction note is needed, and a blank one is none', () => {
    const id = addProject(author);
    publish(id);
    save(id, { title: 'Mended' });
    const without = publish(id, '  \n ');
    expect(refusal(without)).toBe('note needed');
    expect(!without.ok && without.sentence).toBe(
      'A new edition needs a correction note. Say what changed and why it matters to someone who already cut.',
    );
    expect(publish(id, ' The lid was too tight. ').ok).toBe(true);
    expect(editionHistory(id).map(({ n, correctionNote }) => [n, correctionNote])).toEqual([
      [2, 'The lid was too tight.'],
      [1, ''],
    ]);
  });

  test('nothing is published twice: pressing the button again after nothing changed is refused', () => {
    const id = addProject(author);
    publish(id);
    expect(refusal(publish(id, 'Again.'))).toBe('nothing changed');
    expect(editionHistory(id)).toHaveLength(1);
  });

  test('a project saved elsewhere meanwhile is not published', () => {
    const id = addProject(author);
    const seen = project(id).revision;
    save(id, { title: 'Saved in another tab' });
    expect(refusal(publishEdition(id, { by: author, revision: seen }))).toBe('changed meanwhile');
    expect(getEdition(slugOf(id))).toBeNull();
  });

  test('a blocking item of the proof list keeps a project back, with the items', () => {
    const id = addProject(author, { title: ' ' });
    const outcome = publish(id);
    expect(
      !outcome.ok && outcome.refusal.code === 'proof blocks' && outcome.refusal.items.map(({ code }) => code),
    ).toEqual(['no title']);
    expect(!outcome.ok && outcome.sentence).toBe(
      'One item of the proof list keeps this from being published. Mend it, then publish.',
    );
  });

  test('a picture that is not stored keeps a project back', () => {
    const photo = { type: 'photo', attrs: { upload: 'gone', alt: 'The folder', width: 800, height: 600 } } as const;
    const id = addProject(author, { writeUp: writeUpOf(...ONE_STEP.doc.content, photo) });
    expect(refusal(publish(id))).toBe('picture missing');
    addUpload(author, 'gone');
    expect(publish(id).ok).toBe(true);
  });

  test('nobody but its author and an admin publishes a project', () => {
    const id = addProject(author);
    expect(refusal(publish(id, undefined, addPerson('Wenna Tolliver')))).toBe('not found');
    expect(refusal(publishEdition(id, { by: 'nobody', revision: 1 }))).toBe('not found');
    expect(publish(id, undefined, addPerson('Bram Quillon', 'admin')).ok).toBe(true);
  });

  test('a deleted project is not published', () => {
    const id = addProject(author, { deletedAt: new Date() });
    expect(refusal(publish(id))).toBe('not found');
  });

  test('an edition can neither be changed nor deleted', () => {
    const id = addProject(author);
    publish(id);
    expect(() => db.update(editions).set({ title: 'Rewritten' }).run()).toThrow('an edition never changes');
    expect(() => db.delete(editions).run()).toThrow('an edition is never deleted');
  });
});

describe('what readers find', () => {
  test('a draft, an unknown address, an unknown edition and a deleted project are not found', () => {
    const draft = addProject(author);
    const deleted = addProject(author);
    publish(deleted);
    db.update(projects).set({ deletedAt: new Date() }).where(eq(projects.id, deleted)).run();
    expect(getEdition(slugOf(draft))).toBeNull();
    expect(getEdition('no-such-box')).toBeNull();
    expect(getEdition(slugOf(deleted))).toBeNull();
    expect(countPublished()).toBe(0);
    const one = addProject(author);
    publish(one);
    expect(getEdition(slugOf(one), 2)).toBeNull();
  });

  test('the list has each project once, in its newest edition, the newest first', () => {
    const first = addProject(author, { title: 'First' });
    const second = addProject(author, { title: 'Second' });
    publish(first);
    publish(second);
    save(first, { title: 'First, mended' });
    publish(first, 'Mended.');
    expect(listPublished({ limit: 10 }).map(({ title, n }) => [title, n])).toEqual([
      ['First, mended', 2],
      ['Second', 1],
    ]);
    expect(listPublished({ limit: 1, offset: 1 }).map(({ title }) => title)).toEqual(['Second']);
    expect(countPublished()).toBe(2);
  });

  test('every word of a search must be found, in title, summary, author or kind of box', () => {
    const other = addPerson('Bram Quillon');
    publish(addProject(author, { title: 'Seed list folder', summary: 'Keeps lists.' }));
    publish(
      addProject(other, {
        title: 'Jar sleeve',
        summary: 'For 100% dry beans.',
        pattern: { ...FOLDER, group: 'Sleeves and drawers' },
      }),
      undefined,
      other,
    );
    const found = (query: string) => listPublished({ query, limit: 10 }).map(({ title }) => title);
    expect(found('list SEED')).toEqual(['Seed list folder']);
    expect(found('quillon jar')).toEqual(['Jar sleeve']);
    expect(found('drawers')).toEqual(['Jar sleeve']);
    expect(found('seed jar')).toEqual([]);
    expect(found('100%')).toEqual(['Jar sleeve']);
    expect(found('%')).toEqual(['Jar sleeve']);
    expect(found('_eed')).toEqual([]);
    expect(countPublished({ query: 'beans' })).toBe(1);
  });

  test('kinds of box are counted for what was searched, and kinds without a match stay with 0', () => {
    publish(addProject(author, { title: 'Seed list folder' }));
    publish(addProject(author, { title: 'Jar sleeve', pattern: { ...FOLDER, group: 'Sleeves and drawers' } }));
    expect(countByGroup()).toEqual([
      { group: 'Envelopes and pillows', count: 1 },
      { group: 'Sleeves and drawers', count: 1 },
    ]);
    expect(countByGroup('jar')).toEqual([
      { group: 'Envelopes and pillows', count: 0 },
      { group: 'Sleeves and drawers', count: 1 },
    ]);
    expect(listPublished({ groups: ['Sleeves and drawers'], limit: 10 }).map(({ title }) => title)).toEqual([
      'Jar sleeve',
    ]);
  });

  test('the projects of one pattern are found by its slug, whatever they are called', () => {
    publish(addProject(author, { title: 'Tray for lists' }));
    publish(addProject(author, { title: 'Jar sleeve', pattern: { ...FOLDER, slug: 'sleeve' } }));
    expect(listPublished({ pattern: 'sleeve', limit: 10 }).map(({ title }) => title)).toEqual(['Jar sleeve']);
    expect(countPublished({ pattern: 'folder' })).toBe(1);
    expect(listPublished({ pattern: 'no-such-pattern', limit: 10 })).toEqual([]);
  });
});
