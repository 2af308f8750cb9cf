import { describe, expect, it } from 'vitest';
import { mergeStates, type Choices } from '@/features/projects/merge';
import type { ProjectState } from '@/features/projects/project';
import type { BlockNode } from '@/writeup/document';
import { AUTHORS_SIZE, FOLDER, ONE_STEP, writeUpOf } from '../server/published-project';

const text = (words: string): BlockNode => ({ type: 'paragraph', content: [{ type: 'text', text: words }] });
const step = (title: string, ...words: string[]): BlockNode => ({
  type: 'step',
  attrs: { title, mark: '', when: '', key: '', moment: '' } as never,
  content: words.map(text),
});
const THREE = [
  step('Cut', 'Cut the card to size.'),
  step('Score', 'Score along the middle.', 'Burnish the score.'),
  step('Fold', 'Fold it once.'),
];
const base: ProjectState = {
  title: 'Folder',
  summary: 'Keeps lists.',
  minutes: 20,
  hero: null,
  pattern: FOLDER,
  sizing: { ...AUTHORS_SIZE, values: { 'inside width': 100, 'inside height': 150 } },
  writeUp: writeUpOf(...THREE),
};
const withSteps = (...steps: BlockNode[]): ProjectState => ({ ...base, writeUp: writeUpOf(...steps) });
const formula = (name: string, as: string): ProjectState => ({
  ...base,
  pattern: {
    ...FOLDER,
    measures: FOLDER.measures.map((measure) => (measure.name === name ? { ...measure, formula: as } : measure)),
  },
});
const merge = (mine: ProjectState, other: ProjectState, choices?: Choices) =>
  mergeStates({ base, mine, other }, choices);
const stepsOf = ({ writeUp }: ProjectState) => writeUp.doc.content;

describe('two versions of a project', () => {
  it('that changed different facts become one with both changes', () => {
    const { state, clashes } = merge(
      { ...base, title: 'List folder' },
      { ...base, summary: 'Keeps a season of lists.' },
    );
    expect(clashes).toEqual([]);
    expect(state).toEqual({ ...base, title: 'List folder', summary: 'Keeps a season of lists.' });
  });
  it('that changed the same fact alike are no clash', () => {
    const both = { ...base, minutes: 30 };
    expect(merge(both, both)).toEqual({ state: both, clashes: [] });
  });
  it('that changed the same fact differently are a clash, which a choice settles', () => {
    const [mine, other] = [
      { ...base, title: 'Mine' },
      { ...base, title: 'Theirs' },
    ];
    expect(merge(mine, other).clashes).toEqual([
      { where: 'Title', mine: 'Mine', other: 'Theirs', bothCanStand: false },
    ]);
    expect(merge(mine, other).state.title).toBe('Mine');
    expect(merge(mine, other, { Title: 'other' }).state.title).toBe('Theirs');
  });
  it('that set different measures of the size shown first keep both values', () => {
    const size = (values: Record<string, number>) => ({ ...base, sizing: { ...base.sizing, values } });
    const mine = size({ 'inside width': 120, 'inside height': 150 });
    const other = size({ 'inside width': 100, 'inside height': 140 });
    expect(merge(mine, other).state.sizing.values).toEqual({ 'inside width': 120, 'inside height': 140 });
  });
  it('that changed different measures keep both formulas', () => {
    const mine: ProjectState = {
      ...base,
      pattern: { ...FOLDER, measures: [...FOLDER.measures, { name: 'mine', formula: '1 in' }] },
    };
    const other = formula('blank width', '2 * inside width + 1 in');
    const { state, clashes } = merge(mine, other);
    expect(clashes).toEqual([]);
    expect(state.pattern.measures.slice(2)).toEqual([
      { name: 'blank width', formula: '2 * inside width + 1 in' },
      { name: 'mine', formula: '1 in' },
    ]);
  });
  it('that changed the same measure differently are a clash with both formulas told', () => {
    const { clashes } = merge(formula('blank width', '3 in'), formula('blank width', '4 in'));
    expect(clashes).toEqual([
      { where: 'Measure blank width', mine: 'formula: 3 in', other: 'formula: 4 in', bothCanStand: false },
    ]);
  });
  it('keeps a measure that one changed and the other took out', () => {
    const without: ProjectState = { ...base, pattern: { ...FOLDER, measures: FOLDER.measures.slice(0, 2) } };
    const { state } = merge(without, formula('blank width', '9 in'));
    expect(state.pattern.measures[2]).toEqual({ name: 'blank width', formula: '9 in' });
  });
  it('leaves out what one took out and the other left as it was', () => {
    const more: ProjectState = {
      ...base,
      pattern: { ...FOLDER, measures: [...FOLDER.measures, { name: 'spare', formula: '1 in' }] },
    };
    const merged = mergeStates({ base: more, mine: base, other: { ...more, title: 'Theirs' } });
    expect(merged).toEqual({ state: { ...base, title: 'Theirs' }, clashes: [] });
  });
  it('puts measures that both added one after the other, each after what it follows', () => {
    const added = (name: string): ProjectState => ({
      ...base,
      pattern: { ...FOLDER, measures: [...FOLDER.measures, { name, formula: '1 in' }] },
    });
    expect(merge(added('mine'), added('theirs')).state.pattern.measures.map(({ name }) => name)).toEqual([
      'inside width',
      'inside height',
      'blank width',
      'mine',
      'theirs',
    ]);
  });
  it('are a clash as a whole when a name in what they became together leads nowhere', () => {
    const renamed: ProjectState = {
      ...base,
      pattern: {
        ...FOLDER,
        measures: FOLDER.measures.map((m) => (m.name === 'blank width' ? { ...m, name: 'width of blank' } : m)),
      },
    };
    const { state, clashes } = merge(renamed, { ...base, writeUp: ONE_STEP });
    expect(clashes.map(({ where }) => where)).toEqual(['Measures, pieces and write-up together']);
    expect([state.pattern, state.writeUp]).toEqual([renamed.pattern, base.writeUp]);
    const theirs = merge(
      renamed,
      { ...base, writeUp: ONE_STEP },
      { 'Measures, pieces and write-up together': 'other' },
    );
    expect([theirs.state.pattern, theirs.state.writeUp]).toEqual([base.pattern, ONE_STEP]);
  });
});

describe('two versions of a write-up', () => {
  it('that changed different steps keep both changes', () => {
    const mine = withSteps(step('Cut', 'Cut the card with a knife.'), ...THREE.slice(1));
    const other = withSteps(...THREE.slice(0, 2), step('Fold', 'Fold it once and burnish.'));
    const { state, clashes } = merge(mine, other);
    expect(clashes).toEqual([]);
    expect(stepsOf(state)).toEqual([stepsOf(mine)[0], THREE[1], stepsOf(other)[2]]);
  });
  it('that changed different paragraphs of one step keep both', () => {
    const mine = withSteps(THREE[0]!, step('Score', 'Score along the very middle.', 'Burnish the score.'), THREE[2]!);
    const other = withSteps(THREE[0]!, step('Score', 'Score along the middle.', 'Burnish the score twice.'), THREE[2]!);
    const { state, clashes } = merge(mine, other);
    expect(clashes).toEqual([]);
    expect(stepsOf(state)[1]).toEqual(step('Score', 'Score along the very middle.', 'Burnish the score twice.'));
  });
  it('that changed one paragraph differently are a clash where both can stand', () => {
    const mine = withSteps(...THREE.slice(0, 2), step('Fold', 'Fold it twice.'));
    const other = withSteps(...THREE.slice(0, 2), step('Fold', 'Fold it once, gently.'));
    const where = 'Step 3, Fold, Text';
    expect(merge(mine, other).clashes).toEqual([
      { where, mine: 'Fold it twice.', other: 'Fold it once, gently.', bothCanStand: true },
    ]);
    expect(stepsOf(merge(mine, other, { [where]: 'both' }).state)[2]).toEqual(
      step('Fold', 'Fold it twice.', 'Fold it once, gently.'),
    );
  });
  it('keep every step that either put in', () => {
    const mine = withSteps(...THREE, step('Label', 'Write on it.'));
    const other = withSteps(THREE[0]!, step('Rest', 'Let it lie.'), ...THREE.slice(1), step('Trim', 'Trim the rim.'));
    const { state, clashes } = merge(mine, other);
    expect(clashes).toEqual([]);
    expect(stepsOf(state).map((block) => (block.type === 'step' ? block.attrs.title : ''))).toEqual([
      'Cut',
      'Rest',
      'Score',
      'Fold',
      'Trim',
      'Label',
    ]);
  });
  it('keep a step that one changed and the other took out', () => {
    const mine = withSteps(THREE[0]!, THREE[2]!);
    const other = withSteps(THREE[0]!, step('Score', 'Score along the middle.', 'Burnish it well.'), THREE[2]!);
    expect(stepsOf(merge(mine, other).state)[1]).toEqual(stepsOf(other)[1]);
  });
  it('of which nobody knows what they were made from ask for every part that differs', () => {
    const mine = withSteps(THREE[0]!, step('Fold', 'Fold it twice.'));
    const other = withSteps(THREE[0]!, step('Fold', 'Fold it once, gently.'));
    const { clashes } = mergeStates({ base: null, mine, other });
    expect(clashes.map(({ where }) => where)).toEqual(['Step 2, Fold, Text']);
  });
});

describe('nothing that was typed is lost', () => {
  /** A small generator with a fixed seed: mulberry32. */
  const random = (seed: number) => () => {
    seed = (seed + 0x6d2b79f5) | 0;
    let t = Math.imul(seed ^ (seed >>> 15), 1 | seed);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
  it.each([1, 2, 3, 4, 5, 6, 7, 8])(
    'every new word of both sides is in what comes out or in a clash (seed %i)',
    (seed) => {
      const next = random(seed);
      const pick = (n: number) => Math.floor(next() * n);
      const edited = (who: string): ProjectState => {
        const steps = THREE.map((block) => structuredClone(block) as BlockNode & { content: BlockNode[] });
        for (let i = 0; i < 4; i += 1) {
          const at = steps[pick(steps.length)]!;
          const word = `${who}${i}`;
          if (next() < 0.4) at.content[pick(at.content.length)] = text(`Something else, ${word}.`);
          else if (next() < 0.5) at.content.splice(pick(at.content.length + 1), 0, text(`More: ${word}.`));
          else steps.splice(pick(steps.length + 1), 0, step(`New ${word}`, `Do ${word}.`) as (typeof steps)[number]);
        }
        return withSteps(...steps);
      };
      const [mine, other] = [edited('mine'), edited('theirs')];
      const { state, clashes } = merge(mine, other);
      const out = JSON.stringify(state) + JSON.stringify(clashes);
      const words = `${JSON.stringify(mine)}${JSON.stringify(other)}`.match(/(?:mine|theirs)\d/gu) ?? [];
      expect(words.length).toBeGreaterThan(3);
      expect([...new Set(words)].filter((word) => !out.includes(word))).toEqual([]);
    },
  );
});
