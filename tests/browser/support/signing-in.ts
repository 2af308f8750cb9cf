import type { BrowserContext, Page } from '@playwright/test';
import { DEMO_PEOPLE } from '../../../src/features/demo/people';

export type Role = (typeof DEMO_PEOPLE)[number]['role'];
export const demoPerson = (role: Role) => DEMO_PEOPLE.find((person) => person.role === role)!;

/** Signs in by the form with a password and goes on to `to`. */
export async function signIn(
  page: Page,
  person: { readonly email: string; readonly password: string },
  to = '/account',
) {
  await page.goto(`/sign-in?to=${encodeURIComponent(to)}`);
  await page.getByLabel('E-mail address', { exact: true }).fill(person.email);
  await page.getByLabel('Password', { exact: true }).fill(person.password);
  await page.getByLabel('Password', { exact: true }).press('Enter');
  await page.waitForURL((url) => url.pathname === to);
}

type Cookies = Awaited<ReturnType<BrowserContext['cookies']>>;
const signedIn = new Map<Role, Cookies>();

/** Makes a context a demo person's; the form is filled in once for all tests of a run. */
export async function beSignedIn(context: BrowserContext, role: Role): Promise<void> {
  const known = signedIn.get(role);
  if (known) return void (await context.addCookies(known));
  const page = await context.newPage();
  await signIn(page, demoPerson(role));
  signedIn.set(role, await context.cookies());
  await page.close();
}
