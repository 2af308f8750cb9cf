import { z } from 'zod';
import { MOST_OF_ONE, MOST_SIZES } from './my-sheets';
import { readStock } from './stock-link';

/** A sheet as links write it; what is sold everywhere goes by its name, however its size was written. */
const cardSchema = z
  .string()
  .max(40)
  .transform((text, context) => {
    const stock = readStock(text);
    if (stock) return stock.id;
    context.addIssue({
      code: z.ZodIssueCode.custom,
      message: `“${text}” is no sheet. Write a4, letter, 12x12in or a size such as 8.5x13in, with -long or -short for its grain.`,
    });
    return z.NEVER;
  });

const COUNT = `A whole number from 1 to ${MOST_OF_ONE}.`;

/** `{ sheets: [{ card, count }] }`: a reader's whole list, in order. */
export const mySheetsSchema = z
  .object({
    sheets: z
      .array(
        z.object({ card: cardSchema, count: z.number().int(COUNT).min(1, COUNT).max(MOST_OF_ONE, COUNT) }).strict(),
      )
      .max(MOST_SIZES, `At most ${MOST_SIZES} sizes.`)
      .refine((sheets) => new Set(sheets.map(({ card }) => card)).size === sheets.length, {
        message: 'Every size may stand in the list once.',
      }),
  })
  .strict();
