import { describe, expect, it } from 'vitest';
import { STOCKS } from '@/engine';
import groups from './check-values.json' with { type: 'json' };

type Quantities = Record<string, { value: number | string }>;
function printed(group: string, size: string): Quantities {
  const found = groups
    .find((one) => one.id === group)
    ?.cases.find((one) => (one.inputs as Quantities).size?.value === size);
  if (!found) throw new Error(`no ${size} in ${group}`);
  return found.expected as unknown as Quantities;
}

describe('sheets as sold', () => {
  it.each(['A4', 'A3'] as const)('has %s as ISO 216 prints it', (size) => {
    const { width, height } = printed('paper-A', size);
    expect(STOCKS[size.toLowerCase() as 'a4']).toMatchObject({ across: width?.value, along: height?.value });
  });
  it('has Letter as the US sizes print it', () => {
    const { width_mm: width, height_mm: height } = printed('paper-US', 'Letter');
    expect(STOCKS.letter).toMatchObject({ across: width?.value, along: height?.value });
  });
  it('has squares of 12, 8 and 6 in and of 30 cm (common practice, no source)', () => {
    expect([
      STOCKS['12x12in'].across,
      STOCKS['8x8in'].across,
      STOCKS['6x6in'].across,
      STOCKS['30x30cm'].across,
    ]).toEqual([304.8, 203.2, 152.4, 300]);
  });
});
