import { expect, type Locator, type Page } from '@playwright/test';

/** A figure as a page sets it: thin space before a fraction, fraction slash, space that does not break before the unit. */
export const typeset = (text: string): string =>
  text
    .replace(/(\d) (\d+)\/(\d+)/g, '$1\u202f$2/$3')
    .replace(/(\d)\/(\d)/g, '$1\u2044$2')
    .replace(/ (in|mm|cm)\b/g, '\u00a0$1');

/** What is seen of a place, without the words to hear beside a figure, as one types it: `7 1/4 × 9 1/4 in`. */
export const seen = (place: Locator): Promise<string> =>
  place.evaluate((element) => {
    const copy = element.cloneNode(true) as Element;
    for (const heard of copy.querySelectorAll('.visually-hidden')) heard.remove();
    return (copy.textContent ?? '')
      .replace(/\u2044/g, '/')
      .replace(/\s+/g, ' ')
      .trim();
  });

/** Waits until a place shows some text. */
export const shows = (place: Locator, text: string) =>
  expect.poll(() => seen(place), { message: `“${text}” is shown`, timeout: 10_000 }).toContain(text);

/** Until the island has taken over the form, what is typed is only sent. */
export const panelReady = (page: Page) =>
  expect(page.locator('sizing-panel[data-ready]')).toBeAttached({ timeout: 15_000 });

export const sizeField = (page: Page, measure: string): Locator =>
  page.locator(`[data-field="${measure}"] input[type=text]`);

/** What is seen of a live measure of the text, by its formula. */
export const liveMeasure = (page: Page, formula: string): Locator =>
  page.locator(`[data-reader] [data-live="${formula}"]`).first();

/** Every text on the page that follows the size, in order. */
export async function everyFigure(
  page: Page,
): Promise<Record<'live' | 'cards' | 'cutList' | 'facts' | 'fits', string[]>> {
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
  page
    .locator('[data-cut-list] tr')
    .filter({ has: page.getByRole('rowheader', { name: piece, exact: true }) })
    .first();
