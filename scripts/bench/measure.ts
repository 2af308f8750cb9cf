import { performance } from 'node:perf_hooks';

/** Milliseconds of one round: the median of many, after some that warm up. */
export function median(rounds: number, work: (round: number) => void): number {
  for (let warm = 0; warm < Math.min(rounds, 200); warm += 1) work(warm);
  const times = Array.from({ length: rounds }, (_, round) => {
    const start = performance.now();
    work(round);
    return performance.now() - start;
  }).sort((a, b) => a - b);
  return times[Math.floor(times.length / 2)] as number;
}

/** One line of JSON: what was measured, against which peer in the same run, and how many times faster ours is. */
export function report(bench: string, ours: number, peer: string, theirs: number): void {
  print({ bench, ours_ms: three(ours), peer, peer_ms: three(theirs), ratio: three(theirs / ours) });
}
export const print = (line: Readonly<Record<string, unknown>>): void => console.log(JSON.stringify(line));
export const three = (value: number): number => Number(value.toPrecision(3));
