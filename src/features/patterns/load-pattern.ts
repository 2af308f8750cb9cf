import { compilePattern, explainAt, nearestName, type Fault, type Model, type Pattern, type Result } from '@/engine';
import type { z } from 'zod';
import { patternFileSchema } from './pattern-schema';

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

export interface ReadPattern {
  readonly pattern: Pattern;
  readonly model: Model;
}

/** Text of a pattern file of ours to a pattern and its model. Throws a PatternFileError with all that is wrong. */
export function loadPattern(file: string, text: string): ReadPattern {
  const json = parseJson(text);
  const read = json.ok ? readPattern(json.value) : json;
  if (!read.ok) throw new PatternFileError(file, read.faults);
  const slug = file.replace(/^.*\//, '').replace(/\.json$/, '');
  if (read.value.pattern.slug !== slug) {
    throw new PatternFileError(file, [
      {
        code: 'pattern slug',
        where: 'slug',
        found: `“${read.value.pattern.slug}”`,
        expected: `“${slug}”, the name of the file`,
        hint: `Write “${slug}”, or rename the file.`,
      },
    ]);
  }
  return read.value;
}

/** What a pattern file holds, checked by its schema and then by the engine. */
export function readPattern(json: unknown): Result<ReadPattern> {
  const parsed = patternFileSchema.safeParse(json);
  if (!parsed.success) return { ok: false, faults: parsed.error.issues.map(faultOf) };
  const { $schema: _, ...pattern } = parsed.data;
  const compiled = compilePattern(pattern);
  return compiled.ok ? { ok: true, value: { pattern, model: compiled.value } } : compiled;
}

export function parseJson(text: string): Result<unknown> {
  try {
    return { ok: true, value: JSON.parse(text) as unknown };
  } catch (error) {
    const fault: Fault = {
      code: 'pattern json',
      where: 'the file',
      found: error instanceof Error ? error.message : 'something else',
      expected: 'JSON',
      hint: 'Look for a missing comma, quote or bracket there.',
    };
    return { ok: false, faults: [fault] };
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
  return {
    code: 'pattern shape',
    where,
    found: issue.message.replace(/\.$/u, ''),
    expected: '',
    hint: 'Put it right there.',
  };
}
