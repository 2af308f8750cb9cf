import { expect, test } from '@playwright/test';
import { shows } from './support/reader-page';

const CURVES = '/handbook/gluing-and-curves';

test('a sum follows what is typed', async ({ page }) => {
  await page.goto(CURVES);
  const sum = page.locator('form[data-sum="curve-strip"]');
  // A chord of 2 in on a 4 in circle: 4π ∕ 6 = 2.0944 in, up to sixteenths.
  await shows(sum, '2 1/8 in');
  // Over its whole width half the circle: 2π = 6.2832 in.
  await sum.getByLabel('Ends apart, straight across').fill('4');
  await shows(sum, '6 5/16 in');
  await sum.getByLabel('Ends apart, straight across').fill('5');
  await shows(sum, 'Take a wider circle.');
});

test('without JavaScript the server works a sum out, and the guide’s example keeps its size', async ({
  browser,
  baseURL,
}) => {
  const context = await browser.newContext({ baseURL, javaScriptEnabled: false });
  const page = await context.newPage();
  await page.goto(`${CURVES}?units=mm`);
  const sum = page.locator('form[data-sum="curve-strip"]');
  await sum.getByLabel('Ends apart, straight across').fill('4');
  await sum.getByRole('button', { name: 'Work it out' }).click();
  await shows(sum, '6 5/16 in');
  expect(new URL(page.url()).searchParams.get('units')).toBe('mm');
  await context.close();
});
