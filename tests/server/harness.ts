/**
 * Calls the routes of src/pages/api without a server: a request goes through the real middleware, with a real session
 * cookie, on a test database, to the module that Astro would choose.
 *
 *     const people = await cast();                            // after testDatabase()
 *     const answer = await call('PATCH', '/api/account', { as: people.reader, body: { name: 'Wenna' } });
 */
import type { APIContext, APIRoute } from 'astro';
import type { Role } from '@/db/schema';
import { createPerson, type Person } from '@/features/accounts/people.server';
import { beginSession } from '@/features/accounts/session.server';
import { onRequest } from '@/middleware';

export const HERE = 'http://localhost:4321';
export const METHODS = ['GET', 'POST', 'PUT', 'PATCH', 'DELETE'] as const;
export type Method = (typeof METHODS)[number];
export type RouteModule = Partial<Record<Method, APIRoute>>;

const files = import.meta.glob<RouteModule>('../../src/pages/api/**/*.ts');
/** Every page and route of the site, by the path that Astro gives it. */
export const pagePaths = Object.keys(import.meta.glob(['../../src/pages/**/*.{astro,ts,mdx,md}'])).map(pathOf);
/** The API's modules by their path, such as `/api/projects/[id]`. */
export const routeModules = new Map(Object.entries(files).map(([file, load]) => [pathOf(file), load]));

function pathOf(file: string): string {
  const path = file
    .replace('../../src/pages', '')
    .replace(/\.(astro|ts|mdx|md)$/, '')
    .replace(/\/index$/, '');
  return path || '/';
}

export interface Call {
  /** Who asks; nobody unless given. */
  readonly as?: Person | null;
  /** Sent as JSON unless it is a string, which goes as it is, or a form. */
  readonly body?: unknown;
  readonly headers?: Readonly<Record<string, string>>;
  /** Where a browser would say that the request comes from; null leaves the header away. */
  readonly origin?: string | null;
  readonly ip?: string;
}

/** A call through the middleware. */
export async function call(method: Method, address: string, options: Call = {}): Promise<Response> {
  const { context, handler, path } = await prepare(method, address, options);
  const answer = await onRequest(context, () => {
    if (!handler) throw new Error(`${path} has no ${method}`);
    return Promise.resolve(handler(context));
  });
  return withCookies(answer as Response, context);
}

/** A call past the middleware, as if it had let everyone in: what the route itself refuses. */
export async function callUnguarded(method: Method, address: string, options: Call = {}): Promise<Response> {
  const { context, handler, path } = await prepare(method, address, options);
  if (!handler) throw new Error(`${path} has no ${method}`);
  const { as } = options;
  context.locals.user = as ? { id: as.id, name: as.name ?? '', email: as.email, role: as.role } : null;
  context.locals.signIn = as ? { by: 'password', at: Date.now() } : null;
  return withCookies(await handler(context), context);
}

async function prepare(
  method: Method,
  address: string,
  { as, body, headers = {}, origin = HERE, ip = '127.0.0.1' }: Call,
) {
  const url = new URL(address, HERE);
  const found = findRoute(url.pathname);
  const module = found ? await routeModules.get(found.path)?.() : undefined;
  const sent = new Headers(headers);
  if (origin !== null && method !== 'GET') sent.set('origin', origin);
  if (body !== undefined && typeof body !== 'string' && !(body instanceof FormData) && !sent.has('content-type'))
    sent.set('content-type', 'application/json');
  if (as) sent.set('cookie', [sent.get('cookie'), await sessionCookie(as)].filter(Boolean).join('; '));
  const request = new Request(url, {
    method,
    headers: sent,
    ...(body === undefined
      ? {}
      : { body: typeof body === 'string' || body instanceof FormData ? body : JSON.stringify(body) }),
  });
  const context = contextOf(request, { ip, params: found?.params ?? {}, path: found?.path ?? '/404' });
  return { context, handler: module?.[method], path: found?.path ?? url.pathname };
}

/** The part of Astro's context that routes and the middleware use. */
export function contextOf(
  request: Request,
  { ip = '127.0.0.1', params = {}, path = '/' }: { ip?: string; params?: Record<string, string>; path?: string } = {},
): APIContext {
  const context = {
    request,
    url: new URL(request.url),
    params,
    locals: {},
    cookies: new Cookies(request.headers.get('cookie') ?? ''),
    clientAddress: ip,
    isPrerendered: false,
    routePattern: path,
    redirect: (location: string, status = 302) => new Response(null, { status, headers: { location } }),
    rewrite: (to: string) => Promise.resolve(new Response(`page ${to}`, { status: 403 })),
  };
  return context as unknown as APIContext;
}

function findRoute(pathname: string): { path: string; params: Record<string, string> } | null {
  const parts = pathname.split('/');
  // Fixed names before parameters, as Astro orders them.
  const paths = [...routeModules.keys()].sort((a, b) => Number(a.includes('[')) - Number(b.includes('[')));
  for (const path of paths) {
    const names = path.split('/');
    if (names.length !== parts.length) continue;
    const params: Record<string, string> = {};
    const fits = names.every((name, i) => {
      const parameter = /^\[(\w+)\]$/.exec(name)?.[1];
      if (parameter) params[parameter] = decodeURIComponent(parts[i] ?? '');
      return parameter ? parts[i] !== '' : name === parts[i];
    });
    if (fits) return { path, params };
  }
  return null;
}

export type Cast = Readonly<Record<Role, Person>>;

/** One person of each role, without passwords. */
export async function cast(): Promise<Cast> {
  const make = async (role: Role) => {
    const made = await createPerson({ email: `${role}@quilletlane.example`, name: `A test ${role}`, role });
    if (!made.ok) throw new Error(made.sentence);
    return made.person;
  };
  return { admin: await make('admin'), author: await make('author'), reader: await make('reader') };
}

/** `name=value` of a session that this person has just begun. */
export async function sessionCookie(person: Person, by: 'password' | 'link' = 'password'): Promise<string> {
  const cookies = new Cookies('');
  await beginSession({ cookies: cookies as unknown as APIContext['cookies'] }, person, by);
  return cookies.written.map(({ name, value }) => `${name}=${value}`).join('; ');
}

/** The cookies that a response leaves in the browser, as a request would send them. */
export const cookiesOf = (response: Response): string =>
  response.headers
    .getSetCookie()
    .map((line) => line.split(';')[0])
    .filter((pair) => !pair?.endsWith('='))
    .join('; ');

export function withCookies(response: Response, { cookies }: APIContext): Response {
  const copy = new Response(response.body, response);
  for (const { name, value } of (cookies as unknown as Cookies).written)
    copy.headers.append('set-cookie', `${name}=${value}; Path=/`);
  return copy;
}

/** As Astro's cookies, for what is used here. */
class Cookies {
  readonly written: { name: string; value: string }[] = [];
  readonly #sent: Map<string, string>;

  constructor(header: string) {
    const pairs = header
      .split(/;\s*/)
      .filter(Boolean)
      .map((pair): [string, string] => {
        const at = pair.indexOf('=');
        return [pair.slice(0, at), pair.slice(at + 1)];
      });
    this.#sent = new Map(pairs);
  }
  get(name: string) {
    const value = this.#sent.get(name);
    return value === undefined ? undefined : { value };
  }
  has(name: string) {
    return this.#sent.has(name);
  }
  set(name: string, value: string) {
    this.#sent.set(name, value);
    this.written.push({ name, value });
  }
  delete(name: string) {
    this.#sent.delete(name);
    this.written.push({ name, value: '' });
  }
}
