import type { Pattern, Sizing } from '@/engine';
import { tryRange } from '@/features/projects/range-trial';

export interface TrialRequest {
  readonly pattern: Pattern;
  readonly ways: readonly Sizing[];
}

self.addEventListener('message', ({ data }: MessageEvent<TrialRequest>) => {
  for (const tried of tryRange(data.pattern, data.ways)) self.postMessage(tried);
});
