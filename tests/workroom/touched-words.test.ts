import { expect, it } from 'vitest';
import { agoWords } from '@/features/workroom/desk/SaveWords';
import { touchedWords } from '@/features/workroom/list/touched-words';

const now = Date.UTC(2027, 10, 20, 15, 0);
it.each([
  [Date.UTC(2027, 10, 20, 9, 41), 'Today 9:41'],
  [Date.UTC(2027, 10, 19, 23, 59), 'Yesterday'],
  [Date.UTC(2027, 10, 18, 12, 0), '18 November'],
  [Date.UTC(2026, 2, 2, 12, 0), '2 March 2026'],
])('%i was touched %s', (at, words) => expect(touchedWords(at, { now, timeZone: 'UTC' })).toBe(words));

it.each([
  [400, 'just now'],
  [2000, '2 s ago'],
  [59_000, '59 s ago'],
  [60_000, '1 min ago'],
  [7_200_000, '2 h ago'],
  [172_800_000, '2 d ago'],
])('%i ms is %s', (ms, words) => expect(agoWords(ms)).toBe(words));
