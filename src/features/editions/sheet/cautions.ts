/** Where the work can hurt: plain, and deferring to what the makers of tools and glue say. */
export const CAUTIONS: readonly string[] = [
  'Blades: cut against a steel rule on a mat, away from the hand that holds the card. Close or cap the blade when you put it down.',
  'Trimmers and glue guns: follow their makers’ instructions. Hot glue burns through card.',
  'Blades, small parts and magnets stay away from children.',
  'Card, ink and glue touch food only where their makers say that they may.',
];
