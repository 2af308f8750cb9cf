import { queueLetter } from '@/features/mailing/letters.server';
import type { AccountLetter } from './account-letters';
import type { Person } from './people.server';

/** Queues a letter about an account; after `expiresInMinutes` it is no longer worth sending. */
export function post(
  to: Pick<Person, 'email'> & Partial<Pick<Person, 'name'>>,
  letter: AccountLetter,
  expiresInMinutes = 24 * 60,
): void {
  queueLetter({ ...(to.name ? { toName: to.name } : {}), toAddress: to.email, ...letter, expiresInMinutes });
}
