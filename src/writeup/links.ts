/** The schemes that a link in a write-up may have; an address without one is a place on this site. */
const SCHEMES = /^(https?:\/\/|mailto:)[^\s]+$/i;
const OWN_PLACE = /^(\/(?![/\\])|#)[^\s\\]*$/;

/** The address when it may stand in a write-up, else null: http, https, mailto, or a place on this site (`/handbook`, `#step-3`). */
export function safeHref(href: string): string | null {
  const trimmed = href.trim();
  return trimmed.length <= 2000 && (SCHEMES.test(trimmed) || OWN_PLACE.test(trimmed)) ? trimmed : null;
}

/** The address of a video when it may stand in a write-up, else null: https alone, since the reader leaves the page for it. */
export function videoHref(address: string): string | null {
  const trimmed = address.trim();
  return trimmed.length <= 2000 && /^https:\/\/[^\s"<>\\]+$/i.test(trimmed) && URL.canParse(trimmed) ? trimmed : null;
}

/** What a person types into the link field, made whole: `example.org/card` gets https, an e-mail address mailto. Null when it cannot be a link. */
export function readHref(typed: string): string | null {
  const text = typed.trim();
  const safe = safeHref(text);
  if (safe) return safe;
  if (/^[^\s@/:]+@[^\s@/:]+\.[^\s@/:]+$/.test(text)) return `mailto:${text}`;
  if (/^[\w-]+(\.[\w-]+)+([/?#]\S*)?$/.test(text)) return `https://${text}`;
  return null;
}
