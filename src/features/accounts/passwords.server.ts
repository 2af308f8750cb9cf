import { hash, verify } from '@node-rs/argon2';

/** argon2id with the library's parameters: 19 MiB, two passes. Roughly 30 ms. */
export const hashPassword = (password: string): Promise<string> => hash(password.normalize('NFKC'));

let dummy: Promise<string> | undefined;

/**
 * Whether the password fits. Someone who does not exist, or who has no password, takes as long as everyone else:
 * otherwise the time would tell which addresses are known.
 */
export async function passwordFits(stored: string | null | undefined, password: string): Promise<boolean> {
  const against = stored ?? (await (dummy ??= hashPassword('nobody has this password')));
  const fits = await verify(against, password.normalize('NFKC'));
  return fits && stored != null;
}
