import { readFileSync } from 'node:fs';
import { expect, test, type Page } from '@playwright/test';
import { panelReady, shows, sizeField } from './support/reader-page';
import { beSignedIn } from './support/signing-in';

/** A desk opened from blank. */
async function fromBlank(page: Page, title: string): Promise<void> {
  await page.goto('/workroom');
  await page.locator('astro-island:not([ssr])').first().waitFor();
  await page.getByRole('button', { name: 'Start from blank instead' }).click();
  await page.getByLabel('Title').fill(title);
  await page.getByRole('button', { name: 'Make the project' }).click();
  await page.locator('.desk').waitFor({ timeout: 30_000 });
  await expect(page.locator('.save-words')).toContainText('Saved');
}
async function ask(page: Page, name: string, usual: string): Promise<void> {
  await page.getByRole('button', { name: 'Measure or choice' }).click();
  await page.getByLabel('Name of the new measure or choice').fill(name);
  await page.getByRole('button', { name: 'Asked', exact: true }).click();
  await page.getByLabel(`Usual of ${name}`, { exact: true }).fill(usual);
}
const cell = (page: Page, row: number, column: number) => page.locator(`[data-cell="${row} ${column}"]`);
const blank = (page: Page) => page.locator('.piece-facts');

test.beforeEach(async ({ context, page }) => {
  await page.setViewportSize({ width: 1440, height: 1000 });
  await beSignedIn(context, 'author');
});

test('a tray with a curved end and a lid that may be left away is drawn up from blank', async ({ page }) => {
  await fromBlank(page, 'Tray with a round end');
  await ask(page, 'inside length', '6 in');
  await ask(page, 'inside width', '4 in');
  await ask(page, 'inside height', '1 in');

  await page.getByRole('button', { name: /^Tray/ }).click();
  // 6 and two walls of 1, by 4 and two walls of 1.
  await expect(blank(page)).toContainText('8 × 6');

  // The right end becomes an arc: its corners go, and it keeps the name that it had.
  await cell(page, 1, 2).click();
  await page.getByRole('radio', { name: 'arc', exact: true }).check({ force: true });
  await expect(cell(page, 1, 2)).toContainText('arc');
  for (const row of [0, 2]) {
    await cell(page, row, 2).focus();
    await page.keyboard.press('Delete');
    await expect(cell(page, row, 2)).toContainText('cut away');
  }
  // A chord of 4 and a rise of 1: the radius is (16 + 4) / 8 = 2 1/2, the circle 5 across.
  await page.locator('[data-column=pieces] .drawing .dr-panel.pickable').first().waitFor();
  await expect(page.locator('.words')).toContainText(/arc of a 5\sin circle over the 4\sin/);

  // What is pressed in the drawing is chosen in the table, arrows go on from there.
  await page
    .locator('[data-column=pieces] .piece-view .dr-panel.pickable')
    .first()
    .click({ position: { x: 12, y: 12 } });
  await expect(page.locator('.grid-cell.selected')).toHaveCount(1);

  // A lid, only when the reader wants one.
  await page.getByRole('button', { name: 'Measure or choice' }).click();
  await page.getByLabel('Name of the new measure or choice').fill('lid');
  await page.getByRole('button', { name: 'A choice' }).click();
  await page.getByRole('button', { name: 'Rename option other' }).click();
  await page.getByLabel('New name for other').fill('none');
  await page.getByLabel('New name for other').press('Enter');
  await page.locator('.column-head').getByRole('button', { name: 'Piece', exact: true }).click();
  await page.getByRole('button', { name: /^Sheet/ }).click();
  await page.getByRole('button', { name: 'Rename piece Sheet' }).click();
  await page.getByLabel('New name for Sheet').fill('Lid');
  await page.getByLabel('New name for Sheet').press('Enter');
  const when = page.locator('.piece-bar').getByLabel('Only when');
  await when.pressSequentially('lid is pl');
  await page.keyboard.press('ArrowDown');
  await page.keyboard.press('Enter');
  await expect(when).toHaveValue('lid is plain');
  await expect(blank(page)).toContainText('6 × 4');
  await page.getByRole('radio', { name: 'none', exact: true }).check({ force: true });
  await expect(page.getByText('Lid is not cut with these choices.')).toBeVisible();

  // One undo goes back over all of it.
  await page.keyboard.press('Escape');
  await page.locator('[data-column=measures] h2').click();
  await page.keyboard.press('Control+z');
  await expect(blank(page)).toContainText('6 × 4');
  await expect(page.locator('.save-words')).toContainText(/Saved.*revision/, { timeout: 15_000 });

  // The whole range, beside the page.
  await page.getByRole('button', { name: 'Try the whole range' }).click();
  await expect(page.locator('.trial [role=status]')).toContainText(/sizes tried c/, { timeout: 60_000 });

  // A reader finds it and makes a longer one: 8 and two walls of 1.
  await page.getByRole('button', { name: 'Publish edition 1' }).click();
  const dialog = page.getByRole('dialog', { name: 'Publish edition 1' });
  await dialog.getByRole('button', { name: 'Publish edition 1' }).click();
  await page.getByRole('link', { name: 'See it as readers do' }).click();
  await panelReady(page);
  await sizeField(page, 'inside length').fill('8');
  await page.getByRole('link', { name: 'Measurement sheet' }).first().click();
  await shows(page.locator('main'), '10 × 6 in');
});

test('a pattern is kept on the author’s own shelf and goes out as a file', async ({ page }) => {
  await fromBlank(page, 'Card sleeve');
  await page.getByRole('button', { name: /^Sheet/ }).click();
  await page.locator('.pattern-part summary').click();
  const name = `Sleeve ${Date.now()}`;
  await page.getByLabel('Name, pattern').fill(name);
  await page.getByRole('button', { name: 'Keep it as a pattern of my own' }).click();
  await expect(page.locator('.pattern-part [role=status]')).toContainText(`“${name}” stands on your shelf`);
  const [download] = await Promise.all([
    page.waitForEvent('download'),
    page.getByRole('button', { name: 'Pattern as a file' }).click(),
  ]);
  const file = JSON.parse(readFileSync(await download.path(), 'utf8')) as {
    $schema: string;
    name: string;
    format: number;
  };
  expect([file.name, file.format]).toEqual([name, 1]);
  expect((await page.request.get(new URL(file.$schema).pathname)).status()).toBe(200);

  await page.goto('/workroom');
  const own = page.locator('section', { has: page.locator('#own-title') });
  await expect(own.getByRole('button', { name: new RegExp(`^${name}`) })).toBeVisible();
  await page.setInputFiles('input[aria-label="Pattern file"]', {
    name: 'broken.pattern.json',
    mimeType: 'application/json',
    buffer: Buffer.from(JSON.stringify({ ...file, measures: [{ name: 'rib', formula: '1 inn' }] })),
  });
  await expect(own.locator('.problem')).toContainText('measure “rib”');
});
