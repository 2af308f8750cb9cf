import { expect, test } from '@playwright/test';
import { panelReady, shows, sizeField } from './support/reader-page';
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

test('an answer is shown before it is taken, and Escape leaves the size as it was', async ({ page }) => {
  await page.goto(BOOK_BOX);
  await panelReady(page);
  const dialog = page.getByRole('dialog', { name: 'Fit it to a thing' });
  const ask = async () => {
    await page.getByRole('link', { name: 'Fit it to a thing' }).click();
    await dialog.getByLabel('tall').fill('8');
    await dialog.getByLabel('wide').fill('6');
    await dialog.getByLabel('deep').fill('1 3/4');
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

test('without JavaScript the server answers both questions', async ({ browser, baseURL }) => {
  const context = await browser.newContext({ baseURL, javaScriptEnabled: false });
  const page = await context.newPage();
  await page.goto(BOOK_BOX);
  await page.getByRole('link', { name: 'Fit it to a thing' }).click();
  await page.getByLabel('tall').fill('8');
  await page.getByLabel('wide').fill('6');
  await page.getByLabel('deep').fill('1 3/4');
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
