import type { APIRoute } from 'astro';
import { requireRole } from '@/features/accounts/guard.server';
import { json, readJson } from '@/features/http/problem';
import { changeSheetsOf, sheetsOf } from '@/features/sheets/my-sheets.server';
import { mySheetsSchema } from '@/features/sheets/sheets-schema';

export const GET: APIRoute = (context) => {
  const user = requireRole(context, 'reader');
  return user instanceof Response ? user : json({ sheets: sheetsOf(user) });
};

/** `{ sheets: [{ card, count }] }` in place of the whole list. */
export const PUT: APIRoute = async (context) => {
  const user = requireRole(context, 'reader');
  if (user instanceof Response) return user;
  const body = await readJson(context.request, mySheetsSchema);
  if (!body.ok) return body.response;
  return json({ sheets: changeSheetsOf(user.id, () => body.value.sheets) });
};
