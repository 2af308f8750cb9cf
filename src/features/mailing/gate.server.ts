import { eq } from 'drizzle-orm';
import { db } from '@/db/client.server';
import { settings } from '@/db/schema';
import { gateWait } from './backoff';

/** Shut while the mail server is away. Kept in the database, so that a restart does not begin by knocking again. */
export interface Gate {
  readonly failures: number;
  readonly opensAt: number;
  /** When the first of the failures in a row was. */
  readonly since: number;
  readonly reply: string;
}
const KEY = 'mail-gate';

export function readGate(): Gate | null {
  const row = db.select().from(settings).where(eq(settings.key, KEY)).get();
  return row ? (JSON.parse(row.value) as Gate) : null;
}

/** Shuts it for longer each time. Several lanes that meet the same outage count as one failure. */
export function shutGate(reply: string, now: number): Gate {
  const before = readGate();
  if (before && before.opensAt > now) return before;
  const failures = (before?.failures ?? 0) + 1;
  const gate: Gate = { failures, opensAt: now + gateWait(failures), since: before?.since ?? now, reply };
  const value = JSON.stringify(gate);
  db.insert(settings)
    .values({ key: KEY, value, updatedAt: new Date(now) })
    .onConflictDoUpdate({ target: settings.key, set: { value, updatedAt: new Date(now) } })
    .run();
  return gate;
}

export function openGate(): void {
  db.delete(settings).where(eq(settings.key, KEY)).run();
}
