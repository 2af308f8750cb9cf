import { sqlite } from '@/db/client.server';

const PAGE = 500;

/** People a mailing fixed at `frozenAt` goes to: those who had confirmed by then and may be written to. */
const AUDIENCE = `s.state = 'confirmed' AND s.confirmed_at <= @frozenAt
  AND NOT EXISTS (SELECT 1 FROM suppression x WHERE x.email_key = s.email_key)`;

export interface Audience {
  /** Who would get a mailing now. */
  readonly people: number;
  /** Left, or refused before: known, and not written to. */
  readonly leftOut: number;
}

export function countAudience(now: number): Audience {
  return sqlite()
    .prepare(
      `SELECT count(*) FILTER (WHERE ${AUDIENCE}) AS people,
              count(*) FILTER (WHERE NOT (${AUDIENCE}) AND s.state <> 'pending') AS leftOut
       FROM subscriber s`,
    )
    .get({ frozenAt: now }) as Audience;
}

/**
 * Makes the rows of a mailing in state `preparing`, 500 at a time, then opens it for sending. It may be broken off
 * anywhere and called again: a recipient has one row, whatever happens. Nothing is sent before all rows are there.
 */
export function fanOut(mailingId: string, { now, domain }: { now: number; domain: string }): void {
  const database = sqlite();
  const mailing = database
    .prepare("SELECT message_date AS frozenAt FROM mailing WHERE id = ? AND state = 'preparing'")
    .get(mailingId) as { frozenAt: number } | undefined;
  if (!mailing) return;
  const { frozenAt } = mailing;

  const pageEnd = database
    .prepare(
      `SELECT max(id) FROM (SELECT s.id FROM subscriber s WHERE s.id > @after AND ${AUDIENCE} ORDER BY s.id LIMIT ${PAGE})`,
    )
    .pluck();
  const addPage = database.prepare(
    `INSERT INTO delivery (mailing_id, subscriber_id, email_key, next_at, message_id)
     SELECT @mailingId, s.id, s.email_key, @now, '<d.' || lower(hex(randomblob(12))) || '@' || @domain || '>'
     FROM subscriber s WHERE s.id > @after AND s.id <= @end AND ${AUDIENCE} ORDER BY s.id
     ON CONFLICT (mailing_id, email_key) DO NOTHING`,
  );
  const stillPreparing = database.prepare("SELECT 1 FROM mailing WHERE id = ? AND state = 'preparing'").pluck();
  const page = database.transaction((after: string): string | null => {
    if (!stillPreparing.get(mailingId)) return null;
    const end = pageEnd.get({ after, frozenAt }) as string | null;
    if (end !== null) addPage.run({ mailingId, after, end, now, domain, frozenAt });
    return end;
  });
  for (let after: string | null = ''; after !== null; ) after = page.immediate(after);

  database
    .transaction(() => {
      const missing = database
        .prepare(
          `SELECT count(*) FROM subscriber s WHERE ${AUDIENCE}
           AND NOT EXISTS (SELECT 1 FROM delivery d WHERE d.mailing_id = @mailingId AND d.email_key = s.email_key)`,
        )
        .pluck()
        .get({ mailingId, frozenAt }) as number;
      // Only possible when someone was put back on the list meanwhile; the next round takes them in.
      if (missing > 0) return;
      database
        .prepare(
          `UPDATE mailing SET prepared_at = @now, updated_at = @now, state = 'sending',
             total = (SELECT count(*) FROM delivery d WHERE d.mailing_id = mailing.id)
           WHERE id = @mailingId AND state = 'preparing'`,
        )
        .run({ mailingId, now });
    })
    .immediate();
}

/** Mailings whose rows are still being made, also those that a crash broke off. */
export const mailingsToPrepare = (): readonly string[] =>
  sqlite().prepare("SELECT id FROM mailing WHERE state = 'preparing' ORDER BY created_at").pluck().all() as string[];
