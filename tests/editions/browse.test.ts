import { expect, test } from 'vitest';
import { browseHref, readBrowse } from '@/features/editions/browse';

test('an address without parameters asks for everything, newest first', () => {
  expect(readBrowse(new URLSearchParams())).toEqual({ query: '', kinds: [], order: 'newest', page: 1 });
});

test('what is asked for comes back from its own address', () => {
  const browse = { query: 'seed box', kinds: ['Sleeves and drawers', 'Trays'], order: 'title', page: 3 } as const;
  expect(readBrowse(new URL(browseHref(browse), 'https://boxes.example').searchParams)).toEqual(browse);
});

test('what is usual is left out of the address', () => {
  expect(browseHref({ query: '', kinds: [], order: 'newest', page: 1 })).toBe('/projects');
});

test.each(['0', '-1', '1.5', 'x', '99999999'])('page %s is page 1', (page) => {
  expect(readBrowse(new URLSearchParams({ page })).page).toBe(1);
});
