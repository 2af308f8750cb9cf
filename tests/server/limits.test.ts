import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { takeTurn, tooMany } from '@/features/limits/limits.server';
import { waitInWords } from '@/features/limits/limits';
import { testDatabase } from '../setup/test-database';

beforeEach(() => {
  testDatabase();
});
afterEach(() => {
  vi.useRealTimers();
});

const wenna = { ip: '192.0.2.7', emailKey: 'wenna@quilletlane.example' };
const many = async (n: number, who = wenna) => {
  const turns = [];
  for (let i = 0; i < n; i += 1) turns.push(await takeTurn('sign-in', who));
  return turns.map(({ ok }) => ok);
};

describe('counting tries', () => {
  it('allows eight for one e-mail address in a quarter of an hour, and refuses the ninth from anywhere', async () => {
    expect(await many(8)).toEqual(Array(8).fill(true));
    expect(await takeTurn('sign-in', { ...wenna, ip: '198.51.100.1' })).toMatchObject({
      ok: false,
      seconds: 900,
      sentence: 'That was tried too often. Wait 15 minutes, then try again.',
    });
    expect((await takeTurn('sign-in', { ...wenna, emailKey: 'odo@quilletlane.example' })).ok).toBe(true);
  });

  it('allows forty from one address on the net, whoever they are for', async () => {
    for (let i = 0; i < 40; i += 1)
      expect((await takeTurn('sign-in', { ip: '192.0.2.7', emailKey: `a${i}@quilletlane.example` })).ok).toBe(true);
    expect((await takeTurn('sign-in', { ip: '192.0.2.7', emailKey: 'b@quilletlane.example' })).ok).toBe(false);
    expect((await takeTurn('sign-in', { ip: '192.0.2.8', emailKey: 'b@quilletlane.example' })).ok).toBe(true);
  });

  it('counts a whole /64 of IPv6 as one, however it is written', async () => {
    for (let i = 0; i < 40; i += 1) await takeTurn('sign-in', { ip: `2001:db8:0:1::${i.toString(16)}` });
    expect((await takeTurn('sign-in', { ip: '2001:0db8:0000:0001:ffff::1' })).ok).toBe(false);
    expect((await takeTurn('sign-in', { ip: '2001:db8:0:2::1' })).ok).toBe(true);
  });

  it('keeps sign-in, sign-up and the others apart', async () => {
    await many(9);
    expect((await takeTurn('sign-up', wenna)).ok).toBe(true);
  });

  it('gives a good try back', async () => {
    await many(7);
    const turn = await takeTurn('sign-in', wenna);
    if (turn.ok) await turn.giveBack();
    expect(await many(8)).toEqual(Array(8).fill(true));
  });

  it('does not let twenty at once slip through', async () => {
    const turns = await Promise.all(Array.from({ length: 20 }, () => takeTurn('sign-in', wenna)));
    expect(turns.filter(({ ok }) => ok)).toHaveLength(8);
  });

  it('begins anew when the time is over', async () => {
    vi.useFakeTimers({ toFake: ['Date'] });
    await many(9);
    vi.setSystemTime(Date.now() + 15 * 60_000 + 1000);
    expect(await many(1)).toEqual([true]);
  });

  it('answers an API with 429, when to come back and the sentence', async () => {
    const answer = tooMany({ seconds: 700, sentence: 'That was tried too often. Wait 12 minutes, then try again.' });
    expect(answer.status).toBe(429);
    expect(answer.headers.get('retry-after')).toBe('700');
    expect(await answer.json()).toMatchObject({ detail: 'That was tried too often. Wait 12 minutes, then try again.' });
  });
});

describe('a wait in words', () => {
  it.each([
    [1, 'a minute'],
    [60, 'a minute'],
    [61, '2 minutes'],
    [840, '14 minutes'],
    [3600, 'an hour'],
    [3601, '2 hours'],
    [7200, '2 hours'],
  ])('of %i seconds is %s', (seconds, words) => {
    expect(waitInWords(seconds)).toBe(words);
  });
});
