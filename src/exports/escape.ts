const ENTITIES: Readonly<Record<string, string>> = {
  '&': '&amp;',
  '<': '&lt;',
  '>': '&gt;',
  '"': '&quot;',
  "'": '&#39;',
};

/** Text made safe for an element or a quoted attribute of HTML, SVG or XML: the one place where that is done. */
export const esc = (text: string): string => text.replace(/[&<>"']/g, (mark) => ENTITIES[mark] ?? mark);

/** The same for a file of XML, which has no place for most control characters, not even escaped. */
export const escXml = (text: string): string =>
  esc(text.replace(/[\u0000-\u0008\u000b\u000c\u000e-\u001f\ufffe\uffff]/g, ''));
