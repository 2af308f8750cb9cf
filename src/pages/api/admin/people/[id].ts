import type { APIRoute } from 'astro';
import { requireRole } from '@/features/accounts/guard.server';
import { asRow, changePerson, personChangeSchema } from '@/features/accounts/people-desk.server';
import { json, problem, readJson } from '@/features/http/problem';

/** `{ role }` or `{ disabled }`. 409 when it would leave the site without an admin. */
export const PATCH: APIRoute = async (context) => {
  const user = requireRole(context, 'admin');
  if (user instanceof Response) return user;
  const body = await readJson(context.request, personChangeSchema);
  if (!body.ok) return body.response;
  const outcome = changePerson(context.params.id ?? '', body.value);
  if (outcome.ok) return json(asRow(outcome.person));
  return problem(outcome.code === 'nobody' ? 404 : 409, 'Nothing was changed', {
    detail: outcome.sentence,
    code: outcome.code,
  });
};
