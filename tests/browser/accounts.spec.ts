import { expect, test, type Page } from '@playwright/test';
import { letterTo, lettersTo, linkIn } from './support/mailbox';
import { beSignedIn, demoPerson, signIn } from './support/signing-in';

test.use({ actionTimeout: 15_000 });

/** An address that no other run has used. */
const fresh = (name: string) => `${name}.${Date.now().toString(36)}@visitors.example`;
const PASSWORD = 'violet-paper-harbour';

const account = (page: Page) => page.locator('.account-menu summary');

test('a password signs in, a wrong one does not and says so, and signing out ends it', async ({ page }) => {
  const author = demoPerson('author');
  await page.goto('/workroom');
  // Whoever is not signed in is sent to sign in, and then goes on.
  await expect(page).toHaveURL(/\/sign-in\?to=/);
  await page.getByLabel('E-mail address', { exact: true }).fill(author.email);
  await page.getByLabel('Password', { exact: true }).fill('not-the-password');
  await page.getByRole('button', { name: 'Sign in', exact: true }).first().click();
  await expect(page.locator('main [role=alert], main .problem, main .error').first()).toBeVisible();
  await expect(page.getByLabel('E-mail address', { exact: true })).toHaveValue(author.email);
  await page.getByLabel('Password', { exact: true }).fill(author.password);
  await page.getByRole('button', { name: 'Sign in', exact: true }).first().click();
  await page.waitForURL('**/workroom');
  await expect(account(page)).toContainText(author.name);

  await account(page).click();
  await page
    .locator('.account-menu')
    .getByRole('button', { name: /sign out/i })
    .click();
  await page.waitForURL((url) => url.pathname === '/');
  await expect(page.locator('.site-account').getByRole('link', { name: 'Sign in' })).toBeVisible();
  await page.goto('/workroom');
  await expect(page).toHaveURL(/\/sign-in/);
});

test('a link in a letter signs in by its button, once, and reading it alone does nothing', async ({
  page,
  request,
}) => {
  const reader = demoPerson('reader');
  const before = (await lettersTo(reader.email)).length;
  await page.goto('/sign-in?to=/account');
  await page.getByLabel('E-mail address', { exact: true }).fill(reader.email);
  await page.getByRole('button', { name: 'Send me a sign-in link' }).click();
  await expect(page.getByRole('heading', { name: 'Look in your mail' })).toBeVisible();
  await expect.poll(async () => (await lettersTo(reader.email)).length, { timeout: 20_000 }).toBe(before + 1);
  const link = linkIn(await letterTo(reader.email, 'Your sign-in link'), '/sign-in/confirm');

  // A program that opens every link of a mail, twice.
  for (let n = 0; n < 2; n += 1) expect((await request.get(link)).status()).toBe(200);
  await page.goto(link);
  await page.getByRole('button', { name: 'Sign in', exact: true }).click();
  await page.waitForURL('**/account');
  await expect(account(page)).toContainText(reader.name);

  const again = await page.context().browser()!.newContext();
  const second = await again.newPage();
  await second.goto(link);
  await second.getByRole('button', { name: 'Sign in', exact: true }).click();
  await expect(second.getByRole('heading', { name: 'This link does not work' })).toBeVisible();
  await again.close();
});

for (const javaScriptEnabled of [true, false]) {
  const how = javaScriptEnabled ? 'with JavaScript' : 'without JavaScript';
  test(`whoever signs up is a reader, the workroom is not for them, and an admin's change counts at their next page (${how})`, async ({
    browser,
    baseURL,
  }) => {
    const email = fresh(javaScriptEnabled ? 'mira' : 'tove');
    const name = javaScriptEnabled ? 'Mira Oakhanger' : 'Tove Linnet';
    const theirs = await browser.newContext({ baseURL, javaScriptEnabled });
    const page = await theirs.newPage();
    await page.goto('/sign-up');
    await page.getByLabel('Name', { exact: true }).fill(name);
    await page.getByLabel('E-mail address', { exact: true }).fill(email);
    await page.getByLabel('Password', { exact: true }).fill(PASSWORD);
    await page.getByRole('button', { name: 'Sign up' }).click();
    await expect(page.getByRole('heading', { name: 'Look in your mail' })).toBeVisible();
    await page.goto(linkIn(await letterTo(email, 'Confirm your Foldwright account'), '/sign-up/confirm'));
    await expect(page.locator('main')).toContainText(email);
    await page.getByRole('button', { name: 'Make my account' }).click();
    await expect(account(page)).toContainText(name);

    const refused = await page.goto('/workroom');
    expect(refused?.status()).toBe(403);
    await expect(page.getByRole('heading', { name: 'This part is not yours' })).toBeVisible();
    expect((await page.request.get('/api/projects')).status()).toBe(403);
    expect((await page.goto('/admin'))?.status()).toBe(403);

    const admins = await browser.newContext({ baseURL, javaScriptEnabled });
    await beSignedIn(admins, 'admin');
    const admin = await admins.newPage();
    const setRole = async (role: string) => {
      await admin.goto(`/admin?search=${encodeURIComponent(email)}`);
      await admin.getByLabel(`Role of ${name}`, { exact: true }).selectOption(role);
      const answered = admin.waitForResponse((response) => response.request().method() !== 'GET');
      await admin.getByRole('button', { name: `Set role of ${name}` }).click();
      expect((await answered).status()).toBeLessThan(400);
    };
    await setRole('author');
    expect((await page.goto('/workroom'))?.status()).toBe(200);
    await expect(page.getByRole('heading', { name: 'Workroom' })).toBeVisible();
    await setRole('reader');
    expect((await page.goto('/workroom'))?.status()).toBe(403);
    expect((await page.request.get('/api/projects')).status()).toBe(403);

    await admin.goto(`/admin?search=${encodeURIComponent(email)}`);
    const answered = admin.waitForResponse((response) => response.request().method() !== 'GET');
    await admin.getByRole('button', { name: `Disable ${name}` }).click();
    expect((await answered).status()).toBeLessThan(400);
    await page.goto('/account');
    await expect(page).toHaveURL(/\/sign-in/);
    await admins.close();
    await theirs.close();
  });
}

test('the sign-in form works without JavaScript', async ({ browser, baseURL }) => {
  const context = await browser.newContext({ baseURL, javaScriptEnabled: false });
  const page = await context.newPage();
  await signIn(page, demoPerson('reader'));
  await expect(account(page)).toContainText(demoPerson('reader').name);
  await page.goto('/sign-out');
  await page.getByRole('main').getByRole('button', { name: 'Sign out' }).click();
  await expect(page.locator('.site-account').getByRole('link', { name: 'Sign in' })).toBeVisible();
  await context.close();
});
