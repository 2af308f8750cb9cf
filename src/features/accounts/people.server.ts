import { randomUUID } from 'node:crypto';
import { and, asc, count, eq, isNull, or, sql, type SQL } from 'drizzle-orm';
import { db } from '@/db/client.server';
import { users, type Role } from '@/db/schema';
import { emailKey } from './email-key';
import { hashPassword } from './passwords.server';

export { emailKey };

export type Person = typeof users.$inferSelect;

export interface NewPerson {
  readonly email: string;
  readonly name?: string | null;
  readonly role?: Role;
  /** Absent for those who sign in by links alone. */
  readonly password?: string;
  /** Already hashed, where the password itself is no longer at hand. */
  readonly passwordHash?: string;
}

export type Refused = { readonly ok: false; readonly code: string; readonly sentence: string };
export type PersonOutcome = { readonly ok: true; readonly person: Person } | Refused;

/**
 * Makes a person whose address is known to be theirs (a link was used, an admin vouches for it).
 * Refused when the address does not read or somebody has it.
 */
export async function createPerson({
  email,
  name,
  role = 'reader',
  password,
  passwordHash,
}: NewPerson): Promise<PersonOutcome> {
  const key = emailKey(email);
  if (!key) return refused('no-address', `"${email}" is not an e-mail address.`);
  const hashed = passwordHash ?? (password === undefined ? null : await hashPassword(password));
  const person = db
    .insert(users)
    .values({
      id: randomUUID(),
      email: email.trim(),
      emailKey: key,
      name: name?.trim() || null,
      role,
      passwordHash: hashed,
      emailVerified: new Date(),
    })
    .onConflictDoNothing({ target: users.emailKey })
    .returning()
    .get();
  return person ? { ok: true, person } : refused('taken', `Somebody has an account with ${key}.`);
}

export const findById = (id: string): Person | undefined => db.select().from(users).where(eq(users.id, id)).get();

/** By any way of writing the address; undefined also when it does not read. */
export function findByEmail(email: string): Person | undefined {
  const key = emailKey(email);
  return key ? db.select().from(users).where(eq(users.emailKey, key)).get() : undefined;
}

/** People whose name or address holds every word that was typed; everyone for ''. Admins first, then authors, then readers. */
export function listPeople(search = '', { limit = 200 } = {}): { people: Person[]; total: number } {
  const words = search.trim().toLowerCase().split(/\s+/).filter(Boolean).slice(0, 8);
  const holds = (word: string) => {
    const pattern = `%${word.replace(/[\\%_]/g, '\\$&')}%`;
    return or(
      sql`lower(${users.name}) like ${pattern} escape '\\'`,
      sql`${users.emailKey} like ${pattern} escape '\\'`,
    ) as SQL;
  };
  // Emptied accounts keep a row for what they published; there is nobody behind it.
  const where = and(sql`${users.emailKey} not like ${`%@${GONE_DOMAIN}`}`, ...words.map(holds));
  const total = db.select({ n: count() }).from(users).where(where).get()?.n ?? 0;
  const order = sql`case ${users.role} when 'admin' then 0 when 'author' then 1 else 2 end`;
  const people = db.select().from(users).where(where).orderBy(order, asc(users.emailKey)).limit(limit).all();
  return { people, total };
}

/** Takes the place of an address when an account was deleted and what it published stays. No such domain can exist. */
export const GONE_DOMAIN = 'gone.invalid';

/** Gives a role. Takes effect on the person's next request. Never leaves the site without an admin. */
export function setRole(id: string, role: Role): PersonOutcome {
  return change(id, (person) => (role === 'admin' ? null : lastAdmin(person, 'Make somebody else an admin first.')), {
    role,
  });
}

/** Disables or enables. Disabling ends every session at once; enabling does not bring them back. */
export function setDisabled(id: string, disabled: boolean): PersonOutcome {
  const check = (person: Person) =>
    disabled ? lastAdmin(person, 'Make somebody else an admin before you disable this one.') : null;
  const set = disabled
    ? { disabledAt: new Date(), sessionVersion: sql`${users.sessionVersion} + 1` }
    : { disabledAt: null };
  return change(id, check, set);
}

export function setName(id: string, name: string): PersonOutcome {
  return change(id, () => null, { name: name.trim() || null });
}

/** Sets the password and ends every session, also the one it was set from: start a new one there. */
export async function setPassword(id: string, password: string): Promise<PersonOutcome> {
  const passwordHash = await hashPassword(password);
  return change(id, () => null, { passwordHash, sessionVersion: sql`${users.sessionVersion} + 1` });
}

type Changes = { [K in keyof Person]?: Person[K] | SQL };

function change(id: string, check: (person: Person) => Refused | null, changes: Changes): PersonOutcome {
  // Immediate: two admins who demote each other at once must not both succeed.
  return db.transaction(
    (tx): PersonOutcome => {
      const before = tx.select().from(users).where(eq(users.id, id)).get();
      if (!before) return refused('nobody', 'There is no such person any more.');
      const fault = check(before);
      if (fault) return fault;
      const person = tx.update(users).set(changes).where(eq(users.id, id)).returning().get();
      return { ok: true, person: person as Person };
    },
    { behavior: 'immediate' },
  );
}

/** The refusal when this is the only admin who can sign in. Call inside the transaction that changes them. */
export function lastAdmin(person: Person, cure: string): Refused | null {
  if (person.role !== 'admin' || person.disabledAt) return null;
  const others = db
    .select({ n: count() })
    .from(users)
    .where(and(eq(users.role, 'admin'), isNull(users.disabledAt)))
    .get();
  return (others?.n ?? 0) > 1 ? null : refused('last-admin', `${personName(person)} is the only admin. ${cure}`);
}

/** What a person is called where they gave no name: the part of the address before the @. */
export const personName = (person: Pick<Person, 'name' | 'email'>): string =>
  person.name ?? person.email.split('@')[0] ?? person.email;

export const refused = (code: string, sentence: string): Refused => ({ ok: false, code, sentence });
