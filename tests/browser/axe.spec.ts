import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import type { AxeResults } from 'axe-core';
import { expect, test, type BrowserContext, type Page } from '@playwright/test';
import { letterTo } from './support/mailbox';
import { beSignedIn, type Role } from './support/signing-in';

const axe = readFileSync(createRequire(import.meta.url).resolve('axe-core/axe.min.js'), 'utf8');
const BOOK_BOX = '/projects/seed-keepers-book-box';

// A trace looks into frames that run no scripts, and the console tells of it.
test.use({ trace: 'off' });

interface Place {
  readonly name: string;
  readonly path: string | ((context: BrowserContext, baseURL: string) => Promise<string>);
  readonly as?: Role;
  /** Until this is there, the page is not finished. */
  readonly ready?: string;
  readonly status?: number;
  /** Looked at in dark, too. */
  readonly main?: boolean;
}
const ISLAND = 'astro-island:not([ssr])';
const projectOf = async (context: BrowserContext, stage: string): Promise<string> => {
  const { projects } = (await (await context.request.get('/api/projects')).json()) as {
    projects: { id: string; stage: { stage: string } }[];
  };
  return projects.find((project) => project.stage.stage === stage)!.id;
};

const PLACES: readonly Place[] = [
  { name: 'home', path: '/', main: true },
  { name: 'projects', path: '/projects', main: true },
  { name: 'a project', path: BOOK_BOX, ready: 'sizing-panel[data-ready]', main: true },
  { name: 'a project at a refused size', path: `${BOOK_BOX}?inside-width=40in`, ready: 'sizing-panel[data-ready]' },
  { name: 'its measurement sheet', path: `${BOOK_BOX}/sheet`, main: true },
  { name: 'the handbook', path: '/handbook' },
  { name: 'a guide', path: '/handbook/reading-a-measurement-sheet', main: true },
  { name: 'a box in the handbook', path: '/handbook/boxes/book-box', main: true },
  { name: 'a box with one piece, refused', path: '/handbook/boxes/tray?inside-length=40in' },
  { name: 'subscribe', path: '/subscribe' },
  { name: 'sign-in', path: '/sign-in' },
  { name: 'sign-up', path: '/sign-up' },
  { name: 'a page that is not there', path: '/projects/no-such-box', status: 404 },
  { name: 'account', path: '/account', as: 'reader' },
  { name: 'the workroom', path: '/workroom', as: 'author', ready: ISLAND, main: true },
  {
    name: 'a desk',
    path: async (context) => `/workroom/${await projectOf(context, 'draft')}`,
    as: 'author',
    ready: '.desk .ProseMirror',
    main: true,
  },
  {
    name: 'the mailing page',
    path: async (context) => `/workroom/${await projectOf(context, 'published')}/mailing`,
    as: 'author',
    ready: ISLAND,
    main: true,
  },
  { name: 'admin', path: '/admin', as: 'admin' },
  { name: 'the mailbox', path: '/dev/mailbox', as: 'author' },
  {
    name: 'a mail in the mailbox',
    as: 'author',
    path: async (context, baseURL) => {
      const email = `axe.${Date.now().toString(36)}@visitors.example`;
      await context.request.post('/api/subscribe', { headers: { origin: baseURL }, data: { email, units: 'in' } });
      await letterTo(email, 'Confirm');
      const page = await context.newPage();
      await page.goto('/dev/mailbox');
      const path = await page.locator('main a[href^="/dev/mailbox/"]').first().getAttribute('href');
      await page.close();
      return path!;
    },
  },
];

async function open(page: Page, place: Place, baseURL: string): Promise<void> {
  if (place.as) await beSignedIn(page.context(), place.as);
  const path = typeof place.path === 'string' ? place.path : await place.path(page.context(), baseURL);
  const response = await page.goto(path);
  expect(response?.status()).toBe(place.status ?? 200);
  if (place.ready) await page.locator(place.ready).first().waitFor({ state: 'attached', timeout: 30_000 });
}

test.describe('axe finds nothing serious', () => {
  // The pages' own policy would keep axe out.
  test.use({ bypassCSP: true, contextOptions: { reducedMotion: 'reduce' } });

  for (const place of PLACES) {
    test(`on ${place.name}`, async ({ page, baseURL }) => {
      await open(page, place, baseURL!);
      await page.addScriptTag({ content: axe });
      for (const colorScheme of place.main ? (['light', 'dark'] as const) : (['light'] as const)) {
        await page.emulateMedia({ colorScheme });
        // Colours that are on their way to the other theme are neither one's.
        await page.evaluate(() =>
          Promise.all(document.getAnimations().map(({ finished }) => finished.catch(() => null))),
        );
        const found = await page.evaluate(async () => {
          const { axe } = window as unknown as { axe: { run(options: object): Promise<AxeResults> } };
          const { violations } = await axe.run({ resultTypes: ['violations'], iframes: false });
          return violations
            .filter(({ impact }) => impact === 'serious' || impact === 'critical')
            .flatMap(({ id, nodes }) =>
              nodes.map((node) => `${id}: ${node.target.join(' ')} (${node.failureSummary ?? ''})`),
            );
        });
        expect.soft(found, `${place.name} in ${colorScheme}`).toEqual([]);
      }
    });
  }
});

test.describe('at 360 px, with the pages’ own policy in force,', () => {
  test.use({ viewport: { width: 360, height: 740 } });

  for (const place of PLACES) {
    test(`nothing is refused, fails or is wider than the window: ${place.name}`, async ({ page, baseURL }) => {
      // What the policy refuses is told on the console, too.
      const troubles: string[] = [];
      const isItself = (url: string) => place.status !== undefined && url === page.url();
      page.on('console', (message) => {
        if (message.type() === 'error' && !isItself(message.location().url)) troubles.push(message.text());
      });
      page.on('pageerror', (error) => troubles.push(error.message));
      await open(page, place, baseURL!);
      await page.waitForLoadState('networkidle');
      expect(troubles).toEqual([]);
      const width = await page.evaluate(() => {
        const widest = [...document.querySelectorAll('main *')]
          .filter((element) => element.getBoundingClientRect().right > document.documentElement.clientWidth + 1)
          .slice(0, 3)
          .map((element) => `${element.tagName}.${element.getAttribute('class') ?? ''}`);
        return { scroll: document.documentElement.scrollWidth, widest };
      });
      expect(width.scroll, `wider: ${width.widest.join(', ')}`).toBeLessThanOrEqual(360);
    });
  }
});
