import { beforeEach, describe, expect, it } from 'vitest';
import { db } from '@/db/client.server';
import { coAuthors, letters } from '@/db/schema';
import { deleteAccount, exportOwnData } from '@/features/accounts/account-data.server';
import { createPerson, findById, type Person } from '@/features/accounts/people.server';
import { getEdition } from '@/features/editions/editions.server';
import { projectBehindLink } from '@/features/projects/draft-links.server';
import { openProject } from '@/features/projects/projects.server';
import type { ProjectList } from '@/features/projects/project';
import type { Sharing } from '@/features/projects/sharing';
import { testDatabase } from '../setup/test-database';
import { call, cast, type Cast, type Method } from './harness';
import { addProject } from './published-project';

let people: Cast;
let ines: Person;
let wenna: Person;
let id: string;
beforeEach(async () => {
  testDatabase();
  people = await cast();
  ines = people.author;
  const made = await createPerson({ email: 'wenna@quilletlane.example', name: 'Wenna Tolliver', role: 'author' });
  if (!made.ok) throw new Error(made.sentence);
  wenna = made.person;
  id = addProject(ines.id, { slug: 'seed-list-folder' });
});

const as = (person: Person, method: Method, path: string, body?: unknown, revision?: number) =>
  call(method, `/api/projects/${id}${path}`, {
    as: person,
    ...(body === undefined ? {} : { body }),
    ...(revision === undefined ? {} : { headers: { 'if-match': `"${revision}"` } }),
  });
const code = async (answer: Response) => ((await answer.json()) as { code?: string }).code;
const invite = (email = 'Wenna@QuilletLane.example') => as(ines, 'POST', '/people', { email });
const invitation = () => db.select().from(coAuthors).get()?.id ?? '';
const answer = (person: Person, accept: boolean, of = invitation()) =>
  call('POST', `/api/invitations/${of}`, { as: person, body: { accept } });
async function share(): Promise<void> {
  await invite();
  await answer(wenna, true);
}
const titles = async (person: Person) =>
  ((await (await call('GET', '/api/projects', { as: person })).json()) as ProjectList).projects.map(
    ({ title }) => title,
  );

describe('a co-author', () => {
  it('is invited by address, gets a letter, accepts, and then has the project in the workroom', async () => {
    expect((await invite()).status).toBe(201);
    const [letter] = db.select().from(letters).all();
    expect(letter).toMatchObject({
      toAddress: 'wenna@quilletlane.example',
      subject: 'You are invited to work on a project',
    });
    expect(letter?.text).toContain('A test author invites you to work on “Seed list folder”');
    // Until it is accepted nothing is open.
    expect([(await as(wenna, 'GET', '')).status, await titles(wenna)]).toEqual([404, []]);
    expect(await (await answer(wenna, true)).json()).toEqual({ project: id });
    expect([(await as(wenna, 'GET', '')).status, await titles(wenna)]).toEqual([200, ['Seed list folder']]);
    expect(await titles(ines)).toEqual(['Seed list folder']);
  });
  it('may change and publish it', async () => {
    await share();
    const { state } = openProject(id, wenna) ?? {};
    expect((await as(wenna, 'PUT', '', { ...state, title: 'Ours' }, 1)).status).toBe(200);
    expect((await as(wenna, 'POST', '/publish', { revision: 2 })).status).toBe(201);
    expect(getEdition('seed-list-folder')).toMatchObject({ title: 'Ours', author: { id: ines.id } });
  });
  it('may not delete, move, withdraw, invite or tell subscribers', async () => {
    await share();
    await as(ines, 'POST', '/publish', { revision: 1 });
    for (const [method, path, body] of [
      ['DELETE', '', undefined],
      ['PUT', '/address', { slug: 'taken-over' }],
      ['PUT', '/withdrawal', { reason: 'x' }],
      ['DELETE', '/withdrawal', undefined],
      ['POST', '/people', { email: 'odo@quilletlane.example' }],
    ] as const) {
      const refused = await as(wenna, method, path, body);
      expect([method, path, refused.status, await code(refused)]).toEqual([method, path, 403, 'owner-only']);
    }
    const { mailingOfNewest } = await import('@/features/mailing/mailings.server');
    expect(mailingOfNewest(id, wenna)).toBeNull();
    expect(mailingOfNewest(id, ines)).not.toBeNull();
  });
  it('is taken out by the owner, or leaves, and then has no part in it', async () => {
    await share();
    expect((await as(ines, 'DELETE', `/people/${invitation()}`)).status).toBe(200);
    expect((await as(wenna, 'GET', '')).status).toBe(404);
    await share();
    expect((await as(wenna, 'DELETE', `/people/${invitation()}`)).status).toBe(200);
    expect(openProject(id, wenna)).toBeNull();
  });
  it('cannot take out anybody else, or see who else is invited', async () => {
    await share();
    await invite('odo@quilletlane.example');
    const odo =
      db
        .select()
        .from(coAuthors)
        .all()
        .find(({ emailKey }) => emailKey.startsWith('odo'))?.id ?? '';
    expect((await as(wenna, 'DELETE', `/people/${odo}`)).status).toBe(404);
    const seen = (await (await as(wenna, 'GET', '/people')).json()) as Sharing;
    expect(seen.people.map(({ name }) => name)).toEqual(['Wenna Tolliver']);
    const owners = (await (await as(ines, 'GET', '/people')).json()) as Sharing;
    expect(owners.people.map(({ name, state }) => [name, state])).toEqual([
      ['Wenna Tolliver', 'accepted'],
      ['odo@quilletlane.example', 'invited'],
    ]);
  });
});

describe('an invitation', () => {
  it('answers the same whether anybody has the address, and writes only to authors', async () => {
    const known = await (await invite()).text();
    const unknown = await (await invite('nobody@quilletlane.example')).text();
    const reader = await invite('reader@quilletlane.example');
    expect([reader.status, known.includes('wenna'), unknown.includes('nobody')]).toEqual([201, true, true]);
    expect(
      db
        .select()
        .from(letters)
        .all()
        .map(({ toAddress }) => toAddress),
    ).toEqual(['wenna@quilletlane.example']);
  });
  it('is nobody’s but its address’s', async () => {
    await invite();
    expect((await answer(people.admin, true)).status).toBe(404);
    expect((await answer(ines, true)).status).toBe(404);
    expect(openProject(id, wenna)).toBeNull();
  });
  it('can be declined, and is taken once', async () => {
    await invite();
    const first = invitation();
    expect((await answer(wenna, false, first)).status).toBe(200);
    expect((await answer(wenna, true, first)).status).toBe(404);
    await share();
    expect((await answer(wenna, true)).status).toBe(404);
  });
  it.each([
    ['no address', 'wenna', 'no-address'],
    ['the owner’s own', 'author@quilletlane.example', 'owner'],
  ])('to %s is refused', async (_, email, expected) => {
    const refused = await invite(email);
    expect([refused.status, await code(refused)]).toEqual([422, expected]);
  });
  it('is not sent twice', async () => {
    await invite();
    expect(await code(await invite())).toBe('already');
    expect(db.select().from(letters).all()).toHaveLength(1);
  });
});

describe('an account that is deleted', () => {
  it('leaves a shared draft to the co-author who came first', async () => {
    await share();
    expect((await deleteAccount(ines, { keepName: false })).ok).toBe(true);
    expect(openProject(id, wenna)).toMatchObject({ standing: 'owner', author: { id: wenna.id } });
    expect(db.select().from(coAuthors).all()).toEqual([]);
  });
  it('of a co-author leaves the project to its owner, and their part is gone', async () => {
    await share();
    const { state } = openProject(id, wenna) ?? {};
    await as(wenna, 'PUT', '', { ...state, title: 'Ours' }, 1);
    expect((await deleteAccount(wenna, { keepName: false })).ok).toBe(true);
    expect(db.select().from(coAuthors).all()).toEqual([]);
    expect(openProject(id, ines)?.state.title).toBe('Ours');
    expect(findById(wenna.id)).toBeUndefined();
  });
  it('is exported with the revisions of its own projects and the projects that are shared with it', async () => {
    await share();
    const { state } = openProject(id, wenna) ?? {};
    await as(wenna, 'PUT', '', { ...state, title: 'Ours' }, 1);
    expect(exportOwnData(ines).revisions.map(({ n }) => n)).toEqual([1, 2]);
    expect(exportOwnData(wenna).sharedWithMe.map(({ title }) => title)).toEqual(['Ours']);
    expect(exportOwnData(wenna).revisions).toEqual([]);
  });
});

describe('a draft link', () => {
  const make = async () =>
    (await (await as(ines, 'POST', '/links', { label: 'For Odo' })).json()) as {
      link: string;
      links: Sharing['links'];
    };
  const token = (link: string) => link.split('/draft/')[1] ?? '';

  it('opens the project as it is saved now, until it is stopped', async () => {
    const { link, links } = await make();
    expect(token(link)).toMatch(/^[\w-]{43}$/);
    expect(projectBehindLink(token(link))).toMatchObject({ id, title: 'Seed list folder' });
    await as(ines, 'PUT', '', { ...openProject(id, ines)?.state, title: 'Later' }, 1);
    expect(projectBehindLink(token(link))?.title).toBe('Later');
    expect((await as(ines, 'DELETE', `/links/${links[0]?.id}`)).status).toBe(200);
    expect(projectBehindLink(token(link))).toBeNull();
  });
  it('is not kept as it is, and not told again', async () => {
    const { link } = await make();
    const { draftLinks } = await import('@/db/schema');
    expect(JSON.stringify(db.select().from(draftLinks).all())).not.toContain(token(link));
    expect(await (await as(ines, 'GET', '/people')).text()).not.toContain(token(link));
  });
  it('does not open a project that was deleted', async () => {
    const { link } = await make();
    await as(ines, 'DELETE', '');
    expect(projectBehindLink(token(link))).toBeNull();
  });
  it.each(['', 'x', '../../etc/passwd', "' or 1=1 --", 'A'.repeat(43), 'A'.repeat(5000)])(
    '%j opens nothing',
    async (odd) => {
      await make();
      expect(projectBehindLink(odd)).toBeNull();
    },
  );
  it('of another project cannot be stopped from here', async () => {
    const { links } = await make();
    const other = addProject(wenna.id);
    const answered = await call('DELETE', `/api/projects/${other}/links/${links[0]?.id}`, { as: wenna });
    expect(answered.status).toBe(404);
  });
});
