import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import type { AxeResults } from 'axe-core';
import { expect, test, type Page } from '@playwright/test';
import { panelReady, sizeField } from './support/reader-page';

const axe = readFileSync(createRequire(import.meta.url).resolve('axe-core/axe.min.js'), 'utf8');
const BOOK_BOX = '/projects/seed-keepers-book-box';

test.use({ actionTimeout: 15_000, trace: 'off' });

const view = (page: Page) => page.locator('folded-view[data-ready]');
const stage = (page: Page) => view(page).locator('[data-stage]');
const picture = (page: Page) => stage(page).locator('svg');
const turn = (page: Page) => view(page).getByLabel('Turn', { exact: true });
const fold = (page: Page) => view(page).getByLabel('Fold', { exact: true });
async function open(page: Page): Promise<void> {
  await page.goto(BOOK_BOX);
  await panelReady(page);
  await stage(page).scrollIntoViewIfNeeded();
}
const drawn = (page: Page) => picture(page).innerHTML();

test('the box is turned by dragging, by keys and by the slider, and stays so when its size changes', async ({
  page,
}) => {
  await open(page);
  const before = await drawn(page);
  const start = Number(await turn(page).inputValue());
  const box = (await picture(page).boundingBox())!;
  await page.mouse.move(box.x + box.width / 2, box.y + box.height / 2);
  await page.mouse.down();
  await page.mouse.move(box.x + box.width / 2 + 50, box.y + box.height / 2, { steps: 4 });
  await page.mouse.up();
  await expect.poll(async () => Number(await turn(page).inputValue())).toBeGreaterThan(start + 10);
  await expect.poll(() => drawn(page)).not.toBe(before);

  await turn(page).fill('40');
  await stage(page).focus();
  await page.keyboard.press('ArrowRight');
  await expect(turn(page)).toHaveValue('45');
  await page.keyboard.press('ArrowLeft');
  await page.keyboard.press('ArrowLeft');
  await expect(turn(page)).toHaveValue('35');
  const level = await drawn(page);
  await page.keyboard.press('ArrowDown');
  await expect.poll(() => drawn(page)).not.toBe(level);
  await expect(turn(page)).toHaveValue('35');

  await fold(page).fill('0');
  await expect(picture(page)).toHaveAttribute('aria-label', /flat, before folding/);
  await expect(fold(page)).toHaveAttribute('aria-valuetext', 'flat');
  const flat = await drawn(page);
  await sizeField(page, 'inside width').fill('7 in');
  await expect.poll(() => drawn(page)).not.toBe(flat);
  await expect(turn(page)).toHaveValue('35');
  await expect(fold(page)).toHaveValue('0');
  await expect(picture(page)).toHaveAttribute('aria-label', /flat, before folding/);
});

test('the box is seen through, with names, and from its sides', async ({ page }) => {
  await page.emulateMedia({ reducedMotion: 'reduce' });
  await open(page);
  await expect(picture(page).locator('.dr-face').first()).toBeAttached();
  await view(page).getByLabel('See through').check();
  await expect(picture(page).locator('.dr-hidden')).toBeAttached();
  await expect(picture(page).locator('.dr-face')).toHaveCount(0);
  await view(page).getByLabel('Names').check();
  await expect(picture(page).locator('.dr-label').first()).toBeAttached();
  await view(page).getByRole('button', { name: 'Back' }).click();
  await expect(turn(page)).toHaveAttribute('aria-valuetext', 'from the back');
  expect(new URL(page.url()).search).toBe('');
});

test('the folded box has room at 360 px, and nothing that axe finds fault with', async ({ page }) => {
  await page.setViewportSize({ width: 360, height: 740 });
  await open(page);
  for (const part of [picture(page), turn(page), fold(page)]) {
    const box = (await part.boundingBox())!;
    expect(box.x).toBeGreaterThanOrEqual(0);
    expect(box.x + box.width).toBeLessThanOrEqual(360);
  }
  await fold(page).fill('50');
  await expect(picture(page)).toHaveAttribute('aria-label', /partly folded/);
  await view(page).getByLabel('Names').check();
  await page.evaluate(axe);
  const { violations } = await page.evaluate<AxeResults>("axe.run('folded-view')");
  expect(violations.map(({ id, nodes }) => [id, nodes.map(({ html }) => html)])).toEqual([]);
});

test('without JavaScript the server turns and folds it, at the size that was asked for', async ({
  browser,
  baseURL,
}) => {
  const context = await browser.newContext({ ...(baseURL ? { baseURL } : {}), javaScriptEnabled: false });
  const page = await context.newPage();
  await page.goto(`${BOOK_BOX}?inside-width=7in`);
  const form = page.locator('folded-view form');
  await form.getByLabel('Fold', { exact: true }).fill('0');
  await form.getByRole('button', { name: 'From above' }).click();
  await expect(page).toHaveURL(/inside-width=7in/);
  await expect(page.locator('folded-view svg')).toHaveAttribute('aria-label', /flat, before folding/);
  await expect(page.locator('folded-view')).toHaveAttribute('data-tilt', '80');
  await context.close();
});
