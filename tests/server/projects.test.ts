import { eq } from 'drizzle-orm';
import { beforeEach, describe, expect, it } from 'vitest';
import { db } from '@/db/client.server';
import { editions, projects } from '@/db/schema';
import type { OpenProject, ProjectList, ProjectState } from '@/features/projects/project';
import { setRole } from '@/features/accounts/people.server';
import type { Person } from '@/features/accounts/people.server';
import { insteadOf } from '@/features/editions/withdrawal.server';
import { testDatabase } from '../setup/test-database';
import { call, cast, type Call, type Cast, type Method } from './harness';
import { addPerson, addProject, addUpload, FOLDER, writeUpOf } from './published-project';

let people: Cast;
let ines: Person;
let id: string;

beforeEach(async () => {
  testDatabase();
  people = await cast();
  ines = people.author;
  id = addProject(ines.id, { slug: 'seed-list-folder' });
});

const ask = (method: Method, path = '', options: Call = {}) =>
  call(method, `/api/projects/${id}${path}`, { as: ines, ...options });
const open = async () => (await (await ask('GET')).json()) as OpenProject;
const save = (state: unknown, revision: number | null, options: Call & { query?: string } = {}) =>
  ask('PUT', options.query ?? '', {
    body: state,
    headers: revision === null ? {} : { 'if-match': `"${revision}"` },
    ...options,
  });
const stored = (of = id) => db.select().from(projects).where(eq(projects.id, of)).get();
const titles = async (as = ines) =>
  ((await (await call('GET', '/api/projects', { as })).json()) as ProjectList).projects.map((project) => project.title);
const change = async (part: Partial<ProjectState>) => ({ ...(await open()).state, ...part });

describe('saving a project', () => {
  it('raises the revision and names it in ETag', async () => {
    const answer = await save(await change({ title: 'List folder' }), 1);
    expect([answer.status, answer.headers.get('etag')]).toEqual([200, '"2"']);
    expect(await answer.json()).toMatchObject({ revision: 2 });
    expect(stored()).toMatchObject({ title: 'List folder', revision: 2 });
  });
  it('gives back what was saved', async () => {
    const state = await change({
      summary: 'Ä summary',
      minutes: 35,
      sizing: { values: { 'inside width': 101.6 }, choices: {}, units: 'mm', grid: '1mm' },
    });
    await save(state, 1);
    expect((await open()).state).toEqual(state);
    expect((await ask('GET')).headers.get('etag')).toBe('"2"');
  });
  it('refuses a revision that is no longer the newest, writes nothing, and tells the other version', async () => {
    await save(await change({ title: 'From the first tab' }), 1);
    const answer = await save(await change({ title: 'From the second tab' }), 1);
    expect([answer.status, answer.headers.get('etag')]).toEqual([412, '"2"']);
    // HTTP tells the time to the second.
    expect(Date.parse(answer.headers.get('last-modified') ?? '')).toBe(
      Math.floor((stored()?.updatedAt.getTime() ?? 0) / 1000) * 1000,
    );
    expect(await answer.json()).toMatchObject({ code: 'changed-meanwhile' });
    expect(stored()).toMatchObject({ title: 'From the first tab', revision: 2 });
  });
  it('takes one of two saves made from the same revision', async () => {
    const [first, second] = await Promise.all([
      save(await change({ title: 'One' }), 1),
      save(await change({ title: 'Two' }), 1),
    ]);
    expect([first.status, second.status].sort()).toEqual([200, 412]);
    expect(stored()?.revision).toBe(2);
  });
  it.each([null, '*', '1', '"one"'])('asks which revision is meant when If-Match is %s', async (header) => {
    const answer = await save(await change({}), null, header === null ? {} : { headers: { 'if-match': header } });
    expect([answer.status, ((await answer.json()) as { code: string }).code]).toEqual([428, 'revision-missing']);
  });
  it('takes formulas that do not read, as they were typed', async () => {
    const measures = FOLDER.measures.map((measure) =>
      measure.name === 'blank width' ? { ...measure, formula: '2 * ( insde' } : measure,
    );
    expect((await save(await change({ pattern: { ...FOLDER, measures } }), 1)).status).toBe(200);
    expect((await open()).state.pattern.measures[2]?.formula).toBe('2 * ( insde');
  });
  it('takes an empty title and an empty formula', async () => {
    const measures = [...FOLDER.measures, { name: 'new', formula: '' }];
    expect((await save(await change({ title: '', pattern: { ...FOLDER, measures } }), 1)).status).toBe(200);
  });
});

describe('a state that does not fit', () => {
  it.each([
    ['a pattern that is none', { pattern: { name: 'Folder' } }],
    ['a field that a pattern does not have', { pattern: { ...FOLDER, script: 'x' } }],
    ['a formula that is a number', { pattern: { ...FOLDER, measures: [{ name: 'a', formula: 7 }] } }],
    [
      'an unknown part in the write-up',
      { writeUp: { version: 1, doc: { type: 'doc', content: [{ type: 'script', content: [] }] } } },
    ],
    ['a write-up of no version', { writeUp: { doc: { type: 'doc', content: [] } } }],
    [
      'a size that is no number',
      { sizing: { values: { 'inside width': 'wide' }, choices: {}, units: 'in', grid: '1/16in' } },
    ],
    ['an unknown unit', { sizing: { values: {}, choices: {}, units: 'ell', grid: '1/16in' } }],
    ['half a minute', { minutes: 0.5 }],
    ['a title longer than 120 characters', { title: 'x'.repeat(121) }],
    ['a summary longer than 300 characters', { summary: 'x'.repeat(301) }],
  ])('%s is refused and nothing is written', async (_, part) => {
    const answer = await save({ ...(await open()).state, ...part }, 1);
    expect([answer.status, ((await answer.json()) as { code: string }).code]).toEqual([422, 'does-not-fit']);
    expect(stored()?.revision).toBe(1);
  });
  it('is refused when it is larger than 2 MB', async () => {
    expect((await save({ ...(await open()).state, title: 'x'.repeat(2 * 1024 * 1024) }, 1)).status).toBe(413);
  });
  it('is refused with a first picture that is somebody else’s', async () => {
    addUpload(addPerson('Bram Quillon'), 'theirs');
    addUpload(ines.id, 'mine');
    const refused = await save(await change({ hero: 'theirs' }), 1);
    expect([refused.status, ((await refused.json()) as { code: string }).code]).toEqual([422, 'no-such-picture']);
    expect((await save(await change({ hero: 'mine' }), 1)).status).toBe(200);
  });
});

describe('somebody else’s project', () => {
  it.each<[Method, string, unknown]>([
    ['GET', '', undefined],
    ['PUT', '', {}],
    ['DELETE', '', undefined],
    ['POST', '/restore', undefined],
    ['POST', '/duplicate', {}],
    ['POST', '/publish', { revision: 1 }],
    ['PUT', '/address', { slug: 'taken-over' }],
    ['POST', '/merge', { state: {} }],
    ['GET', '/revisions', undefined],
    ['GET', '/revisions/1', undefined],
    ['POST', '/revisions/1/restore', undefined],
    ['GET', '/people', undefined],
    ['POST', '/people', { email: 'odo@quilletlane.example' }],
    ['DELETE', '/people/anybody', undefined],
    ['POST', '/links', { label: '' }],
    ['DELETE', '/links/any', undefined],
    ['GET', '/schedule', undefined],
    ['PUT', '/schedule', { revision: 1, publishAt: 1 }],
    ['DELETE', '/schedule', undefined],
    ['PUT', '/withdrawal', { reason: 'x' }],
    ['DELETE', '/withdrawal', undefined],
  ])('is not there for another author: %s %s', async (method, path, body) => {
    setRole(people.reader.id, 'author');
    const answer = await ask(method, path, {
      as: { ...people.reader, role: 'author' },
      body,
      headers: { 'if-match': '"1"' },
    });
    expect([answer.status, ((await answer.json()) as { code: string }).code]).toEqual([404, 'no-such-project']);
    expect(stored()).toMatchObject({ deletedAt: null, revision: 1, slug: 'seed-list-folder' });
  });
  it('is open to an admin and stays its author’s', async () => {
    expect((await save(await change({ title: 'Mended' }), 1, { as: people.admin })).status).toBe(200);
    expect(stored()).toMatchObject({ title: 'Mended', authorId: ines.id });
  });
  it('is in an admin’s list and in no other author’s', async () => {
    setRole(people.reader.id, 'author');
    expect(await titles()).toEqual(['Seed list folder']);
    expect(await titles({ ...people.reader, role: 'author' })).toEqual([]);
    expect(await titles(people.admin)).toEqual(['Seed list folder']);
  });
});

describe('deleting', () => {
  it('takes a project out of the list and off the desk, and restoring brings it back as it was', async () => {
    const before = stored();
    const answer = (await (await ask('DELETE')).json()) as { restore: string };
    expect(await titles()).toEqual([]);
    expect([(await ask('GET')).status, (await save({}, 1)).status, (await ask('DELETE')).status]).toEqual([
      404, 404, 404,
    ]);
    expect((await call('POST', answer.restore, { as: ines })).status).toBe(200);
    expect(stored()).toEqual(before);
    expect(await titles()).toEqual(['Seed list folder']);
  });
  it('can be undone twice without harm', async () => {
    await ask('DELETE');
    expect([(await ask('POST', '/restore')).status, (await ask('POST', '/restore')).status]).toEqual([200, 200]);
  });
});

describe('a copy', () => {
  it('is a draft of its own at an address of its own', async () => {
    const copy = (await (await ask('POST', '/duplicate', { body: {} })).json()) as { id: string; title: string };
    expect(copy.title).toBe('Seed list folder (copy)');
    expect(stored(copy.id)).toMatchObject({
      slug: 'seed-list-folder-copy',
      revision: 1,
      publishedRevision: null,
      authorId: ines.id,
      pattern: FOLDER,
    });
  });
  it('of a copy is not called a copy of a copy', async () => {
    const first = (await (await ask('POST', '/duplicate', { body: {} })).json()) as { id: string };
    const second = (await (
      await call('POST', `/api/projects/${first.id}/duplicate`, { as: ines, body: {} })
    ).json()) as { id: string; title: string };
    expect(second.title).toBe('Seed list folder (copy)');
    expect(stored(second.id)?.slug).toBe('seed-list-folder-copy-2');
  });
  it('can hold what a tab had typed when the other version is taken', async () => {
    const state = await change({ summary: 'typed here' });
    const copy = (await (await ask('POST', '/duplicate', { body: { state } })).json()) as { id: string; title: string };
    expect(copy.title).toBe('Seed list folder (from this tab)');
    expect(stored(copy.id)?.summary).toBe('typed here');
    expect(stored()?.summary).toBe('Keeps a season of lists.');
  });
});

describe('a new project', () => {
  const begin = (body: unknown) => call('POST', '/api/projects', { as: ines, body });
  it.each(['tray', 'lidded-box', 'sleeve-drawer', 'book-box'])(
    'from %s opens with its measures, usual size and steps, and nothing but advice on its proof list',
    async (pattern) => {
      const answer = await begin({ pattern, title: '  Seed box ' });
      const { id: made, slug } = (await answer.json()) as { id: string; slug: string };
      expect([answer.status, slug, answer.headers.get('location')]).toEqual([201, 'seed-box', `/workroom/${made}`]);
      expect(stored(made)).toMatchObject({
        title: 'Seed box',
        authorId: ines.id,
        revision: 1,
        publishedRevision: null,
      });
      const list = (await (await call('GET', '/api/projects', { as: ines })).json()) as ProjectList;
      const row = list.projects.find((project) => project.id === made);
      expect(row).toMatchObject({ blocking: 0, stage: { stage: 'draft' } });
      expect(row?.folded).toContain('<svg');
      const state = (await (await call('GET', `/api/projects/${made}`, { as: ines })).json()) as OpenProject;
      expect(
        (await call('PUT', `/api/projects/${made}`, { as: ines, body: state.state, headers: { 'if-match': '"1"' } }))
          .status,
      ).toBe(200);
    },
  );
  it('has an address that nobody else has', async () => {
    await begin({ pattern: 'tray', title: 'Seed box' });
    expect(await (await begin({ pattern: 'tray', title: 'Seed box' })).json()).toMatchObject({ slug: 'seed-box-2' });
  });
  it('needs a title and a pattern that exists', async () => {
    expect((await begin({ pattern: 'tray', title: ' ' })).status).toBe(422);
    expect(await (await begin({ pattern: 'hat-box', title: 'Hat box' })).json()).toMatchObject({
      code: 'no-such-pattern',
    });
  });
});

describe('the address', () => {
  const move = async (slug: string) => {
    const answer = await ask('PUT', '/address', { body: { slug } });
    return [answer.status, stored()?.slug];
  };
  it('of a draft can be changed to a free one', async () => {
    addProject(ines.id, { slug: 'seed-box' });
    expect(await move('list-folder')).toEqual([200, 'list-folder']);
    expect(await move('seed-box')).toEqual([409, 'list-folder']);
  });
  it.each(['No', 'ab', 'two  words', '-edge', 'double--hyphen', 'a/b'])('is not “%s”', async (slug) =>
    expect(await move(slug)).toEqual([422, 'seed-list-folder']),
  );
  it('of a published project leads on to the new one, with what follows it and its query', async () => {
    await ask('POST', '/publish', { body: { revision: 1 } });
    expect(await move('list-folder')).toEqual([200, 'list-folder']);
    expect(await move('folder-for-lists')).toEqual([200, 'folder-for-lists']);
    const at = (address: string) => insteadOf(new URL(address, 'http://localhost'));
    expect(at('/projects/seed-list-folder')).toEqual({ moved: '/projects/folder-for-lists' });
    expect(at('/projects/list-folder/sheet.pdf?inside-width=5in&paper=a4')).toEqual({
      moved: '/projects/folder-for-lists/sheet.pdf?inside-width=5in&paper=a4',
    });
    expect(at('/projects/folder-for-lists')).toBeNull();
  });
  it('that a published project had stays its own, and it may go back there', async () => {
    await ask('POST', '/publish', { body: { revision: 1 } });
    await move('list-folder');
    const other = addProject(ines.id, { slug: 'other' });
    const taken = await call('PUT', `/api/projects/${other}/address`, { as: ines, body: { slug: 'seed-list-folder' } });
    expect(taken.status).toBe(409);
    expect(await move('seed-list-folder')).toEqual([200, 'seed-list-folder']);
    expect(insteadOf(new URL('http://localhost/projects/seed-list-folder'))).toBeNull();
    expect(insteadOf(new URL('http://localhost/projects/list-folder'))).toEqual({
      moved: '/projects/seed-list-folder',
    });
  });
  it('of a draft is nobody’s any more once it is changed', async () => {
    await move('list-folder');
    expect(insteadOf(new URL('http://localhost/projects/seed-list-folder'))).toBeNull();
  });
});

describe('publishing from the desk', () => {
  const publish = async (body: unknown) => {
    const answer = await ask('POST', '/publish', { body });
    return {
      status: answer.status,
      ...((await answer.json()) as { n?: number; slug?: string; code?: string; errors?: unknown[]; detail?: string }),
    };
  };
  const stage = async () =>
    ((await (await call('GET', '/api/projects', { as: ines })).json()) as ProjectList).projects[0]?.stage;

  it('makes edition 1, then asks the next one for a correction note', async () => {
    expect(await publish({ revision: 1 })).toMatchObject({ status: 201, n: 1, slug: 'seed-list-folder' });
    expect(await stage()).toEqual({ stage: 'published', edition: 1 });
    await save(await change({ summary: 'Changed.' }), 1);
    expect(await stage()).toEqual({ stage: 'changed', edition: 1 });
    expect(await publish({ revision: 2 })).toMatchObject({ status: 422, code: 'note-needed' });
    expect(await publish({ revision: 2, note: 'The summary says more.' })).toMatchObject({ status: 201, n: 2 });
    expect(
      db
        .select()
        .from(editions)
        .all()
        .map((edition) => edition.correctionNote),
    ).toEqual(['', 'The summary says more.']);
  });
  it('refuses a revision that the author has not seen', async () => {
    await save(await change({ summary: 'Saved meanwhile.' }), 1);
    expect(await publish({ revision: 1 })).toMatchObject({ status: 412, code: 'changed-meanwhile' });
  });
  it('lists what keeps it from being published', async () => {
    await save(await change({ title: '', writeUp: writeUpOf({ type: 'paragraph' }) }), 1);
    const refused = await publish({ revision: 2 });
    expect(refused).toMatchObject({ status: 422, code: 'proof-blocks' });
    expect(refused.errors).toEqual([
      { where: 'Project', sentence: 'The project has no title. Give it a title: it is what readers see first.' },
      { where: 'Write-up', sentence: 'There are no steps. Put in the first step: what does the maker do first?' },
    ]);
    expect(db.select().from(editions).all()).toEqual([]);
  });
});
