/** Stands in a greeting for the subscriber's name. */
export const NAME = '[name]';

/** `Hello [name],` for Wenna: `Hello Wenna,`; without a name: `Hello,`. */
export function greet(greeting: string, name: string | null): string {
  const known = name?.replace(/[\p{C}\s]+/gu, ' ').trim() ?? '';
  return known ? greeting.replaceAll(NAME, known) : greeting.replace(/\s*\[name\]/g, '');
}
