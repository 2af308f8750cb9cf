import type { APIRoute } from 'astro';
import { json } from '@/features/http/problem';
import { askedMailing, noSuchMailing, notInThisState } from '@/features/mailing/mailing-answers.server';
import { openMailing, viewMailing } from '@/features/mailing/mailings.server';
import { resumeMailing } from '@/features/mailing/outbox.server';

/** Carries on where it was paused. Nobody gets it twice. */
export const POST: APIRoute = async (context) => {
  const asked = askedMailing(context);
  if (asked instanceof Response) return asked;
  if (!resumeMailing(asked.mailing.row.id, Date.now()))
    return notInThisState('It is not paused, so there is nothing to carry on with.');
  const now = openMailing(asked.mailing.row.id, asked.user);
  return now ? json(await viewMailing(now, asked.user)) : noSuchMailing();
};
