import { useEffect, useRef, useState } from 'react';

export interface PlayRange {
  readonly from: number;
  readonly to: number;
  /** Where it begins and ends. */
  readonly at: number;
  readonly show: (value: number | null) => void;
}
export interface Play {
  readonly playing: boolean;
  /** Nothing is to move by itself: every press shows the next of a few sizes. */
  readonly byPress: boolean;
  /** Begins, or goes one size on where nothing moves by itself. */
  press(): void;
  stop(): void;
}

const SECONDS = 7;
const STOPS = 8;

/** Goes through a range and comes back: up from where it is, down to the smallest, up again. Nothing is changed by it. */
export function usePlay({ from, to, at, show }: PlayRange): Play {
  const [playing, setPlaying] = useState(false);
  const [byPress] = useState(() => matchMedia('(prefers-reduced-motion: reduce)').matches);
  const frame = useRef(0);
  const stop = useRef(0);
  const latest = useRef(show);
  useEffect(() => {
    latest.current = show;
  });
  useEffect(
    () => () => {
      cancelAnimationFrame(frame.current);
      latest.current(null);
    },
    [],
  );
  const end = () => {
    cancelAnimationFrame(frame.current);
    stop.current = 0;
    latest.current(null);
    setPlaying(false);
  };
  const begin = () => {
    setPlaying(true);
    let start: number | null = null;
    const tick = (time: number) => {
      start ??= time;
      const share = (time - start) / (SECONDS * 1000);
      if (share >= 1) return end();
      latest.current(through(share, { from, to, at }));
      frame.current = requestAnimationFrame(tick);
    };
    frame.current = requestAnimationFrame(tick);
  };
  return {
    playing,
    byPress,
    stop: end,
    press() {
      if (!byPress) return playing ? end() : begin();
      if (stop.current > STOPS) return end();
      setPlaying(true);
      latest.current(from + ((to - from) * stop.current) / STOPS);
      stop.current += 1;
    },
  };
}

/** The value at a share of the way from `at` up to `to`, down to `from` and back, at even speed. */
export function through(
  share: number,
  { from, to, at }: { readonly from: number; readonly to: number; readonly at: number },
): number {
  const way = share * 2 * (to - from);
  const up = to - at;
  if (way <= up) return at + way;
  if (way <= up + (to - from)) return to - (way - up);
  return from + (way - up - (to - from));
}
