import { randomUUID } from 'node:crypto';
import { hostname } from 'node:os';
import { sqlite } from '@/db/client.server';

const KEY = 'mail-worker';
const VALID = 30_000;

/** Workers of this very process. */
const here = new Set<string>();

/** A name that tells another process on this machine whether its owner still lives. */
export function newOwner(): string {
  const owner = `${hostname()}/${process.pid}/${randomUUID()}`;
  here.add(owner);
  return owner;
}

/** Takes the worker's lease, or keeps it; false while another process holds it. That of a dead process is free at once. */
export function holdLease(owner: string, now: number): boolean {
  const hold = sqlite().prepare(
    `INSERT INTO setting (key, value, updated_at) VALUES ('${KEY}', @owner, @now)
     ON CONFLICT (key) DO UPDATE SET value = @owner, updated_at = @now
     WHERE value = @owner OR value = @dead OR updated_at < @now - ${VALID}`,
  );
  if (hold.run({ owner, now, dead: '' }).changes > 0) return true;
  const holder = sqlite().prepare(`SELECT value FROM setting WHERE key = '${KEY}'`).pluck().get() as string | undefined;
  return holder !== undefined && isDead(holder) && hold.run({ owner, now, dead: holder }).changes > 0;
}

/** Only what can be told for certain: a process of this machine that is gone, or had our number before us. */
function isDead(owner: string): boolean {
  const [host, pid, id] = owner.split('/');
  if (!id || host !== hostname() || here.has(owner)) return false;
  if (Number(pid) === process.pid) return true;
  try {
    process.kill(Number(pid), 0);
    return false;
  } catch (error) {
    return (error as NodeJS.ErrnoException).code === 'ESRCH';
  }
}

export function leaveLease(owner: string): void {
  here.delete(owner);
  sqlite().prepare(`DELETE FROM setting WHERE key = '${KEY}' AND value = ?`).run(owner);
}

/** When a worker was last at work; null when none holds the lease. For the health page and the sending view. */
export function workerSeenAt(): number | null {
  return (
    (sqlite().prepare(`SELECT updated_at FROM setting WHERE key = '${KEY}'`).pluck().get() as number | undefined) ??
    null
  );
}
