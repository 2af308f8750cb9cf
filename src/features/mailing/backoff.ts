const MINUTE = 60_000;
const STEPS = [1, 5, 15, 60, 240].map((minutes) => minutes * MINUTE);
const LONGEST = 240 * MINUTE;

/** A mailing that is this late is worth less than none. */
export const GIVE_UP_AFTER = 48 * 60 * MINUTE;
/** How long a delivery whose answer was lost rests before it is sent once more. */
export const REST_AFTER_UNKNOWN = 15 * MINUTE;
/** How many times the answer to a whole message may be lost. After the second, we leave it. */
export const MOST_UNKNOWNS = 2;

/**
 * How long to wait after the `tries`-th time a server said "later": 1, 5, 15, 60, 240 minutes, then 4 hours each,
 * a fifth more or less, so that those deferred together do not come back together. `random` is in [0, 1).
 */
export function waitAfter(tries: number, random: number): number {
  const wait = STEPS[Math.max(0, tries - 1)] ?? LONGEST;
  return Math.round(wait * (0.8 + 0.4 * random));
}

/** How long all sending rests after the `failures`-th time in a row that the server was away: 5 s, doubling, to 5 min. */
export const gateWait = (failures: number): number => Math.min(5_000 * 2 ** Math.max(0, failures - 1), 5 * MINUTE);
/** After this long away, mailings are paused and their author is told. */
export const PAUSE_AFTER_AWAY = 30 * MINUTE;
