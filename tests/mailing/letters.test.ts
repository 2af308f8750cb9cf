import { readFileSync, readdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { config } from '@/config.server';
import { sqlite } from '@/db/client.server';
import { queueLetter, takeLetter } from '@/features/mailing/letters.server';
import { startLocalMailServer, type LocalMailServer } from '@/features/mailing/local-mail-server.server';
import { deleteMails, listMails, readMail } from '@/features/mailing/mailbox.server';
import { openTransport } from '@/features/mailing/transport.server';
import { createMailWorker, type MailWorker } from '@/features/mailing/worker.server';
import { testDatabase } from '../setup/test-database';
import { addAuthor, addMailing, addProject, addSubscriber } from './mailing-fixtures';
import { startScriptedServer, type ScriptedServer } from './scripted-server';

const MINUTE = 60_000;
let now: number;
let worker: MailWorker | undefined;

function startWorker(url: string): MailWorker {
  worker = createMailWorker({ transport: openTransport(url), clock: () => now, random: () => 0.5, lanes: 1 });
  return worker;
}
async function work(): Promise<void> {
  worker!.round();
  await worker!.settled();
}
const letter = {
  toAddress: 'wenna@mail.example',
  subject: 'Your link',
  text: 'Open:\n\nhttps://boxes.example/x?a=1&b=2',
  expiresInMinutes: 15,
};
const stateOf = () =>
  sqlite().prepare('SELECT state, attempts, next_at, text, html FROM letter').get() as Record<string, unknown>;

beforeEach(() => {
  testDatabase();
  now = Date.now();
});
afterEach(async () => {
  await worker?.stop({ patience: 100 });
  worker = undefined;
});

describe('a letter', () => {
  let server: ScriptedServer;
  beforeEach(async () => {
    server = await startScriptedServer();
    startWorker(server.url);
  });
  afterEach(() => server.stop());

  it('goes once, and what it said is forgotten then', async () => {
    queueLetter(letter);
    now = Date.now();
    await work();
    await work();
    expect(server.received).toHaveLength(1);
    expect(server.received[0]).toMatchObject({ from: 'letters@quilletlane.example', to: 'wenna@mail.example' });
    expect(server.received[0]!.raw).toMatch(/^Auto-Submitted: auto-generated\r$/m);
    expect(stateOf()).toMatchObject({ state: 'accepted', text: '', html: '' });
  });

  it('is tried again a minute after "later", and again after the server was away, which costs no try', async () => {
    queueLetter({ ...letter, toAddress: 'greylist-w@mail.example' });
    now = Date.now();
    server.refuseWith('421 not now');
    await work();
    expect(stateOf()).toMatchObject({ state: 'queued', attempts: 0 });
    server.refuseWith(null);
    now += 5_000;
    await work();
    expect(stateOf()).toMatchObject({ state: 'queued', attempts: 1, next_at: now + MINUTE });
    now += MINUTE;
    await work();
    expect(stateOf()).toMatchObject({ state: 'accepted' });
  });

  it('is not sent once it is too old', async () => {
    queueLetter(letter);
    now = Date.now() + 15 * MINUTE;
    await work();
    expect(server.received).toEqual([]);
    expect(stateOf()).toMatchObject({ state: 'expired', text: '' });
  });

  it('goes before what is left of a mailing', async () => {
    addAuthor();
    addProject();
    for (let i = 0; i < 40; i += 1) addSubscriber(`s${i}`);
    addMailing('m1', { at: now });
    worker!.round();
    queueLetter(letter);
    now = Date.now() + 10;
    await worker!.settled();
    const place = server.received.findIndex(({ to }) => to === 'wenna@mail.example');
    expect(place).toBeGreaterThanOrEqual(0);
    expect(place).toBeLessThan(5);
    expect(server.received).toHaveLength(41);
  });

  it('is taken by one worker only', () => {
    queueLetter(letter);
    now = Date.now();
    expect(takeLetter(now)?.toAddress).toBe('wenna@mail.example');
    expect(takeLetter(now)).toBeNull();
  });

  it('with a line break in its subject or address is our own bug', () => {
    expect(() => queueLetter({ ...letter, subject: 'a\r\nBcc: x@y.example' })).toThrow(
      'a line break in a header of a letter',
    );
    expect(() => queueLetter({ ...letter, toAddress: 'a@b.example\nx' })).toThrow(
      'a line break in a header of a letter',
    );
  });
});

describe('the local mail server and its mailbox', () => {
  const dir = join(config.dataDir, 'mail');
  let local: LocalMailServer;
  beforeEach(async () => {
    local = await startLocalMailServer({ port: 0, dir });
    startWorker(local.url);
  });
  afterEach(async () => {
    await worker?.stop({ patience: 100 });
    await local.stop();
    await deleteMails();
  });

  it('keep each mail as it came and list the newest first', async () => {
    queueLetter({ ...letter, subject: 'First' });
    now = Date.now();
    await work();
    queueLetter({ ...letter, subject: 'Second: é', toName: 'Wenna' });
    now = Date.now();
    await work();

    const { mails, total } = await listMails();
    expect(total).toBe(2);
    expect(mails.map(({ subject, to }) => [subject, to])).toEqual([
      ['Second: é', '"Wenna" <wenna@mail.example>'],
      ['First', 'wenna@mail.example'],
    ]);
    const mail = await readMail(mails[1]!.id);
    expect(mail).toMatchObject({ from: '"Quillet Lane Seed Circle" <letters@quilletlane.example>' });
    expect(mail?.text.trim()).toBe('Open:\n\nhttps://boxes.example/x?a=1&b=2');
    expect(mail?.html).toContain('href="https://boxes.example/x?a=1&amp;b=2"');
    expect(mail?.headers.find(({ name }) => name === 'Return-Path')?.value).toBe('<letters@quilletlane.example>');
    expect(readFileSync(join(dir, `${mails[1]!.id}.eml`), 'utf8')).toMatch(
      /^Return-Path: .*\r\nDelivered-To: wenna@mail\.example\r\n/,
    );

    await deleteMails();
    expect(readdirSync(dir)).toEqual([]);
  });

  it('read no other file, whatever the name says', async () => {
    writeFileSync(join(config.dataDir, 'secret-file.eml'), 'Subject: secret\r\n\r\nx');
    for (const id of ['../secret-file', '..%2Fsecret-file', 'secret-file', '']) expect(await readMail(id)).toBeNull();
  });
});
