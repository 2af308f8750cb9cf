/**
 * Every method of every route under src/pages/api, with who may use it. routes.test.ts tries each row: too low a role, a
 * foreign origin, a body that does not read or does not fit; and it fails when a method that exists has no row here.
 *
 * To add a row:
 *
 *     { path: '/api/things/[id]', method: 'PUT', who: 'author', prepare: async ({ author }) => ({ id: thingOf(author) }), body: { title: 'Tray' } },
 *
 * - `path` is the file's path, `who` the lowest role ('all' when no account is needed), the same as in
 *   src/features/accounts/access.ts.
 * - `body` is one that fits: it shows that the route takes JSON through `readJson`. Leave it away when the route reads none;
 *   `form: true` is for routes that take multipart forms instead.
 * - `prepare` makes what the path's parameters stand for, owned by the author, and gives the parameters. It runs anew for
 *   every try. A route without parameters needs none.
 * - `headers` are those without which the route refuses before it reads the body, such as If-Match.
 */
import { db } from '@/db/client.server';
import { editions, mailings, projects } from '@/db/schema';
import type { Access } from '@/features/accounts/access';
import { emptyWriteUp } from '../setup/empty-write-up';
import type { Cast, Method } from './harness';
import { FOLDER } from './published-project';

export interface RouteRow {
  readonly path: string;
  readonly method: Method;
  readonly who: Access;
  readonly prepare?: (people: Cast) => Record<string, string> | Promise<Record<string, string>>;
  readonly body?: unknown;
  readonly form?: true;
  readonly headers?: Readonly<Record<string, string>>;
}

/** A draft of the author's, just enough of one for a route to find it. */
function draft({ author }: Cast): { id: string } {
  const nothing = {} as never;
  db.insert(projects)
    .values({
      id: 'draft',
      authorId: author.id,
      slug: 'draft',
      title: 'Draft',
      pattern: nothing,
      sizing: nothing,
      writeUp: emptyWriteUp(),
    })
    .run();
  return { id: 'draft' };
}

/** The same with further parameters, such as the number of a revision. */
const inDraft = (more: Record<string, string>) => (people: Cast) => ({ ...draft(people), ...more });

/** A mailing about the author's first edition. Its box has no pattern: what would draw it is tried elsewhere. */
function mailing(people: Cast): { id: string } {
  const { id: projectId } = draft(people);
  const nothing = {} as never;
  const { id: publishedBy } = people.author;
  db.insert(editions)
    .values({
      id: 'edition',
      projectId,
      n: 1,
      title: 'Draft',
      summary: '',
      pattern: nothing,
      sizing: nothing,
      writeUp: emptyWriteUp(),
      publishedBy,
    })
    .run();
  const words = { subject: 'A box', greeting: 'Hello', excerpt: 'It is new.' };
  db.insert(mailings)
    .values({ id: 'mailing', projectId, edition: 1, authorId: publishedBy, ...words })
    .run();
  return { id: 'mailing' };
}
/** For routes that read no body: who may come so far is all there is to try. */
const noMailing = () => ({ id: 'no-such-mailing' });

export const ROUTES: readonly RouteRow[] = [
  { path: '/api/health', method: 'GET', who: 'all' },

  { path: '/api/account', method: 'GET', who: 'reader' },
  { path: '/api/account', method: 'PATCH', who: 'reader', body: { name: 'Wenna Tolliver' } },
  {
    path: '/api/account',
    method: 'DELETE',
    who: 'reader',
    body: { email: 'reader@quilletlane.example', keepName: true },
  },
  { path: '/api/account/password', method: 'PUT', who: 'reader', body: { next: 'seven damp snails' } },
  { path: '/api/account/export', method: 'GET', who: 'reader' },

  { path: '/api/sheets', method: 'GET', who: 'reader' },
  { path: '/api/sheets', method: 'PUT', who: 'reader', body: { sheets: [{ card: 'a4', count: 20 }] } },
  { path: '/api/sheets/merge', method: 'POST', who: 'reader', body: { sheets: [{ card: 'a4', count: 20 }] } },

  { path: '/api/admin/people', method: 'GET', who: 'admin' },
  {
    path: '/api/admin/people/[id]',
    method: 'PATCH',
    who: 'admin',
    prepare: ({ reader }) => ({ id: reader.id }),
    body: { role: 'author' },
  },
  { path: '/api/admin/invitations', method: 'GET', who: 'admin' },
  { path: '/api/admin/invitations', method: 'POST', who: 'admin', body: { email: 'odo@quilletlane.example' } },
  { path: '/api/admin/invitations', method: 'DELETE', who: 'admin', body: { email: 'odo@quilletlane.example' } },

  { path: '/api/projects', method: 'GET', who: 'author' },
  { path: '/api/projects', method: 'POST', who: 'author', body: { pattern: 'no-such-pattern', title: 'Seed box' } },
  { path: '/api/projects/[id]', method: 'GET', who: 'author', prepare: draft },
  {
    path: '/api/projects/[id]',
    method: 'PUT',
    who: 'author',
    prepare: draft,
    headers: { 'if-match': '"1"' },
    body: {},
  },
  { path: '/api/projects/[id]', method: 'DELETE', who: 'author', prepare: draft },
  { path: '/api/projects/[id]/address', method: 'PUT', who: 'author', prepare: draft, body: { slug: 'seed-box' } },
  { path: '/api/projects/[id]/duplicate', method: 'POST', who: 'author', prepare: draft, body: {} },
  {
    path: '/api/projects/[id]/merge',
    method: 'POST',
    who: 'author',
    prepare: draft,
    headers: { 'if-match': '"1"' },
    body: { state: {} },
  },
  { path: '/api/projects/[id]/revisions', method: 'GET', who: 'author', prepare: draft },
  { path: '/api/projects/[id]/revisions/[n]', method: 'GET', who: 'author', prepare: inDraft({ n: '1' }) },
  {
    path: '/api/projects/[id]/revisions/[n]/restore',
    method: 'POST',
    who: 'author',
    prepare: inDraft({ n: '1' }),
    headers: { 'if-match': '"1"' },
  },
  { path: '/api/projects/[id]/people', method: 'GET', who: 'author', prepare: draft },
  {
    path: '/api/projects/[id]/people',
    method: 'POST',
    who: 'author',
    prepare: draft,
    body: { email: 'odo@quilletlane.example' },
  },
  {
    path: '/api/projects/[id]/people/[person]',
    method: 'DELETE',
    who: 'author',
    prepare: inDraft({ person: 'nobody' }),
  },
  { path: '/api/projects/[id]/links', method: 'POST', who: 'author', prepare: draft, body: { label: 'For Odo' } },
  { path: '/api/projects/[id]/links/[link]', method: 'DELETE', who: 'author', prepare: inDraft({ link: 'none' }) },
  { path: '/api/projects/[id]/sources', method: 'GET', who: 'author', prepare: draft },
  {
    path: '/api/projects/[id]/sources',
    method: 'POST',
    who: 'author',
    prepare: draft,
    body: { name: 'Pasted text', kind: 'plain', text: 'Cut the lid.' },
  },
  { path: '/api/projects/[id]/sources/[source]', method: 'GET', who: 'author', prepare: inDraft({ source: 'none' }) },
  {
    path: '/api/projects/[id]/sources/[source]',
    method: 'DELETE',
    who: 'author',
    prepare: inDraft({ source: 'none' }),
  },
  {
    path: '/api/invitations/[id]',
    method: 'POST',
    who: 'author',
    prepare: () => ({ id: 'no-such-invitation' }),
    body: { accept: true },
  },
  { path: '/api/projects/[id]/publish', method: 'POST', who: 'author', prepare: draft, body: { revision: 99 } },
  { path: '/api/projects/[id]/schedule', method: 'GET', who: 'author', prepare: draft },
  {
    path: '/api/projects/[id]/schedule',
    method: 'PUT',
    who: 'author',
    prepare: draft,
    body: { revision: 99, publishAt: 1 },
  },
  { path: '/api/projects/[id]/schedule', method: 'DELETE', who: 'author', prepare: draft },
  {
    path: '/api/projects/[id]/withdrawal',
    method: 'PUT',
    who: 'author',
    prepare: draft,
    body: { reason: 'A figure is wrong.' },
  },
  { path: '/api/projects/[id]/withdrawal', method: 'DELETE', who: 'author', prepare: draft },
  { path: '/api/projects/[id]/restore', method: 'POST', who: 'author', prepare: draft },

  { path: '/api/patterns', method: 'GET', who: 'author' },
  { path: '/api/patterns', method: 'POST', who: 'author', body: FOLDER },
  { path: '/api/patterns/[id]', method: 'GET', who: 'author', prepare: () => ({ id: 'tray' }) },
  { path: '/api/patterns/[id]', method: 'DELETE', who: 'author', prepare: () => ({ id: 'no-such-pattern' }) },

  { path: '/api/mailings/[id]', method: 'GET', who: 'author', prepare: noMailing },
  {
    path: '/api/mailings/[id]',
    method: 'PUT',
    who: 'author',
    prepare: mailing,
    headers: { 'if-match': '"1"' },
    body: { subject: 'A box', greeting: 'Hello', excerpt: 'It is new.', withHero: false },
  },
  { path: '/api/mailings/[id]/preview', method: 'GET', who: 'author', prepare: noMailing },
  { path: '/api/mailings/[id]/test', method: 'POST', who: 'author', prepare: noMailing },
  { path: '/api/mailings/[id]/send', method: 'POST', who: 'author', prepare: mailing, body: { revision: 99 } },
  { path: '/api/mailings/[id]/pause', method: 'POST', who: 'author', prepare: noMailing },
  { path: '/api/mailings/[id]/resume', method: 'POST', who: 'author', prepare: noMailing },
  { path: '/api/mailings/[id]/stop', method: 'POST', who: 'author', prepare: noMailing },

  { path: '/api/subscribe', method: 'POST', who: 'all', body: { email: 'wenna@quilletlane.example', units: 'mm' } },

  { path: '/api/uploads', method: 'POST', who: 'author', form: true },
];
