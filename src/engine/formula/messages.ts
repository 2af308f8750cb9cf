import type { Fault } from '../types';

/** One sentence for a person: what was found, what was expected, what to try. */
export function explain(fault: Fault): string {
  const found = fault.found === '' ? '' : `${capital(fault.found)}. `;
  const hint = fault.hint === '' ? (fault.expected === '' ? '' : `Expected ${fault.expected}.`) : fault.hint;
  return `${found}${hint}`.trim();
}
/** The same with its place in front, for command lines and lists. */
export const explainAt = (fault: Fault): string => `${fault.where}: ${explain(fault)}`;

const capital = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);

export const SAYS = {
  tooLong: (length: number, most: number) => [
    `the formula has ${length} characters`,
    `at most ${most}`,
    'Split it into two worked measures.',
  ],
  tooDeep: (most: number) => [
    `brackets and ifs stand more than ${most} deep`,
    `at most ${most}`,
    'Split it into two worked measures.',
  ],
  tooMany: (most: number) => [
    `the formula has more than ${most} parts`,
    `at most ${most}`,
    'Split it into two worked measures.',
  ],
  strayMark: (mark: string) => [`“${mark}” means nothing here`, 'a measure, a number or a sign', 'Take it out.'],
  empty: () => ['there is no formula', 'a formula', 'Type a measure, a number with its unit, or a sum of them.'],
  unfinished: (wanted: string) => ['the formula stops too soon', wanted, `Go on with ${wanted}.`],
  unexpected: (found: string, wanted: string) => [
    `“${found}” stands where ${wanted} should`,
    wanted,
    `Put ${wanted} here.`,
  ],
  leftOver: (found: string) => [
    `“${found}” stands after the end of the formula`,
    'a sign such as + or * between two values',
    'Put a sign between them, or take it out.',
  ],
  unknownName: (name: string, nearest: string | null) => [
    `no measure is called “${name}”`,
    'the name of a measure',
    nearest === null ? 'Add the measure first, or check its name.' : `The nearest name is “${nearest}”.`,
  ],
  unknownFunction: (name: string, nearest: string | null) => [
    `no function is called “${name}”`,
    'a function',
    nearest === null ? 'Check its name.' : `The nearest function is “${nearest}”.`,
  ],
  unknownOption: (choice: string, option: string, options: readonly string[]) => [
    `${choice} has no option “${option}”`,
    options.join(' or '),
    `It can be ${options.join(' or ')}.`,
  ],
  notAChoice: (name: string) => [
    `“${name}” is not a choice`,
    'the name of a choice before “is”',
    'Use = to compare values; “is” is for choices.',
  ],
  choiceAlone: (name: string) => [
    `the choice “${name}” is not a value`,
    'a question about it',
    `Ask which option it is: if ${name} is … then … else …`,
  ],
  wrongCount: (name: string, wants: string, has: number) => [
    `${name} was given ${has} value${has === 1 ? '' : 's'}`,
    wants,
    `Give ${name} ${wants}.`,
  ],
  mixed: (sign: string, left: string, right: string) => [
    `${left} ${sign} ${right}`,
    'two values of one kind',
    `Both sides of “${sign}” must be of one kind; a bare number needs its unit, such as 2 in or 5 mm.`,
  ],
  wants: (what: string, wanted: string, found: string) => [
    `${what} was given ${found}`,
    wanted,
    `Give ${what} ${wanted}.`,
  ],
  wrongResult: (wanted: string, found: string) => [`this works out ${found}`, wanted, `It must work out ${wanted}.`],
  badPower: () => [
    'this power depends on a measure',
    'a plain whole number such as 2',
    'A length may only be raised to a plain whole number.',
  ],
  notYesNo: (found: string) => [
    `this is ${found}`,
    'a question answered by yes or no',
    'Compare two values, or ask which option a choice is.',
  ],
} satisfies Record<string, (...args: never[]) => readonly string[]>;
