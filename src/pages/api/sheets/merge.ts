import type { APIRoute } from 'astro';
import { requireRole } from '@/features/accounts/guard.server';
import { json, readJson } from '@/features/http/problem';
import { mergeSheets } from '@/features/sheets/my-sheets.server';
import { mySheetsSchema } from '@/features/sheets/sheets-schema';

/** `{ sheets }` that a browser kept before its reader signed in; gives the list that came of it. */
export const POST: APIRoute = async (context) => {
  const user = requireRole(context, 'reader');
  if (user instanceof Response) return user;
  const body = await readJson(context.request, mySheetsSchema);
  if (!body.ok) return body.response;
  return json({ sheets: mergeSheets(user.id, body.value.sheets) });
};
