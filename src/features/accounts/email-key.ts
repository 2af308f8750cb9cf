/** Letters, digits and the marks of an unquoted local part (RFC 5322 atext, RFC 6531 letters), in dotted parts. */
const LOCAL = /^[\p{L}\p{M}\p{N}!#$%&'*+/=?^_`{|}~-]+(?:\.[\p{L}\p{M}\p{N}!#$%&'*+/=?^_`{|}~-]+)*$/u;
const DOMAIN_AS_TYPED = /^[\p{L}\p{M}\p{N}-]+(?:\.[\p{L}\p{M}\p{N}-]+)+$/u;
const DOMAIN = /^(?=.{1,253}$)(?:[a-z0-9](?:[a-z0-9-]{0,61}[a-z0-9])?\.)+[a-z0-9](?:[a-z0-9-]{0,61}[a-z0-9])?$/;

/** What to say when `emailKey` gives null. */
export const EMAIL_SENTENCE = 'That is not an e-mail address: it looks like name@place.example.';

/**
 * The form of an e-mail address that is compared and kept unique: trimmed, NFC, lower case, an international domain as
 * its A-labels. Tags (`+seeds`) and dots count, as they do for the mail server. Null when it is no address that a letter
 * may be sent to: quoted local parts, line breaks, spaces, look-alikes of @ and domains without a dot are refused.
 *
 *     emailKey(' Ines@QuilletLane.example ')  // 'ines@quilletlane.example'
 *     emailKey('wenna@bücher.example')        // 'wenna@xn--bcher-kva.example'
 *     emailKey('"two words"@x.example')       // null
 */
export function emailKey(text: string): string | null {
  if (/[\r\n\0]/.test(text) || text.length > 320) return null;
  const typed = text.trim().normalize('NFC').toLowerCase();
  const at = typed.lastIndexOf('@');
  const local = typed.slice(0, Math.max(at, 0));
  const domain = asciiDomain(typed.slice(at + 1));
  // What changes under NFKC only looks like another letter (a full-width @, a ligature).
  if (!domain || !LOCAL.test(local) || local !== local.normalize('NFKC')) return null;
  const key = `${local}@${domain}`;
  const bytes = (part: string) => new TextEncoder().encode(part).length;
  return bytes(local) <= 64 && bytes(key) <= 254 ? key : null;
}

/** Why no letter can be sent to what was typed; null when one can. Our mail goes out without SMTPUTF8. */
export function addressFault(text: string): string | null {
  const key = emailKey(text);
  if (!key) return EMAIL_SENTENCE;
  return /[^\0-\x7f]/.test(key)
    ? 'Before the @, only letters from a to z can be written to from here. Use another address.'
    : null;
}

function asciiDomain(typed: string): string | null {
  if (!DOMAIN_AS_TYPED.test(typed) || !URL.canParse(`http://${typed}`)) return null;
  const domain = new URL(`http://${typed}`).hostname;
  // All-digit last labels are addresses of machines, not names.
  return DOMAIN.test(domain) && !/(^|\.)\d+$/.test(domain) ? domain : null;
}
