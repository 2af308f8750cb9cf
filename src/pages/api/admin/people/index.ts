import type { APIRoute } from 'astro';
import { requireRole } from '@/features/accounts/guard.server';
import { listPeople } from '@/features/accounts/people.server';
import { asRow } from '@/features/accounts/people-desk.server';
import { json } from '@/features/http/problem';

/** `?search=`: people whose name or address holds every word. */
export const GET: APIRoute = (context) => {
  const user = requireRole(context, 'admin');
  if (user instanceof Response) return user;
  const { people, total } = listPeople(context.url.searchParams.get('search') ?? '');
  return json({ people: people.map(asRow), total });
};
