import { z } from 'zod';
import { withoutSlots } from './compose/slots';

export const SUBJECT_LIMIT = 70;
export const GREETING_LIMIT = 80;
export const EXCERPT_LIMIT = 1200;

const line = (what: string, limit: number) =>
  z
    .string()
    .refine((text) => !/[\r\n\0]/.test(text), `${what} is one line.`)
    .transform((text) => withoutSlots(text))
    .refine((text) => text.length <= limit, `${what} has at most ${limit} characters.`);

/** What the author writes; it may be unfinished while it is a draft. */
export const mailingInputSchema = z.object({
  subject: line('The subject', SUBJECT_LIMIT),
  greeting: line('The greeting', GREETING_LIMIT),
  excerpt: z
    .string()
    .transform((text) => withoutSlots(text).replace(/\r\n?/g, '\n').replace(/\0/g, ''))
    .refine((text) => text.length <= EXCERPT_LIMIT, `The first words have at most ${EXCERPT_LIMIT} characters.`),
  withHero: z.boolean(),
});
export type MailingInput = z.infer<typeof mailingInputSchema>;

/** What is missing before it can be sent, as sentences; empty when nothing is. */
export function missingIn({
  subject,
  greeting,
  excerpt,
}: Pick<MailingInput, 'subject' | 'greeting' | 'excerpt'>): readonly string[] {
  return [
    subject.trim() ? '' : 'The subject is empty.',
    greeting.trim() ? '' : 'The greeting is empty: “Hello [name],” would do.',
    excerpt.trim() ? '' : 'There are no first words: say in a sentence or two what the box is.',
  ].filter(Boolean);
}
