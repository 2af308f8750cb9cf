import type { APIRoute } from 'astro';
import { requireRole } from '@/features/accounts/guard.server';
import {
  asOwnAccount,
  changeName,
  deletionSchema,
  nameSchema,
  ownPerson,
  removeAccount,
} from '@/features/accounts/own-account.server';
import { json, problem, readJson } from '@/features/http/problem';

export const GET: APIRoute = (context) => {
  const user = requireRole(context, 'reader');
  return user instanceof Response ? user : json(asOwnAccount(ownPerson(context)));
};

/** `{ name }` */
export const PATCH: APIRoute = async (context) => {
  const user = requireRole(context, 'reader');
  if (user instanceof Response) return user;
  const body = await readJson(context.request, nameSchema);
  if (!body.ok) return body.response;
  const outcome = changeName(ownPerson(context), body.value.name);
  if (outcome.ok) return json(asOwnAccount(outcome.person));
  return problem(422, 'That name does not fit', { detail: outcome.sentence, code: outcome.code });
};

/** `{ email, keepName }`: the own address, typed to show that it is meant. */
export const DELETE: APIRoute = async (context) => {
  const user = requireRole(context, 'reader');
  if (user instanceof Response) return user;
  const body = await readJson(context.request, deletionSchema);
  if (!body.ok) return body.response;
  const outcome = await removeAccount(context, ownPerson(context), body.value);
  if (outcome.ok) return new Response(null, { status: 204 });
  return problem(outcome.code === 'last-admin' ? 409 : 422, 'The account was not deleted', {
    detail: outcome.sentence,
    code: outcome.code,
  });
};
