import { compileLive, compilePattern, explain, type Pattern } from '@/engine';
import { figuresOf } from './patterns';

/** A pattern with these measures and nothing else, all of the given kinds. */
export function bare(
  formulas: Readonly<Record<string, string>>,
  kinds: Readonly<Record<string, 'length' | 'number' | 'angle' | 'area' | 'whole number'>> = {},
): Pattern {
  const measures = [
    {
      name: 'inside width',
      ask: { question: 'How wide?', usual: '6 in', from: '0 in', to: '2000 in' },
      rounds: 'exact' as const,
    },
    {
      name: 'inside depth',
      ask: { question: 'How deep?', usual: '2 in', from: '0 in', to: '2000 in' },
      rounds: 'exact' as const,
    },
    ...Object.entries(formulas).map(([name, formula]) => ({
      name,
      formula,
      ...(kinds[name] ? { kind: kinds[name] } : {}),
    })),
  ];
  const choices = [{ name: 'spine', question: 'Spine', options: ['curved', 'quite straight'], usual: 'curved' }];
  return {
    format: 1,
    slug: 'bare',
    name: 'Bare',
    summary: '',
    group: '',
    measures,
    choices,
    pieces: [],
    fits: [],
    finished: { inside: [], outside: [] },
    order: [],
    assembly: [],
  };
}
const compiled = compilePattern(bare({}));
if (!compiled.ok) throw new Error('the bare pattern compiles');
const MODEL = compiled.value;

/** The exact value of a formula over the bare pattern: lengths in millimetres; NaN when it cannot be worked out. */
export function valueOf(formula: string, answers: Readonly<Record<string, number>> = {}): number {
  const live = compileLive(MODEL, formula);
  if (!live.ok) throw new Error(`${formula}: ${live.faults.map(explain).join(' ')}`);
  return live.value.value(figuresOf(MODEL, answers))?.exact ?? NaN;
}
