import { expect, test, type Page } from '@playwright/test';
import { panelReady, seen, shows, sizeField } from './support/reader-page';
import { beSignedIn } from './support/signing-in';

/** The demo's book box: inside 9 × 6 × 2 1/4 in. */
const BOOK_BOX = '/projects/seed-keepers-book-box';

test.use({ actionTimeout: 15_000 });

test('sheets kept in the browser come first in the panel, and an own size stands in the link', async ({ page }) => {
  await page.goto('/sheets');
  await page.getByLabel('Size', { exact: true }).selectOption('own');
  await page.getByLabel('One side').fill('wide');
  await page.getByLabel('Other side').fill('20');
  await page.getByLabel('How many', { exact: true }).fill('4');
  await page.getByRole('button', { name: 'Add this size' }).click();
  await expect(page.getByText('“wide” does not read as a length.')).toBeVisible();
  await expect(page.getByLabel('One side')).toBeFocused();
  await page.getByLabel('One side').fill('13');
  await page.getByRole('button', { name: 'Add this size' }).click();
  await expect(page.getByRole('button', { name: /^Remove 13 × 20/ })).toBeVisible();

  await page.goto(BOOK_BOX);
  await panelReady(page);
  const card = page.getByLabel('Cut it from').first();
  await expect(card.locator('option').first()).toHaveText(/^13 × 20\s+in \(4\)$/);
  await card.selectOption('13x20in');
  await expect.poll(() => new URL(page.url()).searchParams.get('card')).toBe('13x20in');
  await expect(page.locator('sizing-panel [data-have]')).toContainText('you have 4');

  await page.goto('/projects');
  await expect(page.locator('.project-card-sheets').first()).toContainText(/13 × 20|your sheets/);
});

test('the list of one’s sheets is changed in place, and is there again after a reload', async ({ page }) => {
  await page.goto('/sheets');
  const said = page.locator('[data-sheets-said]');
  await expect(page.getByText('No sheets yet.')).toBeVisible();
  await page.getByLabel('Size', { exact: true }).selectOption('a4');
  await page.getByLabel('Grain', { exact: true }).selectOption('long');
  await page.getByLabel('How many', { exact: true }).fill('12');
  await page.getByRole('button', { name: 'Add this size' }).click();
  await expect(said).toHaveText('Added.');
  const a4 = page.getByLabel('A4 grain along the long side');
  await expect(a4).toHaveValue('12');

  // The same again is counted with what is there; another grain is another pile.
  await page.getByLabel('Size', { exact: true }).selectOption('a4');
  await page.getByLabel('Grain', { exact: true }).selectOption('long');
  await page.getByLabel('How many', { exact: true }).fill('3');
  await page.getByRole('button', { name: 'Add this size' }).click();
  await expect(a4).toHaveValue('15');
  await page.getByLabel('Size', { exact: true }).selectOption('letter');
  await page.getByRole('button', { name: 'Add this size' }).click();
  await expect(page.getByRole('button', { name: 'Remove Letter' })).toBeVisible();

  await a4.fill('none');
  await a4.press('Enter');
  await expect(page.getByText('“none” is no number of sheets.')).toBeVisible();
  await expect(a4).toHaveAttribute('aria-invalid', 'true');
  await a4.fill('7');
  await a4.press('Enter');
  await expect(said).toHaveText('Kept.');
  await page.reload();
  await expect(a4).toHaveValue('7');

  await page.getByRole('button', { name: 'Remove A4, grain along the long side' }).click();
  await expect(said).toHaveText('Removed.');
  await expect(page.getByLabel('Size', { exact: true })).toBeFocused();
  await expect(a4).toBeHidden();
  await page.reload();
  await expect(page.getByRole('button', { name: 'Remove Letter' })).toBeVisible();
  await expect(page.getByRole('button', { name: /^Remove A4/ })).toBeHidden();
});

test('an answer is shown before it is taken, and Escape leaves the size as it was', async ({ page }) => {
  await page.goto(BOOK_BOX);
  await panelReady(page);
  const dialog = page.getByRole('dialog', { name: 'Fit it to a thing' });
  const ask = async () => {
    await page.getByRole('link', { name: 'Fit it to a thing' }).click();
    await dialog.getByLabel('tall', { exact: true }).fill('8');
    await dialog.getByLabel('wide', { exact: true }).fill('6');
    await dialog.getByLabel('deep', { exact: true }).fill('1 3/4');
    // 8, 6 and 1 3/4 in, and an eighth on every side.
    await shows(dialog.locator('.ask-sizes'), '8 1/4 in');
  };
  await ask();
  await expect(sizeField(page, 'inside height')).toHaveValue('9');
  await page.keyboard.press('Escape');
  await expect(dialog).toBeHidden();
  await expect(sizeField(page, 'inside height')).toHaveValue('9');

  await ask();
  await dialog.getByRole('link', { name: 'Use this size' }).click();
  await expect(sizeField(page, 'inside height')).toHaveValue('8 1/4');
  await expect(sizeField(page, 'inside width')).toHaveValue('6 1/4');
  await expect(sizeField(page, 'inside depth')).toHaveValue('2');
});

test('the largest from one’s sheets comes with its plan and what stops it', async ({ page }) => {
  await page.goto(BOOK_BOX);
  await panelReady(page);
  await page.getByRole('link', { name: 'Largest from my sheets' }).click();
  const dialog = page.getByRole('dialog', { name: 'Largest from my sheets' });
  await dialog.getByLabel('Sheets at most').fill('5');
  // The cover stands out by 1/4 in: 11 3/4 in inside make a cover of 12 in, the whole sheet.
  await shows(dialog.locator('.ask-sizes'), '11 3/4 in');
  await expect(dialog.locator('[data-ask-answer]')).toContainText('Cover no longer fits 12 × 12 in');
  await expect(dialog.locator('.ask-sheets svg').first()).toBeVisible();
  await dialog.getByRole('link', { name: 'Use this size' }).click();
  await expect(sizeField(page, 'inside height')).toHaveValue('11 3/4');
});

test.describe('a search that is still running', () => {
  const ask = async (page: Page) => {
    await page.goto(BOOK_BOX);
    await panelReady(page);
    await page.getByRole('link', { name: 'Largest from my sheets' }).click();
    return page.getByRole('dialog', { name: 'Largest from my sheets' });
  };
  /** Nothing is asked of the page's workers before it is let through. */
  const holdSearch = (page: Page) =>
    page.addInitScript(() => {
      const waiting: (() => void)[] = [];
      let held = true;
      const Real = Worker;
      window.Worker = class extends Real {
        override postMessage(data: unknown): void {
          const ask = () => super.postMessage(data);
          if (held) waiting.push(ask);
          else ask();
        }
      };
      window.addEventListener('let-through', () => {
        held = false;
        waiting.forEach((ask) => ask());
      });
    });
  const letThrough = (page: Page) => page.evaluate(() => window.dispatchEvent(new Event('let-through')));

  test('is ended by Cancel, and begins again with Enter', async ({ page }) => {
    await holdSearch(page);
    const dialog = await ask(page);
    const answer = dialog.locator('[data-ask-answer]');
    await expect(answer).toContainText('Trying sizes on your sheets');
    await dialog.getByRole('button', { name: 'Cancel' }).click();
    await expect(answer).toContainText('Stopped.');
    await letThrough(page);
    await dialog.getByLabel('Sheets at most').press('Enter');
    await expect(dialog.locator('.ask-sizes')).toBeVisible();
    await expect(answer).not.toContainText('Stopped.');
  });

  test('does not take away the search for what was typed meanwhile', async ({ page }) => {
    await holdSearch(page);
    const dialog = await ask(page);
    await expect(dialog.locator('[data-ask-answer]')).toContainText('Trying sizes on your sheets');
    // From here on no time passes for the page: what is typed waits until it may.
    await page.clock.install();
    await page.clock.pauseAt(Date.now() + 60_000);
    await dialog.getByLabel('Sheets at most').fill('5');
    await letThrough(page);
    await expect(dialog.locator('.ask-sizes')).toBeVisible();
    await page.clock.runFor(1000);
    // As above: five sheets make it 11 3/4 in tall.
    await shows(dialog.locator('.ask-sizes'), '11 3/4 in');
  });
});

test('a thing may stand another way, and where its exact box cannot be made others are offered', async ({ page }) => {
  await page.goto(BOOK_BOX);
  await panelReady(page);
  await page.getByRole('link', { name: 'Fit it to a thing' }).click();
  const dialog = page.getByRole('dialog', { name: 'Fit it to a thing' });
  await dialog.getByLabel('tall', { exact: true }).fill('4');
  await dialog.getByLabel('wide', { exact: true }).fill('8');
  await dialog.getByLabel('deep', { exact: true }).fill('2');
  await shows(dialog.locator('.ask-sizes'), '4 1/4 in');
  await dialog.getByLabel('wide side up').check();
  // Stood on end it is 8 in tall and 4 in wide, with an eighth on every side.
  await expect
    .poll(() => seen(dialog.locator('.ask-sizes')))
    .toMatch(/tall\s*8 1\/4 in\s*wide\s*4 1\/4 in\s*deep\s*2 1\/4 in/);

  // The range goes to 14 in of height and 10 in of width: 12 in wide is too much, 12 in tall is not.
  await dialog.getByLabel('upright').check();
  await dialog.getByLabel('wide', { exact: true }).fill('12');
  await expect(dialog.locator('.ask-offers')).toContainText('with its wide side up');
  await dialog
    .getByRole('link', { name: /^Use it/ })
    .first()
    .click();
  await expect(sizeField(page, 'inside height')).toHaveValue('12 1/4');
  await expect(sizeField(page, 'inside width')).toHaveValue('4 1/4');
});

/** A sleeve of 6 in and a drawer; on Letter the sleeve is too large. */
const SLEEVE = '/projects/packet-sleeve-with-a-drawer';

test('a piece that is too large is made of two parts with one click, and of one again with another', async ({
  page,
}) => {
  await page.goto(`${SLEEVE}?card=letter`);
  await panelReady(page);
  const fits = page.locator('sizing-panel [data-fits]');
  await expect(fits).toContainText('Sleeve is too large for Letter');
  await fits.getByRole('link', { name: /^Make it of two parts.*Sleeve$/ }).click();
  await expect(fits).toContainText('All pieces fit Letter');
  await expect.poll(() => new URL(page.url()).searchParams.getAll('join')).toEqual(['sleeve']);
  await expect(fits.getByRole('link', { name: /^Make it of one again.*Sleeve$/ })).toBeFocused();

  await page.getByRole('link', { name: 'Measurement sheet', exact: true }).click();
  await expect(page.getByRole('rowheader', { name: 'Sleeve, second part' }).first()).toBeVisible();
  await page.getByRole('link', { name: /^Make it of one again.*Sleeve$/ }).click();
  await expect(page.locator('.sheet-too-large')).toContainText('Sleeve is too large for Letter');
  await expect(page.getByRole('rowheader', { name: 'Sleeve', exact: true }).first()).toBeVisible();
});

test('boxes, border, grain and sheets of another material go into the plan and the link', async ({ page }) => {
  await page.goto(SLEEVE);
  await panelReady(page);
  await page.getByText('How it is cut from sheets').click();
  await page.getByLabel('Boxes', { exact: true }).fill('3');
  await expect(page.locator('[data-facts]')).toContainText('for 3 boxes');
  await page.getByLabel('Border trimmed off first').fill('1/4');
  await page.getByLabel('Grain of the card').selectOption('long');
  await expect.poll(() => new URL(page.url()).search).toBe('?card=12x12in-long&sheet-margin=6.35mm&copies=3');
  await page.getByLabel('Boxes', { exact: true }).fill('many');
  await expect(page.getByText('“many” is no number of boxes.')).toBeVisible();
  await page.getByLabel('Boxes', { exact: true }).fill('1');
  await expect(page.locator('[data-facts]')).not.toContainText('boxes');
});

test('without JavaScript a form says how it is cut from sheets, in the panel and over the sheet', async ({
  browser,
  baseURL,
}) => {
  const context = await browser.newContext({ baseURL, javaScriptEnabled: false });
  const page = await context.newPage();
  await page.goto(`${SLEEVE}?units=mm`);
  await page.getByText('How it is cut from sheets').click();
  await page.getByLabel('Border trimmed off first, mm').fill('6');
  await page.getByLabel('Boxes', { exact: true }).fill('2');
  await page.getByRole('button', { name: 'Work it out' }).click();
  expect(new URL(page.url()).search).toBe('?units=mm&sheet-margin=6mm&copies=2');
  await page.getByRole('link', { name: 'Measurement sheet', exact: true }).click();
  await page.getByLabel('Cut it from').selectOption('a3');
  await page.getByLabel('Boxes', { exact: true }).fill('4');
  await page.getByRole('button', { name: 'Plan it so' }).click();
  expect(new URL(page.url()).searchParams.get('card')).toBe('a3');
  await expect(page.locator('.sheet-cover')).toContainText('of A3 for 4 boxes');
  await context.close();
});

test('without JavaScript the server answers both questions', async ({ browser, baseURL }) => {
  const context = await browser.newContext({ baseURL, javaScriptEnabled: false });
  const page = await context.newPage();
  await page.goto(BOOK_BOX);
  await page.getByRole('link', { name: 'Fit it to a thing' }).click();
  await page.getByLabel('tall', { exact: true }).fill('8');
  await page.getByLabel('wide', { exact: true }).fill('6');
  await page.getByLabel('deep', { exact: true }).fill('1 3/4');
  await page.getByRole('button', { name: 'Work it out' }).click();
  await shows(page.locator('.ask-sizes'), '8 1/4 in');
  await page.getByRole('link', { name: 'Leave it' }).click();
  await page.getByRole('link', { name: 'Largest from my sheets' }).click();
  await page.getByLabel('Sheets at most').fill('5');
  await page.getByRole('button', { name: 'Work it out' }).click();
  await shows(page.locator('.ask-sizes'), '11 3/4 in');
  await page.getByRole('link', { name: 'Use this size' }).click();
  await expect(sizeField(page, 'inside height')).toHaveValue('11 3/4');
  await context.close();
});

test('what the browser kept is offered to the account once', async ({ page, context }) => {
  await page.goto('/sheets');
  await page.getByRole('button', { name: 'Add this size' }).click();
  await expect(page.getByRole('button', { name: 'Remove 12 × 12 in' })).toBeVisible();
  await beSignedIn(context, 'reader');
  await page.goto('/sheets');
  await page.getByRole('button', { name: 'Add them to my account' }).click();
  await expect(page.getByRole('button', { name: 'Remove 12 × 12 in' })).toBeVisible();
  await page.reload();
  await expect(page.getByRole('button', { name: 'Remove 12 × 12 in' })).toBeVisible();
  await expect(page.getByRole('button', { name: 'Add them to my account' })).toBeHidden();
});
