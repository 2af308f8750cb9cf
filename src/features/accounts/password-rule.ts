export const PASSWORD_LEAST = 10;
/** Hashing is made to be slow; nobody needs to be able to make it slower. */
export const PASSWORD_MOST = 200;

export type PasswordVerdict = { readonly ok: boolean; readonly sentence: string };

/**
 * Whether a password may be chosen, and a sentence on how strong it is. Length counts most; what can be guessed from
 * the person, repeats and runs is refused.
 */
export function judgePassword(
  password: string,
  known: { readonly name?: string; readonly email?: string } = {},
): PasswordVerdict {
  const length = [...password].length;
  if (length === 0)
    return {
      ok: false,
      sentence: `${PASSWORD_LEAST} characters or more. Three or four words that do not belong together are easy to keep.`,
    };
  if (length < PASSWORD_LEAST) {
    const missing = PASSWORD_LEAST - length;
    return { ok: false, sentence: `Too short: ${missing} more ${missing === 1 ? 'character' : 'characters'} to go.` };
  }
  if (length > PASSWORD_MOST) return { ok: false, sentence: `Too long: at most ${PASSWORD_MOST} characters.` };

  const plain = password.toLowerCase();
  const different = new Set(plain).size;
  if (different < 5) return { ok: false, sentence: 'Too easy to guess: it repeats the same few characters.' };
  if (isRun(plain)) return { ok: false, sentence: 'Too easy to guess: it is a run of neighbouring characters.' };
  const own = [known.name, known.email, known.email?.split('@')[0], 'foldwright', 'password'];
  for (const word of own) {
    const part = word?.trim().toLowerCase() ?? '';
    if (part.length >= 4 && plain.includes(part) && length - part.length < 6) {
      return { ok: false, sentence: 'Too easy to guess: it is little more than a name that others know.' };
    }
  }
  if (length >= 16 && different >= 8) return { ok: true, sentence: 'Strong: long, and that is what counts.' };
  if (length >= 13) return { ok: true, sentence: 'Good. Longer is stronger still.' };
  return { ok: true, sentence: 'Enough. A few more characters make it much stronger.' };
}

/** Why a password may not be chosen; null when it may. */
export function passwordFault(
  password: string,
  known: { readonly name?: string; readonly email?: string } = {},
): string | null {
  const { ok, sentence } = judgePassword(password, known);
  return ok ? null : sentence;
}

const ROWS = [
  'abcdefghijklmnopqrstuvwxyz',
  '01234567890',
  'qwertyuiop',
  'asdfghjkl',
  'zxcvbnm',
  'qwertzuiop',
  'azertyuiop',
];

/** All but a few characters follow their neighbour in the alphabet, the digits or on the keyboard, either way. */
function isRun(text: string): boolean {
  const pairs = new Set(
    ROWS.flatMap((row) => [...row].slice(1).flatMap((letter, i) => [row[i]! + letter, letter + row[i]!])),
  );
  const steps = text.length - 1;
  let along = 0;
  for (let i = 0; i < steps; i += 1) if (pairs.has(text.slice(i, i + 2))) along += 1;
  return along >= steps - 2;
}
