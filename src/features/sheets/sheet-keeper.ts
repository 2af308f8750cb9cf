import { KEPT_AS } from './kept-as';
import { readKept, type MySheets } from './my-sheets';

/** Where a browser keeps its reader's sheets, and how it tells the page of them. */

const CHANGED = 'foldwright:sheets-changed';

type Place = Pick<Storage, 'getItem' | 'setItem' | 'removeItem'>;

/** What this browser keeps; nothing when it keeps nothing, or lets nobody look. */
export function keptSheets(place: () => Place = () => localStorage): MySheets {
  try {
    return readKept(JSON.parse(place().getItem(KEPT_AS) ?? 'null'));
  } catch {
    return [];
  }
}

/** Keeps a list in this browser, and an empty one not at all. False when the browser does not let it. */
export function keepSheets(sheets: MySheets, place: () => Place = () => localStorage): boolean {
  try {
    if (sheets.length === 0) place().removeItem(KEPT_AS);
    else place().setItem(KEPT_AS, JSON.stringify(sheets));
    return true;
  } catch {
    return false;
  }
}

/** Sends a list to the account: in place of the one there, or to be added to it. Gives what the account has then. */
export async function sendSheets(sheets: MySheets, { how }: { readonly how: 'replace' | 'merge' }): Promise<MySheets> {
  const response = await fetch(how === 'merge' ? '/api/sheets/merge' : '/api/sheets', {
    method: how === 'merge' ? 'POST' : 'PUT',
    headers: { 'content-type': 'application/json' },
    body: JSON.stringify({ sheets }),
  });
  const answer = (await response.json()) as { readonly sheets?: unknown; readonly detail?: string };
  if (!response.ok) throw new Error(answer.detail ?? 'The account did not take it.');
  return readKept(answer.sheets);
}

export const tellSheets = (sheets: MySheets): boolean =>
  document.dispatchEvent(new CustomEvent<MySheets>(CHANGED, { detail: sheets }));
export const hearSheets = (hear: (sheets: MySheets) => void): void =>
  document.addEventListener(CHANGED, (event) => hear((event as CustomEvent<MySheets>).detail));
