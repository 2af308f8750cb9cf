import { describe, expect, it } from 'vitest';
import { rulerTicks } from '@/components/ruler-ticks';

describe('rulerTicks', () => {
  it('marks an inch in sixteenths where they stand four pixels apart', () => {
    // 96 px ÷ 16 = 6 px from tick to tick; 17 ticks with both ends.
    const ticks = rulerTicks({ from: 0, to: 25.4, units: 'in', width: 96 });
    expect(ticks).toHaveLength(17);
    expect(ticks.map(({ size }) => size)).toEqual([14, 4, 4, 4, 6, 4, 4, 4, 9, 4, 4, 4, 6, 4, 4, 4, 14]);
  });

  it('takes coarser ticks where finer ones would run together', () => {
    // 10 in on 200 px: sixteenths 1.25 px apart, eighths 2.5 px, quarters 5 px; 41 quarters.
    expect(rulerTicks({ from: 0, to: 254, units: 'in', width: 200 })).toHaveLength(41);
  });

  it('marks a centimetre in millimetres and figures it by the chosen unit', () => {
    const labels = (units: 'mm' | 'cm') =>
      rulerTicks({ from: 0, to: 20, units, width: 200 }).flatMap(({ label }) => (label ? [label] : []));
    expect(labels('mm')).toEqual(['0', '10', '20']);
    expect(labels('cm')).toEqual(['0', '1', '2']);
  });

  it('starts on a whole mark when the range does not', () => {
    // From 0.3 in the first sixteenth is 5/16 in: (0.3125 − 0.3) of 1 in.
    const [first] = rulerTicks({ from: 0.3 * 25.4, to: 1.3 * 25.4, units: 'in', width: 96 });
    expect(first?.at).toBeCloseTo(0.0125, 9);
  });

  it('leaves out figures that would touch', () => {
    // 10 in on 200 px: 20 px from inch to inch, so every second inch has a figure.
    const figured = rulerTicks({ from: 0, to: 254, units: 'in', width: 200 }).flatMap(({ label }) =>
      label ? [label] : [],
    );
    expect(figured).toEqual(['0', '2', '4', '6', '8', '10']);
  });

  it('has no ticks for an empty range, a range upside down or no room', () => {
    expect(rulerTicks({ from: 5, to: 5, units: 'mm', width: 100 })).toEqual([]);
    expect(rulerTicks({ from: 5, to: 4, units: 'mm', width: 100 })).toEqual([]);
    expect(rulerTicks({ from: 0, to: 5, units: 'mm', width: 0 })).toEqual([]);
  });
});
