import type { Fault, Pattern, Result } from '@/engine';
import { parseJson, readPattern } from './load-pattern';
import { PATTERN_BYTES } from './pattern-limits';

/** A pattern file from anywhere, checked to the last formula; every fault has its place and its cure. */
export function readPatternFile(text: string): Result<Pattern> {
  if (new TextEncoder().encode(text).length > PATTERN_BYTES) return { ok: false, faults: [TOO_LARGE] };
  const json = parseJson(text);
  if (!json.ok) return json;
  const read = readPattern(json.value);
  return read.ok ? { ok: true, value: read.value.pattern } : read;
}

const TOO_LARGE: Fault = {
  code: 'pattern too large',
  where: 'the file',
  found: 'more than 512 kB',
  expected: '512 kB at most',
  hint: 'A pattern holds no pictures: is it the right file?',
};
