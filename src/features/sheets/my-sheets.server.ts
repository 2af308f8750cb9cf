import type { APIContext } from 'astro';
import { eq } from 'drizzle-orm';
import { db, type Transaction } from '@/db/client.server';
import { sheets } from '@/db/schema';
import { formFaults, seeOther, type FormFaults } from '@/features/accounts/form-outcome';
import { readForm } from '@/features/http/form';
import { merged, type MySheets } from './my-sheets';
import { ADD_FIELDS, changeSheets, type SheetOutcome } from './sheet-form';

const read = (tx: Pick<Transaction, 'select'>, userId: string): MySheets =>
  tx
    .select({ card: sheets.card, count: sheets.count })
    .from(sheets)
    .where(eq(sheets.userId, userId))
    .orderBy(sheets.place)
    .all();

/** The sheets that a person has, in their order; none for somebody who is not signed in. */
export const sheetsOf = (user: { readonly id: string } | null): MySheets => (user ? read(db, user.id) : []);

/** Changes the whole list in one go and gives the new one. */
export function changeSheetsOf(userId: string, change: (before: MySheets) => MySheets): MySheets {
  return db.transaction(
    (tx) => {
      const list = change(read(tx, userId));
      tx.delete(sheets).where(eq(sheets.userId, userId)).run();
      if (list.length > 0)
        tx.insert(sheets)
          .values(list.map((one, place) => ({ userId, ...one, place })))
          .run();
      return list;
    },
    { behavior: 'immediate' },
  );
}

/** Adds what a browser has kept; what stands in the account already is not counted twice. */
export const mergeSheets = (userId: string, others: MySheets): MySheets =>
  changeSheetsOf(userId, (before) => merged(before, others));

/** POST /sheets by somebody signed in: the page's forms, told apart by their buttons. */
export async function postSheets(
  { request }: Pick<APIContext, 'request'>,
  userId: string,
): Promise<Response | FormFaults> {
  const field = await readForm(request);
  if (!field) return formFaults(400, { '': 'What was sent does not read. Load the page anew and try again.' });
  // A holder, as the compiler does not see what a callback assigned.
  const told: { outcome?: SheetOutcome } = {};
  changeSheetsOf(userId, (before) => {
    told.outcome = changeSheets(before, field);
    return told.outcome.ok ? told.outcome.sheets : before;
  });
  if (told.outcome?.ok !== false) return seeOther(`/sheets?done=${told.outcome?.done ?? ''}`);
  const { faults } = told.outcome;
  const names = [...ADD_FIELDS, ...Object.keys(faults)];
  return formFaults(422, faults, Object.fromEntries(names.map((name) => [name, field(name).slice(0, 80)])));
}
