import { existsSync, mkdtempSync, readdirSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { APIContext } from 'astro';
import { beforeEach, describe, expect, test } from 'vitest';
import { PaperCache } from '@/features/editions/paper/paper-cache.server';
import { publishEdition } from '@/features/editions/publish.server';
import { LIMITS } from '@/features/limits/limits';
import { takeTurn } from '@/features/limits/limits.server';
import { GET as getSheet } from '@/pages/projects/[slug]/sheet.pdf';
import { GET as getTemplates } from '@/pages/projects/[slug]/templates.pdf';
import { readPdf } from '../exports/read-pdf';
import { testDatabase } from '../setup/test-database';
import { addPerson, addProject } from './published-project';

beforeEach(() => {
  testDatabase();
  const author = addPerson('Ines Thornbury');
  const id = addProject(author, { slug: 'seed-list-folder', title: 'Seed lists & labels' });
  publishEdition(id, { by: author, revision: 1 });
});

const ask = (
  route: typeof getSheet,
  query = '',
  { headers = {}, slug = 'seed-list-folder', ip = '203.0.113.5' } = {},
) => {
  const url = new URL(`/projects/${slug}/x.pdf${query}`, 'http://localhost:4321');
  const redirect = (path: string, status: number) => new Response(null, { status, headers: { location: path } });
  const request = new Request(url, { headers });
  return route({ url, params: { slug }, request, clientAddress: ip, redirect } as unknown as APIContext);
};

describe('sheet.pdf', () => {
  test('is the sheet at the size in the address, named after project and size', async () => {
    const response = await ask(getSheet, '?inside-width=5.5in');
    expect(response.status).toBe(200);
    expect(response.headers.get('content-type')).toBe('application/pdf');
    expect(response.headers.get('content-disposition')).toBe(
      'inline; filename="seed-list-folder-5-1-2x6in-sheet-letter.pdf"',
    );
    const pdf = readPdf(new Uint8Array(await response.arrayBuffer()));
    expect(pdf.info.Title).toBe('Seed lists & labels: measurement sheet');
    // Two panels of 5 1/2 in.
    expect(pdf.structure.text).toContain('11 ×');
    expect(pdf.links[0]).toMatch(/\/projects\/seed-list-folder\?inside-width=5\.5in$/);
  });

  test('takes Letter for inches and A4 for millimetres unless a paper is named', async () => {
    const widthOf = async (query: string) => {
      const bytes = await (await ask(getSheet, query)).arrayBuffer();
      return Math.round(((readPdf(new Uint8Array(bytes)).pages[0]?.width ?? 0) * 25.4) / 7.2) / 10;
    };
    expect([await widthOf(''), await widthOf('?units=mm'), await widthOf('?paper=a4')]).toEqual([215.9, 210, 210]);
  });

  test('is not sent again to one who has it', async () => {
    const etag = (await ask(getSheet)).headers.get('etag') ?? '';
    const again = await ask(getSheet, '', { headers: { 'if-none-match': etag } });
    expect(again.status).toBe(304);
    expect(again.body).toBeNull();
  });

  test.each(['?inside-height=9in', '?inside-width=wide'])(
    'sends %s to the page that says what is wrong',
    async (query) => {
      const response = await ask(getSheet, query);
      expect([response.status, response.headers.get('location')]).toEqual([
        303,
        `/projects/seed-list-folder/sheet${query}`,
      ]);
    },
  );

  test('is refused where nothing is published', async () => {
    expect((await ask(getSheet, '', { slug: 'nothing' })).status).toBe(404);
  });

  test('is refused to one who had too many made; what was made before is not', async () => {
    const ip = '203.0.113.9';
    expect((await ask(getSheet, '?inside-width=6in', { ip })).status).toBe(200);
    for (let i = 1; i < LIMITS.paper.byIp.tries; i += 1) await takeTurn('paper', { ip });
    const refused = await ask(getSheet, '?inside-width=7in', { ip });
    expect(refused.status).toBe(429);
    expect(Number(refused.headers.get('retry-after'))).toBeGreaterThan(0);
    expect((await ask(getSheet, '?inside-width=6in', { ip })).status).toBe(200);
  });
});

test('templates.pdf has every piece at true size', async () => {
  const response = await ask(getTemplates, '?paper=a4');
  expect(response.headers.get('content-disposition')).toContain('seed-list-folder-4x6in-templates-a4.pdf');
  const pdf = readPdf(new Uint8Array(await response.arrayBuffer()));
  expect(pdf.info.Title).toBe('Seed lists & labels: templates');
});

describe('papers on disk', () => {
  const folder = () => join(mkdtempSync(join(tmpdir(), 'papers-')), 'papers');
  const bytes = (length: number) => new Uint8Array(length);

  test('are kept up to a number and a size, the one asked for longest ago going first', async () => {
    const where = folder();
    const cache = new PaperCache(where, { files: 2, bytes: 100 });
    await cache.put('a', bytes(10));
    await cache.put('b', bytes(10));
    expect(await cache.get('a')).toHaveLength(10);
    await cache.put('c', bytes(10));
    expect([await cache.get('b'), (await cache.get('a'))?.length]).toEqual([null, 10]);
    await cache.put('d', bytes(95));
    expect(readdirSync(where)).toEqual(['d.pdf']);
  });

  test('of an earlier start are thrown away', async () => {
    const where = folder();
    await new PaperCache(where).put('a', bytes(1));
    const next = new PaperCache(where);
    await next.put('b', bytes(1));
    expect([await next.get('a'), existsSync(join(where, 'a.pdf'))]).toEqual([null, false]);
  });
});
