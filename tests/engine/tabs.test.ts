import { describe, expect, it } from 'vitest';
import { compilePattern, evaluate, lengthOf, type Net, type PieceDef } from '@/engine';
import { expectClose } from '../setup/expect-close';
import { bare } from './bare-pattern';

// Derived: an edge that leans by an angle a from square over a depth d moves in by d tan a; the chord of an nth of a circle
// of diameter D is D sin(180°/n).
const tan = (degrees: number): number => Math.tan((degrees * Math.PI) / 180);
const sin = (degrees: number): number => Math.sin((degrees * Math.PI) / 180);

function netOf(piece: PieceDef): Net {
  const compiled = compilePattern({ ...bare({}), pieces: [piece] });
  if (!compiled.ok) throw new Error(JSON.stringify(compiled.faults));
  const { pieces, problems } = evaluate(compiled.value, { values: {}, choices: {}, units: 'mm', grid: '1mm' });
  expect(problems).toEqual([]);
  return pieces[0]?.net as Net;
}
/** The panel with a tab on its upper edge, 60 mm long and 10 mm deep. */
const tabbed = (tab: object): Net =>
  netOf({
    name: 'Wall',
    stock: 'card',
    builder: 'grid',
    columns: [{ name: 'wide', size: '60 mm' }],
    rows: [
      { name: 'deep', size: '10 mm' },
      { name: 'tall', size: '40 mm' },
    ],
    cells: [['tab glue'], ['panel wall']],
    tabs: [{ cells: ['glue'], ...tab }],
  });
/** Lengths of the edges of a panel that lie level at this height. */
const levelAt = (net: Net, name: string, y: number): number[] =>
  net.panels
    .filter((panel) => panel.name.startsWith(name))
    .flatMap(({ loop }) => loop.filter((curve) => Math.abs(curve.from.y - y) + Math.abs(curve.to.y - y) < 1e-6))
    .map(lengthOf);

describe('a slip in a formula', () => {
  const problemOf = (piece: PieceDef): string | undefined => {
    const compiled = compilePattern({ ...bare({}), pieces: [piece] });
    if (!compiled.ok) throw new Error(JSON.stringify(compiled.faults));
    return evaluate(compiled.value, { values: {}, choices: {}, units: 'mm', grid: '1mm' }).problems[0]?.sentence;
  };
  const wall = {
    name: 'Wall',
    stock: 'card',
    builder: 'grid',
    columns: [{ name: 'wide', size: '60 mm' }],
    rows: [
      { name: 'deep', size: '10 mm' },
      { name: 'tall', size: '40 mm' },
    ],
    cells: [['tab glue'], ['panel wall']],
  } as const satisfies PieceDef;
  it('does not make a million teeth, or a million pieces', () => {
    expect(problemOf({ ...wall, tabs: [{ cells: ['glue'], teeth: '1000000', 'tooth angle': '0°' }] })).toBe(
      'The wall cannot be cut at this size: “glue” has more than 720 teeth.',
    );
    const rim = { teeth: '1000000', depth: '5 mm', 'tooth angle': '1°', angle: '90°' };
    expect(problemOf({ name: 'Foot', stock: 'card', builder: 'disc', disc: 'foot', diameter: '90 mm', rim })).toBe(
      'The foot cannot be cut at this size: nobody cuts more than 720 teeth.',
    );
    expect(problemOf({ ...wall, count: '1000000' })).toBe(
      'The wall cannot be cut at this size: 1000000 of it are more than anybody cuts (999 at most).',
    );
  });
});

describe('a tab', () => {
  it('is narrower at the tip by the angle of its ends', () => {
    const [tip] = levelAt(tabbed({ left: { by: '45°' }, right: { by: '30°' } }), 'glue', 0);
    expectClose(tip ?? NaN, 60 - 10 * tan(45) - 10 * tan(30), 1e-6);
  });
  it('is narrower at the tip by a length, and may begin a little way in', () => {
    const net = tabbed({ left: { from: '2 mm', by: '3 mm' }, right: { by: '4 mm' } });
    expectClose(levelAt(net, 'glue', 0)[0] ?? NaN, 60 - 2 - 3 - 4, 1e-6);
    expectClose(levelAt(net, 'glue', 10)[0] ?? NaN, 60 - 2, 1e-6);
  });
  it('has teeth that share its fold and give way by their angle on either side', () => {
    const net = tabbed({ teeth: '5', 'tooth angle': '12°' });
    expect(levelAt(net, 'glue', 0)).toHaveLength(5);
    for (const tip of levelAt(net, 'glue', 0)) expectClose(tip, 60 / 5 - 2 * 10 * tan(12), 1e-6);
  });
});

describe('the rim of a disc', () => {
  it('has teeth on the chords of equal shares that give way by their angle on either side', () => {
    const net = netOf({
      name: 'Bottom',
      stock: 'card',
      builder: 'disc',
      disc: 'bottom',
      diameter: '80 mm',
      rim: { teeth: '24', depth: '8 mm', 'tooth angle': '7.5°', angle: '90°' },
    });
    const teeth = net.panels.filter(({ tooth }) => tooth);
    expect(teeth).toHaveLength(24);
    for (const { loop } of teeth) {
      const [tip] = loop
        .filter((curve) => curve.type === 'line')
        .map(lengthOf)
        .slice(1, 2);
      expectClose(tip ?? NaN, 80 * sin(180 / 24) - 2 * 8 * tan(7.5), 1e-6);
    }
  });
});
