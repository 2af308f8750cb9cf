import { describe, expect, it } from 'vitest';
import { GIVE_UP_AFTER, gateWait, waitAfter } from '@/features/mailing/backoff';
import { enhancedStatus, judge, type Answer } from '@/features/mailing/outcome';

const refusal = (reply: string, more: Partial<Answer> = {}): Answer => ({
  phase: 'envelope',
  command: 'RCPT TO',
  code: Number(reply.slice(0, 3)),
  reply,
  ...more,
});
const silence = (phase: Answer['phase']): Answer => ({ phase, code: null, reply: 'Connection closed unexpectedly' });

describe('what follows from an answer', () => {
  it.each<[string, Answer, object]>([
    [
      '250 after the last dot is accepted',
      refusal('250 2.0.0 queued', { phase: 'complete', command: 'DATA' }),
      { kind: 'accepted' },
    ],
    ['450 at the recipient is tried later', refusal('450 4.2.1 try later'), { kind: 'later' }],
    ['451 after the last dot is tried later', refusal('451 4.7.1 slow down', { phase: 'complete' }), { kind: 'later' }],
    [
      '550 5.1.1 is refused and the address suppressed',
      refusal('550 5.1.1 no such person'),
      { kind: 'refused', suppress: true, aboutUs: false },
    ],
    [
      '553 5.1.3 is refused and the address suppressed',
      refusal('553 5.1.3 bad syntax'),
      { kind: 'refused', suppress: true, aboutUs: false },
    ],
    [
      '550 5.1.10 is refused and the address suppressed',
      refusal('550 5.1.10 null MX'),
      { kind: 'refused', suppress: true, aboutUs: false },
    ],
    [
      '550 without a status is refused, the address stays',
      refusal('550 no'),
      { kind: 'refused', suppress: false, aboutUs: false },
    ],
    [
      '550 5.7.1 is about us, the address stays',
      refusal('550 5.7.1 refused by policy'),
      { kind: 'refused', suppress: false, aboutUs: true },
    ],
    [
      '550 5.7.515 is about us',
      refusal('550 5.7.515 not aligned', { phase: 'complete' }),
      { kind: 'refused', suppress: false, aboutUs: true },
    ],
    [
      '554 without a status is about us',
      refusal('554 rejected', { phase: 'complete' }),
      { kind: 'refused', suppress: false, aboutUs: true },
    ],
    ['552 5.2.2, a full mailbox, is tried later', refusal('552 5.2.2 full'), { kind: 'later' }],
    [
      'a number in the words is no status',
      refusal('550 see 5.1.1 in the manual'),
      { kind: 'refused', suppress: false, aboutUs: false },
    ],
    ['421 closes the gate', refusal('421 4.3.2 going down'), { kind: 'server away', pause: false }],
    [
      '535 pauses',
      refusal('535 5.7.8 bad password', { phase: 'connect', command: 'AUTH' }),
      { kind: 'server away', pause: true },
    ],
    [
      'a greeting of 554 closes the gate',
      refusal('554 no service', { phase: 'connect', command: 'CONN' }),
      { kind: 'server away', pause: false },
    ],
    ['no connection closes the gate', silence('connect'), { kind: 'server away', pause: false }],
    ['a line that breaks before the message is whole is tried later', silence('body'), { kind: 'later' }],
    ['a line that breaks after the last dot is unknown', silence('complete'), { kind: 'unknown' }],
    [
      'what our own side cannot send is refused',
      { ...silence('envelope'), refusedHere: true },
      { kind: 'refused', suppress: false, aboutUs: false },
    ],
  ])('%s', (_, answer, outcome) => {
    expect(judge(answer)).toEqual(outcome);
  });

  it('stops the mailing when our own address is refused or the mail is too large', () => {
    expect(judge(refusal('550 5.7.1 sender refused', { command: 'MAIL FROM' })).kind).toBe('stop');
    expect(judge(refusal('552 5.3.4 too big', { phase: 'complete', command: 'DATA' })).kind).toBe('stop');
  });

  it('reads the status at the head of a reply only', () => {
    expect(enhancedStatus('550 5.1.10 null MX')).toBe('5.1.10');
    expect(enhancedStatus('450-4.2.1 first line')).toBe('4.2.1');
    expect(enhancedStatus('550 no 5.1.1')).toBeNull();
  });
});

describe('waiting', () => {
  it('is 1, 5, 15, 60, 240 minutes, then 240 each time', () => {
    const minutes = [1, 2, 3, 4, 5, 6, 20].map((tries) => waitAfter(tries, 0.5) / 60_000);
    expect(minutes).toEqual([1, 5, 15, 60, 240, 240, 240]);
  });
  it('varies by a fifth', () => {
    expect(waitAfter(1, 0)).toBe(48_000);
    expect(waitAfter(1, 1)).toBe(72_000);
  });
  it('gives up after 48 hours', () => {
    expect(GIVE_UP_AFTER).toBe(172_800_000);
  });
  it('knocks at an absent server after 5 s, twice as long each time, at most 5 minutes', () => {
    expect([1, 2, 3, 7, 30].map((n) => gateWait(n) / 1000)).toEqual([5, 10, 20, 300, 300]);
  });
});
