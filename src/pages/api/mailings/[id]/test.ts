import type { APIRoute } from 'astro';
import { json, problem } from '@/features/http/problem';
import { askedMailing, beingSent } from '@/features/mailing/mailing-answers.server';
import { missingIn } from '@/features/mailing/mailing-text-input';
import { sendTest } from '@/features/mailing/mailings.server';

/** Sends the mail as it stands to whoever asks. */
export const POST: APIRoute = async (context) => {
  const asked = askedMailing(context);
  if (asked instanceof Response) return asked;
  const { mailing, user } = asked;
  if (mailing.row.state !== 'draft') return beingSent();
  const [missing] = missingIn(mailing.row);
  if (missing) return problem(422, 'Not finished', { detail: missing, code: 'unfinished' });
  await sendTest(mailing, user);
  return json({ to: user.email }, { status: 202 });
};
