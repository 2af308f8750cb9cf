import type { APIContext } from 'astro';
import { beforeEach, describe, expect, it } from 'vitest';
import { loadAskPage } from '@/features/editions/ask-page.server';
import { publishEdition } from '@/features/editions/publish.server';
import { LIMITS } from '@/features/limits/limits';
import { testDatabase } from '../setup/test-database';
import { addPerson, addProject } from './published-project';

beforeEach(() => {
  testDatabase();
  const author = addPerson('Ines Thornbury');
  publishEdition(addProject(author, { slug: 'seed-list-folder' }), { by: author, revision: 1 });
});

const ask = (which: 'fit' | 'largest', query: string, slug = 'seed-list-folder') =>
  loadAskPage(which, {
    params: { slug },
    url: new URL(`http://localhost:4321/projects/${slug}/${which}${query}`),
    locals: { user: null } as APIContext['locals'],
    clientAddress: '127.0.0.1',
  });
const inside = async (asked: ReturnType<typeof ask>) => {
  const answer = (await asked)?.answer;
  return answer?.ok ? answer.figures.finished.inside.map(({ mm }) => mm) : (answer?.reason ?? null);
};

describe('questions about a size, without scripts', () => {
  it('are asked first', async () => {
    expect(await ask('fit', '')).toMatchObject({ answer: null, wait: null });
    expect(await ask('largest', '?card=a4')).toMatchObject({
      answer: null,
      state: { cutFrom: { stock: { id: 'a4' } } },
    });
  });

  it('are answered at the size and on the sheet in the address', async () => {
    // 100 + 2 × 3 mm and 150 + 2 × 3 mm.
    const query = '?units=mm&card=200x300mm&thing-wide=100&thing-tall=150&thing-ease=3';
    expect(await inside(ask('fit', query))).toEqual([106, 156]);
    expect((await ask('fit', query))?.answer).toMatchObject({ plan: { stock: { id: '200x300mm' } } });
    // Two cards of 8 × 6 in lie on 12 × 12 in; a sixteenth taller they do not.
    expect(await inside(ask('largest', '?card=12x12in&pile-sheets=1&copies=2'))).toEqual([101.6, 152.4]);
  });

  it('keep what was typed and say what does not read', async () => {
    expect(await ask('fit', '?thing-wide=wide&thing-tall=5')).toMatchObject({
      answer: null,
      state: {
        typed: { 'thing-wide': 'wide', 'thing-tall': '5' },
        faults: { 'thing-wide': expect.stringContaining('wide') },
      },
    });
    expect(await ask('largest', '?pile-sheets=many')).toMatchObject({
      answer: null,
      state: { faults: { 'pile-sheets': expect.any(String) } },
    });
  });

  it('are about projects that are published', async () => {
    expect(await ask('fit', '', 'no-such-box')).toBeNull();
  });

  it('are not searched for without end', async () => {
    const query = '?card=6x6in&pile-sheets=1&pile-boxes=1';
    for (let n = 0; n < LIMITS.search.byIp.tries; n += 1) await ask('largest', query);
    expect(await ask('largest', query)).toMatchObject({ answer: null, wait: expect.stringContaining('too often') });
  }, 60_000);
});
