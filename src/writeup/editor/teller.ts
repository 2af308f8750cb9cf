/** Milliseconds that typing has to pause before what was typed is told, and the longest that it waits when nothing pauses. */
const PAUSE = 150;
const LONGEST = 1000;

/** Tells of changes in the pauses between keys, so that what follows from one never holds up the next. */
export interface Teller {
  readonly changed: () => void;
  /** Tells at once what has not been told yet. */
  readonly flush: () => void;
  /** Forgets what has not been told, when another document takes the place of this one. */
  readonly stop: () => void;
}

export function createTeller(tell: () => void): Teller {
  let pausing: ReturnType<typeof setTimeout> | undefined;
  let since: number | null = null;
  const flush = () => {
    clearTimeout(pausing);
    if (since === null) return;
    since = null;
    tell();
  };
  return {
    flush,
    stop() {
      clearTimeout(pausing);
      since = null;
    },
    changed() {
      const now = Date.now();
      since ??= now;
      clearTimeout(pausing);
      pausing = setTimeout(flush, Math.min(PAUSE, Math.max(0, since + LONGEST - now)));
    },
  };
}
