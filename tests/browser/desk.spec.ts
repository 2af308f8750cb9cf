import { expect, test as base, type BrowserContext, type Page } from '@playwright/test';
import { DEMO_PEOPLE } from '../../src/features/demo/people';

type Cookies = Awaited<ReturnType<BrowserContext['cookies']>>;
let signedIn: Cookies | undefined;

/** A context signed in as the demo's author, and a fresh project from `tray`. */
const test = base.extend<{ id: string }>({
  id: async ({ context, page, baseURL }, use) => {
    const author = DEMO_PEOPLE.find(({ role }) => role === 'author')!;
    if (signedIn) await context.addCookies(signedIn);
    else {
      await page.goto('/sign-in?to=/workroom');
      const form = page.locator('main form').first();
      await form.locator('input[name=email]').fill(author.email);
      await form.locator('input[name=password]').fill(author.password);
      await form.locator('input[name=password]').press('Enter');
      await page.waitForURL('**/workroom');
      signedIn = await context.cookies();
    }
    const made = await page.request.post('/api/projects', {
      data: { pattern: 'tray', title: 'Desk at work' },
      headers: { origin: baseURL! },
    });
    await use(((await made.json()) as { id: string }).id);
  },
});

async function openDesk(page: Page, id: string): Promise<void> {
  await page.goto(`/workroom/${id}`);
  await page.locator('.desk').waitFor({ timeout: 30_000 });
  await expect(saveWords(page)).toContainText('Saved');
}
const saveWords = (page: Page) => page.locator('.save-words');
const title = (page: Page) => page.getByLabel('Title of the project');
const revision = async (page: Page, n: number) =>
  expect(saveWords(page)).toHaveText(new RegExp(`Saved.*revision ${n}$`));
const titles = async (page: Page) =>
  ((await (await page.request.get('/api/projects')).json()) as { projects: { title: string }[] }).projects.map(
    (project) => project.title,
  );

test('a formula that does not read is told at its place, cured with one press, and saved as typed meanwhile', async ({
  page,
  id,
}) => {
  await page.setViewportSize({ width: 1440, height: 1000 });
  await openDesk(page, id);
  const formula = page.getByLabel('Formula of outside length');
  await formula.fill('inside lenght + 2 * card thickness');
  await expect(page.locator('.row-fault')).toContainText(
    'No measure is called “inside lenght”. The nearest name is “inside length”.',
  );
  await expect(page.locator('.formula-bad')).toHaveText('inside lenght');
  await expect(page.getByText('These are the last good figures')).toBeVisible();
  await expect(page.getByRole('button', { name: /^Publish edition 1/ })).toHaveAttribute('aria-disabled', 'true');
  await revision(page, 2);
  await page.locator('.row-fault').getByRole('button', { name: 'Use inside length' }).click();
  await expect(formula).toHaveValue('inside length + 2 * card thickness');
  await expect(page.locator('.row-fault')).toHaveCount(0);
  await expect(page.getByRole('button', { name: /^Publish edition 1/ })).toHaveAttribute('aria-disabled', 'false');
});

test('selecting a measure lights what follows it in the list, the pieces and the text, and Escape puts it out', async ({
  page,
  id,
}) => {
  await page.setViewportSize({ width: 1440, height: 1000 });
  await openDesk(page, id);
  await page.getByRole('button', { name: 'inside height', exact: true }).click();
  await expect(page.locator('tr[data-measure="corner tab"]')).toHaveClass(/follows/);
  // The tray, and its layers, whose margin stops at a third of the height.
  await expect(page.locator('[data-column=pieces] .lit-count')).toContainText('3 of 3 lit');
  await expect(page.locator('[data-column=pieces] .dr-panel.lit').first()).toBeVisible();
  await expect(page.locator('[data-column=write-up] .lit-count')).toContainText(/\d+ places? lit/);
  await page.getByRole('button', { name: 'inside height', exact: true }).press('Escape');
  await expect(page.locator('.lit-count')).toHaveCount(0);
});

test('a measure is gone to by the first letters of its name, and a list says what the keys do', async ({
  page,
  id,
}) => {
  await page.setViewportSize({ width: 1440, height: 1000 });
  await openDesk(page, id);
  await page.keyboard.press('Alt+g');
  const dialog = page.getByRole('dialog', { name: 'Go to, or do' });
  await expect(dialog.getByRole('combobox')).toBeFocused();
  await page.keyboard.type('corner t');
  await expect(dialog.getByRole('option')).toHaveText([/^corner tab/]);
  await page.keyboard.press('Enter');
  await expect(dialog).toBeHidden();
  await expect(page.locator('tr[data-measure="corner tab"]')).toBeInViewport();
  await expect(page.locator('[data-column=pieces] .lit-count')).toBeVisible();
  await page.keyboard.press('Alt+k');
  await expect(page.getByRole('dialog', { name: 'Keys' })).toContainText('Alt G');
});

test('a size typed at the desk changes the drawing, is undone with Ctrl Z, and a senseless one says why', async ({
  page,
  id,
}) => {
  await page.setViewportSize({ width: 1440, height: 1000 });
  await openDesk(page, id);
  const blank = page.locator('.piece-facts');
  // The tray's blank is its floor and two walls: 9 + 2 × 1 1/4 by 6 + 2 × 1 1/4.
  await expect(blank).toContainText('11\u202f1\u20442 × 8\u202f1\u20442');
  await page.getByRole('button', { name: 'inside length', exact: true }).click();
  const size = page.getByLabel('inside length, the size shown first');
  await size.fill('8 in');
  await size.press('Enter');
  await expect(blank).toContainText('10\u202f1\u20442 × 8\u202f1\u20442');
  await size.fill('quite long');
  await size.press('Enter');
  await expect(page.locator('.size-slider [role=alert]')).toContainText('quite long');
  await page.keyboard.press('Control+z');
  await expect(blank).toContainText('11\u202f1\u20442 × 8\u202f1\u20442');
});

test('a measure that is renamed takes formulas, fits, pieces and the text along, and one undo brings all back', async ({
  page,
  id,
}) => {
  await page.setViewportSize({ width: 1440, height: 1000 });
  await openDesk(page, id);
  const live = (formula: string) => page.locator(`.ProseMirror .measure[title^="${formula}."]`);
  const stored = async () => {
    const project = (await (await page.request.get(`/api/projects/${id}`)).json()) as { state: object };
    return JSON.stringify(project.state);
  };
  const name = (called: string) => page.getByRole('button', { name: called, exact: true });
  await name('inside height').focus();
  await page.keyboard.press('F2');
  const field = page.getByLabel('New name for inside height');
  await expect(field).toBeFocused();

  await field.fill('Inside  Width');
  await field.press('Enter');
  await expect(page.locator('.measure-naming [role=alert]')).toHaveText(
    'There is a measure called “inside width” already. Choose another, or rename that one first.',
  );
  await expect(field).toHaveAttribute('aria-invalid', 'true');
  await field.press('Escape');
  await expect(name('inside height')).toBeFocused();

  await page.keyboard.press('F2');
  await field.fill('wall height');
  await field.press('Enter');
  await expect(name('wall height')).toBeFocused();
  // Two measures, the usual and the largest margin of layers, two columns, two rows and a finished size; the fit names it
  // as the measure to change.
  await expect(page.locator('.measure-naming')).toContainText('Renamed in 9 formulas, 1 fit and 1 step.');
  await expect(page.getByLabel('Formula of outside height')).toHaveValue('wall height + card thickness');
  await expect(page.getByLabel('Size of row near side')).toHaveValue('wall height');
  await expect(live('wall height')).toHaveCount(1);
  await revision(page, 2);
  expect(await stored()).not.toContain('inside height');

  await page.locator('.measure-naming').getByRole('button', { name: 'Undo' }).click();
  await expect(name('inside height')).toBeVisible();
  await expect(live('inside height')).toHaveCount(1);
  await revision(page, 3);
  expect(await stored()).not.toContain('wall height');
});

const clashes = (page: Page) => page.locator('.clashes');
const kept = async (page: Page, id: string) =>
  (
    (await (await page.request.get(`/api/projects/${id}/revisions`)).json()) as {
      revisions: { n: number; kind: string }[];
    }
  ).revisions.map(({ n, kind }) => [n, kind]);
/** How far the server is, and everything that it has. */
const stored = async (page: Page, id: string) => {
  const project = (await (await page.request.get(`/api/projects/${id}`)).json()) as { revision: number; state: object };
  return { revision: project.revision, words: JSON.stringify(project.state) };
};
const text = (page: Page) => page.locator('[data-column=write-up] .ProseMirror');
/** Types at the end of the first paragraph of a step. */
async function typeIn(page: Page, step: number, words: string): Promise<void> {
  await text(page)
    .locator('.step')
    .nth(step - 1)
    .locator('p')
    .first()
    .click();
  await page.waitForTimeout(80);
  await page.keyboard.press('End');
  await page.keyboard.type(words);
}

test('two tabs that change different things become one without a question, also after one was offline', async ({
  context,
  page: first,
  id,
}) => {
  await first.setViewportSize({ width: 1440, height: 1000 });
  const second = await context.newPage();
  await second.setViewportSize({ width: 1440, height: 1000 });
  await openDesk(first, id);
  await openDesk(second, id);
  await context.setOffline(true);
  await typeIn(first, 1, ' Typed in the first tab.');
  await title(second).fill('Named in the second tab');
  await typeIn(second, 2, ' Typed in the second tab.');
  await expect(saveWords(first)).toContainText('Not saved: The server cannot be reached');
  await expect(saveWords(second)).toContainText('Not saved: The server cannot be reached');
  await context.setOffline(false);
  for (const page of [first, second]) {
    await expect(saveWords(page)).toContainText('Saved', { timeout: 60_000 });
    await expect(text(page)).toContainText('Typed in the first tab.', { timeout: 30_000 });
    await expect(text(page)).toContainText('Typed in the second tab.');
    await expect(title(page)).toHaveValue('Named in the second tab');
    await expect(clashes(page)).toHaveCount(0);
  }
});

test('two tabs that change the same step are asked, one of them offline for a while, and nothing is lost', async ({
  context,
  page: first,
  id,
}) => {
  await first.setViewportSize({ width: 1440, height: 1000 });
  const second = await context.newPage();
  await second.setViewportSize({ width: 1440, height: 1000 });
  await openDesk(first, id);
  await openDesk(second, id);
  await second.route('**/api/projects/**', (route) => route.abort());
  await typeIn(second, 1, ' Offline words.');
  await expect(saveWords(second)).toContainText('Not saved: The server cannot be reached');
  await typeIn(first, 1, ' Other words.');
  await expect.poll(async () => (await stored(first, id)).words).toContain('Other words.');
  const { revision: theirs } = await stored(first, id);

  // The copy outlives the page: it is opened again with the connection back, and asks.
  await second.unroute('**/api/projects/**');
  await second.reload();
  await second.locator('.desk').waitFor({ timeout: 30_000 });
  await expect(clashes(second)).toContainText('Changed in two places.', { timeout: 30_000 });
  await expect(clashes(second)).toContainText('Offline words.');
  await expect(clashes(second)).toContainText('Other words.');
  await second.getByLabel('Both, mine first').check();
  await second.getByRole('button', { name: 'Put together' }).click();
  await revision(second, theirs + 1);
  await expect(text(second)).toContainText('Offline words.');
  await expect(text(second)).toContainText('Other words.');
  await expect(text(first)).toContainText('Offline words.', { timeout: 30_000 });
  expect((await kept(first, id)).slice(0, 2)).toEqual([
    [theirs + 1, 'merged'],
    [theirs, 'saved'],
  ]);
});

test('what gives way when the other version is taken stays among the revisions, and is restored from there', async ({
  context,
  page: first,
  id,
}) => {
  const second = await context.newPage();
  await openDesk(first, id);
  await openDesk(second, id);
  await second.route('**/api/projects/**', (route) => route.abort());
  await title(second).fill('Tray from the second tab');
  await title(first).fill('Tray from the first tab');
  await revision(first, 2);
  await second.unroute('**/api/projects/**');
  await expect(clashes(second)).toContainText('Changed in two places.', { timeout: 45_000 });
  await second.getByLabel('Take theirs').check();
  await second.getByRole('button', { name: 'Put together' }).click();
  await revision(second, 4);
  await expect(title(second)).toHaveValue('Tray from the first tab');
  expect((await kept(second, id))[1]).toEqual([3, 'set aside']);
  await second.close();

  await saveWords(first).click();
  await first.waitForURL('**/revisions');
  await first.getByRole('link', { name: 'Revision 3' }).click();
  await expect(first.locator('.change-words').first()).toContainText('first');
  await first.getByRole('button', { name: 'Restore revision 3' }).click();
  await expect(first.getByRole('status')).toContainText('Restored as revision 5.');
  expect(await titles(first)).toContain('Tray from the second tab');
});

test('a draft link shows the draft to whoever has it, at any size, until it is stopped', async ({
  browser,
  baseURL,
  page,
  id,
}) => {
  await openDesk(page, id);
  await page.getByRole('button', { name: 'People' }).click();
  await page.getByLabel('For whom').fill('Odo');
  await page.getByRole('button', { name: 'Make a draft link' }).click();
  const link = new URL(await page.getByLabel('The new draft link').inputValue()).pathname;

  const stranger = await browser.newContext({ baseURL: baseURL! });
  const reader = await stranger.newPage();
  const opened = await reader.goto(link);
  expect(opened!.headers()).toMatchObject({
    'x-robots-tag': 'noindex, nofollow, noarchive',
    'referrer-policy': 'no-referrer',
    'cache-control': 'private, no-store',
  });
  await expect(reader.getByRole('heading', { name: 'Desk at work' })).toBeVisible();
  await reader.getByLabel('How long is what goes in?').fill('200 mm');
  await reader.getByLabel('Units').selectOption('mm');
  await reader.getByRole('button', { name: 'Work it out' }).click();
  // 200 long and two walls of 1 1/4 in: 200 + 2 × 31.75 = 263.5.
  await expect(reader.locator('.article')).toContainText(/26[34]/);
  expect(await reader.request.put(`/api/projects/${id}`, { data: {} }).then((r) => r.status())).not.toBe(200);

  await page.getByRole('button', { name: 'Stop this link' }).click();
  await expect(page.getByText('stopped')).toBeVisible();
  expect((await reader.goto(link))!.status()).toBe(404);
  await stranger.close();
});

test('what was typed without a connection is said to be unsaved, and is there when the page is opened again', async ({
  context,
  page,
  id,
}) => {
  await openDesk(page, id);
  await context.setOffline(true);
  await title(page).fill('Typed without a connection');
  await expect(saveWords(page)).toContainText('Not saved: The server cannot be reached');
  await page.close();
  await context.setOffline(false);
  const again = await context.newPage();
  await again.goto(`/workroom/${id}`);
  await expect(title(again)).toHaveValue('Typed without a connection', { timeout: 30_000 });
  await expect(again.getByRole('status').filter({ hasText: 'has been brought back' })).toBeVisible();
  await revision(again, 2);
});

test('the workroom finds a project from the keyboard, deletes it, and brings it back', async ({ page, id: _made }) => {
  await page.goto('/workroom');
  await page.locator('astro-island:not([ssr])').first().waitFor();
  await page.keyboard.press('/');
  await page.keyboard.type('desk at');
  const row = page.locator('.project-row').first();
  await expect(row).toContainText('Desk at work');
  const before = await page.locator('.project-row').count();
  await row.getByRole('button', { name: 'Delete Desk at work' }).click();
  await expect(page.getByRole('button', { name: 'Undo' })).toBeFocused();
  await expect(page.locator('.project-row')).toHaveCount(before - 1);
  await page.keyboard.press('Enter');
  await expect(page.locator('.project-row')).toHaveCount(before);
  await expect(page.getByText('“Desk at work” is deleted.')).toHaveCount(0);
});
