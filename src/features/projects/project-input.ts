import { z } from 'zod';
import { patternSchema } from '@/features/patterns/pattern-schema';
import { readWriteUp } from '@/writeup/read-write-up';
import { explainWriteUpFault } from '@/writeup/messages';
import { factsSchema, sizingSchema } from './project';
import { SLUG, SLUG_LENGTH } from './project-slug';

/** What the desk may send as a whole state. The longest text that we take is bounded by the write-up's own limits. */
export const STATE_BYTES = 2 * 1024 * 1024;

const writeUpSchema = z.unknown().transform((json, context) => {
  const read = readWriteUp(json);
  if (read.ok) return read.value;
  for (const fault of read.faults) context.addIssue({ code: 'custom', message: explainWriteUpFault(fault) });
  return z.NEVER;
});

/** A whole project as typed: formulas that do not read are taken (nothing typed is lost), a shape that is none is not. */
export const projectStateSchema = factsSchema.extend({
  pattern: patternSchema,
  sizing: sizingSchema,
  writeUp: writeUpSchema,
});

export const slugSchema = z.object({
  slug: z
    .string()
    .min(SLUG_LENGTH.min, `An address has at least ${SLUG_LENGTH.min} characters.`)
    .max(SLUG_LENGTH.max, `An address has at most ${SLUG_LENGTH.max} characters.`)
    .regex(SLUG, 'An address is made of small letters, digits and single hyphens, such as seed-box.'),
});
