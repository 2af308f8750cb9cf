import { describe, expect, it } from 'vitest';
import { gapWords } from '@/features/sizing/facts';

describe('the room that a fit leaves', () => {
  const mm = { units: 'mm', grid: '1mm' } as const;
  const inches = { units: 'in', grid: '1/16in' } as const;

  it('is told in tenths of a millimetre, also below one', () => {
    expect(gapWords({ gap: -0.43, is: 'same as' }, mm)).toBe('about 0.4\u00a0mm short');
    expect(gapWords({ gap: 0.8, is: 'at least' }, mm)).toBe('0.8\u00a0mm spare');
    expect(gapWords({ gap: 2, is: 'at least' }, mm)).toBe('2\u00a0mm spare');
  });

  it('is told in sixty-fourths of an inch', () => {
    expect(gapWords({ gap: 25.4 / 32, is: 'at least' }, inches)).toBe('1\u204432\u00a0in spare');
  });

  it('is words where no ruler shows it', () => {
    expect(gapWords({ gap: 0, is: 'same as' }, mm)).toBe('exactly');
    expect(gapWords({ gap: 0.02, is: 'same as' }, mm)).toBe('nearly exactly');
    expect(gapWords({ gap: 0, is: 'at least' }, inches)).toBe('just');
  });
});
