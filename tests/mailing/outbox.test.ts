import { simpleParser } from 'mailparser';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { sqlite } from '@/db/client.server';
import { fanOut } from '@/features/mailing/fan-out.server';
import { readGate } from '@/features/mailing/gate.server';
import {
  claim,
  countDeliveries,
  handOver,
  pauseMailing,
  record,
  recover,
  resumeMailing,
  stopMailing,
  troublesOf,
} from '@/features/mailing/outbox.server';
import { openTransport, type MailTransport } from '@/features/mailing/transport.server';
import { createMailWorker, type MailWorker } from '@/features/mailing/worker.server';
import { testDatabase } from '../setup/test-database';
import {
  addAuthor,
  addMailing,
  addProject,
  addSubscriber,
  deliveryOf,
  mailingState,
  MINUTE,
  NOON,
} from './mailing-fixtures';
import { startScriptedServer, type ScriptedServer } from './scripted-server';

let server: ScriptedServer;
let now: number;
let workers: MailWorker[];

function worker(owner = 'worker one', url = server.url): MailWorker {
  const made = createMailWorker({ transport: openTransport(url), clock: () => now, random: () => 0.5, owner });
  workers.push(made);
  return made;
}
/** Rounds until nothing is under way, as the timer would do. */
async function work(it: MailWorker, rounds = 2): Promise<void> {
  for (let i = 0; i < rounds; i += 1) {
    it.round();
    await it.settled();
  }
}
const counts = () => {
  const all = countDeliveries('m1');
  const { accepted, waiting, retrying, refused, uncertain, leftOut, total } = all;
  expect(accepted + waiting + retrying + refused + uncertain + leftOut, 'the counts make up the total').toBe(total);
  return { accepted, waiting, retrying, refused, uncertain, leftOut };
};
const NONE = { accepted: 0, waiting: 0, retrying: 0, refused: 0, uncertain: 0, leftOut: 0 };

beforeEach(async () => {
  testDatabase();
  server = await startScriptedServer();
  now = NOON;
  workers = [];
  addAuthor();
  addProject();
});
afterEach(async () => {
  await Promise.all(workers.map((it) => it.stop({ patience: 100 })));
  await server.stop();
});

describe('the rows of a mailing', () => {
  it('are one for each confirmed person who may be written to', () => {
    addSubscriber('wenna');
    addSubscriber('perrin', { state: 'pending' });
    addSubscriber('tamsin', { state: 'left' });
    addSubscriber('jory');
    sqlite().exec("INSERT INTO suppression (email_key, reason) VALUES ('jory@mail.example', 'hard')");
    addMailing();
    fanOut('m1', { now, domain: 'quilletlane.example' });
    expect(sqlite().prepare('SELECT subscriber_id FROM delivery').pluck().all()).toEqual(['wenna']);
    expect(sqlite().prepare('SELECT state, total, prepared_at FROM mailing').get()).toEqual({
      state: 'sending',
      total: 1,
      prepared_at: NOON,
    });
  });

  it('are the same when they are made twice, over more than one page', () => {
    for (let i = 0; i < 1203; i += 1) addSubscriber(`s${i}`);
    addMailing();
    fanOut('m1', { now, domain: 'quilletlane.example' });
    const ids = sqlite().prepare('SELECT message_id FROM delivery ORDER BY id').pluck().all();
    expect(ids).toHaveLength(1203);
    expect(new Set(ids).size).toBe(1203);
    sqlite().exec("UPDATE mailing SET state = 'preparing', prepared_at = NULL");
    fanOut('m1', { now, domain: 'quilletlane.example' });
    expect(sqlite().prepare('SELECT message_id FROM delivery ORDER BY id').pluck().all()).toEqual(ids);
  });

  it('leave out whoever confirmed after the mailing was fixed', () => {
    addSubscriber('wenna');
    addMailing('m1', { at: Date.UTC(2026, 0, 1) });
    fanOut('m1', { now, domain: 'quilletlane.example' });
    expect(sqlite().prepare('SELECT count(*) FROM delivery').pluck().get()).toBe(0);
  });

  it('are not claimed before all of them are there', () => {
    addSubscriber('wenna');
    addMailing();
    sqlite().exec(
      "INSERT INTO delivery (mailing_id, subscriber_id, email_key, message_id) VALUES ('m1', 'wenna', 'wenna@mail.example', '<d.1@x>')",
    );
    expect(claim('w', { now: Date.now() + MINUTE, limit: 10 })).toEqual([]);
  });
});

describe('sending', () => {
  it('takes each answer for what it is', async () => {
    for (const local of ['anna', 't-450', 't-550', 'd-554', 'drop-before-data', 'drop-after-dot']) addSubscriber(local);
    addMailing();
    await work(worker());
    expect(counts()).toEqual({ ...NONE, accepted: 1, retrying: 2, refused: 2, uncertain: 1 });
    expect(deliveryOf('t-450')).toMatchObject({ state: 'queued', attempts: 1, next_at: NOON + MINUTE, code: 450 });
    expect(deliveryOf('t-550')).toMatchObject({ state: 'rejected', code: 550 });
    expect(deliveryOf('drop-before-data')).toMatchObject({ state: 'queued', phase: 'envelope', code: null });
    expect(deliveryOf('drop-after-dot')).toMatchObject({
      state: 'unknown',
      phase: 'complete',
      unknowns: 1,
      next_at: NOON + 15 * MINUTE,
    });
    expect(sqlite().prepare('SELECT email_key, reason FROM suppression').all()).toEqual([
      { email_key: 't-550@mail.example', reason: 'hard' },
    ]);
    expect(mailingState()).toBe('sending');
  });

  it('gathers what did not simply go by what the server said, without addresses', async () => {
    for (const local of ['t-550', 't-550+b', 'd-554', 'drop-after-dot']) addSubscriber(local);
    addMailing();
    await work(worker());
    expect(troublesOf('m1')).toEqual([
      {
        what: 'refused',
        count: 2,
        reply: '550 5.1.1 no such person',
        enhanced: '5.1.1',
        suppressed: true,
        nextAt: null,
      },
      {
        what: 'refused',
        count: 1,
        reply: '554 5.7.1 refused by policy',
        enhanced: '5.7.1',
        suppressed: false,
        nextAt: null,
      },
      {
        what: 'uncertain',
        count: 1,
        reply: 'Connection closed unexpectedly',
        enhanced: null,
        suppressed: false,
        nextAt: NOON + 15 * MINUTE,
      },
    ]);
  });

  it('tries again what was put off, and then is done', async () => {
    addSubscriber('greylist-wenna');
    addMailing();
    const it = worker();
    await work(it);
    expect(counts()).toEqual({ ...NONE, retrying: 1 });
    now += MINUTE;
    await work(it);
    expect(counts()).toEqual({ ...NONE, accepted: 1 });
    expect(mailingState()).toBe('done');
    expect(server.received).toHaveLength(1);
  });

  it('sends a lost one once more after 15 minutes, the same to the byte', async () => {
    addSubscriber('drop-after-dot', { name: 'Wenna Tolliver' });
    addMailing();
    const it = worker();
    await work(it);
    now += 14 * MINUTE;
    await work(it);
    expect(server.received).toHaveLength(1);
    now += MINUTE;
    await work(it);
    expect(server.received).toHaveLength(2);
    expect(server.received[1]!.raw).toBe(server.received[0]!.raw);
    expect(counts()).toEqual({ ...NONE, accepted: 1 });
    expect(mailingState()).toBe('done');
  });

  it('leaves one uncertain whose answer is lost twice', async () => {
    addSubscriber('drop-after-dot-always');
    addMailing();
    const it = worker();
    await work(it);
    now += 15 * MINUTE;
    await work(it);
    now += 24 * 60 * MINUTE;
    await work(it);
    expect(server.received).toHaveLength(2);
    expect(counts()).toEqual({ ...NONE, uncertain: 1 });
    expect(mailingState()).toBe('done');
  });

  it('gives up what is put off for 48 hours', async () => {
    addSubscriber('t-450');
    addMailing();
    const it = worker();
    for (let hours = 0; hours < 50 * 4; hours += 1) {
      await work(it, 1);
      now += 15 * MINUTE;
    }
    expect(deliveryOf('t-450').state).toBe('expired');
    expect(counts()).toEqual({ ...NONE, refused: 1 });
    expect(mailingState()).toBe('done');
  });

  it('writes nothing to someone who left between the making of the rows and their turn', async () => {
    addSubscriber('wenna');
    addSubscriber('perrin');
    addMailing();
    fanOut('m1', { now, domain: 'quilletlane.example' });
    sqlite().exec("UPDATE subscriber SET state = 'left' WHERE id = 'wenna'");
    await work(worker());
    expect(server.received.map(({ to }) => to)).toEqual(['perrin@mail.example']);
    expect(counts()).toEqual({ ...NONE, accepted: 1, leftOut: 1 });
    expect(mailingState()).toBe('done');
  });

  it('writes nothing to someone who left after the claim and before the hand-over', () => {
    addSubscriber('wenna');
    addMailing();
    fanOut('m1', { now, domain: 'quilletlane.example' });
    const [id] = claim('w', { now, limit: 1 });
    sqlite().exec("UPDATE subscriber SET state = 'left' WHERE id = 'wenna'");
    expect(handOver(id!, 'w', now)).toBeNull();
    expect(claim('w', { now, limit: 1 })).toEqual([]);
    expect(deliveryOf('wenna').state).toBe('suppressed');
  });

  it('takes first tries and second ones by turns', () => {
    for (let i = 0; i < 6; i += 1) addSubscriber(`s${i}`);
    addMailing();
    fanOut('m1', { now, domain: 'quilletlane.example' });
    sqlite().exec('UPDATE delivery SET attempts = 1 WHERE id > 3');
    expect(claim('w', { now, limit: 4 })).toEqual([1, 4, 2, 5]);
  });

  it('pauses when three servers in a row refuse who we are', async () => {
    for (const local of [
      'd-554',
      'd-554+b',
      'd-554+c',
      'd-554+d',
      'd-554+e',
      'd-554+f',
      'd-554+g',
      'd-554+h',
      'd-554+i',
    ])
      addSubscriber(local);
    addMailing();
    await work(worker());
    expect(mailingState()).toBe('paused');
    expect(sqlite().prepare('SELECT pause_reason FROM mailing').pluck().get()).toBe(
      'Servers refuse this mailing because of who sends it: 554 5.7.1 refused by policy',
    );
    // Three, and what the other lanes held at that moment.
    expect(counts().refused).toBeLessThanOrEqual(6);
  });

  it('pauses when the mail is too large, with nobody refused for it', async () => {
    addSubscriber('d-552');
    addMailing();
    await work(worker());
    expect(mailingState()).toBe('paused');
    expect(counts()).toEqual({ ...NONE, waiting: 1 });
  });
});

describe('a mail server that is away', () => {
  it('costs nobody a try, and is knocked at less and less often', async () => {
    server.refuseWith('421 4.3.2 not now');
    for (let i = 0; i < 10; i += 1) addSubscriber(`s${i}`);
    addMailing();
    const it = worker();
    await work(it);
    expect(counts()).toEqual({ ...NONE, waiting: 10 });
    expect(readGate()).toMatchObject({ failures: 1, opensAt: NOON + 5_000 });
    const before = server.connections();
    await work(it, 5);
    expect(server.connections()).toBe(before);
    now += 5_000;
    await work(it);
    expect(readGate()).toMatchObject({ failures: 2, opensAt: NOON + 15_000 });
    server.refuseWith(null);
    now += 10_000;
    await work(it);
    expect(counts()).toEqual({ ...NONE, accepted: 10 });
    expect(readGate()).toBeNull();
  });

  it('pauses mailings with the reason after half an hour', async () => {
    server.refuseWith('421 4.3.2 not now');
    addSubscriber('wenna');
    addMailing();
    const it = worker();
    for (let minutes = 0; minutes <= 36; minutes += 1) {
      await work(it, 1);
      now += MINUTE;
    }
    expect(mailingState()).toBe('paused');
    expect(sqlite().prepare('SELECT pause_reason FROM mailing').pluck().get()).toMatch(
      /^The mail server has been away for half an hour: /,
    );
    server.refuseWith(null);
    resumeMailing('m1', now);
    await work(it);
    expect(mailingState()).toBe('done');
  });
});

describe('a process that ends', () => {
  it('leaves claimed ones to be sent, and handed-over ones uncertain', async () => {
    for (const id of ['claimed', 'flying', 'waiting']) addSubscriber(id);
    addMailing();
    fanOut('m1', { now, domain: 'quilletlane.example' });
    const [first, second] = claim('dead', { now, limit: 2 });
    handOver(second!, 'dead', now);
    expect(recover('worker one', now)).toEqual({ released: 1, unknown: 1 });
    expect(
      sqlite().prepare('SELECT state FROM delivery WHERE id IN (?, ?) ORDER BY id').pluck().all(first, second),
    ).toEqual(['queued', 'unknown']);
    const it = worker();
    await work(it);
    expect(counts()).toEqual({ ...NONE, accepted: 2, uncertain: 1 });
    expect(mailingState()).toBe('sending');
    now += 15 * MINUTE;
    await work(it);
    expect(counts()).toEqual({ ...NONE, accepted: 3 });
    expect(mailingState()).toBe('done');
  });

  it('in the middle of making rows leaves them to be completed', async () => {
    for (let i = 0; i < 3; i += 1) addSubscriber(`s${i}`);
    addMailing();
    sqlite().exec(
      "INSERT INTO delivery (mailing_id, subscriber_id, email_key, next_at, message_id) VALUES ('m1', 's1', 's1@mail.example', 0, '<d.abc@x>')",
    );
    await work(worker());
    expect(counts()).toEqual({ ...NONE, accepted: 3 });
    expect(new Set(server.received.map(({ to }) => to)).size).toBe(3);
  });

  it('that was only slow still settles what was given up as unknown', () => {
    addSubscriber('wenna');
    addMailing();
    fanOut('m1', { now, domain: 'quilletlane.example' });
    const [id] = claim('slow', { now, limit: 1 });
    const copy = handOver(id!, 'slow', now)!;
    recover('worker one', now);
    expect(deliveryOf('wenna').state).toBe('unknown');
    const answer = { phase: 'complete', code: 250, reply: '250 ok' } as const;
    record(copy, 'slow', { answer, outcome: { kind: 'accepted' }, now, random: 0.5 });
    expect(deliveryOf('wenna').state).toBe('accepted');
  });
});

describe('two workers', () => {
  it('send each copy once', async () => {
    for (let i = 0; i < 60; i += 1) addSubscriber(`s${i}`);
    addMailing();
    const one = worker('worker one');
    const two = worker('worker two');
    expect(one.round()).toBe(true);
    expect(two.round()).toBe(false);
    await Promise.all([work(one), work(two)]);
    expect(server.received).toHaveLength(60);
    expect(new Set(server.received.map(({ to }) => to)).size).toBe(60);
  });

  it('never hold the same delivery, even without a lease', () => {
    for (let i = 0; i < 10; i += 1) addSubscriber(`s${i}`);
    addMailing();
    fanOut('m1', { now, domain: 'quilletlane.example' });
    const one = claim('one', { now, limit: 8 });
    const two = claim('two', { now, limit: 8 });
    expect([...one, ...two].sort((a, b) => a - b)).toEqual([1, 2, 3, 4, 5, 6, 7, 8, 9, 10]);
    expect(handOver(one[0]!, 'two', now)).toBeNull();
  });

  it('take over from one another when a lease has run out', async () => {
    addSubscriber('wenna');
    addMailing();
    const one = worker('worker one');
    one.round();
    await one.settled();
    const two = worker('worker two');
    now += 29_000;
    expect(two.round()).toBe(false);
    now += 2_000;
    expect(two.round()).toBe(true);
    expect(one.round()).toBe(false);
  });
});

describe('pausing and stopping', () => {
  beforeEach(() => {
    for (let i = 0; i < 8; i += 1) addSubscriber(`s${i}`);
    addMailing();
    fanOut('m1', { now, domain: 'quilletlane.example' });
  });

  it('a paused mailing hands over nothing more, also not what was claimed', async () => {
    const ids = claim('w', { now, limit: 4 });
    pauseMailing('m1', now);
    expect(ids.map((id) => handOver(id, 'w', now))).toEqual([null, null, null, null]);
    await work(worker());
    expect(server.received).toEqual([]);
    expect(counts()).toEqual({ ...NONE, waiting: 8 });
    resumeMailing('m1', now);
    await work(workers[0]!);
    expect(server.received).toHaveLength(8);
  });

  it('a stopped one never sends the rest; what is under way is written down', async () => {
    const [first] = claim('w', { now, limit: 4 });
    const copy = handOver(first!, 'w', now)!;
    expect(stopMailing('m1', now)).toBe(true);
    const answer = { phase: 'complete', code: 250, reply: '250 ok' } as const;
    record(copy, 'w', { answer, outcome: { kind: 'accepted' }, now, random: 0.5 });
    expect(counts()).toEqual({ ...NONE, accepted: 1, leftOut: 7 });
    expect(resumeMailing('m1', now)).toBe(false);
    await work(worker());
    expect(server.received).toEqual([]);
  });

  it('one that is put off at the moment of stopping is not tried again', () => {
    const [first] = claim('w', { now, limit: 1 });
    const copy = handOver(first!, 'w', now)!;
    stopMailing('m1', now);
    const answer = { phase: 'envelope', code: 450, reply: '450 later' } as const;
    record(copy, 'w', { answer, outcome: { kind: 'later' }, now, random: 0.5 });
    expect(counts()).toEqual({ ...NONE, leftOut: 8 });
  });
});

describe('a copy as it arrives', () => {
  it('meets the standards for mail to a list', async () => {
    addSubscriber('wenna', { email: 'Wenna.Tolliver@mail.example', name: 'Wénna <b>&"Tolliver"', units: 'mm' });
    addMailing();
    await work(worker());
    const { raw, from, to } = server.received[0]!;
    const messageId = deliveryOf('wenna').message_id;
    const mail = await simpleParser(raw);

    expect(to).toBe('Wenna.Tolliver@mail.example');
    expect(from).toBe(`b+${/<d\.([0-9a-f]{24})@/.exec(messageId)?.[1]}@quilletlane.example`);
    expect(mail.date).toEqual(new Date(NOON));
    expect(mail.from?.value).toEqual([{ name: 'Ines Thornbury, Seed Circle', address: 'letters@quilletlane.example' }]);
    expect(mail.replyTo?.text).toBe('ines@quilletlane.example');
    expect(mail.messageId).toBe(messageId);
    expect(messageId).toMatch(/^<d\.[0-9a-f]{24}@quilletlane\.example>$/);
    expect(mail.to).toMatchObject({
      value: [{ name: 'Wénna <b>&"Tolliver"', address: 'Wenna.Tolliver@mail.example' }],
    });
    expect(mail.subject).toBe('New: Seed box');

    const header = (name: string) =>
      mail.headerLines.filter(({ key }) => key === name).map(({ line }) => line.replace(/\r?\n\s*/g, ' '));
    expect(header('list-id')).toEqual(['List-ID: "Quillet Lane Seed Circle" <projects.quilletlane.example>']);
    expect(header('list-unsubscribe')).toEqual(['List-Unsubscribe: <http://localhost:4321/unsubscribe?t=token-wenna>']);
    expect(header('list-unsubscribe-post')).toEqual(['List-Unsubscribe-Post: List-Unsubscribe=One-Click']);
    expect(header('mime-version')).toEqual(['MIME-Version: 1.0']);
    for (const one of ['date', 'from', 'to', 'message-id', 'subject']) expect(header(one), one).toHaveLength(1);
    for (const none of ['precedence', 'auto-submitted', 'bcc', 'cc', 'x-mailer'])
      expect(header(none), none).toEqual([]);

    expect(header('content-type')[0]).toMatch(/^Content-Type: multipart\/alternative;/);
    expect(raw.indexOf('text/plain; charset=utf-8')).toBeGreaterThan(0);
    expect(raw.indexOf('text/html; charset=utf-8')).toBeGreaterThan(raw.indexOf('text/plain; charset=utf-8'));
    expect(Math.max(...raw.split('\r\n').map((line) => line.length))).toBeLessThanOrEqual(998);
    expect(/[^\r]\n|\r[^\n]/.test(raw)).toBe(false);

    expect(mail.text).toBe(
      'Hello Wénna <b>&"Tolliver",\ninside in mm\nhttp://localhost:4321/projects/seed-box?units=mm\nhttp://localhost:4321/unsubscribe?t=token-wenna',
    );
    expect(mail.html).toContain('Hello Wénna &lt;b&gt;&amp;&quot;Tolliver&quot;,');
    expect(mail.html).toContain('<b>inside in mm</b>');
    expect(`${mail.html}${mail.text}`).not.toMatch(/[\uE000\uE001]/);
  });

  it('goes to one recipient in a transaction of its own, each with their own way out', async () => {
    addSubscriber('wenna', { units: 'cm' });
    addSubscriber('perrin');
    addMailing();
    await work(worker());
    const texts = await Promise.all(
      server.received.map(async ({ to, raw }) => [to, (await simpleParser(raw)).text] as const),
    );
    const byTo = new Map(texts);
    expect(byTo.get('wenna@mail.example')).toContain('unsubscribe?t=token-wenna');
    expect(byTo.get('wenna@mail.example')).toContain('units=cm');
    expect(byTo.get('perrin@mail.example')).toContain('unsubscribe?t=token-perrin');
    expect(byTo.get('perrin@mail.example')).toMatch(/^Hello,\n/);
  });
});

describe('the transport', () => {
  const message = (to: string, text: string) => ({
    envelope: { from: 'b@quilletlane.example', to },
    from: { name: '', address: 'a@quilletlane.example' },
    to: { name: '', address: to },
    subject: 's',
    text,
    messageId: '<d.00000000000000000000000a@quilletlane.example>',
    date: new Date(NOON),
    headers: {},
  });
  const sendOne = async (transport: MailTransport, to: string, text = 'x') => {
    const answer = await transport.send(message(to, text));
    transport.close();
    return answer;
  };

  it('tells a line that broke in the middle of the message from one that broke after it', async () => {
    const long = 'A line that is long enough to fill the sockets between.\n'.repeat(150_000);
    expect(await sendOne(openTransport(server.url), 'drop-mid-data@mail.example', long)).toMatchObject({
      phase: 'body',
      code: null,
    });
    expect(await sendOne(openTransport(server.url), 'drop-after-dot@mail.example')).toMatchObject({
      phase: 'complete',
      code: null,
    });
  });

  it('says that there was no connection', async () => {
    const { url } = server;
    await server.stop();
    expect(await sendOne(openTransport(url), 'wenna@mail.example')).toMatchObject({ phase: 'connect', code: null });
    server = await startScriptedServer();
  });

  it('refuses an address that the server has no extension for, without asking it', async () => {
    const answer = await sendOne(openTransport(server.url), 'wénna@mail.example');
    expect(answer).toMatchObject({ code: null, refusedHere: true });
  });
});
