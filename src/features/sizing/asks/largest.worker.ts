import { openModel, type SealedModel, type Sizing, type Solved } from '@/engine';
import { largestFrom, type Pile } from './ask';

/** What the page asks for; the answer is a `Solved`. A search that is no longer wanted is ended from outside. */
export interface LargestRequest {
  readonly model: SealedModel;
  readonly base: Sizing;
  readonly pile: Pile;
}

self.addEventListener('message', ({ data }: MessageEvent<LargestRequest>) => {
  const solved: Solved = largestFrom(openModel(data.model), data.base, data.pile);
  self.postMessage(solved);
});
