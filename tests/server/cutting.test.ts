import type { APIContext, APIRoute } from 'astro';
import { strFromU8, unzipSync } from 'fflate';
import { beforeEach, describe, expect, test } from 'vitest';
import { piecesByKey, outerWords } from '@/features/editions/cutting/piece-files';
import { publishEdition } from '@/features/editions/publish.server';
import { accessTo } from '@/features/accounts/access';
import { LIMITS } from '@/features/limits/limits';
import { takeTurn } from '@/features/limits/limits.server';
import { GET as getAllDxf } from '@/pages/projects/[slug]/pieces.dxf';
import { GET as getAllSvg } from '@/pages/projects/[slug]/pieces.svg';
import { GET as getZip } from '@/pages/projects/[slug]/pieces.zip';
import { GET as getDxf } from '@/pages/projects/[slug]/pieces/[piece].dxf';
import { GET as getSvg } from '@/pages/projects/[slug]/pieces/[piece].svg';
import { boundsOfRead, readDxf, readSvg } from '../exports/read-cutting';
import { testDatabase } from '../setup/test-database';
import { addPerson, addProject } from './published-project';

const HOSTILE = 'Seed lists & "labels" </title><script>';
beforeEach(() => {
  testDatabase();
  const author = addPerson('Ines Thornbury');
  const id = addProject(author, { slug: 'seed-list-folder', title: HOSTILE });
  publishEdition(id, { by: author, revision: 1 });
});

const ask = (
  route: APIRoute,
  query = '',
  { headers = {}, slug = 'seed-list-folder', piece = 'folder', ip = '203.0.113.5' } = {},
) => {
  const url = new URL(`/projects/${slug}/x${query}`, 'http://localhost:4321');
  const redirect = (path: string, status: number) => new Response(null, { status, headers: { location: path } });
  const request = new Request(url, { headers });
  return Promise.resolve(
    route({ url, params: { slug, piece }, request, clientAddress: ip, redirect } as unknown as APIContext),
  );
};
const EVERY: readonly [string, APIRoute][] = [
  ['pieces/folder.svg', getSvg],
  ['pieces/folder.dxf', getDxf],
  ['pieces.svg', getAllSvg],
  ['pieces.dxf', getAllDxf],
  ['pieces.zip', getZip],
];

describe('a piece', () => {
  test('is SVG at the size in the address, two panels of 5 1/2 in being 279.4 mm', async () => {
    const response = await ask(getSvg, '?inside-width=5.5in');
    expect(response.status).toBe(200);
    expect(response.headers.get('content-type')).toBe('image/svg+xml; charset=utf-8');
    expect(response.headers.get('content-disposition')).toBe(
      'attachment; filename="seed-list-folder_folder_5-1-2x6in.svg"',
    );
    const { root, lines } = readSvg(await response.text());
    expect(root.attributes).toMatchObject({ width: '279.4mm', height: '152.4mm', viewBox: '0 0 279.4 152.4' });
    expect(root.text('title')).toBe(`${HOSTILE}: Folder`);
    expect(lines.map(({ work, length }) => [work, length])).toEqual([
      ['valley', 152.4],
      ['cut', 2 * (279.4 + 152.4)],
    ]);
  });

  test('is DXF at the same size', async () => {
    const response = await ask(getDxf, '?inside-width=5.5in');
    expect(response.headers.get('content-type')).toBe('image/vnd.dxf');
    expect(response.headers.get('content-disposition')).toBe(
      'attachment; filename="seed-list-folder_folder_5-1-2x6in.dxf"',
    );
    const { lines } = readDxf(await response.text());
    expect(boundsOfRead(lines)).toEqual({ left: 0, right: 279.4, low: 0, high: 152.4 });
  });

  test('that the box does not have is not found, and those it has are named', async () => {
    const response = await ask(getSvg, '', { piece: 'lid' });
    expect(response.status).toBe(404);
    expect((await response.json()).detail).toBe('At this size and with these choices it has folder.');
  });
});

test('all pieces have a drawing of their own', async () => {
  const { root } = readSvg(await (await ask(getAllSvg)).text());
  expect(root.text('title')).toBe(`${HOSTILE}: all pieces`);
  expect(readDxf(await (await ask(getAllDxf)).text()).lines).toHaveLength(2);
});

describe('the zip', () => {
  test('has each piece in both, the same as on their own', async () => {
    const response = await ask(getZip);
    expect(response.headers.get('content-type')).toBe('application/zip');
    expect(response.headers.get('content-disposition')).toBe(
      'attachment; filename="seed-list-folder_pieces_4x6in.zip"',
    );
    const files = unzipSync(new Uint8Array(await response.arrayBuffer()));
    expect(Object.fromEntries(Object.entries(files).map(([name, bytes]) => [name, strFromU8(bytes)]))).toEqual({
      'seed-list-folder_folder_4x6in.svg': await (await ask(getSvg)).text(),
      'seed-list-folder_folder_4x6in.dxf': await (await ask(getDxf)).text(),
    });
  });

  test('is the same bytes every time', async () => {
    const bytes = async () => new Uint8Array(await (await ask(getZip)).arrayBuffer());
    expect(await bytes()).toEqual(await bytes());
  });
});

describe.each(EVERY)('%s', (path, route) => {
  test('is for all', () => {
    expect(accessTo(`/projects/seed-list-folder/${path}`)).toBe('all');
  });

  test('is not sent again to one who has it, until the size is another', async () => {
    const response = await ask(route);
    expect(response.headers.get('cache-control')).toBe('public, max-age=0, must-revalidate');
    const headers = { 'if-none-match': response.headers.get('etag') ?? '' };
    expect((await ask(route, '', { headers })).status).toBe(304);
    expect((await ask(route, '?inside-width=5in', { headers })).status).toBe(200);
    expect((await ask(route, '?glue=drawn', { headers })).status).toBe(200);
  });

  test.each(['?inside-height=9in', '?inside-width=wide'])(
    'sends %s to the page that says what is wrong',
    async (query) => {
      const response = await ask(route, query);
      expect([response.status, response.headers.get('location')]).toEqual([
        303,
        `/projects/seed-list-folder/sheet${query}`,
      ]);
    },
  );

  test('is refused where nothing is published', async () => {
    expect((await ask(route, '', { slug: 'nothing' })).status).toBe(404);
  });
});

test('one who asked for too many files is refused; what is not sent again is not counted', async () => {
  const ip = '203.0.113.9';
  const headers = { 'if-none-match': (await ask(getSvg, '', { ip })).headers.get('etag') ?? '' };
  for (let i = 1; i < LIMITS.cutting.byIp.tries; i += 1) await takeTurn('cutting', { ip });
  const refused = await ask(getDxf, '', { ip });
  expect(refused.status).toBe(429);
  expect(Number(refused.headers.get('retry-after'))).toBeGreaterThan(0);
  expect((await ask(getSvg, '', { ip, headers })).status).toBe(304);
});

test('pieces have addresses of plain letters, no two alike', () => {
  const names = ['Fore edge', 'Fore Edge', 'Крышка', 'Étui', '../etc'];
  const pieces = names.map((name) => ({ name }) as never);
  expect([...piecesByKey({ pieces }).keys()]).toEqual(['fore-edge', 'fore-edge-2', 'piece', 'etui', 'etc']);
});

test.each([
  // 8 1/2 × 25.4 = 215.9, 6 1/2 × 25.4 = 165.1.
  ['in', '1/16in', 215.9, '8\u202f1⁄2 × 6\u202f1⁄2\u00a0in; the file is in millimetres: 215.9\u00a0×\u00a0165.1'],
  ['cm', '1mm', 215.9, '21.59 × 16.51\u00a0cm; the file is in millimetres: 215.9\u00a0×\u00a0165.1'],
  ['mm', '1mm', 215.9, '215.9\u00a0×\u00a0165.1\u00a0mm; the file is in millimetres'],
  // 216 / 25.4 = 8.504 in, between 8 1/2 and 8 33/64.
  ['in', '1/16in', 216, 'about 8\u202f1⁄2 × 6\u202f1⁄2\u00a0in; the file is in millimetres: 216\u00a0×\u00a0165.1'],
] as const)('an outer size is said in %s and as the file has it', (units, grid, across, words) => {
  expect(outerWords({ across, along: 165.1 }, { sizing: { units, grid, values: {}, choices: {} } })).toBe(words);
});
