import type { APIContext } from 'astro';
import type { Role } from '@/db/schema';
import { problem } from '@/features/http/problem';
import { includesRole } from './access';

/** Who is signed in, as pages and routes see them. Read anew from the database for every request. */
export interface User {
  readonly id: string;
  readonly name: string;
  readonly email: string;
  readonly role: Role;
}

/**
 * The signed-in user when their role includes the one needed, or the refusal to return.
 *
 *     const user = requireRole(context, 'author');
 *     if (user instanceof Response) return user;
 */
export function requireRole(context: Pick<APIContext, 'locals'>, needed: Role): User | Response {
  const { user } = context.locals;
  if (!user) return signInFirst();
  return includesRole(user.role, needed) ? user : notForThisRole(needed);
}

export const signInFirst = (): Response =>
  problem(401, 'Not signed in', { detail: 'Sign in, then try again. What you typed here is still in this page.', code: 'sign-in-first' });

export const notForThisRole = (needed: Role): Response =>
  problem(403, 'Not for your role', {
    detail: needed === 'admin' ? 'This is for admins.' : 'This is for authors. An admin can make you one.',
    code: 'wrong-role',
  });
