import type { APIContext } from 'astro';
import { eq } from 'drizzle-orm';
import { beforeEach, describe, expect, test } from 'vitest';
import { db } from '@/db/client.server';
import { projects } from '@/db/schema';
import { publishEdition } from '@/features/editions/publish.server';
import { GET as getFeed } from '@/pages/feed.xml';
import { GET as getFigures } from '@/pages/projects/[slug]/figures.json';
import { GET as getPicture } from '@/pages/projects/[slug]/picture.png';
import { GET as getRobots } from '@/pages/robots.txt';
import { readXml } from '../editions/read-xml';
import { testDatabase } from '../setup/test-database';
import { addPerson, addProject, addUpload } from './published-project';

let author: string;
let id: string;
beforeEach(() => {
  testDatabase();
  author = addPerson('Ines Thornbury');
  id = addProject(author, { slug: 'seed-list-folder', title: 'Seed lists & labels' });
  publishEdition(id, { by: author, revision: 1 });
});

/** As much of a request as these routes look at. */
const visit = (path: string, headers: Record<string, string> = {}) => {
  const url = new URL(path, 'http://localhost:4321');
  const slug = /^\/projects\/([^/]+)/.exec(url.pathname)?.[1];
  return { url, params: { slug }, request: new Request(url, { headers }), locals: {} } as unknown as APIContext;
};
const figures = async (query: string, slug = 'seed-list-folder') => {
  const response = await getFigures(visit(`/projects/${slug}/figures.json${query}`));
  return { status: response.status, type: response.headers.get('content-type'), body: await response.json() };
};

describe('figures.json', () => {
  test('has the figures at the size in the address, in millimetres', async () => {
    const { status, type, body } = await figures('?inside-width=5in');
    expect([status, type]).toEqual([200, 'application/json; charset=utf-8']);
    expect(body).toMatchObject({
      project: 'seed-list-folder',
      edition: 1,
      pattern: 'folder',
      sizing: { values: { 'inside width': 127, 'inside height': 152.4 }, units: 'in', grid: '1/16in' },
      // Two panels of 5 in: 10 in across, folded in the middle; 6 in along. 254 × 152.4 = 38709.6 mm².
      pieces: [
        { name: 'Folder', count: 1, across: 254, along: 152.4, scores: { across: [127], along: [] }, area: 38709.6 },
      ],
      fits: [{ name: 'it stands', holds: true, gap: 101.6 }],
      sheets: { stock: '12x12in', count: 1, used: 1 },
      departure: { mm: 0 },
      problems: [],
    });
    expect(body.measures).toContainEqual({ name: 'blank width', kind: 'length', exact: 254, cut: 254, shown: '10 in' });
  });

  test('shows lengths in the units that are asked for and keeps the size', async () => {
    const { body } = await figures('?units=mm');
    expect(body.measures).toContainEqual({
      name: 'inside height',
      kind: 'length',
      exact: 152.4,
      cut: 152,
      shown: '152 mm',
    });
  });

  test('is read at the author’s size without parameters, and other parameters do no harm', async () => {
    const { body } = await figures('?utm_source=x');
    expect(body.sizing.values).toEqual({ 'inside width': 101.6, 'inside height': 152.4 });
  });

  test('answers a size that cannot be made with its problems', async () => {
    const { status, body } = await figures('?inside-height=9in');
    expect(status).toBe(200);
    expect(body.problems).toMatchObject([{ code: 'fit fails', measure: 'inside height', nearest: 203.2 }]);
  });

  test.each([
    ['?inside-width=wide', 'inside width'],
    ['?units=furlongs', 'units'],
    ['?cut=2mm', 'cut'],
    ['?card=b5', 'card'],
    ['?copies=0', 'copies'],
    ['?copies=many', 'copies'],
  ])('refuses %s with a problem document that names %s', async (query, where) => {
    const { status, type, body } = await figures(query);
    expect([status, type]).toEqual([400, 'application/problem+json; charset=utf-8']);
    expect(body.errors[0].where).toBe(where);
    expect(body.errors[0].sentence).toMatch(/[.?]$/);
  });

  test('a draft, a deleted project and an unknown one are not found', async () => {
    addProject(author, { slug: 'draft' });
    db.update(projects).set({ deletedAt: new Date() }).where(eq(projects.id, id)).run();
    for (const slug of ['draft', 'seed-list-folder', 'nothing']) expect((await figures('', slug)).status).toBe(404);
  });

  test('an older edition can be asked for, one that is not there is not found', async () => {
    db.update(projects).set({ title: 'Mended', revision: 2 }).where(eq(projects.id, id)).run();
    publishEdition(id, { by: author, revision: 2, note: 'The title was wrong.' });
    expect((await figures('')).body.edition).toBe(2);
    expect((await figures('?edition=1')).body.edition).toBe(1);
    expect((await figures('?edition=3')).status).toBe(404);
    expect((await figures('?edition=one')).status).toBe(404);
  });

  test('is not sent again to whoever has it, until there is another edition', async () => {
    const first = await getFigures(visit('/projects/seed-list-folder/figures.json'));
    const tag = first.headers.get('etag') ?? '';
    expect(first.headers.get('cache-control')).toBe('public, max-age=0, must-revalidate');
    const again = () => getFigures(visit('/projects/seed-list-folder/figures.json', { 'if-none-match': tag }));
    expect((await again()).status).toBe(304);
    db.update(projects).set({ title: 'Mended', revision: 2 }).where(eq(projects.id, id)).run();
    publishEdition(id, { by: author, revision: 2, note: 'The title was wrong.' });
    expect((await again()).status).toBe(200);
  });
});

describe('the feed', () => {
  const feed = async () => {
    const response = await getFeed(visit('/feed.xml'));
    expect(response.headers.get('content-type')).toBe('application/atom+xml; charset=utf-8');
    return readXml(await response.text());
  };

  test('tells of published projects with what they take, and of no draft', async () => {
    addProject(author, { slug: 'draft', title: 'Draft' });
    const [entry, ...others] = (await feed()).all('entry');
    expect(others).toEqual([]);
    expect(entry?.text('title')).toBe('Seed lists & labels');
    expect(entry?.text('summary')).toBe('Keeps a season of lists.');
    expect(entry?.text('content')).toContain('1 piece, 1 sheet of 12 × 12 in');
    expect(entry?.all('link')[0]?.attributes.href).toMatch(/\/projects\/seed-list-folder$/);
  });

  test('tells of a correction in the same entry', async () => {
    const before = (await feed()).all('entry')[0]?.text('id');
    db.update(projects)
      .set({ heroUploadId: addUpload(author, 'a'.repeat(24)), revision: 2 })
      .where(eq(projects.id, id))
      .run();
    publishEdition(id, { by: author, revision: 2, note: 'A photo of <the> fold.' });
    const entries = (await feed()).all('entry');
    expect(entries.map((entry) => entry.text('id'))).toEqual([before]);
    expect(entries[0]?.text('summary')).toBe('Edition 2: A photo of <the> fold.');
    expect(entries[0]?.text('content')).toContain('A photo of &lt;the&gt; fold.');
    expect(entries[0]?.text('content')).toContain(`/media/${'a'.repeat(24)}.jpg`);
  });

  test('says when it has not changed', async () => {
    const tag = (await getFeed(visit('/feed.xml'))).headers.get('etag') ?? '';
    expect((await getFeed(visit('/feed.xml', { 'if-none-match': tag }))).status).toBe(304);
  });
});

test('a project without a photo has a picture of its folded box for previews', async () => {
  const response = await getPicture(visit('/projects/seed-list-folder/picture.png'));
  const bytes = new Uint8Array(await response.arrayBuffer());
  expect(response.headers.get('content-type')).toBe('image/png');
  // Width and height stand in the header chunk of a PNG.
  const view = new DataView(bytes.buffer);
  expect([view.getUint32(16), view.getUint32(20)]).toEqual([1200, 630]);
  expect((await getPicture(visit('/projects/nothing/picture.png'))).status).toBe(404);
});

test('robots are kept from what is not for reading and shown the sitemap', async () => {
  const text = await (await getRobots(visit('/robots.txt'))).text();
  for (const path of ['/api/', '/workroom', '/admin', '/account']) expect(text).toContain(`Disallow: ${path}\n`);
  expect(text).toMatch(/^Sitemap: http.*\/sitemap\.xml$/m);
});
