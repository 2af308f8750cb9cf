import { readFileSync } from 'node:fs';
import { beforeEach, describe, expect, it } from 'vitest';
import type { Pattern } from '@/engine';
import { createPerson, type Person } from '@/features/accounts/people.server';
import type { ShelfPattern } from '@/features/projects/pattern-shelf.server';
import { projectStateSchema } from '@/features/projects/project-input';
import { openProject } from '@/features/projects/projects.server';
import { testDatabase } from '../setup/test-database';
import { call, cast } from './harness';
import { FOLDER } from './published-project';

let ines: Person;
let wenna: Person;
beforeEach(async () => {
  testDatabase();
  ines = (await cast()).author;
  const made = await createPerson({ email: 'wenna@quilletlane.example', name: 'Wenna Tolliver', role: 'author' });
  if (!made.ok) throw new Error(made.sentence);
  wenna = made.person;
});

const keep = (body: unknown, query = '', as = ines) => call('POST', `/api/patterns${query}`, { as, body });
const shelf = async (as = ines) =>
  ((await (await call('GET', '/api/patterns', { as })).json()) as { patterns: ShelfPattern[] }).patterns;
const idOf = async (response: Response) => ((await response.json()) as { id: string }).id;
interface Problem {
  readonly code: string;
  readonly detail: string;
  readonly errors: readonly { readonly where: string; readonly sentence: string }[];
}
const problem = async (response: Response) => (await response.json()) as Problem;

describe('an author’s own pattern', () => {
  it('is kept, stands on the shelf, makes projects, and goes out as the file that came in', async () => {
    const id = await idOf(await keep({ $schema: 'https://foldwright.example/pattern.schema.json', ...FOLDER }));
    expect(await shelf()).toMatchObject([{ slug: id, name: 'Folder', asks: 'inside width, inside height', own: true }]);
    const made = await call('POST', '/api/projects', { as: ines, body: { pattern: id, title: 'List folder' } });
    expect(openProject(await idOf(made), ines)?.state.pattern).toEqual(FOLDER);
    const file = await call('GET', `/api/patterns/${id}`, { as: ines });
    expect(file.headers.get('content-disposition')).toBe('attachment; filename="folder.pattern.json"');
    const { $schema, ...pattern } = (await file.json()) as Pattern & { $schema: string };
    expect([$schema.endsWith('/pattern.schema.json'), pattern]).toEqual([true, FOLDER]);
  });
  it('is the author’s alone', async () => {
    const id = await idOf(await keep(FOLDER));
    expect(await shelf(wenna)).toEqual([]);
    expect((await call('GET', `/api/patterns/${id}`, { as: wenna })).status).toBe(404);
    expect((await call('DELETE', `/api/patterns/${id}`, { as: wenna })).status).toBe(404);
    expect((await call('POST', '/api/projects', { as: wenna, body: { pattern: id, title: 'Mine' } })).status).toBe(422);
    expect((await call('DELETE', `/api/patterns/${id}`, { as: ines })).status).toBe(200);
    expect(await shelf()).toEqual([]);
  });
  it('is replaced only when that is asked for', async () => {
    const id = await idOf(await keep(FOLDER));
    const other = { ...FOLDER, name: 'folder', summary: 'Folded twice.' };
    const refused = await keep(other);
    expect([refused.status, (await problem(refused)).code]).toEqual([409, 'name-taken']);
    expect((await shelf())[0]?.summary).toBe('A card folded once.');
    expect(await (await keep(other, '?replace=yes')).json()).toEqual({ id, replaced: true });
    expect((await shelf())[0]?.summary).toBe('Folded twice.');
  });
  it('that cannot be used is refused with the place and the cure of every fault', async () => {
    const measures = [...FOLDER.measures, { name: 'rib', formula: 'inside widht / 2' }];
    const refused = await problem(await keep({ ...FOLDER, measures }));
    expect(refused.errors).toEqual([
      { where: 'measure “rib”', sentence: 'No measure is called “inside widht”. The nearest name is “inside width”.' },
    ]);
    const misspelt = await problem(await keep({ ...FOLDER, measurs: [] }));
    expect(misspelt.errors[0]).toEqual({
      where: 'the pattern',
      sentence: 'A field called “measurs”. The nearest is “measures”.',
    });
    expect(await shelf()).toEqual([]);
  });
  it('is refused when it is too large or nothing like a pattern', async () => {
    // 600 000 letters are more than 512 kB.
    expect((await keep({ ...FOLDER, summary: 'x'.repeat(600_000) })).status).toBe(413);
    expect((await keep([])).status).toBe(422);
    expect((await keep({ __proto__: null, format: 2 })).status).toBe(422);
  });
});

it('a project begins from blank with the card’s thickness alone', async () => {
  const made = await call('POST', '/api/projects', { as: ines, body: { pattern: 'blank', title: 'My own tray' } });
  const state = openProject(await idOf(made), ines)?.state;
  expect(state?.pattern).toMatchObject({ name: 'My own tray', slug: 'my-own-tray', pieces: [], assembly: [] });
  expect(state?.pattern.measures.map(({ name }) => name)).toEqual(['card thickness']);
  // What it begins with can be saved again as it is.
  expect(projectStateSchema.safeParse(state).success).toBe(true);
});

it('a pattern of ours goes out as a file too', async () => {
  const { $schema: _, ...tray } = (await (await call('GET', '/api/patterns/tray', { as: ines })).json()) as Pattern & {
    $schema: string;
  };
  expect(tray).toEqual(JSON.parse(readFileSync('content/patterns/tray.json', 'utf8')));
});
