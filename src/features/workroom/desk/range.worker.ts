import type { Pattern, Sizing } from '@/engine';
import { checkRange, type RangeCheck } from '@/features/projects/proof-range';

export interface RangeRequest {
  readonly pattern: Pattern;
  readonly sizing: Sizing;
}

self.addEventListener('message', ({ data }: MessageEvent<RangeRequest>) => {
  const checked: RangeCheck | null = checkRange(data.pattern, data.sizing);
  self.postMessage(checked);
});
