import type { APIRoute } from 'astro';
import { json } from '@/features/http/problem';
import { askedMailing, noSuchMailing, notInThisState } from '@/features/mailing/mailing-answers.server';
import { openMailing, viewMailing } from '@/features/mailing/mailings.server';
import { stopMailing } from '@/features/mailing/outbox.server';

/** Stops for good: what has not gone never goes. */
export const POST: APIRoute = async (context) => {
  const asked = askedMailing(context);
  if (asked instanceof Response) return asked;
  if (!stopMailing(asked.mailing.row.id, Date.now()))
    return notInThisState('It has come to its end already, so there is nothing to stop.');
  const now = openMailing(asked.mailing.row.id, asked.user);
  return now ? json(await viewMailing(now, asked.user)) : noSuchMailing();
};
