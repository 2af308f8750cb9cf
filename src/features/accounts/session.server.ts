import { Auth, raw, skipCSRFCheck } from '@auth/core';
import { AuthError } from '@auth/core/errors';
import { encode } from '@auth/core/jwt';
import type { ResponseInternal, Session } from '@auth/core/types';
import type { APIContext } from 'astro';
import { config } from '@/config.server';
import { AUTH_PATH, authConfig, SESSION_COOKIE, SESSION_SECONDS } from './auth.server';
import type { User } from './guard.server';
import type { Person } from './people.server';

export interface SignIn {
  readonly by: 'password' | 'link';
  /** Epoch milliseconds. */
  readonly at: number;
}

type Context = Pick<APIContext, 'request' | 'url' | 'cookies'>;

/** A cookie older than this is written anew, so that who comes by now and then stays signed in. */
const RENEW_AFTER_SECONDS = 24 * 60 * 60;

/** Who is signed in. Clears a cookie that is no longer good and renews one that grows old. */
export async function readSession(context: Context): Promise<{ user: User; signIn: SignIn } | null> {
  if (!context.cookies.has(SESSION_COOKIE) && !context.cookies.has(`${SESSION_COOKIE}.0`)) return null;
  const headers = { cookie: context.request.headers.get('cookie') ?? '' };
  const answer = await callAuth(new Request(new URL(`${AUTH_PATH}/session`, context.url), { headers }));
  const session = answer.body as Session | null;
  const isOld = session !== null && Date.now() / 1000 - session.issued > RENEW_AFTER_SECONDS;
  if (!session || isOld) keepSessionCookies(context, answer);
  return session && { user: session.user, signIn: session.signedIn };
}

export type SignedIn = { readonly ok: true } | { readonly ok: false };

/** Signs in when the password fits. The caller counts the tries. */
export function signInWithPassword(
  context: Context,
  { email, password }: { email: string; password: string },
): Promise<SignedIn> {
  return attempt(context, 'callback/password', { body: new URLSearchParams({ email, password }) });
}

/** Has a link sent. Says nothing about whether one was: a disabled person gets none. */
export async function sendSignInLink(context: Context, { email, to }: { email: string; to: string }): Promise<void> {
  await attempt(context, 'signin/link', { body: new URLSearchParams({ email, callbackUrl: to }) });
}

/** Uses a link up. A new address becomes a reader: having the link proves that it is theirs. */
export function signInWithLink(
  context: Context,
  { email, token }: { email: string; token: string },
): Promise<SignedIn> {
  return attempt(context, `callback/link?${new URLSearchParams({ email, token })}`, {});
}

async function attempt(context: Context, path: string, { body }: { body?: URLSearchParams }): Promise<SignedIn> {
  // Without the visitor's cookies: who was signed in before has no part in this.
  const request = new Request(new URL(`${AUTH_PATH}/${path}`, context.url), body ? { method: 'POST', body } : {});
  try {
    keepSessionCookies(context, await callAuth(request));
    return { ok: true };
  } catch (error) {
    if (error instanceof AuthError && ['CredentialsSignin', 'AccessDenied', 'Verification'].includes(error.type))
      return { ok: false };
    throw error;
  }
}

/** Signs a person in who has just shown in another way that they are who they say. */
export async function beginSession(
  { cookies }: Pick<APIContext, 'cookies'>,
  person: Person,
  by: SignIn['by'],
): Promise<void> {
  const token = { sub: person.id, sv: person.sessionVersion, by, at: Date.now() };
  const value = await encode({ token, secret: config.secret(), salt: SESSION_COOKIE, maxAge: SESSION_SECONDS });
  cookies.set(SESSION_COOKIE, value, { ...authConfig.cookies.sessionToken.options, maxAge: SESSION_SECONDS });
}

/** Signs out here. Other devices stay signed in. */
export function endSession({ cookies }: Pick<APIContext, 'cookies'>): void {
  cookies.delete(SESSION_COOKIE, { path: '/', secure: authConfig.useSecureCookies });
}

/** Auth.js without its own pages and double-submit token: our middleware has checked where the request comes from. */
async function callAuth(request: Request): Promise<ResponseInternal> {
  const answer: unknown = await Auth(request, { ...authConfig, secret: config.secret(), raw, skipCSRFCheck });
  if (answer instanceof Response) throw new Error(`Auth.js refused its settings: ${await answer.text()}`);
  return answer as ResponseInternal;
}

/** The other cookies of Auth.js serve its own pages, which are not used. */
function keepSessionCookies(
  { cookies }: Pick<APIContext, 'cookies'>,
  { cookies: written = [] }: ResponseInternal,
): void {
  for (const { name, value, options } of written) {
    if (!name.startsWith(SESSION_COOKIE)) continue;
    const { path = '/', httpOnly, secure, expires, maxAge, sameSite } = options;
    if (value === '') cookies.delete(name, { path, secure });
    else cookies.set(name, value, { path, httpOnly, secure, expires, maxAge, sameSite });
  }
}
