import { expect, test } from '@playwright/test';
import { panelReady, sizeField } from './support/reader-page';
import { beSignedIn } from './support/signing-in';

// A trace would be timed with it.
test.use({ actionTimeout: 15_000, trace: 'off' });

test('two hundred live measures follow a change', async ({ browser, baseURL, page }) => {
  const FIGURES = 200;
  const author = await browser.newContext({ baseURL });
  await beSignedIn(author, 'author');
  const headers = { origin: baseURL! };
  const made = await author.request.post('/api/projects', {
    headers,
    data: { pattern: 'book-box', title: 'Two hundred figures' },
  });
  const { id } = (await made.json()) as { id: string };
  const opened = await author.request.get(`/api/projects/${id}`);
  const { state, revision } = (await opened.json()) as { state: Record<string, unknown>; revision: number };
  // No two formulas alike, so that each is worked out for itself.
  const measures = Array.from({ length: FIGURES }, (_, n) => [
    { type: 'measure', attrs: { formula: `inside width + ${n} mm`, bare: false } },
    { type: 'text', text: ' ' },
  ]).flat();
  const content = [
    { type: 'step', attrs: { title: 'Many', mark: '' }, content: [{ type: 'paragraph', content: measures }] },
  ];
  const saved = await author.request.put(`/api/projects/${id}`, {
    headers: { ...headers, 'if-match': `"${revision}"` },
    data: { ...state, writeUp: { version: 1, doc: { type: 'doc', content } } },
  });
  expect(saved.status(), await saved.text()).toBe(200);
  const published = await author.request.post(`/api/projects/${id}/publish`, {
    headers,
    data: { revision: ((await saved.json()) as { revision: number }).revision },
  });
  expect(published.status(), await published.text()).toBe(201);
  const { slug } = (await published.json()) as { slug: string };
  await author.close();

  await page.goto(`/projects/${slug}?units=mm`);
  await panelReady(page);
  const figures = page.locator('[data-reader] [data-live]');
  await expect(figures).toHaveCount(FIGURES);
  const widths = Array.from({ length: 15 }, (_, n) => 151 + n);
  const times = await sizeField(page, 'inside width').evaluate(async (element, sizes) => {
    const field = element as HTMLInputElement;
    const taken: number[] = [];
    for (const size of sizes) {
      const from = performance.now();
      field.value = `${size} mm`;
      field.dispatchEvent(new Event('input', { bubbles: true }));
      // A message that is sent in a frame arrives when that frame has been laid out and painted.
      await new Promise<void>((painted) => {
        requestAnimationFrame(() => {
          const { port1, port2 } = new MessageChannel();
          port1.onmessage = () => painted();
          port2.postMessage(null);
        });
      });
      taken.push(performance.now() - from);
    }
    return taken;
  }, widths);
  await expect(figures.first()).toContainText('165\u00a0mm');
  await expect(figures.last()).toContainText(`${165 + FIGURES - 1}\u00a0mm`);
  const sorted = [...times].sort((a, b) => a - b);
  const middle = sorted[Math.floor(sorted.length / 2)]!;
  console.log(
    `From change to repaint with ${FIGURES} figures: ${middle.toFixed(0)} ms in the middle, ${sorted.at(-1)!.toFixed(0)} ms at most`,
  );
});
