import { createHash } from 'node:crypto';
import type { Adapter, AdapterUser } from '@auth/core/adapters';
import { and, eq, lt } from 'drizzle-orm';
import { db } from '@/db/client.server';
import { users, verificationTokens } from '@/db/schema';
import { createPerson, findByEmail, findById, personName, type Person } from './people.server';

/**
 * What Auth.js needs of the database for links by mail with JWT sessions, and no more. Written here rather than taken from
 * the ready-made adapter because a person is found by `emailKey`, which that one would neither fill nor compare.
 */
export const adapter: Adapter = {
  async createUser({ email }) {
    const made = await createPerson({ email });
    if (made.ok) return asUser(made.person);
    // Two links of one new reader, used at the same moment: the other one made them.
    const person = findByEmail(email);
    if (!person) throw new Error(made.sentence);
    return asUser(person);
  },
  getUser: async (id) => asUserOrNull(findById(id)),
  getUserByEmail: async (email) => asUserOrNull(findByEmail(email)),
  async updateUser({ id, emailVerified }) {
    const person = db.update(users).set({ emailVerified }).where(eq(users.id, id)).returning().get();
    return asUser(person as Person);
  },
  async createVerificationToken(token) {
    forgetExpiredTokens();
    db.insert(verificationTokens).values(token).run();
    return token;
  },
  useVerificationToken: async (key) => takeToken(key.identifier, key.token),
};

/** Reads and forgets in one statement: a link works once, however often it is pressed. */
export function takeToken(identifier: string, token: string) {
  const matches = and(eq(verificationTokens.identifier, identifier), eq(verificationTokens.token, token));
  return db.delete(verificationTokens).where(matches).returning().get() ?? null;
}

export function forgetExpiredTokens(): void {
  db.delete(verificationTokens).where(lt(verificationTokens.expires, new Date())).run();
}

/** What is stored of a secret that stands in a link. */
export const tokenHash = (token: string): string => createHash('sha256').update(token).digest('hex');

const asUser = (person: Person): AdapterUser => ({
  id: person.id,
  email: person.emailKey,
  emailVerified: person.emailVerified,
  name: personName(person),
});
const asUserOrNull = (person: Person | undefined): AdapterUser | null => (person ? asUser(person) : null);
