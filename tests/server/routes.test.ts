import { beforeEach, describe, expect, it } from 'vitest';
import type { Role } from '@/db/schema';
import { accessTo, includesRole } from '@/features/accounts/access';
import { testDatabase } from '../setup/test-database';
import { call, callUnguarded, cast, METHODS, pagePaths, routeModules, type Cast } from './harness';
import { ROUTES, type RouteRow } from './routes-table';

const ROLES: readonly Role[] = ['reader', 'author', 'admin'];
const named = (row: RouteRow) => `${row.method} ${row.path}`;

let people: Cast;
beforeEach(async () => {
  testDatabase();
  people = await cast();
});

async function addressOf(row: RouteRow): Promise<string> {
  const params = (await row.prepare?.(people)) ?? {};
  return row.path.replace(/\[(\w+)\]/g, (_, name: string) => {
    const value = params[name];
    if (value === undefined)
      throw new Error(`${named(row)}: its row in tests/server/routes-table.ts needs \`prepare\` to give “${name}”.`);
    return encodeURIComponent(value);
  });
}
const fitting = ({ body, form, headers = {} }: RouteRow) => ({
  headers,
  ...(form ? { body: new FormData() } : body === undefined ? {} : { body }),
});
const mayNot = ({ who }: RouteRow) =>
  who === 'all' || who === 'this machine' ? [] : ROLES.filter((role) => !includesRole(role, who));
const may = ({ who }: RouteRow) =>
  who === 'all' || who === 'this machine' ? ROLES : ROLES.filter((role) => includesRole(role, who));

async function expectProblem(answer: Response, status: number, code?: string): Promise<void> {
  expect(answer.headers.get('content-type')).toMatch(/^application\/problem\+json/);
  const document = (await answer.json()) as { status: number; code?: string };
  expect(document).toMatchObject({ status, ...(code ? { code } : {}) });
  expect(answer.status).toBe(status);
}

describe('the table of routes', () => {
  it('has a row for every method of every file in src/pages/api, and no row without one', async () => {
    const existing: string[] = [];
    for (const [path, load] of routeModules) {
      const module = await load();
      existing.push(...METHODS.filter((method) => method in module).map((method) => `${method} ${path}`));
    }
    const listed = ROUTES.map(named);
    const missing = existing.filter((route) => !listed.includes(route));
    const gone = listed.filter((route) => !existing.includes(route));
    expect(
      missing,
      `No row for: ${missing.join(', ')}. Add one to tests/server/routes-table.ts; its head says how.`,
    ).toEqual([]);
    expect(
      gone,
      `No such route any more: ${gone.join(', ')}. Take its row out of tests/server/routes-table.ts.`,
    ).toEqual([]);
    expect(listed).toHaveLength(new Set(listed).size);
    expect(listed).toHaveLength(existing.length);
  });

  it('agrees with the table of who may go where', () => {
    const differing = ROUTES.filter(({ path, who }) => accessTo(path.replace(/\[\w+\]/g, 'x')) !== who).map(named);
    expect(differing, 'src/features/accounts/access.ts says otherwise for these').toEqual([]);
  });

  it('leaves no page or route of the site unreachable', () => {
    // The error pages are shown at other addresses.
    const pages = pagePaths.filter((path) => path !== '/404' && path !== '/500');
    const unlisted = pages.filter((path) => accessTo(path.replace(/\[[.\w]+\]/g, 'x')) === null);
    expect(unlisted, 'Add these to the table in src/features/accounts/access.ts').toEqual([]);
  });
});

describe.each(
  ROUTES.filter((row) => mayNot(row).length > 0 || row.who === 'reader').map((row) => [named(row), row] as const),
)('%s', (_, row) => {
  it('asks those who are not signed in to sign in', async () => {
    const address = await addressOf(row);
    await expectProblem(await call(row.method, address, fitting(row)), 401, 'sign-in-first');
    await expectProblem(await callUnguarded(row.method, address, fitting(row)), 401, 'sign-in-first');
  });

  const low = mayNot(row);
  if (low.length > 0) {
    it.each(low)('refuses %s, in the middleware and once more itself', async (role) => {
      const address = await addressOf(row);
      await expectProblem(await call(row.method, address, { ...fitting(row), as: people[role] }), 403, 'wrong-role');
      await expectProblem(
        await callUnguarded(row.method, address, { ...fitting(row), as: people[role] }),
        403,
        'wrong-role',
      );
    });
  }
});

describe.each(ROUTES.map((row) => [named(row), row] as const))('%s', (_, row) => {
  it.each(may(row))('lets %s in', async (role) => {
    const answer = await call(row.method, await addressOf(row), { ...fitting(row), as: people[role] });
    expect([401, 403, 405, 500]).not.toContain(answer.status);
  });

  if (row.method !== 'GET') {
    it.each([
      ['from another site', { origin: 'https://elsewhere.example' }],
      ['without saying from where', { origin: null }],
      ['from a page without an origin of its own', { origin: 'null' }],
      ['by a page of another site, as the browser says', { headers: { 'sec-fetch-site': 'cross-site' } }],
    ])('refuses what is sent %s', async (_how, how) => {
      const sent = fitting(row);
      const answer = await call(row.method, await addressOf(row), {
        ...sent,
        ...how,
        headers: { ...sent.headers, ...('headers' in how ? how.headers : {}) },
        as: people.admin,
      });
      await expectProblem(answer, 403, 'other-origin');
    });
  }

  if (row.body !== undefined) {
    const as = () => (row.who === 'admin' ? people.admin : row.who === 'author' ? people.author : people.reader);

    it('refuses JSON that is cut short', async () => {
      const headers = { ...row.headers, 'content-type': 'application/json' };
      await expectProblem(
        await call(row.method, await addressOf(row), { as: as(), headers, body: '{"cut' }),
        400,
        'bad-json',
      );
    });

    it('refuses a body that is not sent as JSON', async () => {
      const headers = { ...row.headers, 'content-type': 'text/plain' };
      await expectProblem(
        await call(row.method, await addressOf(row), { as: as(), headers, body: JSON.stringify(row.body) }),
        415,
        'not-json',
      );
    });

    it.each([
      ['a list', []],
      ['null', null],
      ['a number', 7],
      ['a text', 'text'],
    ])('refuses %s where an object is due', async (_what, wrong) => {
      const headers = { ...row.headers, 'content-type': 'application/json' };
      await expectProblem(
        await call(row.method, await addressOf(row), { as: as(), headers, body: JSON.stringify(wrong) }),
        422,
        'does-not-fit',
      );
    });
  }
});
