import { createHash, randomBytes } from 'node:crypto';
import { and, eq, gt, lt, isNull } from 'drizzle-orm';
import { config } from '@/config.server';
import { db } from '@/db/client.server';
import { subscribers, suppressions } from '@/db/schema';
import { emailKey } from '@/features/accounts/email-key';
import { queueLetter } from '@/features/mailing/letters.server';
import { preferencesUrl, unsubscribeUrl } from '@/features/mailing/sender';
import type { Preferences, SignUp } from './sign-up';
import { alreadyLetter, confirmLetter, type LetterWords } from './subscriber-letters';

const DAY = 24 * 60 * 60_000;
const CONFIRM_DAYS = 3;
/** How long after leaving the page's "that was a mistake" works; later one signs up again. */
const UNDO_DAYS = 7;

const newToken = () => randomBytes(24).toString('base64url');
const hash = (token: string) => createHash('sha256').update(token).digest('hex');

/** Someone as the pages behind a link in a mail may show them. */
export interface Subscriber {
  readonly email: string;
  readonly name: string;
  readonly units: 'in' | 'mm' | 'cm';
  readonly state: 'pending' | 'confirmed' | 'left';
  /** Left so lately that one press takes it back. */
  readonly mayUndo: boolean;
}

/**
 * Asks for a subscription. A letter goes to the address, whichever it is; the caller answers everyone alike. Someone who
 * is on the list stays as they are; someone who left is on it again only once they press the button.
 */
export function askToSubscribe({ email, units, website }: SignUp, now = Date.now()): void {
  const key = emailKey(email);
  if (!key || website) return;
  forgetUnconfirmed(now);
  const token = newToken();
  const letter = db.transaction(
    (tx): LetterWords | null => {
      // Must not be written to, whoever asks.
      if (tx.select().from(suppressions).where(eq(suppressions.emailKey, key)).get()) return null;
      const known = tx.select().from(subscribers).where(eq(subscribers.emailKey, key)).get();
      if (known?.state === 'confirmed') {
        const links = {
          preferences: preferencesUrl(config.siteUrl, known.leaveToken),
          leave: unsubscribeUrl(config.siteUrl, known.leaveToken),
        };
        return alreadyLetter({ listName: config.listName, ...links });
      }
      const asked = {
        email: email.trim(),
        units,
        confirmHash: hash(token),
        confirmExpires: new Date(now + CONFIRM_DAYS * DAY),
      };
      if (known) tx.update(subscribers).set(asked).where(eq(subscribers.id, known.id)).run();
      else {
        tx.insert(subscribers)
          .values({
            id: randomBytes(9).toString('hex'),
            emailKey: key,
            state: 'pending',
            leaveToken: newToken(),
            createdAt: new Date(now),
            ...asked,
          })
          .run();
      }
      return confirmLetter({
        listName: config.listName,
        url: `${config.siteUrl}/subscribe/confirm?t=${token}`,
        days: CONFIRM_DAYS,
      });
    },
    { behavior: 'immediate' },
  );
  if (letter) queueLetter({ toAddress: email.trim(), ...letter, expiresInMinutes: CONFIRM_DAYS * 24 * 60 });
}

/** Whether a confirmation link would still work. Reading it changes nothing. */
export const isConfirmable = (token: string, now = Date.now()): boolean => findByConfirmation(token, now) !== undefined;

/** Puts the person on the list and gives the token of their own pages; null when the link was used or is too old. */
export function confirmSubscription(token: string, now = Date.now()): string | null {
  const subscriber = findByConfirmation(token, now);
  if (!subscriber) return null;
  db.update(subscribers)
    .set({ state: 'confirmed', confirmedAt: new Date(now), leftAt: null, confirmHash: null, confirmExpires: null })
    .where(eq(subscribers.id, subscriber.id))
    .run();
  return subscriber.leaveToken;
}

function findByConfirmation(token: string, now: number) {
  if (!token) return undefined;
  return db
    .select()
    .from(subscribers)
    .where(and(eq(subscribers.confirmHash, hash(token)), gt(subscribers.confirmExpires, new Date(now))))
    .get();
}

/** Whose link this is; null when it is nobody's. */
export function findSubscriber(token: string, now = Date.now()): Subscriber | null {
  const row = byToken(token);
  if (!row) return null;
  return { email: row.email, name: row.name ?? '', units: row.units, state: row.state, mayUndo: mayUndo(row, now) };
}

const byToken = (token: string) =>
  token ? db.select().from(subscribers).where(eq(subscribers.leaveToken, token)).get() : undefined;

const mayUndo = (row: typeof subscribers.$inferSelect, now: number): boolean =>
  row.state === 'left' &&
  row.confirmedAt !== null &&
  row.leftAt !== null &&
  now - row.leftAt.getTime() < UNDO_DAYS * DAY;

/** Takes someone off the list, at once and for all mailings; leaving twice is leaving once. False for nobody's token. */
export function leave(token: string, now = Date.now()): boolean {
  const row = byToken(token);
  if (!row) return false;
  if (row.state !== 'left') {
    db.update(subscribers)
      .set({ state: 'left', leftAt: new Date(now), confirmHash: null, confirmExpires: null })
      .where(eq(subscribers.id, row.id))
      .run();
  }
  return true;
}

/** Takes leaving back. False when it is too late for that, or there is nothing to take back. */
export function undoLeaving(token: string, now = Date.now()): boolean {
  const row = byToken(token);
  if (!row || !mayUndo(row, now)) return false;
  db.update(subscribers).set({ state: 'confirmed', leftAt: null }).where(eq(subscribers.id, row.id)).run();
  return true;
}

export function savePreferences(token: string, { name, units }: Preferences): boolean {
  const row = byToken(token);
  if (!row) return false;
  db.update(subscribers)
    .set({ name: name || null, units })
    .where(eq(subscribers.id, row.id))
    .run();
  return true;
}

/** Forgets those who asked and never confirmed, as their letter promised. */
export function forgetUnconfirmed(now = Date.now()): number {
  return db
    .delete(subscribers)
    .where(
      and(
        eq(subscribers.state, 'pending'),
        isNull(subscribers.confirmedAt),
        lt(subscribers.confirmExpires, new Date(now)),
      ),
    )
    .run().changes;
}
