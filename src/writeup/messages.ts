import type { Fault } from '@/engine';

/** What can be wrong with a write-up that is handed in, and what to do about it. */
const MESSAGES = {
  'not a write-up': { expected: 'a write-up of version 1 with its document', hint: 'Reload the page and try again.' },
  'too large': {
    expected: 'at most 500,000 characters, pictures apart',
    hint: 'Split the project in two, or shorten the text.',
  },
  'too deep': { expected: 'at most 8 levels of lists inside lists', hint: 'Take the innermost lists out one level.' },
  'too many parts': {
    expected: 'at most 5,000 paragraphs, measures and other parts',
    hint: 'Split the project in two, or shorten the text.',
  },
  'unknown part': {
    expected: 'a kind of part that this version knows',
    hint: 'Reload the page: it may be older than the site.',
  },
  'wrong place': { expected: 'parts that fit inside one another', hint: 'Undo the last change, then save again.' },
  'wrong value': { expected: 'a value that can be kept', hint: 'Undo the last change, then save again.' },
} as const;

export type WriteUpFaultCode = keyof typeof MESSAGES;

export function writeUpFault(code: WriteUpFaultCode, found: string): Fault {
  return { code, where: 'write-up', found, ...MESSAGES[code] };
}

/** One sentence or two for a person: what was found, what to do. */
export function explainWriteUpFault(fault: Fault): string {
  return `${fault.found}: wanted is ${fault.expected}. ${fault.hint}`.trim();
}
