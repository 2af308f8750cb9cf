import { readFileSync, readdirSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { explainAt } from '@/engine';
import { patternJsonSchema } from '@/features/patterns/json-schema';
import { patternFileName, patternFileText } from '@/features/patterns/pattern-file';
import { readPatternFile } from '@/features/patterns/read-pattern-file';
import { FOLDER } from '../server/published-project';

const said = (text: string) => {
  const read = readPatternFile(text);
  return read.ok ? [] : read.faults.map(explainAt);
};

describe('a pattern as a file', () => {
  it('is read back as it was written, and says its schema first', () => {
    const text = patternFileText(FOLDER, 'https://foldwright.example/pattern.schema.json');
    expect(text.startsWith('{\n  "$schema": "https://foldwright.example/pattern.schema.json",\n  "format": 1,')).toBe(
      true,
    );
    expect(readPatternFile(text)).toEqual({ ok: true, value: FOLDER });
    expect(patternFileName(FOLDER)).toBe('folder.pattern.json');
  });
  it('is refused with what is wrong and where', () => {
    expect(said('{"format": 1')[0]).toMatch(/^the file: .*Look for a missing comma, quote or bracket there\./u);
    expect(said(JSON.stringify({ ...FOLDER, name: 'x'.repeat(90) }))).toEqual([
      'name: A name has at most 80 characters. Put it right there.',
    ]);
    expect(said('['.repeat(300_000))).toHaveLength(1);
    expect(said(' '.repeat(600_000))).toEqual([
      'the file: More than 512 kB. A pattern holds no pictures: is it the right file?',
    ]);
  });
});

/** As much of JSON Schema as ours uses, written apart from what made it. */
interface Schema {
  readonly type?: string;
  readonly const?: unknown;
  readonly enum?: readonly unknown[];
  readonly anyOf?: readonly Schema[];
  readonly properties?: Readonly<Record<string, Schema>>;
  readonly required?: readonly string[];
  readonly additionalProperties?: boolean;
  readonly items?: Schema | readonly Schema[];
  readonly maxLength?: number;
  readonly maxItems?: number;
  readonly minItems?: number;
}
function fits(value: unknown, schema: Schema): boolean {
  if (schema.anyOf) return schema.anyOf.some((one) => fits(value, one));
  if ('const' in schema) return value === schema.const;
  if (schema.enum) return schema.enum.includes(value);
  switch (schema.type) {
    case 'string':
      return typeof value === 'string' && value.length <= (schema.maxLength ?? Infinity);
    case 'number':
      return typeof value === 'number';
    case 'boolean':
      return typeof value === 'boolean';
    case 'array': {
      if (!Array.isArray(value) || value.length > (schema.maxItems ?? Infinity)) return false;
      if (value.length < (schema.minItems ?? 0)) return false;
      const { items } = schema;
      return value.every((item, i) => fits(item, (Array.isArray(items) ? items[i] : items) as Schema));
    }
    default: {
      if (typeof value !== 'object' || value === null || !schema.properties) return false;
      const known = schema.properties;
      return (
        (schema.required ?? []).every((key) => key in value) &&
        Object.entries(value).every(([key, item]) => known[key] !== undefined && fits(item, known[key]))
      );
    }
  }
}

describe('the published schema', () => {
  const schema = patternJsonSchema('https://foldwright.example/pattern.schema.json') as Schema & { $id: string };
  it('names its address and takes every pattern of ours', () => {
    expect(schema.$id).toBe('https://foldwright.example/pattern.schema.json');
    for (const file of readdirSync('content/patterns'))
      expect([file, fits(JSON.parse(readFileSync(`content/patterns/${file}`, 'utf8')), schema)]).toEqual([file, true]);
  });
  it('takes no pattern with a field that is not known, or without one that must be there', () => {
    expect(fits(FOLDER, schema)).toBe(true);
    expect(fits({ ...FOLDER, measurs: [] }, schema)).toBe(false);
    const { assembly: _, ...rest } = FOLDER;
    expect(fits(rest, schema)).toBe(false);
  });
});
