import type { APIRoute } from 'astro';
import { json } from '@/features/http/problem';
import { askedMailing, noSuchMailing, notInThisState } from '@/features/mailing/mailing-answers.server';
import { openMailing, viewMailing } from '@/features/mailing/mailings.server';
import { pauseMailing } from '@/features/mailing/outbox.server';

/** Sends nothing more until it is told to carry on; what is being handed over now still goes. */
export const POST: APIRoute = async (context) => {
  const asked = askedMailing(context);
  if (asked instanceof Response) return asked;
  if (!pauseMailing(asked.mailing.row.id, Date.now()))
    return notInThisState('It is not being sent just now, so there is nothing to pause.');
  const now = openMailing(asked.mailing.row.id, asked.user);
  return now ? json(await viewMailing(now, asked.user)) : noSuchMailing();
};
