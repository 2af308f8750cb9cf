import type { AuthConfig } from '@auth/core';
import { AuthError } from '@auth/core/errors';
import type { EmailConfig } from '@auth/core/providers/email';
import Credentials from '@auth/core/providers/credentials';
import { config } from '@/config.server';
import type { Role } from '@/db/schema';
import { queueLetter } from '@/features/mailing/letters.server';
import { signInLetter } from './account-letters';
import { adapter } from './adapter.server';
import { emailKey } from './email-key';
import { passwordFits } from './passwords.server';
import { findByEmail, findById, personName, type Person } from './people.server';
import { returnPath } from './return-path';

declare module '@auth/core/types' {
  interface Session {
    user: { id: string; name: string; email: string; role: Role };
    signedIn: { by: 'password' | 'link'; at: number };
    /** When the cookie was written, in seconds. */
    issued: number;
  }
}

declare module '@auth/core/jwt' {
  interface JWT {
    /** The person's session version when they signed in; another one ends the session. */
    sv?: number;
    by?: 'password' | 'link';
    /** When they signed in, in milliseconds. */
    at?: number;
    role?: Role;
  }
}

export const AUTH_PATH = '/api/auth';
export const SESSION_SECONDS = 30 * 24 * 60 * 60;
const LINK_MINUTES = 15;

const isSecure = config.siteUrl.startsWith('https:');
export const SESSION_COOKIE = `${isSecure ? '__Secure-' : ''}foldwright.session`;

/** A sign-in link by mail. It leads to our own page with a button: programs that open every link in a mail would use it up. */
const link: EmailConfig = {
  id: 'link',
  type: 'email',
  name: 'Link by mail',
  maxAge: LINK_MINUTES * 60,
  normalizeIdentifier(typed) {
    const key = emailKey(typed);
    if (!key) throw new Error('not an e-mail address');
    return key;
  },
  sendVerificationRequest({ identifier, token, url }) {
    const person = findByEmail(identifier);
    const to = returnPath(new URL(url).searchParams.get('callbackUrl')?.replace(/^https?:\/\/[^/]+/, ''));
    const address = `${config.siteUrl}/sign-in/confirm?${new URLSearchParams({ email: identifier, token, ...(to === '/' ? {} : { to }) })}`;
    queueLetter({
      ...(person?.name ? { toName: person.name } : {}),
      toAddress: person?.email ?? identifier,
      ...signInLetter({ address, minutes: LINK_MINUTES, isNew: !person }),
      expiresInMinutes: LINK_MINUTES,
    });
  },
};

const password = Credentials({
  id: 'password',
  name: 'Password',
  credentials: { email: {}, password: {} },
  async authorize({ email, password: typed }) {
    const person = findByEmail(String(email ?? ''));
    // Always compared, so that the time taken says nothing about who is known or disabled.
    const fits = await passwordFits(person?.passwordHash, String(typed ?? ''));
    return person && fits && maySignIn(person) ? { id: person.id } : null;
  },
});

const maySignIn = (person: Person): boolean => person.disabledAt === null;

/**
 * Auth.js as this site uses it: passwords and links by mail, sessions in an encrypted cookie, and the person read from
 * the database on every request, so that a role, a disabling or a new password takes effect at once.
 */
export const authConfig = {
  basePath: AUTH_PATH,
  trustHost: true,
  useSecureCookies: isSecure,
  // A getter: the secret is made in the data folder at its first use, which must not happen while building.
  get secret() {
    return config.secret();
  },
  adapter,
  providers: [password, link],
  session: { strategy: 'jwt', maxAge: SESSION_SECONDS },
  cookies: {
    sessionToken: { name: SESSION_COOKIE, options: { httpOnly: true, sameSite: 'lax', path: '/', secure: isSecure } },
  },
  pages: { signIn: '/sign-in', signOut: '/sign-out', error: '/sign-in', verifyRequest: '/sign-in/sent' },
  callbacks: {
    /** Asked when a link is asked for and again when it is used. */
    signIn({ user }) {
      const person = user.id ? findById(user.id) : undefined;
      return !person || maySignIn(person);
    },
    jwt({ token, account }) {
      const person = token.sub ? findById(token.sub) : undefined;
      if (!person || !maySignIn(person)) return null;
      if (account) {
        token.sv = person.sessionVersion;
        token.by = account.type === 'email' ? 'link' : 'password';
        token.at = Date.now();
      }
      if (token.sv !== person.sessionVersion) return null;
      return { ...token, name: personName(person), email: person.email, role: person.role };
    },
    session({ session, token }) {
      return {
        expires: session.expires,
        user: { id: token.sub ?? '', name: token.name ?? '', email: token.email ?? '', role: token.role ?? 'reader' },
        signedIn: { by: token.by ?? 'password', at: token.at ?? 0 },
        issued: token.iat ?? 0,
      };
    },
    redirect: ({ url, baseUrl }) => baseUrl + returnPath(url.startsWith(baseUrl) ? url.slice(baseUrl.length) : url),
  },
  logger: {
    error(error) {
      // Wrong passwords, used-up links and old cookies are answers, not failures.
      const expected = ['CredentialsSignin', 'AccessDenied', 'Verification', 'JWTSessionError'];
      if (error instanceof AuthError && expected.includes(error.type)) return;
      console.error('Signing in failed:', error);
    },
    warn() {},
    debug() {},
  },
} satisfies AuthConfig;
