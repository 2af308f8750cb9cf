import type { Pattern } from '@/engine';

/** A pattern as a file that says what it is: `$schema` first, `format` is its version. */
export const patternFileText = (pattern: Pattern, schema: string): string =>
  `${JSON.stringify({ $schema: schema, ...pattern }, null, 2)}\n`;

export const patternFileName = ({ slug }: Pattern): string => `${slug === '' ? 'pattern' : slug}.pattern.json`;
