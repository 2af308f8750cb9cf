import { gzipSync } from 'node:zlib';
import { expect, test, type Page } from '@playwright/test';
import { cutListRow, panelReady, shows, sizeField } from './support/reader-page';

/** The demo's book box: inside 9 × 6 × 2 1/4 in, covers that stand out by 1/4 in. */
const BOOK_BOX = '/projects/seed-keepers-book-box';
/** With every drawing, sentence, sheet and the folded box; what works sizes out is a quarter of it. */
const MOST_SCRIPT = 100_000;

test.use({ actionTimeout: 15_000 });

async function open(page: Page, address = BOOK_BOX): Promise<void> {
  await page.goto(address);
  await panelReady(page);
}
const cover = (page: Page) => cutListRow(page, 'Cover');
const search = (page: Page) => new URL(page.url()).searchParams;

test('other units change the figures and leave the box as it is', async ({ page }) => {
  await open(page);
  const height = sizeField(page, 'inside height');
  await expect(height).toHaveValue('9');
  await page.getByRole('button', { name: 'mm', exact: true }).click();
  await expect(height).toHaveValue('228.6');
  await expect.poll(() => search(page).get('units')).toBe('mm');
  expect(search(page).has('inside-height')).toBe(false);
  // 6 in are 152.4 and the overhang is 6.35: at whole millimetres 152 + 6, and 229 + 6.
  await shows(cover(page), '158 × 235 mm');
  await page.getByRole('button', { name: 'cm', exact: true }).click();
  await expect(height).toHaveValue('22.86');
  await page.getByRole('button', { name: 'inches', exact: true }).click();
  await expect(height).toHaveValue('9');
  await shows(cover(page), '6 1/4 × 9 1/4 in');
  await expect.poll(() => page.url()).not.toContain('units=');
});

test('a size out of range says so with the nearest that works, and the last good figures stay, marked', async ({
  page,
}) => {
  await open(page);
  const width = page.locator('[data-field="inside width"]');
  const lastGood = page.locator('[data-last-good]');
  await sizeField(page, 'inside width').fill('7 in');
  await shows(cover(page), '7 1/4 × 9 1/4 in');
  await expect(lastGood).toBeHidden();

  await sizeField(page, 'inside width').fill('40 in');
  await expect(width.locator('[data-trouble]')).toContainText('10\u00a0in');
  await expect(sizeField(page, 'inside width')).toHaveAttribute('aria-invalid', 'true');
  await expect(lastGood).toContainText('These figures are not for the size you asked for.');
  await shows(lastGood, '9 × 7 × 2 1/4 in');
  await shows(cover(page), '7 1/4 × 9 1/4 in');

  await width.getByRole('link', { name: 'Use 10\u00a0in' }).click();
  await shows(cover(page), '10 1/4 × 9 1/4 in');
  await expect(lastGood).toBeHidden();
  await expect(sizeField(page, 'inside width')).toHaveValue('10');

  await sizeField(page, 'inside width').fill('quite wide');
  await expect(width.locator('[data-trouble]')).toContainText('quite wide');
  await expect(lastGood).toBeVisible();
  await shows(cover(page), '10 1/4 × 9 1/4 in');
});

test('without JavaScript a size out of range is refused in the same words, with the nearest', async ({
  browser,
  baseURL,
}) => {
  const context = await browser.newContext({ baseURL, javaScriptEnabled: false });
  const page = await context.newPage();
  await page.goto(BOOK_BOX);
  await sizeField(page, 'inside width').fill('40 in');
  await page.getByRole('button', { name: 'Work it out' }).click();
  await expect(page.locator('[data-field="inside width"] [data-trouble]')).toContainText('10\u00a0in');
  await expect(page.locator('[data-last-good]')).toContainText('the nearest size that works');
  await shows(cover(page), '10 1/4 × 9 1/4 in');
  await context.close();
});

test('the keyboard alone changes a size and reaches the sheet', async ({ page }) => {
  await open(page);
  const tabTo = async (what: ReturnType<Page['locator']>) => {
    for (let n = 0; n < 80; n += 1) {
      if (await what.evaluate((element) => element === document.activeElement)) return;
      await page.keyboard.press('Tab');
    }
    throw new Error('Tab does not come to it.');
  };
  await tabTo(sizeField(page, 'inside width'));
  await page.keyboard.press('Control+a');
  await page.keyboard.type('7 1/2');
  await shows(cover(page), '7 3/4 × 9 1/4 in');
  await page.keyboard.press('Tab');
  await expect(page.locator('[data-field="inside width"] input[type=range]')).toBeFocused();
  await page.keyboard.press('ArrowRight');
  await shows(cover(page), '7 13/16 × 9 1/4 in');
  await tabTo(page.getByRole('link', { name: 'Measurement sheet', exact: true }));
  await page.keyboard.press('Enter');
  await page.waitForURL(/\/sheet\?/);
  await shows(page.locator('.sheet-cover'), '9 tall · 7 9/16 wide · 2 1/4 deep in');
});

test('a copied link opens at the same size in the same units', async ({ context, page }) => {
  await context.grantPermissions(['clipboard-read', 'clipboard-write']);
  await open(page);
  await page.getByRole('button', { name: 'mm', exact: true }).click();
  await sizeField(page, 'inside height').fill('20 cm');
  await shows(cover(page), '158 × 206 mm');
  await page.getByRole('link', { name: 'Copy link' }).click();
  await expect(page.getByRole('link', { name: 'Copied' })).toBeVisible();
  const copied = await page.evaluate(() => navigator.clipboard.readText());
  const other = await context.newPage();
  await other.goto(copied);
  await shows(cover(other), '158 × 206 mm');
  await expect(sizeField(other, 'inside height')).toHaveValue('200');
});

test(`the page brings no editor, and less than ${MOST_SCRIPT / 1000} kB of script`, async ({ page }) => {
  const scripts: Promise<{ url: string; body: Buffer }>[] = [];
  page.on('response', (response) => {
    if (response.request().resourceType() === 'script' || /\.m?js(\?|$)/.test(response.url())) {
      scripts.push(response.body().then((body) => ({ url: response.url(), body })));
    }
  });
  await open(page);
  await sizeField(page, 'inside width').fill('7 in');
  await shows(cover(page), '7 1/4');
  await page.waitForLoadState('networkidle');
  const loaded = await Promise.all(scripts);
  const inPage = await page
    .locator('script:not([src]):not([type="application/json"])')
    .evaluateAll((all) => all.map((script) => script.textContent ?? ''));
  expect(loaded.filter(({ body }) => body.includes('ProseMirror')).map(({ url }) => url)).toEqual([]);
  const bytes = [...loaded.map(({ body }) => body), ...inPage.map((text) => Buffer.from(text))].map(
    (body) => gzipSync(body).length,
  );
  const sum = bytes.reduce((all, one) => all + one, 0);
  console.log(`Script of a project's page: ${(sum / 1000).toFixed(1)} kB gzipped, in ${loaded.length} files`);
  expect(loaded.length).toBeGreaterThan(0);
  expect(sum).toBeLessThan(MOST_SCRIPT);
});
