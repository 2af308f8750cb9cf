import { beforeEach, describe, expect, it } from 'vitest';
import { db } from '@/db/client.server';
import { sheets } from '@/db/schema';
import { deleteAccount, exportOwnData } from '@/features/accounts/account-data.server';
import { publishEdition } from '@/features/editions/publish.server';
import { postSheets, sheetsOf } from '@/features/sheets/my-sheets.server';
import { testDatabase } from '../setup/test-database';
import { call, cast, HERE, type Cast } from './harness';
import { addProject } from './published-project';

const A4 = { card: 'a4', count: 20 };
const SQUARE = { card: '12x12in', count: 5 };

let people: Cast;
beforeEach(async () => {
  testDatabase();
  people = await cast();
});

const put = (list: unknown, as = people.reader) => call('PUT', '/api/sheets', { as, body: { sheets: list } });
const merge = (list: unknown, as = people.reader) => call('POST', '/api/sheets/merge', { as, body: { sheets: list } });
const post = (fields: Record<string, string>) =>
  postSheets(
    { request: new Request(`${HERE}/sheets`, { method: 'POST', body: new URLSearchParams(fields) }) },
    people.reader.id,
  );

describe('a reader’s sheets in the account', () => {
  it('are kept in their order and given back, to nobody else', async () => {
    expect(await (await put([SQUARE, A4])).json()).toEqual({ sheets: [SQUARE, A4] });
    expect(await (await call('GET', '/api/sheets', { as: people.reader })).json()).toEqual({ sheets: [SQUARE, A4] });
    expect(await (await call('GET', '/api/sheets', { as: people.author })).json()).toEqual({ sheets: [] });
  });

  it('are replaced whole', async () => {
    await put([SQUARE, A4]);
    await put([{ card: 'a3', count: 1 }]);
    expect(sheetsOf(people.reader)).toEqual([{ card: 'a3', count: 1 }]);
    await put([]);
    expect(sheetsOf(people.reader)).toEqual([]);
  });

  it('stay as they are when what was sent does not fit', async () => {
    await put([A4]);
    const answer = await put([{ card: '10x90in', count: 1 }]);
    expect(answer.status).toBe(422);
    expect(((await answer.json()) as { detail: string }).detail).toContain('“10x90in” is no sheet.');
    expect(sheetsOf(people.reader)).toEqual([A4]);
  });

  it('take what a browser kept once, however often it is sent', async () => {
    await put([A4]);
    const browsers = [{ card: 'a4', count: 30 }, SQUARE];
    expect(await (await merge(browsers)).json()).toEqual({ sheets: [{ card: 'a4', count: 30 }, SQUARE] });
    await merge(browsers);
    expect(sheetsOf(people.reader)).toEqual([{ card: 'a4', count: 30 }, SQUARE]);
  });

  it('stand in what the account gives out about its owner', async () => {
    await put([SQUARE, A4]);
    expect(exportOwnData(people.reader).sheets).toEqual([SQUARE, A4]);
  });

  it('go with the account', async () => {
    await put([A4]);
    await put([SQUARE], people.author);
    expect(await deleteAccount(people.reader, { keepName: false })).toEqual({ ok: true });
    expect(sheetsOf(people.reader)).toEqual([]);
    expect(sheetsOf(people.author)).toEqual([SQUARE]);
  });

  it('go too where a published project keeps its author’s row', async () => {
    await put([SQUARE], people.author);
    const project = addProject(people.author.id);
    publishEdition(project, { by: people.author.id, revision: 1 });
    expect(await deleteAccount(people.author, { keepName: true })).toEqual({ ok: true });
    expect(db.select().from(sheets).all()).toEqual([]);
  });
});

describe('the page’s forms, without scripts', () => {
  it('add, count and remove, and go back to the page', async () => {
    const added = await post({
      do: 'add',
      size: 'own',
      across: '8 1/2',
      along: '13',
      unit: 'in',
      count: '4',
      grain: 'long',
    });
    expect(added).toBeInstanceOf(Response);
    expect((added as Response).headers.get('location')).toBe('/sheets?done=added');
    expect(sheetsOf(people.reader)).toEqual([{ card: '8.5x13in-long', count: 4 }]);
    await post({ do: 'keep', 'count-8.5x13in-long': '9' });
    expect(sheetsOf(people.reader)).toEqual([{ card: '8.5x13in-long', count: 9 }]);
    await post({ remove: '8.5x13in-long' });
    expect(sheetsOf(people.reader)).toEqual([]);
  });

  it('keep what was typed when it does not read, and change nothing', async () => {
    const refused = await post({ do: 'add', size: 'own', across: 'wide', along: '13', unit: 'in', count: '4' });
    expect(refused).toMatchObject({
      status: 422,
      faults: { across: '“wide” does not read as a length. Write it like 8 1/2 or 21.6 cm.' },
      typed: { size: 'own', across: 'wide', along: '13', count: '4' },
    });
    expect(sheetsOf(people.reader)).toEqual([]);
  });
});
