import { expect, test, type Page } from '@playwright/test';
import sharp from 'sharp';
import { letterTo, lettersTo, linkIn } from './support/mailbox';
import { cutListRow, everyFigure, liveMeasure, panelReady, shows, sizeField, typeset } from './support/reader-page';
import { demoPerson } from './support/signing-in';

const TITLE = 'Swap shelf book box';
const SUBJECT = 'A book box for the swap shelf';
/** Another at each run, so that a second run in the same data begins anew. */
const SUBSCRIBER = `odo.${Date.now().toString(36)}@swapshelf.example`;

test.use({ actionTimeout: 15_000 });

/** Keys that are pressed at once after the focus has moved are lost. */
const settle = (page: Page) => page.waitForTimeout(80);

test('a box goes from its pattern to the subscribers and to a reader’s own size', async ({
  browser,
  page,
  request,
  baseURL,
}) => {
  test.setTimeout(150_000);
  await page.setViewportSize({ width: 1440, height: 1000 });
  let desk = '';
  let slug = '';

  await test.step('the author signs in and makes a project from the book box', async () => {
    await page.goto('/sign-in?to=/workroom');
    await page.getByRole('button', { name: `Sign in as ${demoPerson('author').name}` }).click();
    await page.waitForURL('**/workroom');
    await page.locator('astro-island:not([ssr])').first().waitFor();
    await page.getByRole('button', { name: /^Book box/ }).click();
    const dialog = page.getByRole('dialog', { name: 'New project' });
    await expect(dialog.getByRole('radio', { name: /^Book box/ })).toBeChecked();
    await dialog.getByLabel('Title').fill(TITLE);
    await dialog.getByRole('button', { name: 'Make the project' }).click();
    await page.waitForURL(/\/workroom\/[^/]+$/);
    desk = new URL(page.url()).pathname;
  });

  await test.step('sets the sizes', async () => {
    await page.locator('.desk').waitFor({ timeout: 30_000 });
    const sizes = { 'inside height': '10 in', 'inside width': '5 1/2 in', 'inside depth': '2 in', circle: '4 in' };
    for (const [name, text] of Object.entries(sizes)) {
      await page.getByRole('button', { name, exact: true }).click();
      const size = page.getByLabel(`${name}, the size shown first`);
      await size.fill(text);
      await size.press('Enter');
      await expect(page.locator(`tr[data-measure="${name}"]`)).toContainText(typeset(text.replace(' in', '')));
      await page.getByRole('button', { name, exact: true }).click();
    }
    // A chord of 2 in on a circle of 4 in spans 60 degrees: 4π/6 in of arc, 2.094, at sixteenths 2 1/8.
    await expect(page.locator('tr[data-measure="arc"]')).toContainText(typeset('2 1/8'));
  });

  await test.step('writes two steps with live measures, a piece card and the cut list', async () => {
    const text = page.getByRole('textbox', { name: 'Write-up', exact: true });
    await text.focus();
    await settle(page);
    await page.keyboard.press('Control+a');
    await page.keyboard.press('Delete');
    await step(page, 'Cut two covers');
    await page.keyboard.type('Cut two covers, each ');
    await measure(page, 'inside width + overhang');
    await page.keyboard.type(' across.');
    await page.keyboard.press('Alt+Shift+p');
    await page
      .locator('.pick-list')
      .getByRole('button', { name: /^Cover/ })
      .click();
    await settle(page);
    await page.keyboard.press('Alt+Shift+m');
    await settle(page);
    await page.keyboard.type('Cardstock, a bone folder');
    await step(page, 'Roll the spine');
    await page.keyboard.type('The strip is ');
    await measure(page, 'arc');
    await page.keyboard.type(' wide, with its tabs ');
    await measure(page, 'arc + 2 * tab');
    await page.keyboard.type('.');
    await page.keyboard.press('Alt+Shift+l');
    await settle(page);
    await expect(page.locator('.step-title-field')).toHaveCount(2);
    await expect(page.locator('.step-content').first()).toContainText(typeset('each 5 3/4 in across.'));
    await expect(page.locator('.step-content').nth(1)).toContainText(
      typeset('The strip is 2 1/8 in wide, with its tabs 3 1/8 in.'),
    );
  });

  await test.step('uploads a photo with words and a caption', async () => {
    const picture = await sharp({ create: { width: 1200, height: 800, channels: 3, background: '#6d2e5b' } })
      .withMetadata({ exif: { IFD0: { Artist: 'Somebody private' } } })
      .jpeg()
      .toBuffer();
    await page
      .locator('.writeup-editor input[type=file]')
      .setInputFiles({ name: 'finished.jpg', mimeType: 'image/jpeg', buffer: picture });
    const photo = page.locator('.photo-edited');
    await expect(photo).toHaveCount(1);
    await photo.getByLabel('What the photo shows, in words').fill('The finished box on the swap shelf');
    await photo.locator('figcaption').click();
    await settle(page);
    await page.keyboard.type('It stands ');
    await measure(page, 'inside width');
    await page.keyboard.type(' wide inside.');
    await expect(photo.locator('figcaption')).toContainText(typeset('It stands 5 1/2 in wide inside.'));
  });

  await test.step('says what it is, with the photo as its first picture, and publishes it', async () => {
    await page.getByRole('button', { name: 'Facts' }).click();
    const facts = page.getByRole('dialog', { name: 'About this project' });
    await facts.getByLabel('Summary').fill('A small book for the shelf by the door; seed packets go in at the top.');
    await facts.getByLabel('Minutes at the table').fill('75');
    await facts.getByRole('radio').first().check();
    await facts.getByRole('button', { name: 'Back to the desk' }).click();
    await expect(page.locator('.proof-count')).toContainText('nothing in the way of publishing');
    await page.getByRole('button', { name: 'Publish edition 1' }).click();
    const dialog = page.getByRole('dialog', { name: 'Publish edition 1' });
    await dialog.getByRole('button', { name: 'Publish edition 1' }).click();
    const out = page.getByRole('link', { name: 'See it as readers do' });
    await expect(page.getByText('Edition 1 is out.')).toBeVisible();
    slug = new URL((await out.getAttribute('href'))!, baseURL).pathname;
    expect(slug).toMatch(/^\/projects\/swap-shelf-book-box/);
  });

  await test.step('somebody subscribes on the project’s page and confirms by the letter’s button', async () => {
    const context = await browser.newContext({ baseURL });
    const subscriber = await context.newPage();
    await subscriber.goto(slug);
    const form = subscriber.locator('form[data-subscribe]').first();
    await form.getByLabel('Your e-mail address').fill(SUBSCRIBER);
    await form.getByLabel('Sizes in').selectOption('mm');
    await form.getByRole('button', { name: 'Subscribe' }).click();
    await expect(form.getByRole('status')).toContainText('a letter with a button to confirm is on its way');

    const letter = await letterTo(SUBSCRIBER, 'Confirm that you want mail');
    const link = linkIn(letter, '/subscribe/confirm');
    // A program that opens every link subscribes nobody.
    await request.get(link);
    await subscriber.goto(link);
    await subscriber.getByRole('button', { name: 'Confirm' }).click();
    await expect(subscriber.getByRole('heading', { name: 'You are on the list' })).toBeVisible();
    await expect(subscriber.locator('main').getByText(SUBSCRIBER)).toBeVisible();
    await context.close();
  });

  let toHow = 0;
  await test.step('the author prepares a mailing, looks at both parts, tests it and sends it', async () => {
    await page.goto(`${desk}/mailing`);
    await page.locator('astro-island:not([ssr])').first().waitFor();
    await page.getByLabel('Subject').fill(SUBJECT);
    const whole = page.frameLocator('iframe[title="The mail as HTML"]');
    await expect(whole.getByRole('heading', { name: TITLE })).toBeVisible();
    await page.getByRole('radio', { name: 'Plain text' }).check();
    await page.getByRole('radio', { name: 'in', exact: true }).check();
    await expect(page.locator('.mail-plain')).toContainText('10 × 5 1/2 × 2 in');
    await page.getByRole('button', { name: 'Send a test to myself' }).click();
    await expect(page.getByText('You have sent yourself a test', { exact: true })).toBeVisible();
    await letterTo(demoPerson('author').email, SUBJECT);
    toHow = await send(page);
    // The demo's list and one more.
    expect(toHow).toBeGreaterThan(1);
  });

  let leave = '';
  let read = '';
  await test.step('the subscriber gets it as text and HTML, in millimetres, with a way out', async () => {
    const mail = await letterTo(SUBSCRIBER, SUBJECT);
    expect(mail.from?.text).toContain(demoPerson('author').name);
    expect(mail.headers.get('list')).toMatchObject({
      unsubscribe: { url: expect.stringContaining(`${baseURL}/unsubscribe?t=`) },
      'unsubscribe-post': { name: 'List-Unsubscribe=One-Click' },
    });
    leave = (mail.headers.get('list') as unknown as { unsubscribe: { url: string } }).unsubscribe.url;
    // 10 × 5 1/2 × 2 in are 254 × 139.7 × 50.8 mm.
    expect(mail.text).toContain('254 × 140 × 51 mm');
    expect(
      String(mail.html)
        .replace(/<[^>]+>/g, '')
        .replaceAll('&nbsp;', ' ')
        .replaceAll('\u00a0', ' '),
    ).toContain('254 × 140 × 51 mm');
    expect(String(mail.html)).toContain('alt="The finished box on the swap shelf"');
    read = linkIn(mail, slug);
    expect(read).toBe(`${baseURL}${slug}?units=mm`);
    expect((await lettersTo(SUBSCRIBER)).filter(({ subject }) => subject?.includes(SUBJECT))).toHaveLength(1);
  });

  const atReader = await browser.newContext({ baseURL });
  const reader = await atReader.newPage();
  const loads: string[] = [];
  reader.on('framenavigated', (frame) => frame === reader.mainFrame() && loads.push(frame.url()));
  let byScript: Awaited<ReturnType<typeof everyFigure>>;
  await test.step('the reader opens the link, makes it 200 mm wide, and everything follows at once', async () => {
    await reader.goto(read);
    await panelReady(reader);
    await expect(liveMeasure(reader, 'inside width')).toContainText('140\u00a0mm');
    const before = await everyFigure(reader);
    const drawingBefore = await reader.locator('[data-piece="Cover"] svg').first().innerHTML();
    loads.length = 0;
    await reader.evaluate(() => Object.assign(window, { stillHere: true }));

    await sizeField(reader, 'inside width').fill('200 mm');

    // The overhang of 1/4 in is 6 mm at whole millimetres, so a cover is 206 across and 254 + 6 along.
    await expect(liveMeasure(reader, 'inside width + overhang')).toContainText('206\u00a0mm');
    await expect(liveMeasure(reader, 'inside width')).toContainText('200\u00a0mm');
    await expect(reader.locator('figcaption').filter({ hasText: 'wide inside' })).toContainText(
      'It stands 200\u00a0mm',
    );
    await shows(cutListRow(reader, 'Cover'), '206 × 260 mm');
    // Floor: tabs of 13 (1/2 in), 51 deep, 200 wide and a bulge of 50.8 − √(50.8² − 25.5²) = 6.9, up to 7.
    await shows(cutListRow(reader, 'Floor'), '77 × 220 mm');
    const drawing = reader.locator('[data-piece="Cover"] svg').first();
    await expect(drawing.locator('text', { hasText: /^206/ }).first()).toBeAttached();
    expect(await drawing.innerHTML()).not.toBe(drawingBefore);
    // The strip is 53 mm; the floor's curve, a chord of 51 on a circle of 101.6, is 53.43.
    const fits = reader.locator('sizing-panel [data-fits]');
    await expect(fits.locator('li').filter({ hasText: 'Spine goes round the curve' })).toContainText(
      'about 0.4\u00a0mm short',
    );
    byScript = await everyFigure(reader);
    // Beside a cover of 206 × 260 a sheet of 305 has room for one of the four long pieces (75 to 79 wide) alone.
    const sheets = (figures: typeof byScript) => figures.fits.join().match(/\d+(?= sheets)/)?.[0];
    expect(sheets(before)).toBe('2');
    expect(sheets(byScript)).toBe('3');
    await expect.poll(() => new URL(reader.url()).searchParams.get('inside-width')).toBe('200mm');
    expect(new URL(reader.url()).searchParams.get('units')).toBe('mm');
    // The address changes without a new page.
    expect(await reader.evaluate(() => 'stillHere' in window)).toBe(true);
  });

  await test.step('the measurement sheet is of the same size', async () => {
    await reader.getByRole('link', { name: 'Measurement sheet', exact: true }).click();
    await reader.waitForURL(/\/sheet\?/);
    await expect(reader.locator('.sheet-cover')).toContainText('254 tall · 200 wide · 51 deep mm');
    const row = (piece: string) => reader.locator('.sheet-table tr').filter({ hasText: piece }).first();
    await shows(row('Cover'), '206 × 260');
    await shows(row('Floor'), '77 × 220');
    await shows(row('Lower spine'), '79 ×');
  });

  await test.step('the form gives the same figures without JavaScript', async () => {
    const context = await browser.newContext({ baseURL, javaScriptEnabled: false });
    const plain = await context.newPage();
    await plain.goto(read);
    await sizeField(plain, 'inside width').fill('200 mm');
    await plain.getByRole('button', { name: 'Work it out' }).click();
    await plain.waitForURL(/inside-width=200/);
    expect(await everyFigure(plain)).toEqual(byScript);
    await context.close();
  });
  await atReader.close();

  await test.step('one POST takes the subscriber off the list', async () => {
    const left = await request.post(leave, { form: { 'List-Unsubscribe': 'One-Click' } });
    expect(left.status()).toBe(200);
    expect(left.headers()['set-cookie']).toBeUndefined();
  });

  await test.step('the next mailing goes to one less, and not to them', async () => {
    await page.goto(desk);
    await page.locator('.desk').waitFor({ timeout: 30_000 });
    await expect(page.locator('.save-words')).toContainText('Saved');
    await page.getByLabel('Title of the project').fill(`${TITLE}, corrected`);
    await page.getByRole('button', { name: 'Publish edition 2' }).click();
    const dialog = page.getByRole('dialog', { name: 'Publish edition 2' });
    await dialog.getByLabel('Correction note').fill('The title names the correction; nothing that was cut is wrong.');
    await dialog.getByRole('button', { name: 'Publish edition 2' }).click();
    await expect(page.getByText('Edition 2 is out.')).toBeVisible();
    await page.goto(`${desk}/mailing`);
    await page.locator('astro-island:not([ssr])').first().waitFor();
    await page.getByLabel('Subject').fill(`${SUBJECT}, corrected`);
    expect(await send(page)).toBe(toHow - 1);
    expect((await lettersTo(SUBSCRIBER)).filter(({ subject }) => subject?.includes('corrected'))).toHaveLength(0);
  });
});

async function step(page: Page, title: string): Promise<void> {
  await page.keyboard.press('Control+Enter');
  await settle(page);
  await page.keyboard.type(title);
  await page.keyboard.press('Enter');
  await settle(page);
}

async function measure(page: Page, formula: string): Promise<void> {
  const field = page.locator('.measure-field').getByRole('combobox');
  await page.keyboard.press('Alt+m');
  await expect(field).toBeFocused();
  await page.keyboard.type(formula);
  await page.keyboard.press('Enter');
  await expect(field).toHaveCount(0);
  await settle(page);
}

/** Sends the mailing on the page, waits until all of it has gone, and tells to how many. */
async function send(page: Page): Promise<number> {
  await page.getByRole('button', { name: 'Prepare to send…' }).click();
  const button = page.getByRole('dialog').getByRole('button', { name: /^Send to \d+ people$/ });
  const many = Number((await button.textContent())?.match(/\d+/)?.[0]);
  await button.click();
  await expect(page.getByRole('heading', { name: `Done: ${many} of ${many} accepted` })).toBeVisible({
    timeout: 30_000,
  });
  return many;
}
