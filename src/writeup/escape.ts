const ENTITIES: Readonly<Record<string, string>> = {
  '&': '&amp;',
  '<': '&lt;',
  '>': '&gt;',
  '"': '&quot;',
  "'": '&#39;',
};

/** Text made safe for an HTML element or a quoted attribute. */
export const esc = (text: string): string => text.replace(/[&<>"']/g, (mark) => ENTITIES[mark] ?? mark);
