import { describe, expect, it } from 'vitest';
import { thinned, type RevisionMark } from '@/features/projects/thinning';

const MINUTE = 60_000;
const HOUR = 60 * MINUTE;
const DAY = 24 * HOUR;
const NOW = Date.UTC(2031, 4, 20, 12);

/** Revisions 1, 2, 3… at these ages, oldest first. */
const saved = (ages: readonly number[], more: Partial<RevisionMark> = {}): RevisionMark[] =>
  ages.map((age, i) => ({ n: i + 1, kind: 'saved', savedBy: 'ines', savedAt: NOW - age, ...more }));

describe('kept revisions', () => {
  it('are all there for ten minutes', () => {
    expect(thinned(saved([9 * MINUTE, 8 * MINUTE, 2_000, 1_000]), NOW)).toEqual([]);
  });
  it('are the last of every five minutes for a day', () => {
    // 11:30 to 11:35 by the clock: at 11:31, 11:32 and 11:34; then one at 11:36.
    expect(thinned(saved([29 * MINUTE, 28 * MINUTE, 26 * MINUTE, 24 * MINUTE, 0]), NOW)).toEqual([1, 2]);
  });
  it('are the last of every hour for a month and of every day after that', () => {
    const hours = saved([3 * DAY - 10 * MINUTE, 3 * DAY - 20 * MINUTE, 3 * DAY - 70 * MINUTE, 0]);
    expect(thinned(hours, NOW)).toEqual([1]);
    const days = saved([40 * DAY, 40 * DAY - HOUR, 40 * DAY - 2 * HOUR, 39 * DAY, 0]);
    expect(thinned(days, NOW)).toEqual([1, 2]);
  });
  it('are the last of each person', () => {
    const two = saved([29 * MINUTE, 28 * MINUTE, 27 * MINUTE, 0]).map((mark, i) => ({
      ...mark,
      savedBy: i === 1 ? 'wenna' : 'ines',
    }));
    expect(thinned(two, NOW)).toEqual([1]);
  });
  it.each(['published', 'scheduled', 'restored', 'set aside'])('stay for ever when %s', (kind) => {
    expect(thinned([...saved([40 * DAY, 40 * DAY - 1], { kind }), ...saved([0])], NOW)).toEqual([]);
  });
  it('always hold the newest, however old it is', () => {
    expect(thinned(saved([100 * DAY]), NOW)).toEqual([]);
  });
  it('once thinned, are not thinned again at the same time', () => {
    const marks = saved(Array.from({ length: 200 }, (_, i) => (200 - i) * 2 * MINUTE));
    const gone = new Set(thinned(marks, NOW));
    expect(gone.size).toBeGreaterThan(0);
    expect(
      thinned(
        marks.filter(({ n }) => !gone.has(n)),
        NOW,
      ),
    ).toEqual([]);
  });
});
