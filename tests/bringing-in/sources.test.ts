import { beforeEach, expect, it } from 'vitest';
import type { KeptSource } from '@/features/bringing-in/source';
import { createPerson, type Person } from '@/features/accounts/people.server';
import { call, cast, type Call, type Cast, type Method } from '../server/harness';
import { addProject } from '../server/published-project';
import { testDatabase } from '../setup/test-database';

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
  call(method, `/api/projects/${id}/sources${path}`, { as: ines, ...options });
const talk = { name: 'talk.vtt', kind: 'webvtt', text: 'WEBVTT\n\n00:01.000 --> 00:02.000\nÄ lid.\n' };
const keep = async (source: unknown = talk) =>
  (await (await ask('POST', '', { body: source })).json()) as { id: string };
const list = async () => ((await (await ask('GET')).json()) as { sources: readonly KeptSource[] }).sources;

it('keeps an original as it was brought in, once', async () => {
  const { id: source } = await keep();
  expect(await keep({ ...talk, name: 'again.vtt' })).toEqual({ id: source });
  expect(await list()).toMatchObject([
    { id: source, name: 'talk.vtt', kind: 'webvtt', characters: [...talk.text].length },
  ]);
  expect(await (await ask('GET', `/${source}`)).json()).toEqual({ text: talk.text });
});

it('forgets it on wish', async () => {
  const { id: source } = await keep();
  expect(await (await ask('DELETE', `/${source}`)).json()).toEqual({ sources: [] });
  expect((await ask('GET', `/${source}`)).status).toBe(404);
});

it('shows it to nobody else, whoever knows its id', async () => {
  const { id: source } = await keep();
  const made = await createPerson({ email: 'odo@quilletlane.example', name: 'Odo', role: 'author' });
  const odo = made.ok ? made.person : null;
  for (const as of [odo, people.reader, null]) {
    const answer = await ask('GET', `/${source}`, { as });
    expect([401, 403, 404]).toContain(answer.status);
    expect(await answer.text()).not.toContain('lid');
  }
  const other = addProject(ines.id, { slug: 'another-box' });
  expect((await call('GET', `/api/projects/${other}/sources/${source}`, { as: ines })).status).toBe(404);
});

it('refuses what is no text of a known kind, and more than a project keeps', async () => {
  expect((await ask('POST', '', { body: { ...talk, kind: 'docx' } })).status).toBe(422);
  expect((await ask('POST', '', { body: { ...talk, text: '' } })).status).toBe(422);
  for (let n = 0; n < 30; n += 1) await keep({ ...talk, text: `Lid ${n}.` });
  expect((await ask('POST', '', { body: talk })).status).toBe(409);
});
