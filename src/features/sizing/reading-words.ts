import type { Fault } from '@/engine';

/** What was typed for a size and does not read, as a person is told: what was found, what to do. */
export function readingWords(faults: readonly Fault[]): string {
  return faults
    .map(({ found, expected, hint }) => `${capital(found)} does not read as ${expected}. ${hint}`.trim())
    .join(' ');
}

const capital = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);
