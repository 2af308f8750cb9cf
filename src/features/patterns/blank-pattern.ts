import type { Pattern } from '@/engine';

/** By what the workroom asks for it; no pattern of the shelf may be called so. */
export const BLANK = 'blank';

/** A pattern with nothing drawn up yet but the card: drawings know by this measure how thick it is. */
export const blankPattern = (name: string, slug: string): Pattern => ({
  format: 1,
  slug,
  name,
  summary: '',
  group: 'Own patterns',
  measures: [
    {
      name: 'card thickness',
      ask: { question: 'How thick is your card?', usual: '0.3 mm', from: '0 mm', to: '1 mm', finer: true },
      rounds: 'exact',
      unit: 'mm',
    },
  ],
  choices: [],
  pieces: [],
  fits: [],
  finished: { inside: [], outside: [] },
  order: [],
  assembly: [],
});
