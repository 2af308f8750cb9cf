/** What the check of a pattern says: found, expected, hint. */
export const SAYS = {
  badName: (name: string) => [
    `the name “${name}”`,
    'letters, digits and single spaces, beginning with a letter',
    'Rename it.',
  ],
  reserved: (name: string, word: string) => [
    `the name “${name}” holds the word “${word}”`,
    'a name without if, then, else, and, or, not, is',
    'Choose another word.',
  ],
  twice: (name: string) => [`two things are called “${name}”`, 'each name once', 'Rename one of them.'],
  functionName: (name: string) => [`“${name}” is the name of a function`, 'a name of its own', 'Choose another word.'],
  neither: () => [
    'it has neither a question nor a formula',
    'one of the two',
    'Ask the reader for it, or give it a formula.',
  ],
  both: () => ['it has both a question and a formula', 'one of the two', 'Take one of them out.'],
  circle: (chain: readonly string[]) => [
    `it depends on itself: ${chain.join(' → ')}`,
    'measures that do not go round in a circle',
    'Break the circle at one of them.',
  ],
  badOption: (option: string, options: readonly string[]) => [
    `the usual option “${option}”`,
    options.join(' or '),
    'Choose one of its options.',
  ],
  fewOptions: () => ['it has fewer than two options', 'at least two', 'Add an option, or take the choice out.'],
  cellCount: (has: number, wants: number, what: string) => [
    `${has} ${what}`,
    `${wants}, as many as there are sizes`,
    'Give every row one cell for every column.',
  ],
  badCell: (text: string) => [
    `the cell “${text}”`,
    'panel, tab, cap or away, then its name',
    'Write it like “panel floor” or “tab left on floor”.',
  ],
  noCell: (name: string, nearest: string | null) => [
    `no cell is called “${name}”`,
    'the name of a cell',
    nearest === null ? 'Check the names of the cells.' : `The nearest name is “${nearest}”.`,
  ],
  noPoint: (name: string, nearest: string | null) => [
    `no point is called “${name}”`,
    'the name of a point',
    nearest === null ? 'Check the names of the points.' : `The nearest name is “${nearest}”.`,
  ],
  noPiece: (name: string, nearest: string | null) => [
    `no piece is called “${name}”`,
    'the name of a piece',
    nearest === null ? 'Check the names of the pieces.' : `The nearest name is “${nearest}”.`,
  ],
  noPanel: (name: string, piece: string, nearest: string | null) => [
    `no panel of “${piece}” is called “${name}”`,
    'the name of one of its panels',
    nearest === null ? 'Check the names of its panels.' : `The nearest name is “${nearest}”.`,
  ],
  noMeasure: (name: string, nearest: string | null) => [
    `no measure is called “${name}”`,
    'the name of a measure',
    nearest === null ? 'Check its name.' : `The nearest name is “${nearest}”.`,
  ],
  noCap: (name: string) => [`the cap “${name}” has no radius`, 'a radius among the caps', 'Add it to “caps”.'],
  badAngleOrLength: (found: string) => [
    `this is ${found}`,
    'a length or an angle',
    'Say how far in, such as 1/8 in, or how far off square, such as 45°.',
  ],
  badMaterial: (found: string) => [
    `this is ${found}`,
    'a length, an area or a number',
    'Say how long a ribbon is, or how many knobs it takes.',
  ],
  tooMany: (what: string, has: number, most: number) => [`${has} ${what}`, `at most ${most}`, 'Split the pattern.'],
  late: (name: string) => [
    `“${name}” is only known once the pieces are drawn`,
    'a measure, or the size of a column or row',
    'Use it in a fit or in the text.',
  ],
} satisfies Record<string, (...args: never[]) => readonly string[]>;

/** What renaming refuses, said to the person who types the new name. */
export const RENAMING = {
  badName: (name: string) => [
    name === '' ? 'the new name is empty' : `“${name}” cannot be a name`,
    'letters, digits and single spaces, beginning with a letter, 60 characters at most',
    'A name is made of letters, digits and single spaces, and begins with a letter; it has 60 characters at most.',
  ],
  reserved: (name: string, word: string) => [
    `“${name}” holds “${word}”, a word that formulas use`,
    `a name without the word “${word}”`,
    `Leave “${word}” out, or choose another word.`,
  ],
  functionName: (name: string) => [
    `“${name}” is the name of a function`,
    'a name of its own',
    `Say more, such as “own ${name}”.`,
  ],
  given: (name: string) => [`“${name}” has a meaning in every formula`, 'a name of its own', 'Choose another word.'],
  cardThickness: () => [
    'drawings know how thick the card is by the measure “card thickness”',
    'another measure, and another name',
    'That name stays with the measure that has it.',
  ],
  taken: (what: string, name: string) => [
    `there is a ${what} called “${name}” already`,
    'a name that is not taken',
    'Choose another, or rename that one first.',
  ],
  unknown: (what: string, name: string, nearest: string | null) => [
    `no ${what} is called “${name}”`,
    `the name of a ${what}`,
    nearest === null ? 'Check its name.' : `The nearest name is “${nearest}”.`,
  ],
} satisfies Record<string, (...args: never[]) => readonly string[]>;
