import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import {
  areaOf,
  lengthOf,
  perimeterOf,
  readLength,
  readValue,
  show,
  showValue,
  type Arc,
  type Figures,
  type Loop,
  type Point,
} from '@/engine';
import { gramsPerSquareMetre } from '@/features/handbook/cover-weights';
import { valueOf } from '../engine/bare-pattern';
import { figuresOf, modelOf, pieceOf } from '../engine/patterns';
import { expectClose } from '../setup/expect-close';
import groups from './check-values.json' with { type: 'json' };

interface Quantity {
  readonly value: number | string;
  readonly unit: string;
}
type Quantities = Readonly<Record<string, Quantity>>;
interface Case {
  readonly inputs: Quantities;
  readonly expected: Quantities;
  readonly expected_decimal?: Readonly<Record<string, number>>;
  readonly tolerance: Readonly<Record<string, number>>;
  readonly computed?: Readonly<Record<string, number>>;
  readonly true_arc?: number;
}
const casesOf = (id: string): readonly Case[] => {
  const found = groups.find((group) => group.id === id);
  if (!found) throw new Error(`no group ${id}`);
  return found.cases as unknown as readonly Case[];
};
const given = (one: Case, name: string): number => Number(one.inputs[name]?.value ?? NaN);
/** The precise value where the book rounds, else what it prints, with how far off it may be. */
function wanted(one: Case, name: string): { value: number; within: number } {
  const precise = one.computed?.[name];
  if (precise !== undefined) return { value: precise, within: Math.max(1e-9, Math.abs(precise) * 1e-9) };
  const value = one.expected_decimal?.[name] ?? Number(one.expected[name]?.value);
  return { value, within: Math.max(one.tolerance[name] ?? one.tolerance.abs ?? NaN, 1e-8) };
}
function expectWanted(actual: number, one: Case, name: string, slack = 0): void {
  const { value, within } = wanted(one, name);
  expectClose(actual, value, within + slack, `${name} of ${JSON.stringify(one.inputs)}`);
}
/** An inch of the book is an inch here; formulas answer in millimetres. */
const inches = (formula: string): number => valueOf(formula) / 25.4;
/** Values are snapped to the nanometre: in inches, and in whole units of 100 mm. */
const SNAP = 1e-6 / 25.4;

/** A segment of a circle about the origin: its arc and its chord. */
function segment(radius: number, degrees: number): { arc: Arc; loop: Loop } {
  const half = (degrees * Math.PI) / 360;
  const at = (angle: number): Point => ({ x: radius * Math.sin(angle), y: -radius * Math.cos(angle) });
  const [from, to] = [at(-half), at(half)];
  const arc: Arc = { type: 'arc', from, to, centre: { x: 0, y: 0 }, radius, clockwise: true };
  return { arc, loop: [arc, { type: 'line', from: to, to: from }] };
}
const sector = (radius: number, degrees: number): Loop => {
  const { arc } = segment(radius, degrees);
  return [arc, { type: 'line', from: arc.to, to: arc.centre }, { type: 'line', from: arc.centre, to: arc.from }];
};
const exact = (figures: Figures, name: string): number =>
  figures.measures.find((measure) => measure.name === name)?.exact ?? NaN;

const HERE: Readonly<Record<string, () => void>> = {
  // Handbook tables of segments for radius 1.
  'circle-segment-table': () => casesOf('circle-segment-table').forEach(expectSegment),
  'circle-segment-memory': () => casesOf('circle-segment-memory').forEach(expectSegment),
  // Machinery's Handbook, 31st ed., p. 79.
  'segment-worked-mh79': () => {
    const [chord, radius] = casesOf('segment-worked-mh79') as [Case, Case];
    expectWanted(inches('2 * sqrt(8 in * (2 * 60 in - 8 in))'), chord, 'chord', SNAP);
    expectWanted(inches('arc radius(16 in, 6 in)'), radius, 'radius', SNAP);
  },
  // Machinery's Handbook, 31st ed., p. 50.
  'segment-worked-mh50': () => {
    const [first, second] = casesOf('segment-worked-mh50') as [Case, Case];
    expectWanted(areaOf(sector(7, 30)), first, 'sector_area');
    const chord = '2 * sqrt(2 cm * (2 * 12 cm - 2 cm))';
    expectWanted(valueOf(chord) / 10, second, 'chord', 1e-7);
    expectWanted(valueOf(`arc angle(${chord}, 12 cm)`), second, 'central_angle', 1e-6);
    expectWanted(valueOf(`arc length(${chord}, 12 cm)`) / 10, second, 'arc', 1e-7);
    expectWanted(areaOf(segment(12, valueOf(`arc angle(${chord}, 12 cm)`)).loop), second, 'segment_area', 1e-5);
  },
  // Machinery's Handbook, 31st ed., p. 78.
  'circle-worked-mh78': () => {
    const [circle, part, polygon] = casesOf('circle-worked-mh78') as [Case, Case, Case];
    const whole = [segment(1.375, 180).arc, turned(segment(1.375, 180).arc)];
    expectWanted(areaOf(whole), circle, 'area');
    expectWanted(perimeterOf(whole), circle, 'circumference');
    expectWanted(areaOf(sector(35, 60)), part, 'sector_area');
    expectWanted(lengthOf(segment(35, 60).arc), part, 'arc');
    const across = 160 * Math.cos(Math.PI / 12); // 12 sides on a circle of 80 mm radius
    const figures = figuresOf(modelOf('polygon-box'), { sides: 12, 'inside across flats': across });
    expectWanted(exact(figures, 'side') / 10, polygon, 'side', 1e-6);
    expectWanted(valueOf(`12 * ${across} mm * ${exact(figures, 'side')} mm / 4`) / 100, polygon, 'area', 1e-4);
  },
  // MatheAss, “Circular sections”; 1 is 100 mm here.
  'segment-worked-matheass': () => {
    const [first, second] = casesOf('segment-worked-matheass') as [Case, Case];
    expectWanted(valueOf('arc radius(2100 mm, 600 mm)') / 100, first, 'radius', 1e-8);
    expectWanted(valueOf('arc angle(2100 mm, 1218.75 mm)'), first, 'central_angle', 1e-6);
    expectWanted(valueOf('arc length(2100 mm, 1218.75 mm)') / 100, first, 'arc', 1e-8);
    expectWanted(valueOf('1218.75 mm - arc height(2100 mm, 1218.75 mm)') / 100, first, 'apothem', 1e-8);
    expectWanted(areaOf(sector(12.1875, first.computed?.central_angle ?? NaN)), first, 'sector_area', 1e-6);
    expectWanted(areaOf(segment(12.1875, first.computed?.central_angle ?? NaN).loop), first, 'segment_area', 1e-6);
    const radius = '100 mm / (pi * (45° / 180°))';
    expectWanted(valueOf(radius) / 100, second, 'radius', 1e-8);
    expectWanted(valueOf(`2 * ${radius} * sin(22.5°)`) / 100, second, 'chord', 1e-8);
    expectWanted(valueOf(`arc height(2 * ${radius} * sin(22.5°), ${radius})`) / 100, second, 'sagitta', 1e-8);
    expectWanted(areaOf(sector(1.273239544735, 45)), second, 'sector_area', 1e-9);
    expectWanted(areaOf(segment(1.273239544735, 45).loop), second, 'segment_area', 1e-9);
  },
  // Formulas 22–24 of the handbook's segment table.
  'chord-sagitta-to-radius': () => {
    for (const one of casesOf('chord-sagitta-to-radius')) {
      const [chord, rise] = [`${given(one, 'chord')} in`, `${given(one, 'sagitta')} in`];
      const radius = `arc radius(${chord}, ${rise})`;
      expectWanted(inches(radius), one, 'radius', SNAP);
      if (2 * given(one, 'sagitta') > given(one, 'chord')) continue; // more than half round: not the arc that a box has
      expectWanted(valueOf(`arc angle(${chord}, ${radius})`), one, 'central_angle', 2e-6);
      expectWanted(inches(`arc length(${chord}, ${radius})`), one, 'arc', 10 * SNAP);
    }
  },
  // The Building Trades Pocketbook: low by less than 0.6 % of the true arc.
  'arc-huygens': () => {
    for (const one of casesOf('arc-huygens')) {
      const [chord, rise] = [`${given(one, 'chord')} in`, `${given(one, 'sagitta')} in`];
      const arc = inches(`arc length(${chord}, arc radius(${chord}, ${rise}))`);
      expectClose(arc, one.true_arc ?? NaN, 1e-6);
      const rule = inches(`(8 * hypot(${chord} / 2, ${rise}) - ${chord}) / 3`);
      expectWanted(rule, one, 'arc_approx', SNAP);
      expect(rule).toBeLessThan(arc);
      expect(rule).toBeGreaterThan(arc * 0.994);
    }
  },
  'regular-polygon-closed-forms': () => {
    for (const one of casesOf('regular-polygon-closed-forms')) {
      const sides = given(one, 'sides');
      const across = 100 / Math.tan(Math.PI / sides); // a side of 100 mm
      const figures = figuresOf(modelOf('polygon-box'), { sides, 'inside across flats': across }, { grid: '1/32in' });
      const floor = pieceOf(figures, 'Base').net.panels[0]?.loop as Loop;
      // The floor is drawn as cut: a scale factor to the exact side.
      const scale = 100 / lengthOf(floor[0] as Loop[number]);
      expectWanted((areaOf(floor) * scale ** 2) / 1e4, one, 'area', 1e-7);
    }
  },
  // Solid geometry: no box of ours tapers with flat sides; the formulas of an author would.
  'pyramid-frustum': () => {
    for (const one of casesOf('pyramid-frustum')) {
      const half = `${180 / given(one, 'sides')}°`;
      const [bottom, top, tall] = ['bottom_side', 'top_side', 'height'].map((name) => `${given(one, name)} in`) as [
        string,
        string,
        string,
      ];
      const [inner, outer] = [`(${bottom} - ${top}) / (2 * tan(${half}))`, `(${bottom} - ${top}) / (2 * sin(${half}))`];
      const slant = `hypot(${tall}, ${inner})`;
      expectWanted(inches(slant), one, 'slant', SNAP);
      expectWanted(inches(`hypot(${tall}, ${outer})`), one, 'lateral_edge', SNAP);
      const base = valueOf(`atan2(${tall}, ${inner})`);
      expectWanted(base, one, 'base_dihedral', 1e-6);
      const side = `acos(-(sin(${base}°) ^ 2 * cos(2 * ${half}) + cos(${base}°) ^ 2))`;
      expectWanted(valueOf(side), one, 'side_dihedral', 3e-6);
      expectWanted(valueOf(`atan2(${slant}, (${bottom} - ${top}) / 2)`), one, 'panel_base_angle', 1e-6);
      const area = `${given(one, 'sides')} * (${bottom} + ${top}) / 2 * ${slant}`;
      expectWanted(valueOf(area) / 645.16, one, 'lateral_area', 1e-7);
    }
  },
  // Machinery's Handbook, 31st ed., p. 89; a foot is an inch here.
  'solids-mh89': () => {
    const [frustum, cylinder, wedge] = casesOf('solids-mh89') as [Case, Case, Case];
    const [low, high] = ['2 in * 3 in', '1 in * 1.5 in'];
    const volume = `4.5 in / 3 * (${low} + ${high} + sqrt(${low}) * sqrt(${high}))`;
    expectWanted(valueOf(volume) / 25.4 ** 3, frustum, 'volume', 1e-9);
    expectWanted(valueOf('pi * 2.5 in * 20 in') / 645.16, cylinder, 'lateral_area', 1e-8);
    expectWanted(valueOf('pi * (2.5 in / 2) ^ 2 * 20 in') / 25.4 ** 3, cylinder, 'volume', 1e-9);
    const cut = '(2 * 4 in + 5 in) * 3 in * 4.5 in / 6';
    expectWanted(valueOf(cut) / 25.4 ** 3, wedge, 'volume_in3', 1e-9);
    expect(showValue(valueOf(cut), 'volume', { units: 'cm' }).text).toBe('479.3 cm³'); // 479.32162
  },
  'unit-definitions': () => {
    for (const one of casesOf('unit-definitions')) {
      const [input] = Object.values(one.inputs) as [Quantity];
      const [output] = Object.values(one.expected) as [Quantity];
      const pair = `${input.unit} to ${output.unit}`;
      if (pair === 'in to mm') {
        const read = readLength(`${input.value} in`, { units: 'mm' });
        expect(read.ok && read.value.mm).toBe(output.value);
      } else if (pair === 'mm to in') {
        // As a ruler with sixty-fourths reads it: within 1/128 in.
        const read = readValue({ kind: 'length' }, show(Number(input.value), { units: 'in', grid: '1/32in' }).text, {
          units: 'in',
        });
        expectClose((read.ok ? read.value : NaN) / 25.4, one.expected_decimal?.length ?? NaN, 1 / 128);
      } else if (pair === 'in^2 to mm^2') expect(valueOf('1 in * 1 in')).toBe(output.value);
      else if (pair === 'in^3 to cm^3') expectClose(valueOf('1 in * 1 in * 1 in') / 1000, Number(output.value), 1e-9);
      else if (pair === 'lb to g')
        // 500 sheets of 20 × 26 in, one pound in all.
        expectClose(gramsPerSquareMetre(1) * 500 * 20 * 26 * 0.0254 ** 2, Number(output.value), 1e-9);
      // No ruler here has yards, no caliper points.
      else expect(['yd to m', 'point (paper), mil to mm']).toContain(pair);
    }
  },
  'basis-weight-factor': () => {
    const cover = casesOf('basis-weight-factor').find(({ inputs }) => inputs.grade?.value === 'cover');
    if (!cover) throw new Error('no cover');
    expectWanted(gramsPerSquareMetre(1), cover, 'factor');
  },
  'basis-weight-table': () => {
    const cover = casesOf('basis-weight-table').filter(({ inputs }) => inputs.grade?.value === 'cover');
    expect(cover.length).toBeGreaterThan(4);
    for (const one of cover) {
      expectWanted(gramsPerSquareMetre(given(one, 'basis_weight')), one, 'grammage');
      expect(Math.round(gramsPerSquareMetre(given(one, 'basis_weight')))).toBe(one.expected.grammage_rounded?.value);
    }
  },
  // Derived: two walls and the clearance on both sides; lengthwise, where no tab lies between lid and base.
  'thick-board-fit': () => {
    for (const one of casesOf('thick-board-fit')) {
      const figures = figuresOf(
        modelOf('lidded-box'),
        {
          'inside length': given(one, 'base_inside'),
          'card thickness': given(one, 'thickness'),
          play: 2 * given(one, 'clearance_per_side'),
        },
        { units: 'mm', grid: '0.5mm' },
      );
      expectWanted(exact(figures, 'lid inside length'), one, 'lid_inside');
      expectWanted(exact(figures, 'outside length'), one, 'lid_outside');
      const fit = modelOf('lidded-box').pattern.fits.find(({ name }) => name === 'lid goes over the ends');
      expect(fit?.left).toBe('lid inside length - (inside length + 2 * card thickness)');
      expectWanted(exact(figures, 'lid inside length') - exact(figures, 'play'), one, 'base_outside');
    }
  },
};
function expectSegment(one: Case): void {
  const degrees = given(one, 'central_angle');
  const { arc, loop } = segment(1, degrees);
  expectWanted(lengthOf(arc), one, 'arc', 1e-9);
  expectWanted(areaOf(loop), one, 'area', 1e-9);
  if (degrees > 180) return; // the formulas know the smaller arc over a chord
  // A radius of a metre: a nanometre is a billionth of it.
  const chord = `${1000 * Math.hypot(arc.to.x - arc.from.x, arc.to.y - arc.from.y)} mm`;
  expectWanted(valueOf(chord) / 1000, one, 'chord', 2e-9);
  // Near the half circle the chord hardly tells the angle.
  expectWanted(valueOf(`arc length(${chord}, 1000 mm)`) / 1000, one, 'arc', degrees > 170 ? 1e-5 : 1e-7);
  expectWanted(valueOf(`arc height(${chord}, 1000 mm)`) / 1000, one, 'sagitta', degrees > 170 ? 1e-5 : 1e-7);
}
/** The same arc on the other side of the middle. */
function turned(arc: Arc): Arc {
  return { ...arc, from: arc.to, to: arc.from };
}

/** Groups that are checked beside what they are about. */
const ELSEWHERE: Readonly<Record<string, string>> = {
  'chord-radius-to-arc': 'engine/formula.test.ts',
  'regular-polygon-printed': 'engine/patterns/polygon-box.test.ts',
  'regular-polygon-computed': 'engine/patterns/polygon-box.test.ts',
  'cone-frustum-worked': 'engine/patterns/cone-cup.test.ts',
  'cone-development': 'engine/patterns/cone-cup.test.ts',
  'cone-frustum-development': 'engine/patterns/cone-cup.test.ts',
  pyramid: 'engine/patterns/pyramid-box.test.ts',
  'polyhedron-known-angles': 'engine/patterns/pyramid-box.test.ts',
  'inch-64ths': 'engine/measure.test.ts',
  'round-to-fraction': 'engine/measure.test.ts',
  'paper-A': 'reference/stocks.test.ts',
  'paper-US': 'reference/stocks.test.ts',
  'envelope-square': 'engine/patterns/diagonal-envelope.test.ts',
  'pillow-curve': 'engine/patterns/pillow-box.test.ts',
  'pillow-curve-general': 'engine/patterns/pillow-box.test.ts',
  'offset-polygon': 'engine/patterns/frame-box.test.ts',
};
/** Groups about what the product does not do, with why. */
const NOT_APPLICABLE: Readonly<Record<string, string>> = {
  'ellipse-perimeter': 'no box is oval: curves are lines and arcs of circles',
  'output-units': 'what a page makes of a millimetre is checked where files are measured, not in the engine',
  'paper-B': 'no sheet of the B series is offered',
  'paper-C': 'no sheet of the C series is offered',
  'envelope-sizes': 'an envelope is asked by its card, not by the name of a size',
  'basis-weight-equivalents': 'the handbook knows pounds of cover stock and no other grade',
  'caliper-ranges': 'a range to judge by, not a value: the reader measures the card',
  'bend-faa': 'sheet metal: card is scored, and patterns allow for layers, not for bends',
  'bend-sheetmetal': 'sheet metal, as bend-faa',
  'bend-neutral-axis': 'a scored fold of card has no radius; layers are counted in card thicknesses',
  'bend-mh-empirical': 'sheet metal, as bend-faa',
  'line-conventions':
    'facts about drawings without numbers of ours: line styles are chosen in the look of the interface',
  'arc-bezier': 'drawings keep arcs as arcs; the PDF library turns them into curves',
};

describe('check values', () => {
  it.each(Object.entries(HERE))('hold: %s', (_, check) => check());
  it('are all checked here, beside what they are about, or said not to apply', () => {
    const said = [HERE, ELSEWHERE, NOT_APPLICABLE].flatMap((list) => Object.keys(list));
    expect([...said].sort()).toEqual(groups.map(({ id }) => id).sort());
    expect(groups).toHaveLength(44);
  });
  it.each(Object.entries(ELSEWHERE))('are named where they are checked: %s in %s', (id, file) => {
    expect(readFileSync(join(import.meta.dirname, '..', file), 'utf8')).toContain(id);
  });
});
