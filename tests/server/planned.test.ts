import { eq } from 'drizzle-orm';
import { beforeEach, describe, expect, it } from 'vitest';
import { db } from '@/db/client.server';
import { editions, letters, schedules, uploads, users } from '@/db/schema';
import type { Person } from '@/features/accounts/people.server';
import { countPublished, getEdition, listPublished } from '@/features/editions/editions.server';
import { projectFeed } from '@/features/editions/feed.server';
import { dropPlan, plannedFor, planEdition, publishDue } from '@/features/editions/schedule.server';
import { insteadOf, withdrawnAt } from '@/features/editions/withdrawal.server';
import { openProject, saveProject } from '@/features/projects/projects.server';
import { testDatabase } from '../setup/test-database';
import { call, cast, type Cast } from './harness';
import { addProject, addUpload } from './published-project';

let people: Cast;
let ines: Person;
let id: string;
beforeEach(async () => {
  testDatabase();
  people = await cast();
  ines = people.author;
  id = addProject(ines.id, { slug: 'seed-list-folder' });
});

const NOW = Date.UTC(2031, 2, 14, 9);
const HOUR = 3_600_000;
const plan = (publishAt = NOW + HOUR, { revision = 1, note = '' } = {}) =>
  planEdition(id, ines, { revision, note, publishAt }, NOW);
const type = (title: string) => {
  const { state, revision } = openProject(id, ines) ?? {};
  if (!state || !revision) throw new Error('The project must open.');
  return saveProject(id, ines, { state: { ...state, title }, revision });
};
const numbers = () =>
  db
    .select()
    .from(editions)
    .all()
    .map(({ n, title }) => [n, title]);

describe('an edition that is planned', () => {
  it('comes out when its time has come and not before, once, in the words that were planned', () => {
    expect(plan().ok).toBe(true);
    type('Typed later');
    expect([publishDue(NOW + HOUR - 1), numbers()]).toEqual([0, []]);
    expect([publishDue(NOW + HOUR), publishDue(NOW + HOUR)]).toEqual([1, 0]);
    expect(numbers()).toEqual([[1, 'Seed list folder']]);
    expect(getEdition('seed-list-folder')?.publishedAt.getTime()).toBe(NOW + HOUR);
    expect(openProject(id, ines)?.stage).toEqual({ stage: 'changed', edition: 1 });
    expect(plannedFor(id, ines)).toBeNull();
    expect(
      db
        .select()
        .from(letters)
        .all()
        .map(({ subject }) => subject),
    ).toEqual(['“Seed list folder” is out']);
  });
  it('comes out late when the site was not running at its time', () => {
    plan();
    expect(publishDue(NOW + 48 * HOUR)).toBe(1);
  });
  it.each([NOW, NOW - HOUR, NOW + 400 * 24 * HOUR, Number.NaN])('is refused for the time %i', (at) => {
    expect(plan(at)).toMatchObject({ ok: false, refusal: { code: 'bad time' } });
    expect(db.select().from(schedules).all()).toEqual([]);
  });
  it('gives way to a later plan, and can be dropped', () => {
    plan(NOW + HOUR);
    plan(NOW + 2 * HOUR);
    expect(plannedFor(id, ines)).toMatchObject({ publishAt: NOW + 2 * HOUR, revision: 1 });
    expect([dropPlan(id, ines), dropPlan(id, ines), publishDue(NOW + 3 * HOUR)]).toEqual([true, false, 0]);
  });
  it('is dropped when one is published by hand first', async () => {
    plan();
    await call('POST', `/api/projects/${id}/publish`, { as: ines, body: { revision: 1 } });
    expect([publishDue(NOW + HOUR), numbers().length]).toEqual([0, 1]);
  });
  it('needs what publishing needs: nothing blocking, the newest revision, a note from the second on', () => {
    type('');
    expect(plan(NOW + HOUR, { revision: 2 })).toMatchObject({ ok: false, refusal: { code: 'proof blocks' } });
    expect(plan(NOW + HOUR, { revision: 1 })).toMatchObject({ ok: false, refusal: { code: 'changed meanwhile' } });
    type('Named again');
    plan(NOW + HOUR, { revision: 3 });
    publishDue(NOW + HOUR);
    type('Changed');
    expect(plan(NOW + HOUR, { revision: 4 })).toMatchObject({ ok: false, refusal: { code: 'note needed' } });
    expect(plan(NOW + HOUR, { revision: 4, note: 'A new name.' })).toMatchObject({ ok: true });
  });
  it('that cannot come out says why, makes nothing, and is not tried again', () => {
    addUpload(ines.id, 'gone');
    const { state } = openProject(id, ines) ?? {};
    if (!state) throw new Error('The project must open.');
    saveProject(id, ines, { state: { ...state, hero: 'gone' }, revision: 1 });
    plan(NOW + HOUR, { revision: 2 });
    db.delete(uploads).where(eq(uploads.id, 'gone')).run();
    expect([publishDue(NOW + HOUR), publishDue(NOW + 2 * HOUR), numbers()]).toEqual([0, 0, []]);
    expect(plannedFor(id, ines)?.problem).toContain('a picture that is no longer stored');
    expect(
      db
        .select()
        .from(letters)
        .all()
        .map(({ subject }) => subject),
    ).toEqual(['“Seed list folder” did not come out']);
  });
  it('does not come out once whoever planned it may no longer publish', () => {
    plan();
    db.update(users)
      .set({ disabledAt: new Date(NOW) })
      .where(eq(users.id, ines.id))
      .run();
    expect([publishDue(NOW + HOUR), numbers()]).toEqual([0, []]);
  });
});

describe('a project that is withdrawn', () => {
  const withdraw = (reason: string) => call('PUT', `/api/projects/${id}/withdrawal`, { as: ines, body: { reason } });
  beforeEach(async () => {
    await call('POST', `/api/projects/${id}/publish`, { as: ines, body: { revision: 1 } });
  });

  it('says why at its address and is in no list, feed or search', async () => {
    expect((await withdraw('  The strip is too short.  ')).status).toBe(200);
    expect(withdrawnAt('seed-list-folder')).toMatchObject({
      title: 'Seed list folder',
      reason: 'The strip is too short.',
    });
    expect(insteadOf(new URL('http://localhost/projects/seed-list-folder?units=mm'))).toEqual({
      shown: '/withdrawn/seed-list-folder',
    });
    expect([getEdition('seed-list-folder'), getEdition('seed-list-folder', 1)]).toEqual([null, null]);
    expect([listPublished({ limit: 9 }), countPublished(), projectFeed().parts]).toEqual([[], 0, []]);
  });
  it('keeps its editions as they were, and comes back', async () => {
    await withdraw('A figure is wrong.');
    expect((await call('DELETE', `/api/projects/${id}/withdrawal`, { as: ines })).status).toBe(200);
    expect(getEdition('seed-list-folder')).toMatchObject({ n: 1, title: 'Seed list folder' });
    expect(withdrawnAt('seed-list-folder')).toBeNull();
  });
  it('comes back with its next edition', async () => {
    await withdraw('A figure is wrong.');
    type('Mended');
    const done = await call('POST', `/api/projects/${id}/publish`, {
      as: ines,
      body: { revision: 2, note: 'Mended.' },
    });
    expect([done.status, getEdition('seed-list-folder')?.n]).toEqual([201, 2]);
  });
  it('needs a reason, and something published', async () => {
    expect((await withdraw('  ')).status).toBe(422);
    const draft = addProject(ines.id);
    const answer = await call('PUT', `/api/projects/${draft}/withdrawal`, { as: ines, body: { reason: 'x' } });
    expect(answer.status).toBe(409);
  });
});
