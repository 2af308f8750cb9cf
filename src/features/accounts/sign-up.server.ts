import { createHash, randomBytes, timingSafeEqual } from 'node:crypto';
import { decode, encode } from '@auth/core/jwt';
import type { APIContext } from 'astro';
import { z } from 'zod';
import { config } from '@/config.server';
import { alreadyKnownLetter, signUpLetter } from './account-letters';
import { SESSION_COOKIE } from './auth.server';
import { hashPassword, passwordFits } from './passwords.server';
import { createPerson, emailKey, findByEmail, type Person } from './people.server';
import { post } from './post.server';

/**
 * Signing up. Nothing is stored until the address is proved: what was typed travels, encrypted, inside the letter's link.
 *
 * The link is tied to the browser that signed up. From any other browser the password must be typed again: otherwise
 * somebody could sign up with a stranger's address and their own password, and wait for the stranger to press the button.
 */
const SIGN_UP_HOURS = 24;
const SALT = 'foldwright sign-up';
const BROWSER_COOKIE = `${SESSION_COOKIE.startsWith('__Secure-') ? '__Secure-' : ''}foldwright.sign-up`;

const sealedSchema = z.object({ email: z.string(), name: z.string(), passwordHash: z.string(), browser: z.string() });
type Sealed = z.infer<typeof sealedSchema>;

/** Sends the letter that fits: to confirm, or that there is an account already. The page says the same either way. */
export async function askToSignUp(
  { cookies }: Pick<APIContext, 'cookies'>,
  { email, name, password }: { email: string; name: string; password: string },
): Promise<void> {
  // Hashed for known addresses too: the time taken must not tell them apart.
  const passwordHash = await hashPassword(password);
  const browser = randomBytes(24).toString('base64url');
  cookies.set(BROWSER_COOKIE, browser, {
    httpOnly: true,
    sameSite: 'lax',
    path: '/sign-up',
    secure: BROWSER_COOKIE.startsWith('__Secure-'),
    maxAge: SIGN_UP_HOURS * 3600,
  });
  const token = await seal({ email, name, passwordHash, browser: digest(browser) });

  const known = findByEmail(email);
  if (known) {
    if (!known.disabledAt) post(known, alreadyKnownLetter({ signIn: `${config.siteUrl}/sign-in` }));
    return;
  }
  const address = `${config.siteUrl}/sign-up/confirm?${new URLSearchParams({ token })}`;
  post({ email, name }, signUpLetter({ address, name, hours: SIGN_UP_HOURS }), SIGN_UP_HOURS * 60);
}

export interface PendingSignUp {
  readonly email: string;
  readonly name: string;
  /** Whether this is another browser than the one that signed up. */
  readonly needsPassword: boolean;
}

/** What a link holds; null when it is too old, damaged or not ours. */
export async function readSignUp(
  { cookies }: Pick<APIContext, 'cookies'>,
  token: string,
): Promise<PendingSignUp | null> {
  const sealed = await unseal(token);
  return sealed && { email: sealed.email, name: sealed.name, needsPassword: !isSameBrowser(cookies, sealed) };
}

export type SignUpOutcome =
  | { readonly ok: true; readonly person: Person }
  | { readonly ok: false; readonly code: 'no link' | 'wrong password' | 'known' };

export async function confirmSignUp(
  { cookies }: Pick<APIContext, 'cookies'>,
  token: string,
  password: string,
): Promise<SignUpOutcome> {
  const sealed = await unseal(token);
  if (!sealed) return { ok: false, code: 'no link' };
  if (!isSameBrowser(cookies, sealed) && !(await passwordFits(sealed.passwordHash, password)))
    return { ok: false, code: 'wrong password' };
  const made = await createPerson({ email: sealed.email, name: sealed.name, passwordHash: sealed.passwordHash });
  if (!made.ok) return { ok: false, code: 'known' };
  cookies.delete(BROWSER_COOKIE, { path: '/sign-up' });
  return made;
}

const seal = (sealed: Sealed) =>
  encode({ token: { ...sealed }, secret: config.secret(), salt: SALT, maxAge: SIGN_UP_HOURS * 3600 });

async function unseal(token: string): Promise<Sealed | null> {
  try {
    const read = sealedSchema.safeParse(await decode({ token, secret: config.secret(), salt: SALT }));
    return read.success && emailKey(read.data.email) ? read.data : null;
  } catch {
    return null;
  }
}

function isSameBrowser(cookies: APIContext['cookies'], { browser }: Sealed): boolean {
  const mine = cookies.get(BROWSER_COOKIE)?.value;
  return mine !== undefined && timingSafeEqual(Buffer.from(digest(mine)), Buffer.from(browser));
}

const digest = (text: string): string => createHash('sha256').update(text).digest('base64url');
