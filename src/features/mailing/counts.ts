/** Where a mailing stands. The first five are what a person asks about; together with `leftOut` they make up the total. */
export interface Counts {
  /** The next server took it. Never called delivered: nobody can know that from here. */
  readonly accepted: number;
  /** Not tried yet, or being handed over now. */
  readonly waiting: number;
  /** A server said "later". */
  readonly retrying: number;
  /** A server refused it, or it was put off for 48 hours. */
  readonly refused: number;
  /** The whole message went over and the answer was lost. */
  readonly uncertain: number;
  /** Left, or the mailing was stopped, before their turn came. */
  readonly leftOut: number;
  /** Of those waiting, how many are being handed over at this moment. */
  readonly inFlight: number;
  readonly total: number;
}

export interface StateCount {
  readonly state: string;
  readonly tried: boolean;
  readonly count: number;
}

const PLACE: Readonly<Record<string, Exclude<keyof Counts, 'inFlight' | 'total'>>> = {
  accepted: 'accepted',
  queued: 'waiting',
  leased: 'waiting',
  in_flight: 'waiting',
  rejected: 'refused',
  expired: 'refused',
  unknown: 'uncertain',
  suppressed: 'leftOut',
  cancelled: 'leftOut',
};

/** Sorts a GROUP BY into the counts that people see. Every delivery is in exactly one of them. */
export function countUp(rows: readonly StateCount[]): Counts {
  const counts = { accepted: 0, waiting: 0, retrying: 0, refused: 0, uncertain: 0, leftOut: 0, inFlight: 0, total: 0 };
  for (const { state, tried, count } of rows) {
    const place = state === 'queued' && tried ? 'retrying' : PLACE[state];
    if (!place) throw new Error(`a delivery in no known state: ${state}`);
    counts[place] += count;
    counts.total += count;
    if (state === 'in_flight') counts.inFlight += count;
  }
  return counts;
}
