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

test('another tab’s save is never overwritten, and both versions are kept whichever is chosen', async ({
  context,
  page: first,
  id,
}) => {
  const second = await context.newPage();
  await openDesk(first, id);
  await openDesk(second, id);
  await title(first).fill('Tray from the first tab');
  await revision(first, 2);

  await title(second).fill('Tray from the second tab');
  await expect(second.getByRole('alert')).toContainText('Changed in another place. Revision 2 was saved');
  await second.reload();
  await expect(title(second)).toHaveValue('Tray from the second tab');
  await second.getByRole('button', { name: 'Keep mine as a new revision' }).click();
  await revision(second, 3);
  expect(await titles(first)).toEqual(
    expect.arrayContaining(['Tray from the second tab', 'Tray from the first tab (from the other tab)']),
  );

  await title(first).fill('Tray from the first tab, later');
  await first.getByRole('button', { name: 'Take the other' }).click();
  await expect(title(first)).toHaveValue('Tray from the second tab');
  await revision(first, 3);
  expect(await titles(first)).toEqual(
    expect.arrayContaining(['Tray from the second tab', 'Tray from the first tab, later (from this tab)']),
  );
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
