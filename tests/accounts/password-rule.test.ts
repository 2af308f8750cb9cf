import { describe, expect, it } from 'vitest';
import { judgePassword } from '@/features/accounts/password-rule';

const INES = { name: 'Ines Thornbury', email: 'ines@quilletlane.example' };

describe('choosing a password', () => {
  it.each([
    ['', '10 characters or more. Three or four words that do not belong together are easy to keep.'],
    ['snail', 'Too short: 5 more characters to go.'],
    ['ninechars', 'Too short: 1 more character to go.'],
    ['aaaaaaaaaaaa', 'Too easy to guess: it repeats the same few characters.'],
    ['abababababab', 'Too easy to guess: it repeats the same few characters.'],
    ['1234567890', 'Too easy to guess: it is a run of neighbouring characters.'],
    ['qwertyuiop', 'Too easy to guess: it is a run of neighbouring characters.'],
    ['zyxwvutsrq', 'Too easy to guess: it is a run of neighbouring characters.'],
    ['Ines Thornbury1', 'Too easy to guess: it is little more than a name that others know.'],
    ['ines@quilletlane.example', 'Too easy to guess: it is little more than a name that others know.'],
    ['password12', 'Too easy to guess: it is little more than a name that others know.'],
    [`${'long enough '.repeat(17)}`, 'Too long: at most 200 characters.'],
  ])('%j is refused: %s', (password, sentence) => {
    expect(judgePassword(password, INES)).toEqual({ ok: false, sentence });
  });

  it.each([
    ['damp snail', 'Enough. A few more characters make it much stronger.'],
    ['damp snail tin', 'Good. Longer is stronger still.'],
    ['damp snail tin lantern', 'Strong: long, and that is what counts.'],
  ])('%j is taken: %s', (password, sentence) => {
    expect(judgePassword(password, INES)).toEqual({ ok: true, sentence });
  });
});
