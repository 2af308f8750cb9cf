import { readFileSync } from 'node:fs';
import { beforeAll, describe, expect, it } from 'vitest';
import { compilePattern, usualSizing, type Pattern } from '@/engine';
import type { Edition } from '@/features/editions/editions.server';
import { compileMailing, MOST_BYTES, type CompiledMailing } from '@/features/mailing/compose/compile.server';
import { fillCopy, type Recipient } from '@/features/mailing/compose/fill-copy';
import { greet } from '@/features/mailing/compose/greeting';
import { fillSlots, slot, withoutSlots } from '@/features/mailing/compose/slots';
import { letterHtml } from '@/features/mailing/letter-html';

const pattern = JSON.parse(readFileSync('content/patterns/book-box.json', 'utf8')) as Pattern;
const model = compilePattern(pattern);
if (!model.ok) throw new Error('the book box does not compile');
const usual = usualSizing(model.value);

const edition: Edition = {
  id: 'e2',
  projectId: 'p',
  slug: 'seed-keepers-book-box',
  n: 2,
  newest: 2,
  title: 'Seed keeper’s <book> box',
  summary: 'A box.',
  minutes: 120,
  pattern,
  // The book box is usually 228.6 × 152.4 × 57.15 mm inside.
  sizing: { ...usual, units: 'in', grid: '1/16in' },
  writeUp: {
    version: 1,
    doc: {
      type: 'doc',
      content: [
        {
          type: 'step',
          attrs: { title: 'Cut', mark: '' },
          content: [
            { type: 'photo', attrs: { upload: 'u1', alt: 'A "closed" book & its box', width: 1600, height: 1000 } },
          ],
        },
      ],
    },
  },
  hero: { id: 'u1', width: 1600, height: 1000 },
  author: { id: 'ines', name: 'Ines Thornbury' },
  correctionNote: 'Step 4 said 7/8.\nIt should be 1 in & no more.',
  publishedAt: new Date(Date.UTC(2026, 2, 3)),
};
const words = { greeting: 'Hello [name],', excerpt: 'First <words> & more.\n\nSecond paragraph.', withHero: true };
const wenna: Recipient = {
  address: "o'wenna&co@mail.example",
  name: '<i>Wenna</i>',
  units: 'in',
  leaveToken: 'tok+en',
  confirmedAt: Date.UTC(2026, 1, 2),
};
let mail: CompiledMailing;
const copy = (who: Partial<Recipient> = {}) =>
  fillCopy({ ...mail, greeting: words.greeting, siteUrl: 'http://localhost:4321' }, { ...wenna, ...who });

beforeAll(async () => {
  mail = await compileMailing(edition, words);
});

describe('a mailing', () => {
  it('says the finished size in the subscriber’s units, in both parts, and its link carries them', () => {
    const sizes = { in: /9 × 6 × 2 1\/4 in/, mm: /229 × 152 × 57 mm/, cm: /22\.9 × 15\.2 × 5\.7 cm/ };
    for (const units of ['in', 'mm', 'cm'] as const) {
      const { html, text } = copy({ units });
      const shown = html.replace(/<[^>]*>/g, '').replaceAll('\u00a0', ' ');
      expect(text).toMatch(sizes[units]);
      expect(shown).toMatch(sizes[units]);
      expect(text).toContain(`http://localhost:4321/projects/seed-keepers-book-box?units=${units}\n`);
      expect(html).toContain(`href="http://localhost:4321/projects/seed-keepers-book-box?units=${units}"`);
    }
  });

  it('writes fractions with a plain slash', () => {
    const { html, text } = copy();
    expect(`${html}${text}`).not.toMatch(/[\u2044\u202f]/);
  });

  it('escapes what was typed where it stands', () => {
    const { html, text } = copy();
    expect(html).toContain('Hello &lt;i&gt;Wenna&lt;/i&gt;,');
    expect(html).toContain('First &lt;words&gt; &amp; more.');
    expect(html).toContain('o&#39;wenna&amp;co@mail.example');
    expect(html).toContain('alt="A &quot;closed&quot; book &amp; its box"');
    expect(html).not.toMatch(/<i>|<words>|<book>/);
    expect(text).toContain('Hello <i>Wenna</i>,');
    expect(text).toContain("o'wenna&co@mail.example");
  });

  it('has pictures only as whole addresses of JPEGs, with size and words', () => {
    const images = copy().html.match(/<img[^>]*>/g) ?? [];
    expect(images).toHaveLength(1);
    expect(images[0]).toContain('src="http://localhost:4321/media/u1.jpg"');
    // 1000 of 1600 in a column of 536: 335.
    expect(images[0]).toMatch(/width="536"/);
    expect(images[0]).toMatch(/height="335"/);
    expect(images[0]).toMatch(/alt="[^"]+"/);
  });

  it('links to pages of the site alone, as they are', () => {
    const links = [...copy().html.matchAll(/href="([^"]*)"/g)].map(([, href]) => href);
    expect(new Set(links)).toEqual(
      new Set([
        'http://localhost:4321/projects/seed-keepers-book-box?units=in',
        'http://localhost:4321/unsubscribe?t=tok%2Ben',
        'http://localhost:4321/subscribe/preferences?t=tok%2Ben',
      ]),
    );
  });

  it('has the correction note from the second edition on, and the picture when it is wanted', async () => {
    expect(copy().text).toContain('IF YOU HAVE CUT EDITION 1');
    const first = await compileMailing({ ...edition, n: 1 }, { ...words, withHero: false });
    expect(first.text).not.toContain('IF YOU HAVE CUT');
    expect(first.html).not.toContain('<img');
    expect(first.text).not.toContain('[Picture');
  });

  it('reads as plain text', () => {
    expect(copy().text).toBe(`FOLDWRIGHT
http://localhost:4321/projects/seed-keepers-book-box?units=in

SEED KEEPER’S <BOOK> BOX
========================

Hello <i>Wenna</i>,

First <words> & more.

Second paragraph.

[Picture: A "closed" book & its box]

- - - - - - - - - - - - - - - - - - - - - - - - - - - - -

IF YOU HAVE CUT EDITION 1
=========================

Step 4 said 7/8.
It should be 1 in & no more.

- - - - - - - - - - - - - - - - - - - - - - - - - - - - -

  Finished, inside    9 × 6 × 2 1/4 in
  Finished, outside   ${outside()}
  To cut              ${pieces()}
  Time                about two hours

Make it at your size:
http://localhost:4321/projects/seed-keepers-book-box?units=in

- - - - - - - - - - - - - - - - - - - - - - - - - - - - -

You get this because you confirmed o'wenna&co@mail.example on
2 February 2026. We count nothing: no pixels, no rewritten
links.

Leave this list:
http://localhost:4321/unsubscribe?t=tok%2Ben
Change what you get:
http://localhost:4321/subscribe/preferences?t=tok%2Ben

Ines Thornbury, Quillet Lane Seed Circle, 3 Quillet Lane,
Marrow End
`);
  });
  // The engine's own tests hold these to their values; here only that both parts say the same.
  const outside = () => mail.unitParts.in.outsideText;
  const pieces = () => /(\d+ pieces)/.exec(mail.html)?.[1];

  it('weighs far less than what some mail programs cut off, and is heavier when it says more', async () => {
    expect(mail.bytes).toBeGreaterThan(Buffer.byteLength(copy().html) - 200);
    expect(mail.bytes).toBeLessThan(30_000);
    const long = await compileMailing(edition, { ...words, excerpt: 'x'.repeat(MOST_BYTES) });
    expect(long.bytes).toBeGreaterThan(MOST_BYTES);
  });

  it('leaves no slot open', () => {
    const { html, text } = copy();
    expect(`${html}${text}`).not.toMatch(/[\uE000\uE001]/);
    expect(() => fillSlots(`a ${slot('greeting')}`, {})).toThrow('no value for the slot "greeting"');
    expect(withoutSlots(`a${slot('address')}b`)).toBe('aaddressb');
  });
});

describe('a greeting', () => {
  it('names the person, or goes without', () => {
    expect(greet('Hello [name],', 'Wenna')).toBe('Hello Wenna,');
    expect(greet('Hello [name],', null)).toBe('Hello,');
    expect(greet('[name], hello', ' ')).toBe(', hello');
  });
  it('keeps a name on its line', () => {
    expect(greet('Hello [name],', 'Wenna\r\nBcc: x')).toBe('Hello Wenna Bcc: x,');
  });
});

describe('a letter', () => {
  it('as HTML says the same, with links that can be followed and nothing that was typed as markup', () => {
    const html = letterHtml('Hello <b>,\n\nhttps://boxes.example/a?b=1&c=2\n\nDone.');
    expect(html).toContain('Hello &lt;b&gt;,');
    expect(html).toContain('<a href="https://boxes.example/a?b=1&amp;c=2"');
  });
});
