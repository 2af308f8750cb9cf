import type { APIRoute } from 'astro';
import { requireRole } from '@/features/accounts/guard.server';
import { invite, openInvitations, withdrawInvitation } from '@/features/accounts/invitations.server';
import { invitationSchema } from '@/features/accounts/people-desk.server';
import { json, problem, readJson } from '@/features/http/problem';

export const GET: APIRoute = (context) => {
  const user = requireRole(context, 'admin');
  return user instanceof Response ? user : json({ invitations: openInvitations() });
};

/** `{ email }`: sends the letter; an older invitation to the address stops working. */
export const POST: APIRoute = async (context) => {
  const user = requireRole(context, 'admin');
  if (user instanceof Response) return user;
  const body = await readJson(context.request, invitationSchema);
  if (!body.ok) return body.response;
  const outcome = invite(body.value.email, user.name);
  if (outcome.ok) return json(outcome.invitation, { status: 201 });
  return problem(outcome.code === 'no-address' ? 422 : 409, 'Nobody was invited', {
    detail: outcome.sentence,
    code: outcome.code,
  });
};

/** `{ email }`: the invitation stops working. */
export const DELETE: APIRoute = async (context) => {
  const user = requireRole(context, 'admin');
  if (user instanceof Response) return user;
  const body = await readJson(context.request, invitationSchema);
  if (!body.ok) return body.response;
  if (withdrawInvitation(body.value.email)) return new Response(null, { status: 204 });
  return problem(404, 'No such invitation', {
    detail: `No invitation to ${body.value.email} is open.`,
    code: 'no-invitation',
  });
};
