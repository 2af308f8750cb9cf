import { describe, expect, it } from 'vitest';
import {
  compilePattern,
  evaluate,
  explain,
  formulasOfPattern,
  keyOf,
  renamedBack,
  renameInFormula,
  renameInPattern,
  renameInSizing,
  type Figures,
  type Pattern,
  type Rename,
} from '@/engine';
import { FOLDER } from '../server/published-project';
import { SLUGS, modelOf, patternOf, sizingsOf } from './patterns';

const tab: Rename = { what: 'measure', from: 'tab', to: 'glue flap' };
const formula = (text: string, rename: Rename = tab) => {
  const renamed = renameInFormula(text, rename);
  if (!renamed.ok) throw new Error(explain(renamed.faults[0]!));
  return renamed.value;
};
const pattern = (from: Pattern, rename: Rename): Pattern => {
  const renamed = renameInPattern(from, rename);
  if (!renamed.ok) throw new Error(explain(renamed.faults[0]!));
  return renamed.value;
};
const refusal = (rename: Rename, from: Pattern = FOLDER) => {
  const renamed = renameInPattern(from, rename);
  return renamed.ok ? null : renamed.faults.map((fault) => `${fault.where}: ${explain(fault)}`);
};

describe('a name in a formula', () => {
  it.each<[string, string]>([
    ['tab', 'glue flap'],
    ['2*tab+tab width', '2*glue flap+tab width'],
    ['  inside  width -  Tab ', '  inside  width -  glue flap '],
    ['(tab)', '(glue flap)'],
    ['max(tab, tab of lid) × 2', 'max(glue flap, tab of lid) × 2'],
    ['1 1/2 in + tab', '1 1/2 in + glue flap'],
    ['tray.tab + tab.across', 'tray.tab + tab.across'],
    ['tabs + tab', 'tabs + glue flap'],
    ['if tab > 1 in then tab else -tab^2', 'if glue flap > 1 in then glue flap else -glue flap^2'],
    // As someone types, a formula may not make sense yet.
    ['tab +', 'glue flap +'],
    ['', ''],
  ])('changes “%s” to “%s”', (before, after) => expect(formula(before)).toBe(after));

  it('is no function of the same beginning', () =>
    expect(formula('arc length(arc, 2 in) + arc', { what: 'measure', from: 'arc', to: 'bow' })).toBe(
      'arc length(bow, 2 in) + bow',
    ));
  it('is a choice before “is”, not the option behind it', () => {
    const choice: Rename = { what: 'choice', from: 'curved', to: 'spine' };
    expect(formula('if curved  is not curved then 1 in else 2 in', choice)).toBe(
      'if spine  is not curved then 1 in else 2 in',
    );
  });
  it('is an option behind its own choice alone', () => {
    const option: Rename = { what: 'option', choice: 'lid', from: 'none', to: 'left off' };
    expect(formula('lid is none or ribbon is none and not lid is not none', option)).toBe(
      'lid is left off or ribbon is none and not lid is not left off',
    );
  });
  it('is a piece before the point, in small letters where it stood so', () => {
    const piece: Rename = { what: 'piece', from: 'Lower spine', to: 'Back Strip' };
    expect(formula('lower spine.across - Lower  spine.curve length + lower spine', piece)).toBe(
      'back strip.across - Back Strip.curve length + lower spine',
    );
  });
  it('is a column or row behind the point of its own piece', () => {
    const track: Rename = { what: 'track', piece: 'Lid', from: 'left tab', to: 'left flap' };
    expect(formula('lid.left tab + base.left tab + left tab', track)).toBe('lid.left flap + base.left tab + left tab');
  });
  it('is not looked for behind a mark that means nothing', () => {
    const renamed = renameInFormula('tab # 2', tab, 'measure “side”, formula');
    expect(renamed).toMatchObject({
      ok: false,
      faults: [{ code: 'formula stray mark', where: 'measure “side”, formula', span: { from: 4, to: 5 } }],
    });
  });
  it('may not make a formula longer than may be', () => {
    // 100 × “tab + ” and “tab”: 603 characters are too many already; 99 + 1 are 597, and 997 with names of seven letters.
    const long = `${'tab + '.repeat(99)}tab`;
    expect(long.length).toBe(597);
    expect(renameInFormula(long, { ...tab, to: 'abcdefg' })).toMatchObject({
      ok: false,
      faults: [{ code: 'formula too long' }],
    });
  });
});

const NEW = 'Quite New';
const places = <T extends { readonly name: string }>(things: readonly T[]) => things.map(({ name }) => name);
/** Every name of a pattern, once. Cells as they are written in the data: read here without the engine. */
function* everyRename({ measures, choices, pieces, fits }: Pattern): Generator<Rename> {
  // The thickness of the card keeps its name: drawings know it by that.
  for (const from of places(measures)) if (from !== 'card thickness') yield { what: 'measure', from, to: NEW };
  for (const from of places(fits)) yield { what: 'fit', from, to: NEW };
  for (const { name: choice, options } of choices) {
    yield { what: 'choice', from: choice, to: NEW };
    for (const from of options) yield { what: 'option', choice, from, to: NEW };
  }
  for (const piece of pieces) {
    yield { what: 'piece', from: piece.name, to: NEW };
    const tracks = piece.builder === 'grid' ? [...piece.columns, ...piece.rows] : [];
    for (const from of new Set(places(tracks))) yield { what: 'track', piece: piece.name, from, to: NEW };
    for (const from of cellsOf(piece)) yield { what: 'cell', piece: piece.name, from, to: NEW.toLowerCase() };
  }
}
function cellsOf(piece: Pattern['pieces'][number]): ReadonlySet<string> {
  switch (piece.builder) {
    case 'grid':
      return new Set([
        ...piece.cells.flat().flatMap((cell) => /^(?:panel|tab|flap|cap) (.+?)(?: on .+)?$/u.exec(cell)?.[1] ?? []),
        ...(piece.creases ?? []).flatMap(({ parts }) => parts ?? []),
      ]);
    case 'fan':
      return new Set([piece.centre, piece.flap.name]);
    case 'disc':
      return new Set([piece.disc]);
    case 'sector':
      return new Set([piece.body]);
    case 'outline':
      return new Set(places(piece.panels));
    case 'layer':
      return new Set();
  }
}
/** Every number and yes or no of the figures in its place; names and words left out. */
const figuresAlone = ({ sizing: _, ...figures }: Figures) =>
  JSON.stringify(figures, (_key, value: unknown) => (typeof value === 'string' ? '' : value));

describe.each(SLUGS)('%s', (slug) => {
  const model = modelOf(slug);
  const sizing = [...sizingsOf(model, 1, 7)][0]!;
  const sized = { ...sizing, choices: lowered(sizing.choices), values: lowered(sizing.values) };
  const before = evaluate(model, sized);
  const [alone, pieces, written] = [
    figuresAlone(before),
    JSON.stringify(before.pieces),
    JSON.stringify(patternOf(slug)),
  ];

  it('gives the same figures whatever is renamed, and is what it was when renamed back', () => {
    for (const rename of everyRename(patternOf(slug))) {
      const about = JSON.stringify(rename);
      const renamed = pattern(patternOf(slug), rename);
      const compiled = compilePattern(renamed);
      expect(compiled.ok ? [] : compiled.faults, about).toEqual([]);
      if (!compiled.ok) continue;
      const after = evaluate(compiled.value, renameInSizing(sized, rename));
      expect(figuresAlone(after) === alone, about).toBe(true);
      if (rename.what !== 'piece' && rename.what !== 'cell')
        expect(JSON.stringify(after.pieces) === pieces, about).toBe(true);
      expect(JSON.stringify(renamed) === written, about).toBe(false);
      expect(JSON.stringify(pattern(renamed, renamedBack(rename))) === written, about).toBe(true);
    }
  }, 90_000);

  it('has every formula that its check reads among those in which names are looked for', () => {
    // Each text becomes a name that nothing has; the check then complains of each that it reads as a formula, by that name.
    let count = 0;
    const KEPT = new Set(['builder', 'kind', 'name', 'piece', 'of']);
    const strange = (value: unknown, field: string): unknown => {
      if (Array.isArray(value)) return value.map((item) => strange(item, field));
      if (typeof value === 'object' && value !== null)
        return Object.fromEntries(Object.entries(value).map(([key, item]) => [key, strange(item, key)]));
      if (typeof value !== 'string' || KEPT.has(field)) return value;
      count += 1;
      const name = `strange${count}`;
      return field === 'loop' ? value.replace(/^.*? bowed (out|in) by .+$/u, `a bowed $1 by ${name}`) : name;
    };
    const compiled = compilePattern(strange(model.pattern, '') as Pattern);
    const complained = (compiled.ok ? [] : compiled.faults)
      .filter(({ code }) => code === 'formula unknown name')
      .map(({ found }) => /“(.+)”/u.exec(found)?.[1] ?? '');
    count = 0;
    const walked = formulasOfPattern(strange(model.pattern, '') as Pattern).map(({ text }) => text);
    expect(walked.length).toBeGreaterThan(model.pattern.measures.length);
    expect([...new Set(walked)].sort()).toEqual([...new Set(complained)].sort());
  });
});
const lowered = <T>(answers: Readonly<Record<string, T>>): Readonly<Record<string, T>> =>
  Object.fromEntries(Object.entries(answers).map(([name, answer]) => [keyOf(name), answer]));

describe('renaming in a pattern', () => {
  it('takes along questions, fits, their change lists and finished sizes, and keeps all else as it was', () => {
    const renamed = pattern(FOLDER, { what: 'measure', from: 'Inside  Width', to: '  clear   width ' });
    expect(places(renamed.measures)).toEqual(['clear width', 'inside height', 'blank width']);
    expect(renamed.measures[2]).toEqual({ name: 'blank width', formula: '2 * clear width' });
    expect(renamed.fits[0]).toMatchObject({ right: '2 * clear width', change: ['inside height'] });
    expect(renamed.finished.inside[0]?.formula).toBe('clear width');
    expect(renamed.measures[1]).toBe(FOLDER.measures[1]);
    expect(pattern(FOLDER, { what: 'measure', from: 'inside height', to: 'rise' }).fits[0]?.change).toEqual(['rise']);
  });
  it('takes along the order of making and leaves its words', () => {
    const told = { ...FOLDER, order: ['Cut [[ blank width ]] of card; the blank width is [[2*blank width]] open.'] };
    expect(pattern(told, { what: 'measure', from: 'blank width', to: 'sheet' }).order).toEqual([
      'Cut [[ sheet ]] of card; the blank width is [[2*sheet]] open.',
    ]);
  });
  it('takes along where a piece and its cells stand in space', () => {
    expect(pattern(FOLDER, { what: 'piece', from: 'Folder', to: 'Cover' }).assembly[0]?.piece).toBe('Cover');
    const celled = pattern(FOLDER, { what: 'cell', piece: 'Folder', from: 'front', to: 'face' });
    expect(celled.assembly[0]?.root).toBe('face');
    expect(celled.pieces[0]).toMatchObject({ cells: [['panel face', 'panel back']], columns: [{ name: 'front' }, {}] });
  });
  it('gives a name other capitals', () =>
    expect(places(pattern(FOLDER, { what: 'measure', from: 'blank width', to: 'Blank width' }).measures)[2]).toBe(
      'Blank width',
    ));

  it.each<[string, Rename, string]>([
    [
      'an empty name',
      { ...tab, from: 'blank width', to: ' ' },
      'The new name is empty. A name is made of letters, digits and single spaces, and begins with a letter; it has 60 characters at most.',
    ],
    [
      'a name of digits',
      { ...tab, from: 'blank width', to: '2 ribs' },
      '“2 ribs” cannot be a name. A name is made of letters, digits and single spaces, and begins with a letter; it has 60 characters at most.',
    ],
    [
      'a word of formulas',
      { ...tab, from: 'blank width', to: 'more or less' },
      '“more or less” holds “or”, a word that formulas use. Leave “or” out, or choose another word.',
    ],
    [
      'the name of a function',
      { ...tab, from: 'blank width', to: 'Arc Length' },
      '“Arc Length” is the name of a function. Say more, such as “own Arc Length”.',
    ],
    [
      'what every formula has',
      { ...tab, from: 'blank width', to: 'cut grid' },
      '“cut grid” has a meaning in every formula. Choose another word.',
    ],
    [
      'a name that is taken',
      { ...tab, from: 'blank width', to: 'Inside  height' },
      'There is a measure called “inside height” already. Choose another, or rename that one first.',
    ],
  ])('refuses %s', (_, rename, sentence) => expect(refusal(rename)).toEqual([`measure “blank width”: ${sentence}`]));

  it.each<[Rename, string]>([
    [
      { ...tab, from: 'blank widt' },
      'measure “blank widt”: No measure is called “blank widt”. The nearest name is “blank width”.',
    ],
    [
      { what: 'piece', from: 'Foldr', to: 'Cover' },
      'piece “Foldr”: No piece is called “Foldr”. The nearest name is “Folder”.',
    ],
    [
      { what: 'cell', piece: 'Folder', from: 'frnt', to: 'face' },
      'piece “Folder”, cell “frnt”: No cell is called “frnt”. The nearest name is “front”.',
    ],
    [
      { what: 'track', piece: 'Foldre', from: 'front', to: 'face' },
      'piece “Foldre”, column or row “front”: No piece is called “Foldre”. The nearest name is “Folder”.',
    ],
    [
      { what: 'option', choice: 'flap', from: 'none', to: 'off' },
      'choice “flap”, option “none”: No choice is called “flap”. Check its name.',
    ],
  ])('says what is near when there is no such thing: %j', (rename, sentence) =>
    expect(refusal(rename)).toEqual([sentence]),
  );

  it.each<[Rename, string]>([
    [
      { what: 'track', piece: 'Folder', from: 'front', to: 'area' },
      'There is a size of the piece called “area” already. Choose another, or rename that one first.',
    ],
    [
      { what: 'track', piece: 'Folder', from: 'front', to: 'height' },
      'There is a size of the piece called “height” already. Choose another, or rename that one first.',
    ],
    [
      { what: 'cell', piece: 'Folder', from: 'front', to: 'back' },
      'There is a cell called “back” already. Choose another, or rename that one first.',
    ],
    [
      { what: 'cell', piece: 'Folder', from: 'front', to: 'face on top' },
      '“face on top” holds “on”, a word that formulas use. Leave “on” out, or choose another word.',
    ],
  ])('keeps two sizes and two cells of a piece apart: %j', (rename, sentence) =>
    expect(refusal(rename)).toEqual([
      `piece “Folder”, ${rename.what === 'cell' ? 'cell' : 'column or row'} “front”: ${sentence}`,
    ]),
  );

  it('leaves the thickness of the card its name, by which drawings know it', () => {
    const carded = { ...FOLDER, measures: [...FOLDER.measures, { name: 'Card thickness', formula: '0.3 mm' }] };
    const sentence =
      'Drawings know how thick the card is by the measure “card thickness”. That name stays with the measure that has it.';
    expect(refusal({ ...tab, from: 'card thickness', to: 'caliper' }, carded)).toEqual([
      `measure “card thickness”: ${sentence}`,
    ]);
    expect(refusal({ ...tab, from: 'blank width', to: 'card thickness' })).toEqual([
      `measure “blank width”: ${sentence}`,
    ]);
    expect(refusal({ ...tab, from: 'Card thickness', to: 'card thickness' }, carded)).toBeNull();
  });
  it('refuses while a formula holds a mark that means nothing, and says which', () => {
    const broken = { ...FOLDER, measures: [...FOLDER.measures, { name: 'rib', formula: '2 # blank width' }] };
    expect(refusal({ what: 'measure', from: 'blank width', to: 'sheet' }, broken)).toEqual([
      'measure “rib”, formula: “#” means nothing here. Take it out.',
    ]);
  });
});

describe('an author’s size', () => {
  const sizing = { values: { tab: 12, width: 90 }, choices: { lid: 'none' }, units: 'in', grid: '1/16in' } as const;
  it.each<[Rename, object]>([
    [{ what: 'measure', from: 'Tab', to: 'Glue Flap' }, { values: { 'glue flap': 12, width: 90 } }],
    [{ what: 'choice', from: 'lid', to: 'Top' }, { choices: { top: 'none' } }],
    [{ what: 'option', choice: 'lid', from: 'none', to: 'Left off' }, { choices: { lid: 'Left off' } }],
    [{ what: 'piece', from: 'tab', to: 'flap' }, {}],
  ])('keeps its answers when %j', (rename, change) =>
    expect(renameInSizing(sizing, rename)).toEqual({ ...sizing, ...change }),
  );
});
