import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { compilePattern, evaluate, explain, usualSizing, type Figures, type Model, type Pattern } from '@/engine';
import { workExample } from '@/features/examples/example';
import { partHtml } from '@/features/examples/example-parts';
import { groupBoxes } from '@/features/handbook/box-entries';
import { readLive, showLive } from '@/writeup/live';

/** Entries are named by their pattern's slug, so a folder holds each at most once. */
const namesIn = (folder: string, ending: string) =>
  readdirSync(new URL(`../../content/${folder}`, import.meta.url))
    .filter((name) => name.endsWith(ending))
    .map((name) => name.slice(0, -ending.length))
    .sort();
const entries = namesIn('handbook/boxes', '.mdx');

function modelOf(slug: string): Model {
  const file = new URL(`../../content/patterns/${slug}.json`, import.meta.url);
  const compiled = compilePattern(JSON.parse(readFileSync(file, 'utf8')) as Pattern);
  if (!compiled.ok) throw new Error(compiled.faults.map(explain).join('\n'));
  return compiled.value;
}
const textOf = (slug: string) =>
  readFileSync(new URL(`../../content/handbook/boxes/${slug}.mdx`, import.meta.url), 'utf8');
const all = (text: string, pattern: RegExp) => [...text.matchAll(pattern)].map(([, found]) => found ?? '');
const listed = (text: string, field: string) =>
  (new RegExp(`^${field}: \\[(.+)\\]$`, 'm').exec(text)?.[1] ?? '').split(', ').filter(Boolean);

/** The usual size once for every option of every choice, the others being usual. */
function variants(model: Model): { readonly as: string; readonly figures: Figures }[] {
  const usual = usualSizing(model);
  const sizings = model.pattern.choices.flatMap(({ name, options }) =>
    options.map((option) => ({ as: `${name} is ${option}`, choices: { ...usual.choices, [name]: option } })),
  );
  return [{ as: 'usual', choices: usual.choices }, ...sizings].map(({ as, choices }) => ({
    as,
    figures: evaluate(model, { ...usual, choices }),
  }));
}

it('every pattern has an entry, and every entry a pattern', () => {
  expect(entries).toEqual(namesIn('patterns', '.json'));
});

describe.each(entries)('%s', (slug) => {
  const text = textOf(slug);
  const words = text.replace(/^---[^]*?^---$/m, '').replace(/<[^>]+>/g, ' ');
  const model = modelOf(slug);

  it('places only formulas that read', () => {
    const faults = all(text, /<Live formula="([^"]+)"/g).flatMap((formula) => {
      const live = readLive(model, formula);
      return live.ok ? [] : live.faults.map(explain);
    });
    expect(faults).toEqual([]);
  });

  it('places only formulas that have an answer whatever is chosen', () => {
    const without = variants(model).flatMap(({ as, figures }) =>
      all(text, /<Live formula="([^"]+)"/g)
        .filter((formula) => showLive({ model, figures }, { formula, bare: false }) === null)
        .map((formula) => `${formula}, where ${as}`),
    );
    expect(without).toEqual([]);
  });

  it('asks only for what its pattern asks for', () => {
    const { measures, choices } = model.pattern;
    const asked = measures.filter(({ ask }) => ask).map(({ name }) => name);
    expect(listed(text, 'ask').filter((name) => !asked.includes(name))).toEqual([]);
    expect(listed(text, 'choose').filter((name) => !choices.some((choice) => choice.name === name))).toEqual([]);
  });

  it('shows pieces, ranges and order once each, and says what to check before gluing', () => {
    expect(all(text, /<ExamplePart part="(\w+)"/g)).toEqual(['pieces', 'ranges', 'order']);
    const heads = all(text, /^## (.+)$/gm);
    const choices = listed(text, 'choose').length > 0 ? ['Choices'] : [];
    expect(heads).toEqual(['How it works', 'The pieces', 'What limits it', ...choices, 'Making it', 'Before you glue']);
  });

  it('types no measurement: figures come from the engine', () => {
    const typed = words.match(/\d[\d./ ]*\s*(?:in|inch(?:es)?|mm|cm|millimetres?)\b/g);
    expect(typed).toBeNull();
  });

  it('is short enough to be read at the table', () => {
    const prose = words.replace(/^## .+$/gm, '');
    const count = prose.split(/\s+/).filter((word) => /\p{L}/u.test(word)).length;
    expect(count).toBeGreaterThanOrEqual(200);
    expect(count).toBeLessThanOrEqual(400);
  });
});

describe('parts of an entry', () => {
  const at = (slug: string, query: string) => workExample(modelOf(slug), new URLSearchParams(query));
  /** What is seen of a part, without what is heard. */
  const seen = (html: string) =>
    html
      .replace(/<span class="visually-hidden.*?<\/span>/g, '')
      .replace(/<[^>]+>/g, ' ')
      .replace(/ +/g, ' ');

  it('show the pieces that the box has with the choices made', () => {
    const names = (query: string) =>
      all(partHtml(at('book-box', query), 'pieces'), /role="group" aria-label="([^"]+)"/g);
    expect(names('')).toContain('Upper spine');
    expect(names('lid=none')).not.toContain('Upper spine');
    expect(names('lid=none')).toContain('Top');
  });

  it('show only the ranges of what is asked with the choices made', () => {
    expect(seen(partHtml(at('book-box', ''), 'ranges'))).toContain(' circle ');
    expect(seen(partHtml(at('book-box', 'spine=straight'), 'ranges'))).not.toContain(' circle ');
  });

  it('follow the size: a lid is never asked to be deeper than its base is tall', () => {
    const range = / lid height [^<]+? to 2\u00a0in card/;
    expect(seen(partHtml(at('lidded-box', 'inside-height=2in'), 'ranges'))).toMatch(range);
    expect(seen(partHtml(at('lidded-box', 'inside-height=3in'), 'ranges'))).not.toMatch(range);
  });

  it('put figures in the order of making', () => {
    // The tray is scored at its height.
    expect(seen(partHtml(at('tray', 'inside-height=2in'), 'order'))).toContain(
      'Score 2\u00a0in in from all four sides',
    );
  });

  it('say the outside of the box and whether it closes', () => {
    // 200 mm and a card of half a millimetre at both ends; 100 mm and two cards on either side; 30 mm and the floor.
    const query = 'inside-length=200mm&inside-width=100mm&inside-height=30mm&card-thickness=0.5mm&units=mm&cut=0.5mm';
    const words = seen(partHtml(at('tray', query), 'outside'));
    expect(words).toContain('Outside 201 × 102 × 30.5\u00a0mm');
    expect(words).toContain('It closes');
  });
});

it('lists the boxes by kind, and leaves out those without an entry', () => {
  const box = (slug: string, group: string) => ({
    slug,
    name: slug,
    group,
    summary: '',
    asks: '',
    folded: '',
    own: false,
  });
  const patterns = [box('tray', 'Trays'), box('bag', 'Bags'), box('drum', 'Round'), box('lidded', 'Trays')];
  const groups = groupBoxes(patterns, [{ id: 'tray' }, { id: 'lidded' }, { id: 'bag' }]);
  expect(groups.map(({ group, boxes }) => [group, boxes.map(({ slug }) => slug)])).toEqual([
    ['Bags', ['bag']],
    ['Trays', ['lidded', 'tray']],
  ]);
});
