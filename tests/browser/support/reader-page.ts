import { expect, type Locator, type Page } from '@playwright/test';

/** A figure as a page sets it: thin space before a fraction, fraction slash, space that does not break before the unit. */
export const typeset = (text: string): string =>
  text
    .replace(/(\d) (\d+)\/(\d+)/g, '$1\u202f$2/$3')
    .replace(/(\d)\/(\d)/g, '$1\u2044$2')
    .replace(/ (in|mm|cm)\b/g, '\u00a0$1');

/** Until the island has taken over the form, what is typed is only sent. */
export const panelReady = (page: Page) => expect(page.locator('sizing-panel[data-ready]')).toBeAttached({ timeout: 15_000 });

export const sizeField = (page: Page, measure: string): Locator =>
  page.locator(`[data-field="${measure}"] input[type=text]`);

/** What is seen of a live measure of the text, by its formula. */
export const liveMeasure = (page: Page, formula: string): Locator =>
  page.locator(`[data-reader] [data-live="${formula}"]`).first();

/** Every text on the page that follows the size, in order. */
export async function everyFigure(page: Page): Promise<Record<'live' | 'cards' | 'cutList' | 'facts' | 'fits', string[]>> {
  const texts = async (selector: string) =>
    (await page.locator(selector).allTextContents()).map((text) => text.replace(/\s+/g, ' ').trim());
  return {
    live: await texts('[data-reader] [data-live]'),
    cards: await texts('[data-reader] [data-piece]'),
    cutList: await texts('[data-reader] [data-cut-list]'),
    facts: await texts('[data-facts]'),
    fits: await texts('sizing-panel [data-fits]'),
  };
}

/** The row of a piece in the article's cut list. */
export const cutListRow = (page: Page, piece: string): Locator =>
  page.locator('[data-cut-list] tr').filter({ has: page.getByRole('rowheader', { name: piece, exact: true }) }).first();
