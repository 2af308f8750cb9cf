import { sqlite } from '@/db/client.server';

const KEY = 'mail-worker';
const VALID = 30_000;

/** Takes the worker's lease, or keeps it; false while another process holds it. */
export function holdLease(owner: string, now: number): boolean {
  return (
    sqlite()
      .prepare(
        `INSERT INTO setting (key, value, updated_at) VALUES ('${KEY}', @owner, @now)
         ON CONFLICT (key) DO UPDATE SET value = @owner, updated_at = @now WHERE value = @owner OR updated_at < @now - ${VALID}`,
      )
      .run({ owner, now }).changes > 0
  );
}

export function leaveLease(owner: string): void {
  sqlite().prepare(`DELETE FROM setting WHERE key = '${KEY}' AND value = ?`).run(owner);
}

/** When a worker was last at work; null when none holds the lease. For the health page and the sending view. */
export function workerSeenAt(): number | null {
  return (
    (sqlite().prepare(`SELECT updated_at FROM setting WHERE key = '${KEY}'`).pluck().get() as number | undefined) ??
    null
  );
}
