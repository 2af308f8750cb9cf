/** Parts of `Name <letters@place.example>`, or of a bare address. */
export function senderParts(mailFrom: string): {
  readonly name: string;
  readonly address: string;
  readonly domain: string;
} {
  const named = /^\s*"?([^"<]*?)"?\s*<([^<>\s]+)>\s*$/.exec(mailFrom);
  const name = named?.[1] ?? '';
  const address = named?.[2] ?? mailFrom.trim();
  return { name, address, domain: address.slice(address.lastIndexOf('@') + 1) };
}

/** The address that refusals come back to, one for each delivery, so that each is known by its own token. */
export function bounceAddress(messageId: string, domain: string): string {
  const token = /^<d\.([0-9a-f]+)@/.exec(messageId)?.[1];
  if (!token) throw new Error('a message id without a token');
  return `b+${token}@${domain}`;
}

export const unsubscribeUrl = (siteUrl: string, token: string): string =>
  `${siteUrl}/unsubscribe?t=${encodeURIComponent(token)}`;
export const preferencesUrl = (siteUrl: string, token: string): string =>
  `${siteUrl}/subscribe/preferences?t=${encodeURIComponent(token)}`;

/**
 * The list headers of every mailing: RFC 2919 (the list's name, the same in every mail) and RFC 8058 (leaving with one
 * click). `token` is the subscriber's own.
 */
export function listHeaders({ listName, domain, siteUrl, token }: ListFacts): Record<string, string> {
  return {
    'List-Id': `${phrase(listName)} <projects.${domain}>`,
    'List-Unsubscribe': `<${unsubscribeUrl(siteUrl, token)}>`,
    'List-Unsubscribe-Post': 'List-Unsubscribe=One-Click',
  };
}
export interface ListFacts {
  readonly listName: string;
  readonly domain: string;
  readonly siteUrl: string;
  readonly token: string;
}

/** A display name as a header may hold it: quoted, or as encoded words of at most 75 characters (RFC 2047). */
function phrase(name: string): string {
  const clean = name.replace(/["\\\p{C}]/gu, '');
  if (/^[\x20-\x7e]*$/.test(clean)) return `"${clean}"`;
  const words: string[] = [];
  let part = '';
  const bytes = (text: string) => new TextEncoder().encode(text);
  for (const letter of clean) {
    if (bytes(part + letter).length > 45) {
      words.push(part);
      part = '';
    }
    part += letter;
  }
  return [...words, part].map((word) => `=?utf-8?B?${btoa(String.fromCharCode(...bytes(word)))}?=`).join(' ');
}
