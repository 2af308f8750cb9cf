import type { Role } from '@/db/schema';

/**
 * Who may go where. Every address of the site is listed: what is not here is answered with "not found", whatever
 * file may exist for it. Routes of the API check the role once more themselves (`requireRole`).
 *
 * - `all`: no account is needed
 * - `reader`: anyone who is signed in
 * - `author`: authors and admins
 * - `admin`
 * - `this machine`: somebody at this machine, while the site is local and no real mail server is set up
 */
export type Access = 'all' | Role | 'this machine';

/** An address, and with `/*` also everything below it. The longest that matches decides. */
const TABLE: Readonly<Record<string, Access>> = {
  '/': 'all',
  '/projects/*': 'all',
  '/draft/*': 'all',
  '/withdrawn/*': 'all',
  '/handbook/*': 'all',
  '/sheets': 'all',
  '/subscribe/*': 'all',
  '/unsubscribe/*': 'all',
  '/media/*': 'all',
  '/feed.xml': 'all',
  '/sitemap.xml': 'all',
  '/robots.txt': 'all',
  '/pattern.schema.json': 'all',
  '/sign-in/*': 'all',
  '/sign-up/*': 'all',
  '/sign-out': 'all',

  '/account/*': 'reader',
  '/workroom/*': 'author',
  '/admin/*': 'admin',
  '/dev/*': 'this machine',

  '/api/health': 'all',
  '/api/subscribe': 'all',
  '/api/account/*': 'reader',
  '/api/sheets/*': 'reader',
  '/api/projects/*': 'author',
  '/api/patterns/*': 'author',
  '/api/invitations/*': 'author',
  '/api/uploads/*': 'author',
  '/api/mailings/*': 'author',
  '/api/admin/*': 'admin',
  // The sign-in library's own addresses. Signing in goes through /sign-in alone, where tries are counted.
  '/api/auth/session': 'all',
};

const EXACT = new Map(Object.entries(TABLE).filter(([path]) => !path.endsWith('/*')));
const BELOW = Object.entries(TABLE)
  .filter(([path]) => path.endsWith('/*'))
  .map(([path, access]) => ({ prefix: path.slice(0, -2), access }))
  .sort((a, b) => b.prefix.length - a.prefix.length);

/** Null: the address is not in the table. */
export function accessTo(pathname: string): Access | null {
  const path = pathname.length > 1 ? pathname.replace(/\/+$/, '') : pathname;
  // An encoded slash or dot could name another file than the one that was checked.
  if (/%2f|%5c|%2e|\/\/|\\/i.test(path)) return null;
  const exact = EXACT.get(path);
  if (exact) return exact;
  return BELOW.find(({ prefix }) => path === prefix || path.startsWith(`${prefix}/`))?.access ?? null;
}

const RANK: Readonly<Record<Role, number>> = { reader: 1, author: 2, admin: 3 };

/** Whether a role includes another: an admin may do what an author may, an author what a reader may. */
export const includesRole = (role: Role, needed: Role): boolean => RANK[role] >= RANK[needed];
