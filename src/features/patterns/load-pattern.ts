import { compilePattern, explainAt, nearestName, type Fault, type Model, type Pattern } from '@/engine';
import type { z } from 'zod';
import { patternSchema } from './pattern-schema';

/** A pattern file that cannot be used. The message names the file and lists every fault with its place and cure. */
export class PatternFileError extends Error {
  override name = 'PatternFileError';
  constructor(
    readonly file: string,
    readonly faults: readonly Fault[],
  ) {
    super(`${file} cannot be used:\n${faults.map((fault) => `  ${explainAt(fault)}`).join('\n')}`);
  }
}

/** Text of a pattern file to a pattern and its model. Throws a PatternFileError with all that is wrong. */
export function loadPattern(file: string, text: string): { readonly pattern: Pattern; readonly model: Model } {
  const parsed = patternSchema.safeParse(readJson(file, text));
  if (!parsed.success) throw new PatternFileError(file, parsed.error.issues.map(faultOf));
  const compiled = compilePattern(parsed.data);
  if (!compiled.ok) throw new PatternFileError(file, compiled.faults);
  const slug = file.replace(/^.*\//, '').replace(/\.json$/, '');
  if (parsed.data.slug !== slug) {
    throw new PatternFileError(file, [
      {
        code: 'pattern slug',
        where: 'slug',
        found: `“${parsed.data.slug}”`,
        expected: `“${slug}”, the name of the file`,
        hint: `Write “${slug}”, or rename the file.`,
      },
    ]);
  }
  return { pattern: parsed.data, model: compiled.value };
}

function readJson(file: string, text: string): unknown {
  try {
    return JSON.parse(text);
  } catch (error) {
    const found = error instanceof Error ? error.message : 'something else';
    throw new PatternFileError(file, [
      {
        code: 'pattern json',
        where: 'the file',
        found,
        expected: 'JSON',
        hint: 'Look for a missing comma, quote or bracket there.',
      },
    ]);
  }
}

/** `pieces → 2 → columns → 1 → size`, counted from one as people do. */
const placeOf = (path: readonly (string | number)[]): string =>
  path.length === 0 ? 'the pattern' : path.map((part) => (typeof part === 'number' ? `${part + 1}` : part)).join(' → ');

const KNOWN = [
  'format',
  'slug',
  'name',
  'summary',
  'group',
  'measures',
  'choices',
  'pieces',
  'fits',
  'finished',
  'order',
  'turn',
  'assembly',
  'columns',
  'rows',
  'cells',
  'lines',
  'tabs',
  'caps',
  'corners',
  'notches',
  'slots',
  'rolls',
  'bent',
  'shown',
  'edges',
  'look',
  'remarks',
  'question',
  'usual',
  'from',
  'to',
  'finer',
  'when',
  'formula',
  'rounds',
  'unit',
  'kind',
  'ask',
  'note',
  'options',
  'left',
  'right',
  'is',
  'tolerance',
  'otherwise',
  'change',
  'advice',
  'count',
  'stock',
  'builder',
  'centre',
  'sides',
  'flap',
  'shape',
  'hole',
  'holes',
  'creases',
  'disc',
  'diameter',
  'rim',
  'body',
  'inner radius',
  'outer radius',
  'seam',
  'points',
  'panels',
  'loop',
  'role',
  'low',
  'high',
  'round',
  'depth',
  'teeth',
  'tooth angle',
  'radius',
  'corner',
  'cell',
  'side',
  'across',
  'along',
  'width',
  'height',
  'between',
  'angle',
  'size',
  'by',
  'top',
  'bottom',
  'inside',
  'outside',
  'piece',
  'root',
  'at',
];

function faultOf(issue: z.ZodIssue): Fault {
  const where = placeOf(issue.path);
  if (issue.code === 'unrecognized_keys') {
    const [key = ''] = issue.keys;
    const nearest = nearestName(key, KNOWN);
    return {
      code: 'pattern field',
      where,
      found: `a field called “${key}”`,
      expected: 'only fields that a pattern has',
      hint: nearest ? `The nearest is “${nearest}”.` : 'Take it out.',
    };
  }
  if (issue.code === 'invalid_type' && issue.received === 'undefined') {
    return { code: 'pattern missing', where, found: 'nothing', expected: issue.expected, hint: 'Add it.' };
  }
  return { code: 'pattern shape', where, found: issue.message, expected: '', hint: 'Put it right there.' };
}
