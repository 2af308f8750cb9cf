import { readFileSync, readdirSync } from 'node:fs';
import { join } from 'node:path';
import type { Model, Pattern } from '@/engine';
import { config } from '@/config.server';
import { loadPattern } from './load-pattern';

interface Loaded {
  readonly pattern: Pattern;
  readonly model: Model;
}
let loaded: ReadonlyMap<string, Loaded> | null = null;

/** Every pattern of content/patterns, checked. They belong to the application, so they are read once. */
function patterns(): ReadonlyMap<string, Loaded> {
  loaded ??= readPatterns(join(config.root, 'content/patterns'));
  return loaded;
}
/** Reads a folder of pattern files. Throws a PatternFileError for the first file with faults. */
export function readPatterns(folder: string): ReadonlyMap<string, Loaded> {
  const files = readdirSync(folder)
    .filter((name) => name.endsWith('.json'))
    .sort();
  return new Map(
    files.map((name) => [
      name.replace(/\.json$/, ''),
      loadPattern(`content/patterns/${name}`, readFileSync(join(folder, name), 'utf8')),
    ]),
  );
}

export const listPatterns = (): readonly Pattern[] => [...patterns().values()].map(({ pattern }) => pattern);
export const getPattern = (slug: string): Pattern | undefined => patterns().get(slug)?.pattern;
export const getPatternModel = (slug: string): Model | undefined => patterns().get(slug)?.model;
