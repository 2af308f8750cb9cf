/** Ticks of the ruler that shows how far a mailing is: one for each `step` people, long ones numbered. */
export interface CountTick {
  readonly at: number;
  readonly size: 'long' | 'middle' | 'short';
}

const MOST_TICKS = 130;

/** 1, 2, 5, 10, 20…: as few people a tick as leaves at most 130 ticks. */
function tickStep(total: number): number {
  for (let power = 1; ; power *= 10)
    for (const digit of [1, 2, 5]) if (total / (digit * power) <= MOST_TICKS) return digit * power;
}

export function countTicks(total: number): readonly CountTick[] {
  const step = tickStep(total);
  return Array.from({ length: Math.floor(total / step) + 1 }, (_, i) => ({
    at: i * step,
    size: i % 10 === 0 ? 'long' : i % 5 === 0 ? 'middle' : 'short',
  }));
}
