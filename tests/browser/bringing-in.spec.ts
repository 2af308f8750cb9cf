import { expect, test, type Page } from '@playwright/test';
import { beSignedIn } from './support/signing-in';

// The lidded box at its usual size, 7 x 4 x 1 1/2 in inside: base 10 x 7, lid 9 1/8 x 6 1/8, its walls 1 in.
const TALK = [
  '[0:05] Um, cut the base 10 by 7 inches. Score the base at 1 1/2 on all four sides, and burnish every score with care.',
  '[1:10] Now the lid. Cut the lid 9 1/8 by 6 1.8 inches and keep 12 inches of ribbon for later, on the side of the table.',
  '[2:00] Next, score the lid at one inch on every side, fold it and glue its four corners.',
].join('\n');

async function emptyDesk(page: Page, baseURL: string | undefined): Promise<string> {
  const made = await page.request.post('/api/projects', {
    data: { pattern: 'lidded-box', title: 'Brought in' },
    headers: { origin: baseURL ?? '' },
  });
  const { id } = (await made.json()) as { id: string };
  await page.goto(`/workroom/${id}`);
  const text = page.getByRole('textbox', { name: 'Write-up', exact: true });
  await text.waitFor({ timeout: 30_000 });
  await text.focus();
  await page.keyboard.press('Control+a');
  await page.keyboard.press('Delete');
  await expect(page.locator('.writeup-text .step')).toHaveCount(0);
  return id;
}

test('a talk with its times becomes steps with live measures, in one step of undo, and is kept', async ({
  page,
  context,
  baseURL,
}) => {
  await beSignedIn(context, 'author');
  const id = await emptyDesk(page, baseURL);
  const written = page.locator('.writeup-text');

  await page.getByRole('button', { name: 'Bring text in' }).click();
  const dialog = page.getByRole('dialog', { name: 'Bring text in' });
  await dialog.getByLabel('Text', { exact: true }).fill('[0:05] One.\n[0:75] Two.');
  await dialog.getByRole('button', { name: 'Read it' }).click();
  await expect(dialog.getByRole('alert')).toContainText('Line 2: “0:75” is no time.');
  await dialog.getByLabel('Text', { exact: true }).fill(TALK);
  await dialog.getByRole('button', { name: 'Read it' }).click();

  const review = page.getByRole('dialog', { name: 'Pasted text' });
  await expect(review.getByRole('list', { name: 'Steps' }).locator('> li')).toHaveCount(3);
  await expect(review.locator('.brought-number')).toHaveCount(7);
  await review.getByLabel('Leave out filler words').check();
  await expect(review.locator('del')).toHaveText('Um,');

  await page.keyboard.press('a');
  await expect(review.locator('.brought-number[data-is=certain]')).toHaveCount(0);
  // What was misheard is shown both ways, and waits for a word.
  await expect(review.locator('.brought-number[data-is=doubtful]')).toHaveText('6 1.8 inches');
  for (let n = 0; n < 7 && (await review.locator('.number-said').textContent()) !== null; n += 1) {
    const open = await review.locator('.brought-number[data-is=open], .brought-number[data-is=doubtful]').count();
    if (open === 0) break;
    await page.keyboard.press('Enter');
  }
  await review.locator('.brought-number[data-is=unmatched]').click();
  await page.keyboard.press('k');
  await review.getByLabel('Address of the video').fill('https://video.example/lidded');
  await review.getByRole('button', { name: 'Put into the write-up' }).click();
  await expect(review).toBeHidden();

  await expect(written.locator('.step')).toHaveCount(3);
  await expect(written.locator('.measure')).toHaveCount(6);
  await expect(written.locator('.stray-number')).toHaveCount(0);
  await expect(written.locator('.step p').first()).toHaveText(
    /^Cut the base 10 by 7\s*in\. Score the base at 1\s*1⁄2/u,
  );
  await expect(page.locator('.proof-strip, .desk')).not.toContainText('is typed, not live');

  await written.focus();
  await page.keyboard.press('Control+z');
  await expect(written.locator('.step')).toHaveCount(0);
  await page.keyboard.press('Control+Shift+z');
  await expect(written.locator('.step')).toHaveCount(3);
  await expect
    .poll(async () => JSON.stringify(await (await page.request.get(`/api/projects/${id}`)).json()))
    .toContain('{"seconds":70,"address":"https://video.example/lidded"}');

  await page.getByRole('button', { name: 'Originals' }).click();
  await page.getByRole('button', { name: 'Pasted text', exact: true }).click();
  await expect(page.getByLabel('Text of the original')).toContainText('Um, cut the base');
});

test('a typed length is underlined as one writes; one key makes it live, another leaves it as typed', async ({
  page,
  context,
  baseURL,
}) => {
  await beSignedIn(context, 'author');
  await emptyDesk(page, baseURL);
  const written = page.locator('.writeup-text');
  await page.keyboard.type('The lid is 9 1/8 inches long.');
  await expect(written.locator('.stray-number')).toHaveText('9 1/8 inches');
  await page.keyboard.press('Home');
  for (let n = 0; n < 13; n += 1) await page.keyboard.press('ArrowRight');
  await page.keyboard.press('Alt+m');
  const asked = page.getByRole('dialog', { name: 'Typed number' });
  await expect(asked).toContainText('Which measure is it?');
  await page.keyboard.press('k');
  await expect(asked).toBeHidden();
  await expect(written.locator('.stray-number')).toHaveCount(0);
  await page.keyboard.press('Control+z');
  await expect(written.locator('.stray-number')).toHaveCount(1);
  await page.keyboard.press('Alt+m');
  await page.keyboard.press('Enter');
  await expect(written.locator('.measure')).toHaveCount(1);
  await expect(written.locator('.stray-number')).toHaveCount(0);
});
