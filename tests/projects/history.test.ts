import { describe, expect, it } from 'vitest';
import { begin, edit, redo, settle, undo } from '@/features/projects/history';

describe('undo and redo', () => {
  it('steps back and forth', () => {
    const history = edit(edit(begin('a'), 'ab'), 'abc');
    expect(undo(history).present).toBe('ab');
    expect(undo(undo(history)).present).toBe('a');
    expect(redo(undo(history)).present).toBe('abc');
  });
  it('takes typing in one field as one step', () => {
    const typed = edit(edit(edit(begin('a'), 'ab', 'title'), 'abc', 'title'), 'abcd', 'title');
    expect(undo(typed).present).toBe('a');
  });
  it('begins a new step when the field was left between', () => {
    const typed = edit(settle(edit(begin('a'), 'ab', 'title')), 'abc', 'title');
    expect(undo(typed).present).toBe('ab');
  });
  it('begins a new step in another field', () => {
    expect(undo(edit(edit(begin('a'), 'ab', 'title'), 'abc', 'summary')).present).toBe('ab');
  });
  it('forgets what was undone once something else is typed', () => {
    const changed = edit(undo(edit(begin('a'), 'ab')), 'ax');
    expect(redo(changed)).toBe(changed);
  });
  it('stays where it is with nothing to undo or redo', () => {
    expect(undo(begin('a')).present).toBe('a');
    expect(redo(begin('a')).present).toBe('a');
  });
  it('keeps the last 200 steps', () => {
    let history = begin(0);
    for (let n = 1; n <= 250; n += 1) history = edit(history, n);
    expect(history.past).toHaveLength(200);
    expect(history.past[0]).toBe(50);
  });
});
