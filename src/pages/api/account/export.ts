import type { APIRoute } from 'astro';
import { exportOwnData } from '@/features/accounts/account-data.server';
import { requireRole } from '@/features/accounts/guard.server';
import { ownPerson } from '@/features/accounts/own-account.server';

/** Everything kept about oneself, as a file. */
export const GET: APIRoute = (context) => {
  const user = requireRole(context, 'reader');
  if (user instanceof Response) return user;
  return new Response(`${JSON.stringify(exportOwnData(ownPerson(context)), null, 2)}\n`, {
    headers: {
      'content-type': 'application/json; charset=utf-8',
      'content-disposition': 'attachment; filename="foldwright-own-data.json"',
      'cache-control': 'no-store',
    },
  });
};
