import { readFileSync } from 'node:fs';
import { beforeEach, describe, expect, it } from 'vitest';
import { sqlite } from '@/db/client.server';
import { compilePattern, usualSizing, type Pattern } from '@/engine';
import { fanOut } from '@/features/mailing/fan-out.server';
import {
  beginSending,
  earlierMailings,
  mailingOfNewest,
  openMailing,
  saveMailing,
  sendTest,
  viewMailing,
  type OpenMailing,
} from '@/features/mailing/mailings.server';
import { stopMailing } from '@/features/mailing/outbox.server';
import { GET as preview } from '@/pages/api/mailings/[id]/preview';
import { addAuthor, addSubscriber } from '../mailing/mailing-fixtures';
import { testDatabase } from '../setup/test-database';

const pattern = readFileSync('content/patterns/tray.json', 'utf8');
const model = compilePattern(JSON.parse(pattern) as Pattern);
const sizing = model.ok ? JSON.stringify(usualSizing(model.value)) : '';
const writeUp = JSON.stringify({ version: 1, doc: { type: 'doc', content: [] } });

const ines = { id: 'ines', name: 'Ines Thornbury', email: 'ines@quilletlane.example', role: 'author' as const };
const jory = { id: 'jory', name: 'Jory', email: 'jory@quilletlane.example', role: 'author' as const };
const bram = { id: 'bram', name: 'Bram Quillon', email: 'bram@quilletlane.example', role: 'admin' as const };

function publish(n: number): void {
  sqlite()
    .prepare(
      "INSERT INTO edition (id, project_id, n, title, summary, pattern, sizing, write_up, correction_note, published_by) VALUES ('e' || @n, 'tray', @n, 'Label tray', 'A tray for labels.', @pattern, @sizing, @writeUp, '', 'ines')",
    )
    .run({ n, pattern, sizing, writeUp });
}
const newest = (asker = ines as typeof ines | typeof bram): OpenMailing => {
  const mailing = mailingOfNewest('tray', asker);
  if (!mailing || mailing === 'unpublished') throw new Error('no mailing');
  return mailing;
};
const input = { subject: 'New: Label tray', greeting: 'Hello [name],', excerpt: 'A tray.', withHero: false };

beforeEach(() => {
  testDatabase();
  addAuthor();
  addAuthor('jory');
  addAuthor('bram', 'admin');
  sqlite()
    .prepare(
      "INSERT INTO project (id, author_id, slug, title, pattern, sizing, write_up) VALUES ('tray', 'ines', 'label-tray', 'Label tray', ?, ?, ?)",
    )
    .run(pattern, sizing, writeUp);
});

describe('the mailing of a project', () => {
  it('is about its newest edition, one for each, and there is none before the first', () => {
    expect(mailingOfNewest('tray', ines)).toBe('unpublished');
    publish(1);
    const first = newest();
    expect(first.row).toMatchObject({
      edition: 1,
      state: 'draft',
      subject: 'New: Label tray',
      greeting: 'Hello [name],',
      excerpt: 'A tray for labels.',
    });
    expect(newest().row.id).toBe(first.row.id);
    publish(2);
    expect(newest().row).toMatchObject({ edition: 2, subject: 'Corrected: Label tray' });
    expect(sqlite().prepare('SELECT count(*) FROM mailing').pluck().get()).toBe(2);
  });

  it('is open to its author and to admins, and does not exist for others', () => {
    publish(1);
    const { id } = newest().row;
    expect(openMailing(id, ines)?.row.id).toBe(id);
    expect(openMailing(id, bram)?.row.id).toBe(id);
    expect(openMailing(id, jory)).toBeNull();
    expect(mailingOfNewest('tray', jory)).toBeNull();
    expect(openMailing('nothing', ines)).toBeNull();
  });
});

describe('saving', () => {
  beforeEach(() => publish(1));

  it('goes over the revision it was made from, and never over another', () => {
    expect(saveMailing(newest(), input, 1)).toMatchObject({ ok: true, revision: 2 });
    expect(saveMailing(newest(), { ...input, subject: 'Other' }, 1)).toMatchObject({
      ok: false,
      code: 'changed meanwhile',
      revision: 2,
    });
    expect(newest().row.subject).toBe('New: Label tray');
  });

  it('is over once it is being sent', async () => {
    addSubscriber('wenna');
    await beginSending(newest(), 1);
    expect(saveMailing(newest(), input, 1)).toEqual({ ok: false, code: 'being sent' });
    expect(() => sqlite().exec("UPDATE mailing SET subject = 'x'")).toThrow(
      'a mailing that is being sent never changes',
    );
  });
});

describe('a test', () => {
  it('goes to whoever asks, and looks as a subscriber’s copy does', async () => {
    publish(1);
    await sendTest(newest(), ines);
    const letter = sqlite().prepare('SELECT to_address, subject, text, headers FROM letter').get() as Record<
      string,
      string
    >;
    expect(letter).toMatchObject({ to_address: 'ines@quilletlane.example', subject: '[Test] New: Label tray' });
    expect(letter.text).toContain('Hello Ines Thornbury,');
    expect(JSON.parse(letter.headers!)).toEqual({
      From: '"Ines Thornbury, Quillet Lane Seed Circle" <letters@quilletlane.example>',
      'Reply-To': 'ines@quilletlane.example',
    });
    expect(newest().row.testedAt).not.toBeNull();
  });
});

describe('sending', () => {
  beforeEach(() => publish(1));

  it('is begun once, however often it is asked for', async () => {
    addSubscriber('wenna');
    const mailing = newest();
    const answers = await Promise.all([beginSending(mailing, 1), beginSending(mailing, 1)]);
    expect(answers.map(({ ok }) => ok).sort()).toEqual([false, true]);
    expect(await beginSending(newest(), 1)).toMatchObject({ ok: false, status: 409, code: 'being-sent' });
    expect(newest().row).toMatchObject({
      state: 'preparing',
      fromName: 'Ines Thornbury, Quillet Lane Seed Circle',
      replyTo: 'ines@quilletlane.example',
    });
  });

  it.each([
    ['a revision that was changed meanwhile', () => saveMailing(newest(), input, 1), 412, 'changed-meanwhile'],
    ['an edition that is not the newest', () => publish(2), 409, 'newer-edition'],
    ['an empty subject', () => sqlite().exec("UPDATE mailing SET subject = ' '"), 422, 'unfinished'],
    [
      'a list on which nobody has confirmed',
      () => sqlite().exec("UPDATE subscriber SET state = 'left'"),
      409,
      'nobody',
    ],
    [
      'a mail of more than 90 kB',
      () => sqlite().prepare('UPDATE mailing SET excerpt = ?').run('x'.repeat(90_000)),
      422,
      'too-heavy',
    ],
  ])('is refused for %s', async (_, spoil, status, code) => {
    addSubscriber('wenna');
    const { id } = newest().row;
    spoil();
    const refused = await beginSending(openMailing(id, ines)!, 1);
    expect(refused).toMatchObject({ ok: false, status, code });
    expect(openMailing(id, ines)!.row.state).toBe('draft');
  });

  it('shows counts that make up the total, and ends where it is stopped', async () => {
    for (const id of ['a', 'b', 'c']) addSubscriber(id);
    addSubscriber('gone', { state: 'left' });
    expect((await viewMailing(newest(), ines)).audience).toEqual({ people: 3, leftOut: 1 });
    await beginSending(newest(), 1);
    fanOut(newest().row.id, { now: Date.now(), domain: 'x.example' });
    const view = await viewMailing(newest(), ines);
    expect(view.state).toBe('sending');
    expect(view.sending?.counts).toEqual({
      accepted: 0,
      waiting: 3,
      retrying: 0,
      refused: 0,
      uncertain: 0,
      leftOut: 0,
      inFlight: 0,
      total: 3,
    });
    stopMailing(newest().row.id, Date.now());
    expect((await viewMailing(newest(), ines)).sending?.counts).toMatchObject({ waiting: 0, leftOut: 3, total: 3 });
    expect(() => sqlite().exec("UPDATE mailing SET state = 'sending'")).toThrow(
      'a mailing that has ended is never sent again',
    );
    publish(2);
    expect(earlierMailings(newest())).toMatchObject([{ edition: 1, state: 'cancelled', accepted: 0, total: 3 }]);
  });
});

describe('the preview', () => {
  it('may do nothing but show itself in a frame of ours', async () => {
    publish(1);
    const { id } = newest().row;
    const url = new URL(`http://localhost:4321/api/mailings/${id}/preview?part=html&units=mm`);
    const response = (await preview({ locals: { user: ines }, params: { id }, url } as unknown as Parameters<
      typeof preview
    >[0])) as Response;
    expect(response.headers.get('content-security-policy')).toBe(
      "sandbox; default-src 'none'; style-src 'unsafe-inline'; img-src http://localhost:4321 http://localhost:4321; frame-ancestors 'self'",
    );
    const html = await response.text();
    expect(html).toContain('Hello Sample Reader,');
    expect(html).not.toMatch(/<script|<iframe|<form/i);
  });
});
