import { expect, test } from 'vitest';
import { atomFeed, type FeedEntry } from '@/features/editions/atom';
import { sitemap } from '@/features/editions/sitemap';
import { readXml } from './read-xml';

const began = new Date('2026-01-01T00:00:00.000Z');
const entry: FeedEntry = {
  projectId: 'p1',
  slug: 'seed-box',
  title: 'Seeds & "labels" <small>',
  author: 'Ines Thornbury',
  summary: 'Holds packets.',
  correctionNote: '',
  edition: 1,
  firstPublished: new Date('2026-02-01T10:00:00.000Z'),
  updated: new Date('2026-03-02T10:00:00.000Z'),
  content: '<p>9 × 6 in &amp; more</p>',
  group: 'Boxes that look like books',
};
const feedOf = (entries: readonly FeedEntry[]) =>
  readXml(atomFeed({ siteUrl: 'https://boxes.example', title: 'Seed Circle', entries, began }));

test('a feed has what RFC 4287 asks of it: id, title, updated, a link to itself and an author', () => {
  const feed = feedOf([entry]);
  expect(feed.name).toBe('feed');
  expect(feed.attributes.xmlns).toBe('http://www.w3.org/2005/Atom');
  expect(feed.text('id')).toBe('https://boxes.example/feed.xml');
  expect(feed.text('title')).toBe('Seed Circle');
  expect(feed.text('updated')).toBe('2026-03-02T10:00:00.000Z');
  expect(feed.all('link').map(({ attributes }) => [attributes.rel, attributes.href])).toEqual([
    ['self', 'https://boxes.example/feed.xml'],
    ['alternate', 'https://boxes.example/projects'],
  ]);
  expect(feed.all('author')[0]?.text('name')).toBe('Seed Circle');
});

test('an entry has id, title, updated, author, summary and content, and survives marks in its title', () => {
  const [first] = feedOf([entry]).all('entry');
  expect(first?.text('id')).toBe('https://boxes.example/projects/p1');
  expect(first?.text('title')).toBe('Seeds & "labels" <small>');
  expect(first?.text('published')).toBe('2026-02-01T10:00:00.000Z');
  expect(first?.text('updated')).toBe('2026-03-02T10:00:00.000Z');
  expect(first?.all('author')[0]?.text('name')).toBe('Ines Thornbury');
  expect(first?.text('summary')).toBe('Holds packets.');
  expect(first?.text('content')).toBe('<p>9 × 6 in &amp; more</p>');
  expect(first?.all('link')[0]?.attributes.href).toBe('https://boxes.example/projects/seed-box');
});

test('a corrected edition keeps its id and tells the correction', () => {
  const [first] = feedOf([{ ...entry, edition: 2, correctionNote: 'The lid was too tight.' }]).all('entry');
  expect(first?.text('id')).toBe('https://boxes.example/projects/p1');
  expect(first?.text('summary')).toBe('Edition 2: The lid was too tight.');
});

test('an empty feed is still a feed', () => {
  const feed = feedOf([]);
  expect(feed.text('updated')).toBe('2026-01-01T00:00:00.000Z');
  expect(feed.all('entry')).toEqual([]);
});

test('control characters that XML cannot carry are left out', () => {
  const [first] = feedOf([{ ...entry, title: 'Bell\u0007 box' }]).all('entry');
  expect(first?.text('title')).toBe('Bell box');
});

test('a sitemap lists whole addresses with the day they changed', () => {
  const map = readXml(sitemap('https://boxes.example', [{ path: '/' }, { path: '/projects/a-b', changed: began }]));
  expect(map.attributes.xmlns).toBe('http://www.sitemaps.org/schemas/sitemap/0.9');
  expect(map.all('url').map((url) => url.text('loc'))).toEqual([
    'https://boxes.example/',
    'https://boxes.example/projects/a-b',
  ]);
  expect(map.all('url')[1]?.text('lastmod')).toBe('2026-01-01T00:00:00.000Z');
});
