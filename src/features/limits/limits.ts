const MINUTE = 60;
const HOUR = 60 * MINUTE;

/**
 * How often something may be tried, by one address on the net and for one e-mail address. `seconds` is how long a count
 * lasts from its first try.
 */
export const LIMITS = {
  /** Passwords that do not fit; a right one gives the tries back. */
  'sign-in': { byIp: { tries: 40, seconds: 15 * MINUTE }, byEmail: { tries: 8, seconds: 15 * MINUTE } },
  'sign-in-link': { byIp: { tries: 20, seconds: HOUR }, byEmail: { tries: 4, seconds: 15 * MINUTE } },
  /** Links that are tried out, whether they fit or not. */
  'use-link': { byIp: { tries: 60, seconds: HOUR }, byEmail: { tries: 20, seconds: HOUR } },
  'sign-up': { byIp: { tries: 20, seconds: HOUR }, byEmail: { tries: 4, seconds: HOUR } },
  subscribe: { byIp: { tries: 30, seconds: HOUR }, byEmail: { tries: 4, seconds: HOUR } },
  /** Invitations to work on a project. */
  'co-author': { byIp: { tries: 40, seconds: HOUR }, byEmail: { tries: 40, seconds: HOUR } },
  /** Pages behind links to drafts, whether the link works or not. */
  draft: { byIp: { tries: 300, seconds: 10 * MINUTE }, byEmail: { tries: 300, seconds: 10 * MINUTE } },
  /** PDFs that have to be made; those made before do not count. */
  paper: { byIp: { tries: 300, seconds: 10 * MINUTE }, byEmail: { tries: 300, seconds: 10 * MINUTE } },
  /** Files for cutting machines; asking again for one that has not changed does not count. */
  cutting: { byIp: { tries: 300, seconds: 10 * MINUTE }, byEmail: { tries: 300, seconds: 10 * MINUTE } },
  /** Searches for a size that browsers without scripts leave to the server. */
  search: { byIp: { tries: 60, seconds: 10 * MINUTE }, byEmail: { tries: 60, seconds: 10 * MINUTE } },
} as const;

export type LimitName = keyof typeof LIMITS;

/** "a minute", "7 minutes", "an hour": rounded up, so that it is never too soon. */
export function waitInWords(seconds: number): string {
  const minutes = Math.max(1, Math.ceil(seconds / MINUTE));
  if (minutes === 1) return 'a minute';
  if (minutes < 60) return `${minutes} minutes`;
  return minutes === 60 ? 'an hour' : `${Math.ceil(minutes / 60)} hours`;
}

/** The same sentence whoever is refused and for whichever of the counts. */
export function tooManySentence(seconds: number): string {
  return `That was tried too often. Wait ${waitInWords(seconds)}, then try again.`;
}
