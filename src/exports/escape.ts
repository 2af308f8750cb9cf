const ENTITIES: Readonly<Record<string, string>> = {
  '&': '&amp;',
  '<': '&lt;',
  '>': '&gt;',
  '"': '&quot;',
  "'": '&#39;',
};

/** Text made safe for an element or a quoted attribute of HTML, SVG or XML: the one place where that is done. */
export const esc = (text: string): string => text.replace(/[&<>"']/g, (mark) => ENTITIES[mark] ?? mark);
