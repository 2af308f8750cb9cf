import { eq } from 'drizzle-orm';
import { beforeEach, describe, expect, it } from 'vitest';
import { db } from '@/db/client.server';
import { projects, revisions } from '@/db/schema';
import type { Person } from '@/features/accounts/people.server';
import { publishEdition } from '@/features/editions/publish.server';
import type { OpenProject, ProjectState } from '@/features/projects/project';
import { testDatabase } from '../setup/test-database';
import { call, cast, type Cast, type Method } from './harness';
import { addProject } from './published-project';

let people: Cast;
let ines: Person;
let id: string;
beforeEach(async () => {
  testDatabase();
  people = await cast();
  ines = people.author;
  id = addProject(ines.id, { slug: 'seed-list-folder' });
});

const ask = (method: Method, path = '', { revision, body }: { revision?: number; body?: unknown } = {}) =>
  call(method, `/api/projects/${id}${path}`, {
    as: ines,
    ...(body === undefined ? {} : { body }),
    ...(revision === undefined ? {} : { headers: { 'if-match': `"${revision}"` } }),
  });
const open = async () => (await (await ask('GET')).json()) as OpenProject;
const save = async (part: Partial<ProjectState>, revision: number) =>
  ask('PUT', '', { revision, body: { ...(await open()).state, ...part } });
const kept = () =>
  db
    .select()
    .from(revisions)
    .where(eq(revisions.projectId, id))
    .orderBy(revisions.n)
    .all()
    .map(({ n, kind, savedBy, state }) => ({ n, kind, savedBy, title: state.title }));

describe('revisions', () => {
  it('are kept with every save, the first one too, with who saved it', async () => {
    await save({ title: 'One' }, 1);
    await call('PUT', `/api/projects/${id}`, {
      as: people.admin,
      headers: { 'if-match': '"2"' },
      body: { ...(await open()).state, title: 'Two' },
    });
    expect(kept()).toEqual([
      { n: 1, kind: 'saved', savedBy: ines.id, title: 'Seed list folder' },
      { n: 2, kind: 'saved', savedBy: ines.id, title: 'One' },
      { n: 3, kind: 'saved', savedBy: people.admin.id, title: 'Two' },
    ]);
  });
  it('are listed newest first, with names and without their states', async () => {
    await save({ title: 'One' }, 1);
    const answer = (await (await ask('GET', '/revisions')).json()) as { revisions: Record<string, unknown>[] };
    expect(answer.revisions.map(({ n, kind, savedBy }) => ({ n, kind, savedBy }))).toEqual([
      { n: 2, kind: 'saved', savedBy: { id: ines.id, name: 'A test author' } },
      { n: 1, kind: 'saved', savedBy: { id: ines.id, name: 'A test author' } },
    ]);
    expect(Object.keys(answer.revisions[0] ?? {})).not.toContain('state');
    const older = (await (await ask('GET', '/revisions?before=2')).json()) as { revisions: { n: number }[] };
    expect(older.revisions.map(({ n }) => n)).toEqual([1]);
    expect((await ask('GET', '/revisions?before=x')).status).toBe(400);
  });
  it('are restored as a new one, and what stood there stays', async () => {
    await save({ title: 'One', summary: 'Not this' }, 1);
    const answer = await ask('POST', '/revisions/1/restore', { revision: 2 });
    expect([answer.status, answer.headers.get('etag')]).toEqual([200, '"3"']);
    expect((await open()).state).toMatchObject({ title: 'Seed list folder', summary: 'Keeps a season of lists.' });
    expect(kept().map(({ n, kind, title }) => [n, kind, title])).toEqual([
      [1, 'saved', 'Seed list folder'],
      [2, 'saved', 'One'],
      [3, 'restored', 'Seed list folder'],
    ]);
  });
  it('are not restored over a save that nobody has seen', async () => {
    await save({ title: 'One' }, 1);
    expect((await ask('POST', '/revisions/1/restore', { revision: 1 })).status).toBe(412);
    expect((await open()).state.title).toBe('One');
  });
  it.each(['99', '0', '-1', 'one', '1e3', '1;drop'])('numbered %s are not there', async (n) => {
    const answer = await ask('GET', `/revisions/${encodeURIComponent(n)}`);
    expect([answer.status, ((await answer.json()) as { code: string }).code]).toEqual([404, 'no-such-revision']);
    expect((await ask('POST', `/revisions/${encodeURIComponent(n)}/restore`, { revision: 1 })).status).toBe(404);
  });
  it('that were published are marked so', async () => {
    await save({ title: 'One' }, 1);
    publishEdition(id, { by: ines.id, revision: 2 });
    expect(kept().map(({ n, kind }) => [n, kind])).toEqual([
      [1, 'saved'],
      [2, 'published'],
    ]);
  });
  it('of two versions put together hold the one that gave way, and what came out', async () => {
    await save({ title: 'Theirs' }, 1);
    const { state } = await open();
    const answer = await ask('POST', '/merge', {
      revision: 2,
      body: { state: { ...state, summary: 'Both' }, setAside: { ...state, title: 'Mine', summary: 'Both' } },
    });
    expect([answer.status, await answer.json()]).toEqual([200, expect.objectContaining({ revision: 4 })]);
    expect(kept().map(({ n, kind, title }) => [n, kind, title])).toEqual([
      [1, 'saved', 'Seed list folder'],
      [2, 'saved', 'Theirs'],
      [3, 'set aside', 'Mine'],
      [4, 'merged', 'Theirs'],
    ]);
    expect(await open()).toMatchObject({ revision: 4, state: { title: 'Theirs', summary: 'Both' } });
  });
  it('are thinned when there are many, and the newest stays', async () => {
    // A save every minute, a year ago: all of one day fall into one span.
    const day = Date.UTC(2025, 0, 1, 12);
    const { state } = await open();
    for (let n = 1; n < 39; n += 1)
      db.insert(revisions)
        .values({ projectId: id, n, state, savedBy: ines.id, savedAt: new Date(day + n * 60_000) })
        .run();
    db.update(projects).set({ revision: 39 }).where(eq(projects.id, id)).run();
    await save({ title: 'Forty' }, 39);
    // 38 and 39 stay: the last of that day, and what stood there before this save; 40 is the newest.
    expect(kept().map(({ n }) => n)).toEqual([38, 39, 40]);
  });
  it('of a project that was never changed since the site began to keep them are there at the first save', async () => {
    expect(kept()).toEqual([]);
    await save({ title: 'One' }, 1);
    expect(kept()[0]).toMatchObject({ n: 1, title: 'Seed list folder' });
  });
});

describe('asking for a project', () => {
  it('answers 304 while the revision is the one that is known', async () => {
    const asked = (revision: number) =>
      call('GET', `/api/projects/${id}`, { as: ines, headers: { 'if-none-match': `"${revision}"` } });
    expect((await asked(1)).status).toBe(304);
    await save({ title: 'One' }, 1);
    expect((await asked(1)).status).toBe(200);
  });
});

describe('hostile JSON', () => {
  const state = async () => (await open()).state;
  /** Sent as text: what lies so deep cannot be written by `JSON.stringify`. */
  const DEEP = `${'{"a":'.repeat(50_000)}1${'}'.repeat(50_000)}`;
  const send = (method: Method, path: string, body: unknown) =>
    call(method, `/api/projects/${id}${path}`, {
      as: ines,
      headers: { 'if-match': '"1"', 'content-type': 'application/json' },
      body: JSON.stringify(body).replace('"DEEP"', () => DEEP),
    });
  const stored = () => db.select().from(projects).where(eq(projects.id, id)).get();

  it.each<[string, (good: ProjectState) => unknown]>([
    ['__proto__ in the state', () => JSON.parse('{"__proto__": {"title": "x"}, "title": "y"}')],
    ['a pattern that lies thousands deep', (good) => ({ ...good, pattern: 'DEEP' })],
    ['a write-up that lies thousands deep', (good) => ({ ...good, writeUp: { version: 1, doc: 'DEEP' } })],
    [
      'a part of the text editor that is none of ours',
      (good) => ({ ...good, writeUp: { version: 1, doc: { type: 'doc', content: [{ type: 'iframe' }] } } }),
    ],
    [
      'a link that would run a script',
      (good) => ({
        ...good,
        writeUp: {
          version: 1,
          doc: {
            type: 'doc',
            content: [
              {
                type: 'paragraph',
                content: [
                  { type: 'text', text: 'x', marks: [{ type: 'link', attrs: { href: 'javascript:alert(1)' } }] },
                ],
              },
            ],
          },
        },
      }),
    ],
    ['numbers that are none', (good) => ({ ...good, sizing: { ...good.sizing, values: { a: 'Infinity' } } })],
    ['a list for a name', (good) => ({ ...good, title: ['x'] })],
    [
      'more measures than a pattern may have',
      (good) => ({
        ...good,
        pattern: {
          ...good.pattern,
          measures: Array.from({ length: 20_000 }, (_, i) => ({ name: `m${i}`, formula: '1' })),
        },
      }),
    ],
  ])('%s is refused, and nothing of it is stored', async (_, spoil) => {
    const answer = await send('PUT', '', spoil(await state()));
    expect([413, 422]).toContain(answer.status);
    expect(stored()).toMatchObject({ revision: 1, title: 'Seed list folder' });
    expect(kept()).toEqual([]);
    const aside = await send('POST', '/merge', { state: await state(), setAside: spoil(await state()) });
    expect([413, 422]).toContain(aside.status);
    expect(kept()).toEqual([]);
  });
  it.each([
    '<script>alert(1)</script>',
    '"><img src=x onerror=alert(1)>',
    "'); DROP TABLE revision; --",
    '${7*7}{{7*7}}',
    '\u0000\u202e',
  ])('a title such as %j is kept as text and never more', async (title) => {
    expect((await save({ title }, 1)).status).toBe(200);
    expect(stored()?.title).toBe(title);
    expect(kept()[1]?.title).toBe(title);
    const answer = await ask('GET');
    expect(answer.headers.get('content-type')).toBe('application/json; charset=utf-8');
  });
  it('fields that nobody knows are not stored', async () => {
    const body = { ...(await state()), authorId: people.admin.id, publishedRevision: 1, role: 'admin' };
    expect((await ask('PUT', '', { revision: 1, body })).status).toBe(200);
    expect(stored()).toMatchObject({ authorId: ines.id, publishedRevision: null });
    expect(Object.keys(kept()[1] ?? {})).not.toContain('role');
    const row = db.select().from(revisions).where(eq(revisions.n, 2)).get();
    expect(Object.keys(row?.state ?? {}).sort()).toEqual([
      'hero',
      'minutes',
      'pattern',
      'sizing',
      'summary',
      'title',
      'writeUp',
    ]);
  });
  it('a formula is data: whatever it says, nothing runs', async () => {
    const { pattern } = await state();
    const formulas = ['process.exit(1)', 'constructor.constructor("return 1")()', '`${globalThis}`', 'a = 1; b'];
    const measures = [...pattern.measures, ...formulas.map((formula, i) => ({ name: `odd ${i}`, formula }))];
    expect((await save({ pattern: { ...pattern, measures } }, 1)).status).toBe(200);
    const refused = await ask('POST', '/publish', { body: { revision: 2 } });
    expect([refused.status, ((await refused.json()) as { code: string }).code]).toEqual([422, 'proof-blocks']);
  });
});
