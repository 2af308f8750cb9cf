import { expect, test as base, type Page } from '@playwright/test';
import sharp from 'sharp';
import { DEMO_PEOPLE } from '../../src/features/demo/people';

type Cookies = Awaited<ReturnType<ReturnType<Page['context']>['cookies']>>;
let signedIn: Cookies | undefined;

/** The desk of a fresh project from `book-box`, signed in as the demo's author, with an emptied write-up and the caret in it. */
const test = base.extend<{ desk: { page: Page; id: string; saved: () => Promise<string> } }>({
  desk: async ({ page, baseURL }, use) => {
    const author = DEMO_PEOPLE.find(({ role }) => role === 'author')!;
    if (signedIn) await page.context().addCookies(signedIn);
    else {
      await page.goto('/sign-in?to=/workroom');
      const form = page.locator('main form').first();
      await form.locator('input[name=email]').fill(author.email);
      await form.locator('input[name=password]').fill(author.password);
      await form.locator('input[name=password]').press('Enter');
      await page.waitForURL('**/workroom');
      signedIn = await page.context().cookies();
    }
    const made = await page.request.post('/api/projects', {
      data: { pattern: 'book-box', title: 'Editor at work' },
      headers: { origin: baseURL! },
    });
    const { id } = (await made.json()) as { id: string };
    await page.goto(`/workroom/${id}`);
    const text = page.getByRole('textbox', { name: 'Write-up', exact: true });
    await text.waitFor({ timeout: 30_000 });
    await text.focus();
    await page.waitForTimeout(80);
    await page.keyboard.press('Control+a');
    await page.keyboard.press('Delete');
    const saved = async () => {
      const answer = (await (await page.request.get(`/api/projects/${id}`)).json()) as { state: { writeUp: unknown } };
      return JSON.stringify(answer.state.writeUp);
    };
    await use({ page, id, saved });
  },
});

const written = (page: Page) => page.locator('.writeup-text');
const field = (page: Page) => page.locator('.measure-field').getByRole('combobox');
/** Keys that are pressed at once after the focus has moved are lost. */
const settle = (page: Page) => page.waitForTimeout(80);

async function putMeasure(page: Page, query: string) {
  await page.keyboard.press('Alt+m');
  await expect(field(page)).toBeFocused();
  await page.keyboard.type(query);
  await page.keyboard.press('Enter');
  await expect(field(page)).toHaveCount(0);
  await settle(page);
}

test('two colons find a measure by name; one goes on typing behind it, and it is saved as its formula', async ({
  desk: { page, saved },
}) => {
  await page.keyboard.type('Cut the strip ::');
  await expect(field(page)).toBeFocused();
  await page.keyboard.type('dep');
  await expect(page.getByRole('listbox', { name: 'Measures' }).getByRole('option').first()).toContainText(
    'inside depth',
  );
  await page.keyboard.press('Enter');
  await settle(page);
  await page.keyboard.type(' wide.');
  await expect(written(page).locator('p').first()).toHaveText('Cut the strip 2\u202f1\u20444\u00a0in wide.');
  await expect
    .poll(saved)
    .toContain(
      '{"type":"text","text":"Cut the strip "},{"type":"measure","attrs":{"formula":"inside depth","bare":false}},{"type":"text","text":" wide."}',
    );
});

test('Escape leaves two colons as text, with the caret behind them', async ({ desk: { page } }) => {
  await page.keyboard.type('Note ::');
  await expect(field(page)).toBeFocused();
  await page.keyboard.press('Escape');
  await settle(page);
  await page.keyboard.type(' so');
  await expect(written(page).locator('p').first()).toHaveText('Note :: so');
});

test('arrows stop on a measure; Enter changes it, Backspace removes it, undo brings it back', async ({
  desk: { page },
}) => {
  await page.keyboard.type('A ');
  await putMeasure(page, 'inside width');
  await page.keyboard.press('ArrowLeft');
  const measure = written(page).locator('.measure');
  await expect(measure).toHaveClass(/selected/);
  await page.keyboard.press('Enter');
  await expect(field(page)).toHaveValue('inside width');
  await page.keyboard.type('inside width + 2 * tab');
  await page.keyboard.press('Enter');
  await settle(page);
  // 6 + 2 × 1/2
  await expect(measure).toHaveText('7\u00a0in');
  await page.waitForTimeout(600);
  await page.keyboard.press('ArrowLeft');
  await page.keyboard.press('Backspace');
  await expect(measure).toHaveCount(0);
  await page.keyboard.press('Control+z');
  await expect(measure).toHaveText('7\u00a0in');
});

test('a formula that does not read is marked where it stands, with its cure', async ({ desk: { page } }) => {
  await page.keyboard.press('Alt+m');
  await expect(field(page)).toBeFocused();
  await page.keyboard.type('arc + 2 * tabs');
  await expect(page.locator('.measure-fault-place u')).toHaveText('tabs');
  await expect(page.locator('.measure-fault')).toContainText('No measure is called “tabs”. The nearest name is “tab”.');
  await page.getByRole('button', { name: 'Use tab' }).click();
  await field(page).press('Enter');
  await settle(page);
  // 2 3/8 + 2 × 1/2
  await expect(written(page).locator('.measure')).toHaveText('3\u202f3\u20448\u00a0in');
});

test('a step takes what stands behind the caret, its title is typed first, steps change places and come back by undo', async ({
  desk: { page, saved },
}) => {
  await page.keyboard.press('Control+Enter');
  await settle(page);
  await page.keyboard.type('First');
  await page.keyboard.press('Enter');
  await page.keyboard.type('Cut it. Fold it.');
  for (let n = 0; n < 'Fold it.'.length; n += 1) await page.keyboard.press('ArrowLeft');
  await page.keyboard.press('Control+Enter');
  await settle(page);
  await page.keyboard.type('Second');
  await page.keyboard.press('Enter');
  const titles = () =>
    page.locator('.step-title-field').evaluateAll((fields) => fields.map((f) => (f as HTMLInputElement).value));
  expect(await titles()).toEqual(['First', 'Second']);
  await expect(page.locator('.step-content')).toHaveText(['Cut it. ', 'Fold it.']);
  await page.waitForTimeout(600);
  await page.keyboard.press('Alt+Shift+ArrowUp');
  expect(await titles()).toEqual(['Second', 'First']);
  await page.waitForTimeout(600);
  await page.keyboard.type('Now: ');
  await expect(page.locator('.step-content').first()).toHaveText('Now: Fold it.');
  await expect.poll(saved).toContain('"attrs":{"title":"Second","mark":""}');
  for (let n = 0; n < 2; n += 1) await page.keyboard.press('Control+z');
  expect(await titles()).toEqual(['First', 'Second']);
});

test('a photo stands as a placeholder while one goes on typing, then in its place, and is read from its own address', async ({
  desk: { page, saved },
}) => {
  await page.keyboard.type('Before');
  await page.keyboard.press('Enter');
  const picture = await sharp({ create: { width: 900, height: 600, channels: 3, background: '#1b7155' } })
    .jpeg()
    .toBuffer();
  await page
    .locator('.writeup-editor input[type=file]')
    .setInputFiles([{ name: 'strip.jpg', mimeType: 'image/jpeg', buffer: picture }]);
  await page.keyboard.type('after');
  const photo = page.locator('.photo-edited');
  await expect(photo).toHaveCount(1);
  await page.keyboard.type('wards');
  await expect(written(page).locator('> p').last()).toHaveText('afterwards');
  await photo.getByLabel('What the photo shows, in words').fill('A green strip');
  await expect
    .poll(() => photo.locator('img').evaluate((image) => (image as HTMLImageElement).naturalWidth))
    .toBeGreaterThan(0);
  await expect.poll(saved).toContain('"alt":"A green strip","width":900,"height":600');
});

test('a picture that is not taken says why and can be left out', async ({ desk: { page } }) => {
  await page
    .locator('.writeup-editor input[type=file]')
    .setInputFiles([
      { name: 'drawing.png', mimeType: 'image/png', buffer: Buffer.from('<svg xmlns="http://www.w3.org/2000/svg"/>') },
    ]);
  const coming = page.locator('.photo-coming');
  await expect(coming).toContainText('This is an SVG drawing, which may hold programs');
  await coming.getByRole('button', { name: 'Leave it out' }).click();
  await expect(coming).toHaveCount(0);
});

test("a word processor's text keeps its lists, bold and tables; pictures from elsewhere and programs in links go", async ({
  desk: { page },
}) => {
  const html =
    '<b style="font-weight:normal"><p>Cut <span style="font-weight:700">two</span> <img src="file:///c/x.png">now.</p></b>' +
    "<p class=MsoListParagraph style='mso-list:l0 level1 lfo1'><span style='mso-list:Ignore'>1.</span>One</p>" +
    "<p class=MsoListParagraph style='mso-list:l0 level1 lfo1'><span style='mso-list:Ignore'>2.</span>Two</p>" +
    '<table><tr><td>Floor</td><td>3 x 4</td></tr></table>' +
    '<p><a href="javascript:alert(1)">bad</a> <a href="https://quilletlane.example">good</a></p>' +
    '<p><span class="measure" data-live="tab"><span class="figure">1/2 in</span><span class="visually-hidden">half an inch</span></span> ' +
    '<span class="measure" data-live="gone"><span class="figure">3 in</span><span class="visually-hidden">3 inches</span></span></p>';
  await page.evaluate((pasted) => {
    const clipboardData = new DataTransfer();
    clipboardData.setData('text/html', pasted);
    document
      .querySelector('.ProseMirror')
      ?.dispatchEvent(new ClipboardEvent('paste', { clipboardData, bubbles: true, cancelable: true }));
  }, html);
  const text = written(page);
  await expect(text.locator('strong')).toHaveText(['two']);
  await expect(text.locator('ol > li')).toHaveText(['One', 'Two']);
  await expect(text.locator('table td')).toHaveText(['Floor', '3 x 4']);
  await expect(text.locator('a')).toHaveText(['good']);
  await expect(text.locator('img:not(.ProseMirror-separator)')).toHaveCount(0);
  await expect(text.locator('.measure')).toHaveText(['1\u20442\u00a0in']);
  await expect(text.locator('p').last()).toContainText('3 in');
});

test('a step is there only when a choice is made; what speaks of later steps follows the count', async ({
  desk: { page, saved },
}) => {
  for (const title of ['Cut', 'Round it', 'Score']) {
    await page.keyboard.press('Control+Enter');
    await settle(page);
    await page.keyboard.type(title);
    await page.keyboard.press('Enter');
    await settle(page);
  }
  await page.keyboard.type('As in ');
  await page.keyboard.press('Alt+Shift+S');
  // The steps are listed in order: the third is this one.
  await page.locator('.pick-list button').nth(2).click();
  await settle(page);
  await expect(written(page).locator('.step-ref')).toHaveText('step\u00a03');

  await written(page).locator('.step-content').nth(1).click();
  await page.keyboard.press('Alt+Shift+W');
  await page.getByRole('button', { name: 'spine is straight', exact: true }).click();
  await settle(page);
  // The book box has a curved spine unless one chooses another.
  await expect(written(page).locator('.step-left-out')).toHaveCount(1);
  await expect(written(page).locator('.step-ref')).toHaveText('step\u00a02');
  await expect.poll(saved).toContain('"when":"spine is straight"');
});

test('words are found and replaced, and live measures stay as they are', async ({ desk: { page, saved } }) => {
  await page.keyboard.type('Cut a tab, ');
  await putMeasure(page, 'tab');
  await page.keyboard.type(' wide, and a tab.');
  await page.keyboard.press('Control+f');
  const bar = page.getByRole('search', { name: 'Find in the write-up' });
  await bar.getByLabel('Find', { exact: true }).fill('tab');
  await expect(bar.locator('.find-count')).toHaveText('1 of 2');
  await bar.getByLabel('Put in its place').fill('flap');
  await bar.getByRole('button', { name: 'Replace all' }).click();
  await page.keyboard.press('Escape');
  // 1/2 in is the usual width of a tab.
  await expect(written(page).locator('p').first()).toHaveText('Cut a flap, 1\u20442\u00a0in wide, and a flap.');
  await expect.poll(saved).toContain('"formula":"tab"');
});

test('Tab goes from cell to cell of a table and makes a row behind the last', async ({ desk: { page } }) => {
  await page.keyboard.press('Alt+Shift+B');
  await page
    .locator('.pick-list')
    .getByRole('button', { name: /^Table/ })
    .click();
  await settle(page);
  for (let n = 1; n <= 10; n += 1) {
    await page.keyboard.type(String(n));
    await page.keyboard.press('Tab');
  }
  // Three columns: ten cells fill three rows and begin a fourth.
  await expect(written(page).locator('tr')).toHaveCount(4);
  await expect(written(page).locator('td').last()).toBeEmpty();
  await page.getByRole('toolbar', { name: 'Table' }).getByRole('button', { name: 'Take the table out' }).click();
  await expect(written(page).locator('table')).toHaveCount(0);
});
