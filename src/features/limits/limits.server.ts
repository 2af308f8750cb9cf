import type Sqlite from 'better-sqlite3';
import { RateLimiterRes, RateLimiterSQLite } from 'rate-limiter-flexible';
import { sqlite } from '@/db/client.server';
import { problem } from '@/features/http/problem';
import { LIMITS, tooManySentence, type LimitName } from './limits';

export interface Who {
  /** The peer's address, as our own server established it. */
  readonly ip: string;
  /** The compared form of an e-mail address, where the limit concerns one. */
  readonly emailKey?: string;
}

export type Turn =
  | { readonly ok: true; /** Takes the try back: it was a good one. */ giveBack(): Promise<void> }
  | { readonly ok: false; readonly seconds: number; readonly sentence: string };

/**
 * Counts one try before it is made, so that many at once cannot slip through together. Counts are kept in the database:
 * a restart does not clear them.
 *
 *     const turn = await takeTurn('subscribe', { ip: clientAddress, emailKey });
 *     if (!turn.ok) return tooMany(turn);
 */
export async function takeTurn(name: LimitName, who: Who): Promise<Turn> {
  const counters = countersOf(sqlite())[name];
  const taken: [RateLimiterSQLite, string][] = [];
  let wait = 0;
  for (const [limiter, key] of [
    [counters.byIp, networkOf(who.ip)],
    [counters.byEmail, who.emailKey],
  ] as const) {
    if (!key) continue;
    try {
      await limiter.consume(key);
      taken.push([limiter, key]);
    } catch (refused) {
      if (!(refused instanceof RateLimiterRes)) throw refused;
      wait = Math.max(wait, refused.msBeforeNext / 1000);
    }
  }
  if (wait > 0) return { ok: false, seconds: Math.ceil(wait), sentence: tooManySentence(wait) };
  return {
    ok: true,
    async giveBack() {
      for (const [limiter, key] of taken) {
        if (limiter === counters.byEmail) await limiter.delete(key);
        else await limiter.reward(key);
      }
    },
  };
}

/** The 429 of an API route, with when to come back. */
export function tooMany({ seconds, sentence }: { seconds: number; sentence: string }): Response {
  return problem(429, 'Tried too often', {
    detail: sentence,
    code: 'too-often',
    headers: { 'retry-after': String(seconds) },
  });
}

/** One subscriber line of IPv6 is usually a /64; counting single addresses in it would count nobody. */
function networkOf(ip: string): string {
  const address = ip.replace(/^::ffff:(?=\d+\.)/i, '').replace(/%.*$/, '');
  if (!address.includes(':')) return address;
  const [head = '', tail = ''] = address.toLowerCase().split('::');
  const before = head ? head.split(':') : [];
  const after = tail ? tail.split(':') : [];
  const groups = address.includes('::')
    ? [...before, ...Array<string>(Math.max(0, 8 - before.length - after.length)).fill('0'), ...after]
    : before;
  return groups
    .slice(0, 4)
    .map((group) => group.replace(/^0+(?=.)/, ''))
    .join(':');
}

type Counters = Record<LimitName, { readonly byIp: RateLimiterSQLite; readonly byEmail: RateLimiterSQLite }>;
const known = new WeakMap<Sqlite.Database, Counters>();

function countersOf(database: Sqlite.Database): Counters {
  const before = known.get(database);
  if (before) return before;
  // Counts are no part of the data that migrations look after: they may be lost at any time.
  database.exec(
    'CREATE TABLE IF NOT EXISTS rate_limit (key TEXT PRIMARY KEY, points INTEGER NOT NULL DEFAULT 0, expire INTEGER)',
  );
  database.prepare('DELETE FROM rate_limit WHERE expire < ?').run(Date.now());
  const limiter = (keyPrefix: string, { tries, seconds }: { tries: number; seconds: number }) =>
    new RateLimiterSQLite({
      storeClient: database,
      storeType: 'better-sqlite3',
      tableName: 'rate_limit',
      tableCreated: true,
      keyPrefix,
      points: tries,
      duration: seconds,
    });
  const counters = Object.fromEntries(
    Object.entries(LIMITS).map(([name, { byIp, byEmail }]) => [
      name,
      { byIp: limiter(`${name}/ip`, byIp), byEmail: limiter(`${name}/email`, byEmail) },
    ]),
  ) as Counters;
  known.set(database, counters);
  return counters;
}
