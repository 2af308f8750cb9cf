import { useStore } from '@nanostores/react';
import { useEffect, useState } from 'react';
import { rangeItems, type RangeCheck } from '@/features/projects/proof-range';
import type { ProofItem } from '@/features/projects/proof';
import type { DeskStore } from './desk-store';
import type { RangeRequest } from './range.worker';

const REST = 1500;
const NOTHING: readonly ProofItem[] = [];

/** What trying sizes all over the range found, worked out beside the page once nothing was typed for a while. */
export function useRangeCheck(store: DeskStore): readonly ProofItem[] {
  const { pattern, sizing } = useStore(store.$draft);
  const [items, setItems] = useState(NOTHING);
  useEffect(() => {
    let worker: Worker | null = null;
    const timer = setTimeout(() => {
      worker = new Worker(new URL('./range.worker.ts', import.meta.url), { type: 'module' });
      worker.onmessage = ({ data }: MessageEvent<RangeCheck | null>) => {
        worker?.terminate();
        // While the pattern does not read, what was found before stands.
        if (data !== null) setItems(rangeItems(data));
      };
      worker.postMessage({ pattern, sizing } satisfies RangeRequest);
    }, REST);
    return () => {
      clearTimeout(timer);
      worker?.terminate();
    };
  }, [pattern, sizing]);
  return items;
}
