import type { APIContext } from 'astro';
import { requireRole } from '@/features/accounts/guard.server';
import { problem } from '@/features/http/problem';
import { openMailing, type OpenMailing, type Sender } from './mailings.server';

/** The mailing that a route's `id` names, when the person signed in may work on it; or the refusal to return. */
export function askedMailing(context: APIContext): { readonly mailing: OpenMailing; readonly user: Sender } | Response {
  const user = requireRole(context, 'author');
  if (user instanceof Response) return user;
  const mailing = openMailing(context.params.id ?? '', user);
  return mailing ? { mailing, user } : noSuchMailing();
}

/** Also for a mailing of someone else's: whether it exists is nobody's business. */
export const noSuchMailing = (): Response =>
  problem(404, 'No such mailing', {
    detail: 'There is no such mailing among yours. Open it from its project in the workroom.',
    code: 'no-such-mailing',
  });

export const notInThisState = (sentence: string): Response =>
  problem(409, 'Not now', { detail: sentence, code: 'not-in-this-state' });

export const beingSent = (): Response =>
  notInThisState('It is being sent or has been sent, so it cannot be changed any more.');
