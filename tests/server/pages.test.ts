import { readdirSync, readFileSync } from 'node:fs';
import { expect, it } from 'vitest';
import { accessTo } from '@/features/accounts/access';
import { pagePaths } from './harness';

const sources = import.meta.glob<string>(['../../src/pages/**/*.{astro,ts}', '!../../src/pages/api/**'], {
  query: '?raw',
  import: 'default',
  eager: true,
});

/** What a page for these must ask itself, whatever the middleware has said. */
const ASKS = {
  reader: "requireRole(Astro, 'reader')",
  author: "requireRole(Astro, 'author')",
  admin: "requireRole(Astro, 'admin')",
  'this machine': 'isAtThisMachine(',
};

const guarded = Object.entries(sources).flatMap(([file, source]) => {
  const path = file
    .replace('../../src/pages', '')
    .replace(/(\/index)?\.(astro|ts)$/, '')
    .replace(/\[\w+\]/g, 'x');
  const access = accessTo(path || '/');
  return access === null || access === 'all' ? [] : [{ path, source, asks: ASKS[access] }];
});

it('finds the pages that are not for everybody', () => {
  const paths = guarded.map(({ path }) => path);
  for (const path of ['/account', '/admin', '/workroom', '/workroom/x/mailing', '/dev/mailbox/x/html'])
    expect(paths).toContain(path);
});

it.each(guarded)('$path asks once more who it is', ({ source, asks }) => {
  expect(source).toContain(asks);
});

it('no file in public/ hides a page: files are served first', () => {
  expect(readdirSync('public').filter((name) => pagePaths.includes(`/${name}`))).toEqual([]);
  expect(readFileSync('src/pages/robots.txt.ts', 'utf8')).toContain('Sitemap: ');
});
