import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { createAutosave, type SaveAnswer, type SaveState } from '@/features/workroom/saving/autosave';
import { sameState } from '@/features/workroom/saving/same-state';

/** A server that answers when it is told to. */
function desk(answers: SaveAnswer[] = []) {
  const sent: { state: string; revision: number }[] = [];
  const copies: (string | null)[] = [];
  const states: SaveState[] = [];
  const waiting: ((answer: SaveAnswer) => void)[] = [];
  const saver = createAutosave<string>({
    send: (state, revision) => {
      sent.push({ state, revision });
      const answer = answers.shift();
      return answer ? Promise.resolve(answer) : new Promise((resolve) => waiting.push(resolve));
    },
    keepCopy: (state, revision) => copies.push(`${state}@${revision}`),
    dropCopy: () => copies.push(null),
    onState: (state) => states.push(state),
    now: Date.now,
    start: { revision: 7, savedAt: 0 },
  });
  return {
    saver,
    sent,
    copies,
    states,
    answer: (answer: SaveAnswer) => waiting.shift()?.(answer),
    kind: () => saver.state().status.kind,
  };
}
const saved = (revision: number): SaveAnswer => ({ kind: 'saved', revision, updatedAt: 1000 * revision });

beforeEach(() => void vi.useFakeTimers());
afterEach(() => void vi.useRealTimers());

describe('saving by itself', () => {
  it('sends the newest state a second after the last change', async () => {
    const { saver, sent, kind } = desk([saved(8)]);
    saver.changed('a');
    await vi.advanceTimersByTimeAsync(900);
    saver.changed('ab');
    await vi.advanceTimersByTimeAsync(999);
    expect([sent, kind()]).toEqual([[], 'waiting']);
    await vi.advanceTimersByTimeAsync(1);
    expect(sent).toEqual([{ state: 'ab', revision: 7 }]);
    expect(saver.state()).toEqual({ status: { kind: 'saved' }, revision: 8, savedAt: 8000 });
  });
  it('sends at once when the field or the page is left', async () => {
    const { saver, sent } = desk([saved(8)]);
    saver.changed('a');
    await saver.flush();
    expect(sent).toEqual([{ state: 'a', revision: 7 }]);
  });
  it('sends nothing when nothing changed', async () => {
    const { saver, sent } = desk();
    await saver.flush();
    expect(sent).toEqual([]);
  });
  it('has one request under way and sends the latest after it, over the new revision', async () => {
    const { saver, sent, answer } = desk();
    saver.changed('a');
    await vi.advanceTimersByTimeAsync(1000);
    saver.changed('ab');
    saver.changed('abc');
    await vi.advanceTimersByTimeAsync(5000);
    expect(sent).toHaveLength(1);
    answer(saved(8));
    await vi.advanceTimersByTimeAsync(1000);
    expect(sent[1]).toEqual({ state: 'abc', revision: 8 });
  });
  it('keeps a copy until the server has it', async () => {
    const { saver, copies } = desk([saved(8)]);
    saver.changed('a');
    expect(copies).toEqual(['a@7']);
    await vi.advanceTimersByTimeAsync(1000);
    expect(copies).toEqual(['a@7', null]);
  });
  it('says that it failed, keeps the copy and tries again after 2, 4 and 8 seconds', async () => {
    const lost: SaveAnswer = { kind: 'unreachable', sentence: 'The server cannot be reached.' };
    const { saver, sent, copies, kind } = desk([lost, lost, lost, saved(8)]);
    saver.changed('a');
    await vi.advanceTimersByTimeAsync(1000);
    expect([kind(), sent.length]).toEqual(['failed', 1]);
    await vi.advanceTimersByTimeAsync(2000);
    expect(sent).toHaveLength(2);
    await vi.advanceTimersByTimeAsync(4000);
    expect(sent).toHaveLength(3);
    expect(copies).toEqual(['a@7']);
    await vi.advanceTimersByTimeAsync(8000);
    expect([kind(), sent.length]).toEqual(['saved', 4]);
  });
  it('does not send again by itself what the server refused, but sends the next change', async () => {
    const { saver, sent, kind } = desk([{ kind: 'refused', sentence: 'Too long.' }, saved(8)]);
    saver.changed('a');
    await vi.advanceTimersByTimeAsync(60_000);
    expect([kind(), sent.length]).toEqual(['refused', 1]);
    saver.changed('b');
    await vi.advanceTimersByTimeAsync(1000);
    expect([kind(), sent.length]).toEqual(['saved', 2]);
  });
});

describe('when another tab saved meanwhile', () => {
  const changed: SaveAnswer = { kind: 'changed', revision: 9, updatedAt: 5000 };
  it('stops, tells the other version, and keeps what was typed with the revision it was made from', async () => {
    const { saver, sent, copies } = desk([changed]);
    saver.changed('a');
    await vi.advanceTimersByTimeAsync(1000);
    expect(saver.state()).toEqual({
      status: { kind: 'conflict', other: { revision: 9, updatedAt: 5000 } },
      revision: 7,
      savedAt: 0,
    });
    saver.changed('ab');
    await vi.advanceTimersByTimeAsync(60_000);
    await saver.flush();
    expect(sent).toHaveLength(1);
    expect(copies).toEqual(['a@7', 'ab@7']);
  });
  it('goes on from the version that was settled on', async () => {
    const { saver, sent } = desk([changed, saved(11)]);
    saver.changed('a');
    await vi.advanceTimersByTimeAsync(1000);
    saver.goOn({ revision: 10, updatedAt: 6000 });
    saver.changed('b');
    await vi.advanceTimersByTimeAsync(1000);
    expect(sent[1]).toEqual({ state: 'b', revision: 10 });
  });
  it('sends nothing of a copy that was made from an older revision', async () => {
    const { saver, sent, copies } = desk();
    saver.conflict({ revision: 7, updatedAt: 0 }, 5);
    saver.changed('old copy');
    await vi.advanceTimersByTimeAsync(60_000);
    expect([sent, copies]).toEqual([[], ['old copy@5']]);
  });
});

describe('two states', () => {
  it('say the same in another order of fields, and with a field that has no value', () => {
    expect(sameState({ a: 1, b: { c: [1, 2], d: undefined } }, { b: { c: [1, 2] }, a: 1 })).toBe(true);
  });
  it('do not say the same in another order of a list', () => expect(sameState([1, 2], [2, 1])).toBe(false));
});
