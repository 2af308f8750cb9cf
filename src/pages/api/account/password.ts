import type { APIRoute } from 'astro';
import { requireRole } from '@/features/accounts/guard.server';
import { changePassword, ownPerson, passwordSchema } from '@/features/accounts/own-account.server';
import { problem, readJson } from '@/features/http/problem';
import { tooMany } from '@/features/limits/limits.server';

/** `{ current?, next }`. Ends every other session. */
export const PUT: APIRoute = async (context) => {
  const user = requireRole(context, 'reader');
  if (user instanceof Response) return user;
  const body = await readJson(context.request, passwordSchema);
  if (!body.ok) return body.response;
  const outcome = await changePassword(context, ownPerson(context), body.value);
  if (outcome.ok) return new Response(null, { status: 204 });
  if ('seconds' in outcome) return tooMany(outcome);
  return problem(422, 'The password was not changed', { detail: outcome.sentence, code: outcome.code });
};
