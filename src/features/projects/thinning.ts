/** What is known of a kept revision without its state. */
export interface RevisionMark {
  readonly n: number;
  readonly kind: string;
  readonly savedBy: string | null;
  /** Milliseconds since 1970, UTC. */
  readonly savedAt: number;
}

const MINUTE = 60_000;
const HOUR = 60 * MINUTE;
const DAY = 24 * HOUR;
/** Up to this age, one revision is kept for each such span of time. */
const STEPS = [
  { age: 10 * MINUTE, span: 0 },
  { age: DAY, span: 5 * MINUTE },
  { age: 30 * DAY, span: HOUR },
  { age: Number.POSITIVE_INFINITY, span: DAY },
] as const;
/** Only what autosave makes is ever let go. */
const THINNED = new Set(['saved', 'merged']);

/**
 * Which revisions may go, oldest first: all of the last ten minutes stay, then one for every five minutes of a day, every
 * hour of a month and every day after that; of each span the last one of each person. The newest, and whatever was published,
 * restored or set aside, stays for ever.
 */
export function thinned(marks: readonly RevisionMark[], now: number): readonly number[] {
  const newestFirst = [...marks].sort((a, b) => b.n - a.n);
  const kept = new Set<string>();
  const gone: number[] = [];
  newestFirst.forEach(({ n, kind, savedBy, savedAt }, i) => {
    const { span } = STEPS.find(({ age }) => now - savedAt <= age) ?? STEPS[3];
    if (i === 0 || !THINNED.has(kind) || span === 0) return;
    const place = `${span}/${Math.floor(savedAt / span)}/${savedBy ?? ''}`;
    if (kept.has(place)) gone.push(n);
    kept.add(place);
  });
  return gone.reverse();
}
