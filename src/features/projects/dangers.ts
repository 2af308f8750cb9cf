/** A tool or material that can hurt, as words in a write-up name it. */
export interface Danger {
  readonly name: string;
  /** What a caution about it could say, as a sentence to the author. */
  readonly advice: string;
  readonly words: RegExp;
}

const DANGERS: readonly Danger[] = [
  {
    name: 'blades',
    words: /\b(?:craft |utility |box )?(?:kni(?:fe|ves)|scalpels?|blades?|box cutters?|rotary cutters?)\b/iu,
    advice: 'Say how to cut safely: a steel rule, a mat, the other hand away, the blade capped when it is put down.',
  },
  {
    name: 'trimmers',
    words: /\b(?:paper )?(?:trimmers?|guillotines?)\b/iu,
    advice: 'Say to follow the maker’s own instructions, and to keep fingers clear of the blade.',
  },
  {
    name: 'hot glue',
    words: /\b(?:hot[- ]?(?:melt )?glue|glue guns?)\b/iu,
    advice: 'Say that it burns, also through card, and to follow the maker’s instructions.',
  },
  {
    name: 'strong glue and sprays',
    words: /\b(?:super ?glue|cyanoacrylate|contact (?:adhesive|cement)|spray (?:adhesive|glue|mount)|varnish)\b/iu,
    advice: 'Say to air the room and to follow what stands on the tube or can.',
  },
  {
    name: 'magnets and small parts',
    words: /\b(?:magnets?|brads?|eyelets?|small parts?)\b/iu,
    advice: 'Say to keep them away from small children: swallowed, they do harm.',
  },
  {
    name: 'awls and needles',
    words: /\b(?:awls?|piercing tools?|needles?|bradawls?)\b/iu,
    advice: 'Say to pierce into foam or a mat, never towards the hand.',
  },
  {
    name: 'food',
    words: /\b(?:food|chocolates?|biscuits?|cookies|sweets|candy|cakes?)\b/iu,
    advice: 'Say that card, ink and glue touch food only where their makers allow it; wrap it otherwise.',
  },
];

/** What can hurt of that which a text speaks of. */
export const dangersIn = (text: string): readonly Danger[] => DANGERS.filter(({ words }) => words.test(text));
