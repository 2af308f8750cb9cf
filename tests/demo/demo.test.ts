import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { openDatabase, useDatabase } from '@/db/client.server';
import { migrateDatabase } from '@/db/migrate.server';
import { db } from '@/db/client.server';
import {
  attempts,
  deliveries,
  editions,
  letters,
  mailings,
  projects,
  settings,
  subscribers,
  suppressions,
  users,
} from '@/db/schema';
import {
  compileLive,
  compilePattern,
  evaluate,
  showValue,
  type ChoiceDef,
  type Figures,
  type Model,
  type Pattern,
  type Sizing,
} from '@/engine';
import { passwordFits } from '@/features/accounts/passwords.server';
import { DEMO_PEOPLE } from '@/features/demo/people';
import { seedDemo } from '@/features/demo/seed.server';
import { getEdition, type Edition } from '@/features/editions/editions.server';
import { getPattern } from '@/features/patterns/patterns.server';
import { proofList } from '@/features/projects/proof';
import type { BlockNode, InlineNode, PhotoNode } from '@/writeup/document';
import { readWriteUp } from '@/writeup/read-write-up';
import { collectUses } from '@/writeup/uses';

const NOW = Date.UTC(2031, 4, 20, 12);
const DAY = 24 * 60 * 60_000;
const SLUGS = [
  'seed-keepers-book-box',
  'swap-day-box',
  'packet-sleeve-with-a-drawer',
  'pillow-for-a-handful-of-beans',
  'twine-drum',
  'honeycomb-box',
  'chest-for-four-seasons',
  'bulb-carton-with-a-roof',
  'frame-for-a-pressed-flower',
];

// Filled once: drawing and encoding its pictures takes seconds.
let database: ReturnType<typeof openDatabase>;
beforeAll(async () => {
  database = openDatabase(':memory:');
  migrateDatabase(database);
  useDatabase(database);
  await seedDemo(NOW);
}, 120_000);
afterAll(() => {
  useDatabase(undefined);
  database.$client.close();
});

function published(slug: string, n?: number): Edition {
  const edition = getEdition(slug, n);
  if (!edition) throw new Error(`${slug} is not published`);
  return edition;
}
const CORRECTED = ['swap-day-box', 'chest-for-four-seasons'];
const all = () => [...SLUGS.map((slug) => published(slug)), ...CORRECTED.map((slug) => published(slug, 1))];
const each = (check: (edition: Edition) => void) => all().forEach(check);

function modelOf(pattern: Pattern): Model {
  const compiled = compilePattern(pattern);
  if (!compiled.ok) throw new Error(JSON.stringify(compiled.faults));
  return compiled.value;
}

describe('what the demo holds', () => {
  it('has one person of each role, with the passwords that are shown', async () => {
    const people = db.select().from(users).all();
    expect(people.map(({ role }) => role).sort()).toEqual(['admin', 'author', 'reader']);
    for (const { email, password } of DEMO_PEOPLE) {
      const person = people.find((one) => one.email === email);
      expect(await passwordFits(person?.passwordHash, password), email).toBe(true);
    }
  });
  it('has nine published projects in eleven editions, and a draft', () => {
    const rows = db.select().from(projects).all();
    expect(rows).toHaveLength(10);
    expect(
      rows
        .filter(({ publishedRevision }) => publishedRevision !== null)
        .map(({ slug }) => slug)
        .sort(),
    ).toEqual([...SLUGS].sort());
    expect(db.select().from(editions).all()).toHaveLength(11);
  });
  it('is marked as the demo', () => {
    expect(
      db
        .select()
        .from(settings)
        .all()
        .map(({ key }) => key),
    ).toContain('demo');
  });
  it('has 25 subscribers: 22 on the list in every unit, 2 who have not confirmed, 1 who left', () => {
    const rows = db.select().from(subscribers).all();
    const count = (state: string) => rows.filter((row) => row.state === state).length;
    expect([rows.length, count('confirmed'), count('pending'), count('left')]).toEqual([25, 22, 2, 1]);
    expect(new Set(rows.map(({ units }) => units))).toEqual(new Set(['in', 'mm', 'cm']));
    expect(rows.every(({ email }) => email.endsWith('.example'))).toBe(true);
  });
  it('spreads its editions over the weeks before', () => {
    const days = all().map(({ publishedAt }) => (NOW - publishedAt.getTime()) / DAY);
    expect(days).toEqual([4, 9, 38, 54, 46, 41, 15, 27, 12, 24, 32]);
  });
  it('says what edition 2 of the swap-day box corrected', () => {
    expect(published('swap-day-box').n).toBe(2);
    expect(published('swap-day-box').correctionNote).toMatch(/cut a new blank/);
    const formulas = (n: number) =>
      collectUses(published('swap-day-box', n).writeUp.doc)
        .formulas.filter(({ step }) => step === 7)
        .map(({ formula }) => formula);
    expect(formulas(1).slice(0, 3)).toEqual(['lid.across', 'lid.along', 'inside height']);
    expect(formulas(2).slice(0, 3)).toEqual(['lid.across', 'lid.along', 'lid height']);
  });
});

describe('the correction of the chest', () => {
  it('gives the shelves legs as tall as a drawer’s place, in the step that its note names', () => {
    const edition = published('chest-for-four-seasons');
    expect(edition.n).toBe(2);
    expect(edition.correctionNote).toMatch(/^Step 8 told you to score the shelves’ legs/);
    const formulas = (n: number) =>
      collectUses(published(edition.slug, n).writeUp.doc)
        .formulas.filter(({ step }) => step === 8)
        .map(({ formula }) => formula);
    expect(formulas(1)[3]).toBe('drawer outside height');
    expect(formulas(2)[3]).toBe('cell height');
  });
});

describe('the mailing that was sent', () => {
  it('is done: 20 copies accepted, one of them at the second try, and one refused', () => {
    const [mailing] = db.select().from(mailings).all();
    const copies = db.select().from(deliveries).all();
    expect(mailing).toMatchObject({ state: 'done', edition: 1, total: 21 });
    expect(copies.filter(({ state }) => state === 'accepted')).toHaveLength(20);
    expect(copies.filter(({ state, attempts: tries }) => state === 'accepted' && tries === 2)).toHaveLength(1);
    expect(copies.filter(({ state }) => state === 'rejected')).toMatchObject([{ code: 550, enhanced: '5.1.1' }]);
    expect(db.select().from(attempts).all()).toHaveLength(22);
    expect(db.select().from(suppressions).all()).toMatchObject([
      { emailKey: 'pascoe@marrowend.example', reason: 'hard' },
    ]);
  });
  it('went out after the edition, within minutes', () => {
    const [mailing] = db.select().from(mailings).all();
    const out = published('seed-keepers-book-box').publishedAt.getTime();
    const times = db
      .select()
      .from(deliveries)
      .all()
      .flatMap(({ acceptedAt }) => acceptedAt?.getTime() ?? []);
    expect(Math.min(...times)).toBeGreaterThan(out);
    expect(mailing?.finishedAt?.getTime()).toBe(Math.max(...times));
    expect(Math.max(...times) - Math.min(...times)).toBeLessThan(10 * 60_000);
  });
  it('has both parts as compiled for an edition, with sizes in every unit', () => {
    const [mailing] = db.select().from(mailings).all();
    expect(mailing?.html).toContain('<html');
    expect(mailing?.text).toContain('Make it at your size');
    expect(JSON.stringify(mailing?.unitParts?.in)).toContain('2 1/4');
    expect(JSON.stringify(mailing?.unitParts?.cm)).toMatch(/\d cm/);
  });
  it('leaves nothing to be sent when the site starts', () => {
    expect(db.select().from(letters).all()).toEqual([]);
    expect(
      db
        .select()
        .from(deliveries)
        .all()
        .filter(({ state }) => ['queued', 'leased', 'in_flight', 'unknown'].includes(state)),
    ).toEqual([]);
  });
});

describe('the write-ups', () => {
  it('make a box in eight steps or more', () => {
    each(({ title, writeUp }) => expect(collectUses(writeUp.doc).steps, title).toBeGreaterThanOrEqual(8));
  });
  it('leave the patterns and their ranges as they are', () => {
    each(({ pattern, title }) => expect(pattern, title).toEqual(getPattern(pattern.slug)));
  });
  it('pass the proof list with nothing left to mend: steps that words alone tell are a matter of taste', () => {
    each((edition) =>
      expect(
        proofList(edition).filter(({ code }) => code !== 'no picture'),
        edition.title,
      ).toEqual([]),
    );
  });
  it('are read back by the server’s own schema without a change', () => {
    each(({ title, writeUp }) => {
      const read = readWriteUp(JSON.parse(JSON.stringify(writeUp)));
      expect(read.ok && read.value.doc, title).toEqual(writeUp.doc);
    });
  });
  it('use every piece that is made without decorative layers in a step', () => {
    each(({ title, pattern, writeUp }) => {
      const used = collectUses(writeUp.doc)
        .pieces.filter(({ step }) => step !== null)
        .map(({ piece }) => piece);
      const bare = pattern.pieces.filter(({ when = '' }) => !when.includes('layers is'));
      expect(new Set(used), title).toEqual(new Set(bare.map(({ name }) => name)));
    });
  });
  it('have a cut list, materials, and cautions about blades, children and food', () => {
    for (const slug of SLUGS) {
      const { doc } = published(slug).writeUp;
      const uses = collectUses(doc);
      expect([uses.cutLists.length, uses.materials.length], slug).toEqual([1, 1]);
      const cautions = blocksOf(doc.content)
        .filter(({ type }) => type === 'caution')
        .map((node) => textOf(node))
        .join(' ');
      for (const word of [/trimmer/i, /child/, /maker/]) expect(cautions, slug).toMatch(word);
    }
    expect(textOf(published('seed-keepers-book-box').writeUp.doc)).toMatch(/food/);
  });
  it('have live measures that work out to something at every choice and at other sizes', () => {
    each(({ title, pattern, writeUp, sizing }) => {
      const model = modelOf(pattern);
      const formulas = [...new Set(collectUses(writeUp.doc).formulas.map(({ formula }) => formula))];
      for (const figures of figuresAtAll(model, sizing)) {
        const said = `${title} ${JSON.stringify(figures.sizing.choices)} ${JSON.stringify(figures.sizing.values)}`;
        for (const formula of formulas) expect(valueOf(model, formula, figures), `${formula}: ${said}`).not.toBeNull();
      }
    });
  });
  it('make boxes whose parts fit, at the author’s size, a quarter larger, a fifth smaller, in inches and millimetres', () => {
    each(({ title, pattern, sizing }) => {
      const model = modelOf(pattern);
      for (const figures of [1, 1.25, 0.8].flatMap((times) => resized(model, sizing, times))) {
        const failing = figures.fits.filter(({ holds, advice }) => !holds && !advice).map(({ name }) => name);
        const said = `${title} ${figures.sizing.units} ${JSON.stringify(figures.sizing.values)}`;
        expect([failing, figures.problems], said).toEqual([[], []]);
      }
    });
  });
  it('never say a size that does not follow: no typed inches, millimetres or fractions', () => {
    each(({ title, writeUp }) => {
      for (const text of textsOf(writeUp.doc.content)) {
        const rest = text.replace(/\d+(?: to \d+)? (?:g\/m²|lb cover|minutes)/g, '');
        expect(rest, `${title}: “${text}”`).not.toMatch(/\d|[¼½¾⅛⅜⅝⅞″]|\b(?:inch|inches|mm|cm|millimet|centimet)/i);
      }
    });
  });
  it('show the strip of the book box as 2 3/8 in at sixteenths', () => {
    const { pattern, sizing } = published('seed-keepers-book-box');
    const model = modelOf(pattern);
    // 2.25 in over a 4.5 in circle spans 2 asin(1/2) = 60°: an arc of 4.5 pi / 6 = 2.356 in.
    const value = valueOf(model, 'lower spine.strip', evaluate(model, sizing));
    expect(showValue(value ?? 0, 'length', { units: 'in', grid: '1/16in' }).text).toBe('2 3/8 in');
    const sizes = ['inside height', 'inside width', 'inside depth', 'circle', 'overhang'].map((name) =>
      valueOf(model, name, evaluate(model, sizing)),
    );
    expect(sizes).toEqual([228.6, 152.4, 57.15, 114.3, 6.35]);
  });
});

describe('the pictures', () => {
  it('stand first in 3 to 2, 1600 pixels wide', () => {
    for (const slug of SLUGS) {
      const { hero } = published(slug);
      expect(hero, slug).toMatchObject({ width: 1600 });
      expect((hero?.width ?? 0) / (hero?.height ?? 1), slug).toBeCloseTo(1.5, 2);
    }
  });
  it('are at least two a write-up, with words for those who cannot see them and captions that follow the size', () => {
    each(({ title, writeUp }) => {
      const photos = blocksOf(writeUp.doc.content).filter((node): node is PhotoNode => node.type === 'photo');
      expect(photos.length, title).toBeGreaterThanOrEqual(2);
      for (const { attrs, content } of photos) {
        expect(attrs.alt.length, attrs.alt).toBeGreaterThan(60);
        expect(attrs.alt).not.toMatch(/\d/);
        expect(
          (content ?? []).some(({ type }) => type === 'measure'),
          attrs.alt,
        ).toBe(true);
      }
    });
  });
});

describe('the draft', () => {
  it('is half written, and its proof list says what is missing', () => {
    const draft = db
      .select()
      .from(projects)
      .all()
      .find(({ title }) => title === 'Potting-bench packet tray');
    expect(draft?.publishedRevision).toBeNull();
    expect(
      draft
        ? proofList(draft)
            .map(({ code }) => code)
            .sort()
        : [],
    ).toEqual(['live measure', 'no alt text', 'no materials', 'no summary']);
  });
});

describe('filling', () => {
  it('leaves nothing behind when it breaks off', async () => {
    const other = openDatabase(':memory:');
    migrateDatabase(other);
    useDatabase(other);
    try {
      db.insert(users)
        .values({ id: 'x', email: 'wenna@quilletlane.example', emailKey: 'wenna@quilletlane.example' })
        .run();
      await expect(seedDemo(NOW)).rejects.toThrow('Somebody has an account with wenna@quilletlane.example.');
      expect(
        db
          .select()
          .from(users)
          .all()
          .map(({ id }) => id),
      ).toEqual(['x']);
      expect(db.select().from(settings).all()).toEqual([]);
    } finally {
      useDatabase(database);
      other.$client.close();
    }
  });
});

// ── Looking into a write-up ──────────────────────────────────────────────────────────────────────────────────────────

type Any = BlockNode | InlineNode | { readonly type: 'listItem' | 'doc'; readonly content: readonly BlockNode[] };
const inside = (node: Any): readonly Any[] => ('content' in node ? ((node.content ?? []) as readonly Any[]) : []);
const blocksOf = (nodes: readonly Any[]): Any[] => nodes.flatMap((node) => [node, ...blocksOf(inside(node))]);
const textOf = (node: Any): string => (node.type === 'text' ? node.text : inside(node).map(textOf).join(''));
/** Every text that is typed: text nodes, titles and marks of steps. */
const textsOf = (nodes: readonly Any[]): string[] =>
  blocksOf(nodes).flatMap((node) =>
    node.type === 'text' ? [node.text] : node.type === 'step' ? [node.attrs.title, node.attrs.mark] : [],
  );

function valueOf(model: Model, formula: string, figures: Figures): number | null {
  const live = compileLive(model, formula);
  if (!live.ok) throw new Error(`${formula} does not read`);
  return live.value.value(figures)?.cut ?? null;
}

/** Every length that is asked first, this many times as large; the finer points stay. */
function resized(model: Model, sizing: Sizing, times: number): Figures[] {
  const usual = evaluate(model, sizing);
  const asked = model.pattern.measures.flatMap(({ name, ask }) => (ask && !ask.finer ? [name] : []));
  const values = Object.fromEntries(
    usual.measures
      .filter(({ name, kind }) => kind === 'length' && asked.includes(name) && name in sizing.values)
      .map(({ name, exact }) => [name, exact * times]),
  );
  return [
    evaluate(model, { ...sizing, values: { ...sizing.values, ...values } }),
    evaluate(model, { ...sizing, values: { ...sizing.values, ...values }, units: 'mm', grid: '1mm' }),
  ];
}

/** At the author's size, a third larger and a fifth smaller, in inches and millimetres, with every choice. */
function figuresAtAll(model: Model, sizing: Sizing): Figures[] {
  const usual = evaluate(model, sizing);
  const sizes = [1, 1.33, 0.8].map((times) =>
    Object.fromEntries(
      usual.measures
        .filter(({ name, asked }) => asked && name.startsWith('inside'))
        .map(({ name, cut }) => [name, cut * times]),
    ),
  );
  return sizes.flatMap((values) =>
    choicesOf(model.pattern.choices).flatMap((choices) => [
      evaluate(model, { ...sizing, values: { ...sizing.values, ...values }, choices }),
      evaluate(model, { values: { ...sizing.values, ...values }, choices, units: 'mm', grid: '1mm' }),
    ]),
  );
}
function choicesOf([first, ...rest]: readonly ChoiceDef[]): Record<string, string>[] {
  if (!first) return [{}];
  return choicesOf(rest).flatMap((others) => first.options.map((option) => ({ ...others, [first.name]: option })));
}
