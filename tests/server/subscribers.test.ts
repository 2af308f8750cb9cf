import { beforeEach, describe, expect, it } from 'vitest';
import { sqlite } from '@/db/client.server';
import { GENERIC_ANSWER, signUpSchema } from '@/features/subscribers/sign-up';
import { postSubscribe, postUnsubscribe } from '@/features/subscribers/subscribe-forms.server';
import {
  askToSubscribe,
  confirmSubscription,
  findSubscriber,
  forgetUnconfirmed,
  isConfirmable,
  leave,
  savePreferences,
  undoLeaving,
} from '@/features/subscribers/subscribers.server';
import { POST } from '@/pages/api/subscribe';
import { testDatabase } from '../setup/test-database';

const DAY = 24 * 60 * 60_000;
const NOW = Date.UTC(2026, 2, 3, 10);
const asked = (email: string, units: 'in' | 'mm' | 'cm' = 'in') => ({ email, units, website: '' });
const letters = () =>
  sqlite().prepare('SELECT to_address AS "to", subject, text, headers FROM letter ORDER BY rowid').all() as {
    to: string;
    subject: string;
    text: string;
    headers: string;
  }[];
const tokenIn = (text: string) => /confirm\?t=([\w-]+)/.exec(text)?.[1] ?? '';
const rowOf = (email: string) =>
  sqlite().prepare('SELECT * FROM subscriber WHERE email_key = ?').get(email) as Record<string, unknown> & {
    state: string;
    leave_token: string;
  };
/** Signs someone up and confirms; gives the token of their links. */
function join(email: string, units: 'in' | 'mm' | 'cm' = 'in', now = NOW): string {
  askToSubscribe(asked(email, units), now);
  return confirmSubscription(tokenIn(letters().at(-1)!.text), now)!;
}

beforeEach(() => void testDatabase());

describe('subscribing', () => {
  it('takes a letter with a button, and until then nothing', () => {
    askToSubscribe(asked('Wenna@Mail.example', 'mm'), NOW);
    expect(rowOf('wenna@mail.example')).toMatchObject({ state: 'pending', units: 'mm', email: 'Wenna@Mail.example' });
    const [letter] = letters();
    expect(letter).toMatchObject({
      to: 'Wenna@Mail.example',
      subject: 'Confirm that you want mail from Quillet Lane Seed Circle',
    });
    expect(JSON.parse(letter!.headers)).toEqual({ 'Auto-Submitted': 'auto-generated' });
    const token = tokenIn(letter!.text);
    for (let i = 0; i < 100; i += 1) expect(isConfirmable(token, NOW)).toBe(true);
    expect(rowOf('wenna@mail.example').state).toBe('pending');
    confirmSubscription(token, NOW);
    expect(rowOf('wenna@mail.example').state).toBe('confirmed');
  });

  it('keeps no token that a stolen database would give away', () => {
    askToSubscribe(asked('wenna@mail.example'), NOW);
    const token = tokenIn(letters()[0]!.text);
    expect(token).toHaveLength(32);
    expect(JSON.stringify(rowOf('wenna@mail.example'))).not.toContain(token);
  });

  it('confirms once, and not after three days', () => {
    askToSubscribe(asked('wenna@mail.example'), NOW);
    const token = tokenIn(letters()[0]!.text);
    expect(confirmSubscription(token, NOW + 3 * DAY + 1)).toBeNull();
    expect(confirmSubscription(token, NOW + 3 * DAY - 1)).not.toBeNull();
    expect(confirmSubscription(token, NOW + 3 * DAY - 1)).toBeNull();
    expect(confirmSubscription('', NOW)).toBeNull();
  });

  it('counts an address in other letters as the same person', () => {
    askToSubscribe(asked('wenna@mail.example'), NOW);
    askToSubscribe(asked(' WENNA@mail.EXAMPLE '), NOW);
    expect(sqlite().prepare('SELECT count(*) FROM subscriber').pluck().get()).toBe(1);
    // Only the newest letter's link works.
    const [first, second] = letters().map(({ text }) => tokenIn(text));
    expect(isConfirmable(first!, NOW)).toBe(false);
    expect(isConfirmable(second!, NOW)).toBe(true);
  });

  it('writes to someone who is on the list that nothing has changed', () => {
    join('wenna@mail.example', 'in');
    askToSubscribe(asked('wenna@mail.example', 'mm'), NOW);
    expect(letters().at(-1)?.subject).toBe('You already get mail from Quillet Lane Seed Circle');
    expect(rowOf('wenna@mail.example')).toMatchObject({ state: 'confirmed', units: 'in' });
  });

  it('writes nothing to an address that must not be written to, and nothing for a program', () => {
    sqlite().exec("INSERT INTO suppression (email_key, reason) VALUES ('gone@mail.example', 'complaint')");
    askToSubscribe(asked('gone@mail.example'), NOW);
    askToSubscribe({ ...asked('wenna@mail.example'), website: 'http://x.example' }, NOW);
    expect(letters()).toEqual([]);
  });

  it('forgets after three days whoever did not press the button', () => {
    askToSubscribe(asked('wenna@mail.example'), NOW);
    join('perrin@mail.example');
    expect(forgetUnconfirmed(NOW + 2 * DAY)).toBe(0);
    expect(forgetUnconfirmed(NOW + 4 * DAY)).toBe(1);
    expect(sqlite().prepare('SELECT email_key FROM subscriber').pluck().all()).toEqual(['perrin@mail.example']);
  });

  it('refuses what is no address with a sentence that helps', () => {
    const sentence = (email: string) => signUpSchema.safeParse({ email }).error?.issues[0]?.message;
    expect(sentence('wenna')).toBe('That is not an e-mail address: it looks like name@place.example.');
    expect(sentence('wénna@mail.example')).toBe(
      'Before the @, only letters from a to z can be written to from here. Use another address.',
    );
    expect(sentence('wenna@mail.example')).toBeUndefined();
  });
});

describe('the answer to the sign-up form', () => {
  const api = async (email: string, ip = '192.0.2.1') =>
    (await POST({
      request: new Request('http://localhost:4321/api/subscribe', {
        method: 'POST',
        headers: { 'content-type': 'application/json' },
        body: JSON.stringify({ email, units: 'in' }),
      }),
      clientAddress: ip,
    } as unknown as Parameters<typeof POST>[0])) as Response;

  it('is the same for an address that is known, unknown, left or suppressed', async () => {
    join('known@mail.example');
    leave(join('left@mail.example'));
    sqlite().exec("INSERT INTO suppression (email_key, reason) VALUES ('gone@mail.example', 'hard')");
    for (const email of ['known@mail.example', 'new@mail.example', 'left@mail.example', 'gone@mail.example']) {
      const response = await api(email);
      expect([response.status, await response.json()], email).toEqual([202, { sentence: GENERIC_ANSWER }]);
    }
  });

  it('stops after four tries for one address', async () => {
    for (let i = 0; i < 4; i += 1) expect((await api('wenna@mail.example', `192.0.2.${i}`)).status).toBe(202);
    const refused = await api('wenna@mail.example', '192.0.2.9');
    expect(refused.status).toBe(429);
    expect(Number(refused.headers.get('retry-after'))).toBeGreaterThan(3000);
    expect(letters()).toHaveLength(4);
  });

  it('is a page for the plain form, with what was typed when it does not fit', async () => {
    const form = async (email: string) =>
      postSubscribe({
        request: new Request('http://localhost:4321/subscribe', {
          method: 'POST',
          body: new URLSearchParams({ email, units: 'cm' }),
        }),
        clientAddress: '192.0.2.1',
      });
    const done = await form('wenna@mail.example');
    expect(done instanceof Response && [done.status, done.headers.get('location')]).toEqual([303, '/subscribe?asked']);
    expect(await form('wenna')).toMatchObject({ status: 422, typed: { email: 'wenna', units: 'cm' } });
  });
});

describe('leaving', () => {
  const post = (token: string, body: URLSearchParams | FormData | string, type?: string) =>
    postUnsubscribe({
      request: new Request(`http://localhost:4321/unsubscribe?t=${token}`, {
        method: 'POST',
        body,
        headers: { origin: 'https://webmail.example', ...(type ? { 'content-type': type } : {}) },
      }),
      url: new URL(`http://localhost:4321/unsubscribe?t=${token}`),
    });

  it('is not done by looking, a hundred times', () => {
    const token = join('wenna@mail.example');
    for (let i = 0; i < 100; i += 1) expect(findSubscriber(token)?.state).toBe('confirmed');
    expect(rowOf('wenna@mail.example').state).toBe('confirmed');
  });

  it('is done by one click of a mail program, urlencoded or multipart, once however often it asks', async () => {
    const token = join('wenna@mail.example');
    const multipart = new FormData();
    multipart.set('List-Unsubscribe', 'One-Click');
    const first = await post(token, new URLSearchParams({ 'List-Unsubscribe': 'One-Click' }));
    const leftAt = rowOf('wenna@mail.example').left_at;
    const second = await post(token, multipart);
    for (const response of [first, second]) {
      expect(response?.status).toBe(200);
      expect(response?.headers.get('location')).toBeNull();
      expect(response?.headers.get('set-cookie')).toBeNull();
      expect(await response?.text()).toBe('You are off the list.\n');
    }
    expect(rowOf('wenna@mail.example')).toMatchObject({ state: 'left', left_at: leftAt });
  });

  it('gives a page to a person who presses the button', async () => {
    const token = join('wenna@mail.example');
    expect(await post(token, new URLSearchParams({ do: 'leave' }))).toBeNull();
    expect(rowOf('wenna@mail.example').state).toBe('left');
    expect(await post(token, new URLSearchParams({ do: 'undo' }))).toBeNull();
    expect(rowOf('wenna@mail.example').state).toBe('confirmed');
  });

  it('answers alike for a token that is nobody’s, and refuses what is no form', async () => {
    expect((await post('nobody', new URLSearchParams({ 'List-Unsubscribe': 'One-Click' })))?.status).toBe(200);
    const token = join('wenna@mail.example');
    expect((await post(token, '{}', 'application/json'))?.status).toBe(400);
    expect((await post(token, new URLSearchParams({ x: 'y' })))?.status).toBe(400);
    expect(rowOf('wenna@mail.example').state).toBe('confirmed');
  });

  it('can be taken back for seven days, later only by signing up again', () => {
    const token = join('wenna@mail.example');
    leave(token, NOW);
    expect(findSubscriber(token, NOW + 7 * DAY + 1)?.mayUndo).toBe(false);
    expect(undoLeaving(token, NOW + 7 * DAY + 1)).toBe(false);
    askToSubscribe(asked('wenna@mail.example', 'cm'), NOW + 8 * DAY);
    expect(rowOf('wenna@mail.example').state).toBe('left');
    confirmSubscription(tokenIn(letters().at(-1)!.text), NOW + 8 * DAY);
    expect(rowOf('wenna@mail.example')).toMatchObject({ state: 'confirmed', units: 'cm', leave_token: token });
  });

  it('makes a waiting confirmation worthless', () => {
    const token = join('wenna@mail.example');
    leave(token, NOW);
    askToSubscribe(asked('wenna@mail.example'), NOW);
    const confirm = tokenIn(letters().at(-1)!.text);
    undoLeaving(token, NOW);
    leave(token, NOW);
    expect(confirmSubscription(confirm, NOW)).toBeNull();
  });
});

describe('preferences', () => {
  it('are a name and units, and nobody else’s', () => {
    const token = join('wenna@mail.example');
    join('perrin@mail.example');
    expect(savePreferences(token, { name: 'Wenna', units: 'cm' })).toBe(true);
    expect(rowOf('wenna@mail.example')).toMatchObject({ name: 'Wenna', units: 'cm' });
    expect(rowOf('perrin@mail.example')).toMatchObject({ name: null, units: 'in' });
    expect(savePreferences('nobody', { name: '', units: 'in' })).toBe(false);
    expect(savePreferences('', { name: '', units: 'in' })).toBe(false);
  });
});
