import { z } from 'zod';
import { addressFault } from '@/features/accounts/email-key';

export const UNITS = ['in', 'mm', 'cm'] as const;
export const NAME_LIMIT = 60;

/** What the sign-up form sends. `website` is a field that people do not see: whoever fills it in is a program. */
export const signUpSchema = z.object({
  email: z.string().superRefine((text, context) => {
    const fault = addressFault(text);
    if (fault) context.addIssue({ code: 'custom', message: fault });
  }),
  units: z.enum(UNITS, { message: 'Sizes come in inches, millimetres or centimetres.' }).default('in'),
  website: z.string().max(500).default(''),
});
export type SignUp = z.infer<typeof signUpSchema>;

export const preferencesSchema = z.object({
  name: z
    .string()
    .transform((text) => text.replace(/[\p{C}\s]+/gu, ' ').trim())
    .refine((text) => text.length <= NAME_LIMIT, `A name has at most ${NAME_LIMIT} characters.`),
  units: z.enum(UNITS, { message: 'Sizes come in inches, millimetres or centimetres.' }),
});
export type Preferences = z.infer<typeof preferencesSchema>;

/** The one answer, for an address that is known, unknown or must not be written to. */
export const GENERIC_ANSWER =
  'Look into your mail: if that address can be written to, a letter with a button to confirm is on its way. Nothing more comes until you have pressed it.';

export const UNIT_NAMES: Readonly<Record<(typeof UNITS)[number], string>> = {
  in: 'inches',
  mm: 'millimetres',
  cm: 'centimetres',
};
