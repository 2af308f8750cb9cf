/** How far a message had got when the answer came, or when none came. */
export type Phase = 'connect' | 'envelope' | 'body' | 'complete';

/** What a server said, or that it said nothing. */
export interface Answer {
  readonly phase: Phase;
  /** The command that was answered: `MAIL FROM`, `RCPT TO`, `DATA`, `AUTH`… */
  readonly command?: string;
  /** SMTP reply code; null when there was no reply. */
  readonly code: number | null;
  /** The reply's text, or what our own side says went wrong. */
  readonly reply: string;
  /** The reply's enhanced status code (RFC 3463), such as `5.1.1`. */
  readonly enhanced?: string | null;
  /** Our side could not send it at all, such as an address that the server has no extension for. */
  readonly refusedHere?: boolean;
}

/** What follows from an answer for one delivery, and for the mailing as a whole. */
export type Outcome =
  | { readonly kind: 'accepted' }
  /** Later again, with a longer pause each time. */
  | { readonly kind: 'later' }
  /** Not tried again; `suppress` when the address itself does not exist. */
  | { readonly kind: 'refused'; readonly suppress: boolean; readonly aboutUs: boolean }
  /** The whole message was handed over and the answer never came. */
  | { readonly kind: 'unknown' }
  /** Nothing is wrong with this delivery: the server is away. Nothing is counted against it. */
  | { readonly kind: 'server away'; readonly pause: boolean }
  /** The server will not take this mailing from us at all: stop before everyone is refused. */
  | { readonly kind: 'stop'; readonly why: string };

/** Addresses that do not exist, by enhanced status: bad mailbox, bad domain, bad syntax, moved away, null MX. */
const NO_SUCH_ADDRESS = /^5\.1\.(?:1|2|3|6|10)$/;

/** The enhanced status code at the head of a reply: `550 5.1.1 no such person` → `5.1.1`. */
export const enhancedStatus = (reply: string): string | null =>
  /^[245]\d\d[ -]([245]\.\d{1,3}\.\d{1,3})(?:\s|$)/.exec(reply)?.[1] ?? null;

/** Judges an answer by phase, reply code and enhanced status, in that order; never by the reply's words. */
export function judge({ phase, command, code, reply, enhanced = enhancedStatus(reply), refusedHere }: Answer): Outcome {
  if (code === null) {
    if (refusedHere) return { kind: 'refused', suppress: false, aboutUs: false };
    if (phase === 'complete') return { kind: 'unknown' };
    return phase === 'connect' ? { kind: 'server away', pause: false } : { kind: 'later' };
  }
  if (code >= 200 && code < 300) return { kind: 'accepted' };
  if (command === 'AUTH' || code === 535) return { kind: 'server away', pause: true };
  if (phase === 'connect' || code === 421) return { kind: 'server away', pause: false };
  if (code < 500) return { kind: 'later' };

  if (command === 'MAIL FROM') return { kind: 'stop', why: `The mail server refuses our own address: ${reply}` };
  if (enhanced === '5.2.2') return { kind: 'later' };
  if (enhanced === '5.3.4' || (code === 552 && !enhanced))
    return { kind: 'stop', why: `The mail server says that the mail is too large: ${reply}` };
  if (enhanced && NO_SUCH_ADDRESS.test(enhanced)) return { kind: 'refused', suppress: true, aboutUs: false };
  const aboutUs = enhanced ? enhanced.startsWith('5.7.') : code === 554;
  return { kind: 'refused', suppress: false, aboutUs };
}
