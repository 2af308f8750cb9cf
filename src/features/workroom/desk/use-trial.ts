import { useEffect, useRef, useState } from 'react';
import type { Pattern, Sizing } from '@/engine';
import { waysOf, type WayTried } from '@/features/projects/range-trial';
import type { TrialRequest } from './trial.worker';

export interface Trial {
  /** What was tried so far, a way of choosing after the other. */
  readonly tried: readonly WayTried[];
  readonly ways: number;
  readonly running: boolean;
  /** The pattern that it was tried with: a later one may do better. */
  readonly of: Pattern;
}

/** Trying the whole range beside the page, and stopping it. */
export function useTrial(): {
  trial: Trial | null;
  start: (pattern: Pattern, sizing: Sizing) => void;
  stop: () => void;
} {
  const [trial, setTrial] = useState<Trial | null>(null);
  const worker = useRef<Worker | null>(null);
  const end = () => {
    worker.current?.terminate();
    worker.current = null;
  };
  useEffect(() => end, []);
  const stop = () => {
    end();
    setTrial((now) => now && { ...now, running: false });
  };
  return {
    trial,
    stop,
    start(pattern, sizing) {
      end();
      const ways = waysOf(pattern, sizing);
      setTrial({ tried: [], ways: ways.length, running: true, of: pattern });
      const own = new Worker(new URL('./trial.worker.ts', import.meta.url), { type: 'module' });
      worker.current = own;
      own.addEventListener('message', ({ data }: MessageEvent<WayTried>) => {
        if (worker.current !== own) return;
        setTrial((now) => {
          if (now === null) return now;
          const tried = [...now.tried, data];
          return { ...now, tried, running: tried.length < now.ways };
        });
      });
      own.addEventListener('error', stop);
      own.postMessage({ pattern, ways } satisfies TrialRequest);
    },
  };
}
