import type { APIContext } from 'astro';
import { config } from '@/config.server';
import type { Role } from '@/db/schema';
import { problem } from '@/features/http/problem';
import { includesRole } from './access';

/*
 * The middleware lets nobody past who may not; pages and routes ask here once more, so that a slip in its table alone
 * opens nothing.
 */

/** Who is signed in, as pages and routes see them. Read anew from the database for every request. */
export interface User {
  readonly id: string;
  readonly name: string;
  readonly email: string;
  readonly role: Role;
}

/**
 * Whether it is the person at this computer, while the site is for this machine alone and its letters go nowhere else:
 * they hold links that sign in.
 */
export const isAtThisMachine = ({ clientAddress }: Pick<APIContext, 'clientAddress'>): boolean =>
  config.smtpUrl === null && config.isLocal && /^(127\.|::1$|::ffff:127\.)/.test(clientAddress);

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
  problem(401, 'Not signed in', {
    detail: 'Sign in, then try again. What you typed here is still in this page.',
    code: 'sign-in-first',
  });

export const notForThisRole = (needed: Role): Response =>
  problem(403, 'Not for your role', {
    detail: needed === 'admin' ? 'This is for admins.' : 'This is for authors. An admin can make you one.',
    code: 'wrong-role',
  });
