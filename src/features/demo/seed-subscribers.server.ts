import { createHash, randomBytes } from 'node:crypto';
import { db } from '@/db/client.server';
import { subscribers } from '@/db/schema';
import { emailKey } from '@/features/accounts/email-key';
import { DEMO_SUBSCRIBERS } from './subscribers';

const DAY = 24 * 60 * 60_000;
const MINUTES_TO_CONFIRM = 17;

/**
 * Puts the demo's people on the list as they were before anybody left. Written straight to the table: asking and confirming
 * by the usual way would send everybody a letter today.
 */
export function seedSubscribers(now: number): void {
  for (const { name, email, units, confirmedDaysAgo } of DEMO_SUBSCRIBERS) {
    const key = emailKey(email);
    if (!key) throw new Error(`${email} is not an e-mail address.`);
    const confirmed = confirmedDaysAgo === undefined ? null : now - confirmedDaysAgo * DAY;
    const pending = {
      state: 'pending',
      confirmHash: createHash('sha256').update(randomBytes(24)).digest('hex'),
      confirmExpires: new Date(now + 2 * DAY),
    } as const;
    db.insert(subscribers)
      .values({
        id: randomBytes(9).toString('hex'),
        name: name ?? null,
        email,
        emailKey: key,
        units,
        leaveToken: randomBytes(24).toString('base64url'),
        createdAt: new Date((confirmed ?? now - DAY / 2) - MINUTES_TO_CONFIRM * 60_000),
        ...(confirmed === null ? pending : { state: 'confirmed', confirmedAt: new Date(confirmed) }),
      })
      .run();
  }
}
