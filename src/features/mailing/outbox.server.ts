import { sqlite } from '@/db/client.server';
import { GIVE_UP_AFTER, MOST_UNKNOWNS, REST_AFTER_UNKNOWN, waitAfter } from './backoff';
import { countUp, type Counts } from './counts';
import { openGate } from './gate.server';
import { enhancedStatus, type Answer, type Outcome } from './outcome';
import { MUST_NOT_BE_SENT } from './suppression-sql';
import type { Trouble } from './trouble';

/*
 * The outbox: one row a recipient, and the row is the only truth. A delivery goes
 *
 *   queued → leased → in_flight → accepted | rejected | expired | unknown | queued again, later
 *
 * in three short transactions: claimed, handed over (committed before the server hears of it), and the result. None of
 * them spans an await. docs/decisions/012-outbox.md says why.
 */
const LEASE = 5 * 60_000;
/** Longer than any answer may take (10 minutes after the last dot). */
const IN_FLIGHT_LEASE = 25 * 60_000;

/** All that is needed to write one recipient's copy. */
export interface Copy {
  readonly deliveryId: number;
  readonly attempt: number;
  readonly mailingId: string;
  readonly messageId: string;
  readonly address: string;
  readonly name: string | null;
  readonly units: 'in' | 'mm' | 'cm';
  readonly leaveToken: string;
  readonly confirmedAt: number | null;
}

/**
 * Takes up to `limit` deliveries that are due, of mailings that are being sent; first tries and second ones by turns.
 * Those whose recipient left meanwhile are ended in the same statement.
 */
export function claim(owner: string, { now, limit }: { now: number; limit: number }): readonly number[] {
  const database = sqlite();
  return database
    .transaction(() => {
      const sending = database
        .prepare("SELECT id FROM mailing WHERE state = 'sending' AND prepared_at IS NOT NULL ORDER BY prepared_at")
        .pluck();
      const due = (where: string) =>
        database
          .prepare(
            `SELECT id FROM delivery WHERE mailing_id = @mailing AND ${where} AND next_at <= @now ORDER BY next_at, id LIMIT @limit`,
          )
          .pluck();
      const fresh = due("state = 'queued' AND attempts = 0");
      const again = due("state = 'queued' AND attempts > 0");
      const lost = due(`state = 'unknown' AND unknowns < ${MOST_UNKNOWNS}`);
      const firsts: number[] = [];
      const seconds: number[] = [];
      for (const mailing of sending.all() as string[]) {
        firsts.push(...(fresh.all({ mailing, now, limit }) as number[]));
        for (const query of [again, lost]) seconds.push(...(query.all({ mailing, now, limit }) as number[]));
      }
      const ids = byTurns(firsts, seconds).slice(0, limit);
      if (ids.length === 0) return [];
      const rows = database
        .prepare(
          `UPDATE delivery SET
             state = CASE WHEN NOT ${MUST_NOT_BE_SENT} THEN 'leased' WHEN state = 'unknown' THEN 'unknown' ELSE 'suppressed' END,
             unknowns = CASE WHEN state = 'unknown' AND ${MUST_NOT_BE_SENT} THEN ${MOST_UNKNOWNS} ELSE unknowns END,
             lease_owner = @owner, lease_until = @until
           WHERE id IN (SELECT value FROM json_each(@ids)) AND state IN ('queued', 'unknown')
             AND EXISTS (SELECT 1 FROM mailing m WHERE m.id = delivery.mailing_id AND m.state = 'sending')
           RETURNING id, state`,
        )
        .all({ owner, until: now + LEASE, ids: JSON.stringify(ids) }) as { id: number; state: string }[];
      const taken = new Set(rows.filter((row) => row.state === 'leased').map((row) => row.id));
      return ids.filter((id) => taken.has(id));
    })
    .immediate();
}

function byTurns<T>(one: readonly T[], other: readonly T[]): T[] {
  return Array.from({ length: Math.max(one.length, other.length) }, (_, i) => [one[i], other[i]])
    .flat()
    .filter((item) => item !== undefined);
}

/**
 * The last look before a server hears of it: still ours, still being sent, still wanted. Marks it in flight and opens
 * its attempt; null when it is not to go now.
 */
export function handOver(id: number, owner: string, now: number): Copy | null {
  const database = sqlite();
  return database
    .transaction((): Copy | null => {
      const moved = database
        .prepare(
          `UPDATE delivery SET state = 'in_flight', phase = 'connect', code = NULL, enhanced = NULL, reply = NULL, lease_until = @until
           WHERE id = @id AND state = 'leased' AND lease_owner = @owner AND NOT ${MUST_NOT_BE_SENT}
             AND EXISTS (SELECT 1 FROM mailing m WHERE m.id = delivery.mailing_id AND m.state = 'sending')`,
        )
        .run({ id, owner, until: now + IN_FLIGHT_LEASE });
      if (moved.changes === 0) {
        release([id], owner);
        return null;
      }
      const attempt = database
        .prepare(
          'INSERT INTO attempt (delivery_id, n, started_at) SELECT @id, 1 + count(*), @now FROM attempt WHERE delivery_id = @id RETURNING n',
        )
        .pluck()
        .get({ id, now }) as number;
      const row = database
        .prepare(
          `SELECT d.id AS deliveryId, d.mailing_id AS mailingId, d.message_id AS messageId, s.email AS address, s.name, s.units,
             s.leave_token AS leaveToken, s.confirmed_at AS confirmedAt
           FROM delivery d JOIN subscriber s ON s.id = d.subscriber_id WHERE d.id = ?`,
        )
        .get(id) as Omit<Copy, 'attempt'>;
      return { ...row, attempt };
    })
    .immediate();
}

/** Puts back what was claimed and not handed over. */
export function release(ids: readonly number[], owner: string): void {
  sqlite()
    .prepare(
      `UPDATE delivery SET lease_owner = NULL, lease_until = NULL, state = CASE
         WHEN EXISTS (SELECT 1 FROM mailing m WHERE m.id = delivery.mailing_id AND m.state = 'cancelled')
           THEN CASE WHEN unknowns > 0 THEN 'unknown' ELSE 'cancelled' END
         WHEN unknowns > 0 THEN 'unknown'
         ELSE 'queued' END
       WHERE id IN (SELECT value FROM json_each(@ids)) AND state = 'leased' AND lease_owner = @owner`,
    )
    .run({ ids: JSON.stringify(ids), owner });
}

export interface Result {
  readonly answer: Answer;
  readonly outcome: Outcome;
  readonly now: number;
  /** In [0, 1), for the jitter. */
  readonly random: number;
}

/** Writes down what came of one copy. A late "accepted" also settles a delivery that was given up as unknown meanwhile. */
export function record(
  { deliveryId, attempt, mailingId }: Copy,
  owner: string,
  { answer, outcome, now, random }: Result,
): void {
  const database = sqlite();
  database
    .transaction(() => {
      const enhanced = answer.enhanced ?? enhancedStatus(answer.reply);
      const reply = answer.reply.slice(0, 300);
      database
        .prepare(
          'UPDATE attempt SET ended_at = @now, outcome = @kind, phase = @phase, code = @code, reply = @reply WHERE delivery_id = @deliveryId AND n = @attempt AND ended_at IS NULL',
        )
        .run({ deliveryId, attempt, now, kind: outcome.kind, phase: answer.phase, code: answer.code, reply });
      const row = database
        .prepare(
          `SELECT d.state, d.lease_owner AS owner, d.attempts, d.unknowns, d.email_key AS emailKey, m.state AS mailing, m.prepared_at AS preparedAt
           FROM delivery d JOIN mailing m ON m.id = d.mailing_id WHERE d.id = ?`,
        )
        .get(deliveryId) as Row;
      const ours = row.state === 'in_flight' && row.owner === owner;
      if (!ours && !(row.state === 'unknown' && outcome.kind === 'accepted')) return;
      const next = nextState(row, outcome, now, random);
      database
        .prepare(
          `UPDATE delivery SET state = @state, attempts = @attempts, unknowns = @unknowns, next_at = @nextAt, lease_owner = NULL, lease_until = NULL,
             phase = @phase, code = @code, enhanced = @enhanced, reply = @reply, accepted_at = @acceptedAt WHERE id = @deliveryId`,
        )
        .run({
          deliveryId,
          ...next,
          phase: answer.phase,
          code: answer.code,
          enhanced,
          reply,
          acceptedAt: next.state === 'accepted' ? now : null,
        });
      if (outcome.kind === 'refused' && outcome.suppress) {
        database
          .prepare(
            "INSERT INTO suppression (email_key, reason, created_at) VALUES (?, 'hard', ?) ON CONFLICT DO NOTHING",
          )
          .run(row.emailKey, now);
      }
      if (outcome.kind === 'stop') pauseMailing(mailingId, now, outcome.why);
      if (outcome.kind === 'refused' && outcome.aboutUs && refusesUs(mailingId)) {
        pauseMailing(mailingId, now, `Servers refuse this mailing because of who sends it: ${reply}`);
      }
    })
    .immediate();
}

interface Row {
  readonly state: string;
  readonly owner: string | null;
  readonly attempts: number;
  readonly unknowns: number;
  readonly emailKey: string;
  readonly mailing: string;
  readonly preparedAt: number;
}

function nextState(row: Row, outcome: Outcome, now: number, random: number) {
  const same = { attempts: row.attempts, unknowns: row.unknowns, nextAt: now };
  const cancelled = row.mailing === 'cancelled';
  // What may have arrived once stays uncertain, whatever becomes of the second copy.
  const ended = (state: 'rejected' | 'expired' | 'cancelled') =>
    row.unknowns > 0 ? { ...same, state: 'unknown', unknowns: MOST_UNKNOWNS } : { ...same, state };
  const waiting = row.unknowns > 0 ? 'unknown' : 'queued';
  switch (outcome.kind) {
    case 'accepted':
      return { ...same, state: 'accepted', attempts: row.attempts + 1 };
    case 'refused':
      return { ...ended('rejected'), attempts: row.attempts + 1 };
    case 'unknown':
      return {
        ...same,
        state: 'unknown',
        attempts: row.attempts + 1,
        unknowns: row.unknowns + 1,
        nextAt: now + REST_AFTER_UNKNOWN,
      };
    case 'later': {
      if (cancelled) return ended('cancelled');
      const attempts = row.attempts + 1;
      const nextAt = now + waitAfter(attempts, random);
      return nextAt > row.preparedAt + GIVE_UP_AFTER
        ? { ...ended('expired'), attempts }
        : { ...same, state: waiting, attempts, nextAt };
    }
    case 'server away':
    case 'stop':
      return cancelled ? ended('cancelled') : { ...same, state: waiting };
  }
}

/** The last three answers were refusals about us, or more than 5 of the last 100 were. */
function refusesUs(mailingId: string): boolean {
  const about = sqlite()
    .prepare(
      `SELECT (d.state = 'rejected' AND (d.enhanced LIKE '5.7.%' OR (d.code = 554 AND d.enhanced IS NULL))) AS aboutUs
       FROM attempt a JOIN delivery d ON d.id = a.delivery_id
       WHERE d.mailing_id = ? AND a.ended_at IS NOT NULL AND a.code IS NOT NULL ORDER BY a.ended_at DESC, a.rowid DESC LIMIT 100`,
    )
    .pluck()
    .all(mailingId) as number[];
  const three = about.length >= 3 && about.slice(0, 3).every(Boolean);
  return three || (about.length === 100 && about.filter(Boolean).length > 5);
}

/**
 * What a process left behind when it ended: rows that it had only claimed go back; of those it was handing over, nobody
 * knows whether they arrived. Called by whoever holds the worker's lease, for the rows of all others, and for leases of
 * its own that ran out. `busy` are the deliveries that it is handing over itself.
 */
export function recover(
  owner: string,
  now: number,
  busy: readonly number[] = [],
): { readonly released: number; readonly unknown: number } {
  const database = sqlite();
  const mine = `lease_owner = @owner AND (lease_until > @now OR id IN (SELECT value FROM json_each(@busy)))`;
  const facts = { owner, now, busy: JSON.stringify(busy) };
  // Looked at several times a second: no write unless there is something to write.
  const left = database.prepare(
    `SELECT 1 FROM delivery WHERE state IN ('leased', 'in_flight') AND NOT (${mine}) LIMIT 1`,
  );
  if (!left.get(facts)) return { released: 0, unknown: 0 };
  return database
    .transaction(() => {
      const released = database
        .prepare(
          `UPDATE delivery SET lease_owner = NULL, lease_until = NULL, state = CASE
             WHEN EXISTS (SELECT 1 FROM mailing m WHERE m.id = delivery.mailing_id AND m.state = 'cancelled') AND unknowns = 0 THEN 'cancelled'
             WHEN unknowns > 0 THEN 'unknown' ELSE 'queued' END
           WHERE state = 'leased' AND NOT (${mine})`,
        )
        .run(facts).changes;
      const unknown = database
        .prepare(
          `UPDATE delivery SET state = 'unknown', attempts = attempts + 1, unknowns = unknowns + 1, next_at = @next, lease_owner = NULL, lease_until = NULL
           WHERE state = 'in_flight' AND NOT (${mine})`,
        )
        .run({ ...facts, next: now + REST_AFTER_UNKNOWN }).changes;
      return { released, unknown };
    })
    .immediate();
}

/** Ends mailings of which nothing is left to do. */
export function finishMailings(now: number): void {
  sqlite()
    .prepare(
      `UPDATE mailing SET state = 'done', finished_at = @now, updated_at = @now WHERE state = 'sending' AND prepared_at IS NOT NULL AND NOT EXISTS (
         SELECT 1 FROM delivery d WHERE d.mailing_id = mailing.id
           AND (d.state IN ('queued', 'leased', 'in_flight') OR (d.state = 'unknown' AND d.unknowns < ${MOST_UNKNOWNS})))`,
    )
    .run({ now });
}

// ── What a person may do with a mailing that is being sent ───────────────────────────────────────────────────────────

/** Those being handed over at this moment still go; nothing else does. */
export function pauseMailing(id: string, now: number, reason: string | null = null): boolean {
  return (
    sqlite()
      .prepare(
        "UPDATE mailing SET state = 'paused', pause_reason = @reason, updated_at = @now WHERE id = @id AND state = 'sending'",
      )
      .run({ id, now, reason }).changes > 0
  );
}

/** Carries on, and knocks at the mail server at once if it was away. */
export function resumeMailing(id: string, now: number): boolean {
  const resumed =
    sqlite()
      .prepare(
        "UPDATE mailing SET state = 'sending', pause_reason = NULL, updated_at = @now WHERE id = @id AND state = 'paused'",
      )
      .run({ id, now }).changes > 0;
  if (resumed) openGate();
  return resumed;
}

/** Stops for good: what has not gone never goes. Accepted stays accepted, uncertain stays uncertain. */
export function stopMailing(id: string, now: number): boolean {
  const database = sqlite();
  return database
    .transaction(() => {
      const stopped = database
        .prepare(
          `UPDATE mailing SET state = 'cancelled', finished_at = @now, updated_at = @now,
             total = (SELECT count(*) FROM delivery d WHERE d.mailing_id = mailing.id)
           WHERE id = @id AND state IN ('preparing', 'sending', 'paused')`,
        )
        .run({ id, now }).changes;
      if (stopped === 0) return false;
      database
        .prepare(
          `UPDATE delivery SET state = CASE WHEN unknowns > 0 THEN 'unknown' ELSE 'cancelled' END,
             unknowns = CASE WHEN unknowns > 0 THEN ${MOST_UNKNOWNS} ELSE 0 END, lease_owner = NULL, lease_until = NULL
           WHERE mailing_id = @id AND state IN ('queued', 'leased')`,
        )
        .run({ id });
      return true;
    })
    .immediate();
}

// ── What it looks like ───────────────────────────────────────────────────────────────────────────────────────────────

/** Always counted from the rows, never kept beside them. */
export function countDeliveries(mailingId: string): Counts {
  const rows = sqlite()
    .prepare(
      'SELECT state, attempts > 0 AS tried, count(*) AS count FROM delivery WHERE mailing_id = ? GROUP BY state, attempts > 0',
    )
    .all(mailingId) as { state: string; tried: number; count: number }[];
  return countUp(rows.map((row) => ({ ...row, tried: row.tried === 1 })));
}

/** Those that did not simply go, gathered by what the server said. No address is in it. */
export function troublesOf(mailingId: string): readonly Trouble[] {
  const rows = sqlite()
    .prepare(
      `SELECT CASE WHEN state = 'queued' THEN 'later' WHEN state = 'unknown' THEN 'uncertain' WHEN state = 'expired' THEN 'expired' ELSE 'refused' END AS what,
         count(*) AS count, coalesce(max(reply), '') AS reply, enhanced,
         EXISTS (SELECT 1 FROM suppression x WHERE x.email_key = delivery.email_key) AS suppressed,
         min(CASE WHEN state = 'queued' OR (state = 'unknown' AND unknowns < ${MOST_UNKNOWNS}) THEN next_at END) AS nextAt
       FROM delivery
       WHERE mailing_id = ? AND (state IN ('rejected', 'expired', 'unknown') OR (state = 'queued' AND attempts > 0))
       GROUP BY what, code, enhanced, suppressed, (state = 'unknown' AND unknowns < ${MOST_UNKNOWNS})
       ORDER BY CASE what WHEN 'later' THEN 0 WHEN 'refused' THEN 1 WHEN 'expired' THEN 2 ELSE 3 END, count DESC LIMIT 20`,
    )
    .all(mailingId) as (Omit<Trouble, 'suppressed'> & { suppressed: number })[];
  return rows.map((row) => ({ ...row, suppressed: row.suppressed === 1 }));
}

/** How many were accepted since then: the pace, for "about 3 minutes to go". */
export const acceptedSince = (mailingId: string, since: number): number =>
  sqlite()
    .prepare("SELECT count(*) FROM delivery WHERE mailing_id = ? AND state = 'accepted' AND accepted_at > ?")
    .pluck()
    .get(mailingId, since) as number;

export const sendingMailings = (): readonly string[] =>
  sqlite().prepare("SELECT id FROM mailing WHERE state = 'sending'").pluck().all() as string[];
