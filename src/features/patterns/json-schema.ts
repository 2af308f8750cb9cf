import { zodToJsonSchema } from 'zod-to-json-schema';
import { patternFileSchema } from './pattern-schema';

/** The published schema of pattern files, as editors and other programs read it: JSON Schema, draft 7. */
export const patternJsonSchema = (address: string): object => ({
  ...zodToJsonSchema(patternFileSchema, { target: 'jsonSchema7', $refStrategy: 'none' }),
  $id: address,
  title: 'Foldwright pattern',
  description:
    'The parametric description of a box: measures, choices, pieces, fits. Lengths are formulas such as "inside width + 2 * tab"; `format` is the version.',
});
