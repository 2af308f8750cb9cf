import { evaluate as mathEvaluate } from 'mathjs';
import { describe, expect, it } from 'vitest';
import { compilePattern, explain, type Fault } from '@/engine';
import groups from '../reference/check-values.json' with { type: 'json' };
import { expectClose } from '../setup/expect-close';
import { bare, valueOf } from './bare-pattern';
import { figuresOf, seeded } from './patterns';

function faultsOf(formula: string): readonly Fault[] {
  const compiled = compilePattern(bare({ probe: formula }));
  return compiled.ok ? [] : compiled.faults;
}
const firstFault = (formula: string): string => explain(faultsOf(formula)[0] as Fault);

describe('formulas', () => {
  it.each([
    ['inside width + 2 * 1/2 in', 7 * 25.4],
    ['inside width / 4 - 5 3/8 in', (1.5 - 5.375) * 25.4],
    ['if spine is curved then inside depth else inside width', 50.8],
    ['if spine is not curved then inside depth else inside width', 152.4],
    ['if spine is quite straight then inside depth else inside width', 152.4],
    ['if inside width > inside depth and not (inside depth >= 3 in) then 1 mm else 2 mm', 1],
    ['min(inside width, inside depth, 1 in)', 25.4],
    ['down to(inside width / 7, 1/4 in)', 19.05],
    ['up to(10 mm, 4 mm)', 12],
    ['hypot(3 mm, 4 mm)', 5],
    ['sqrt(inside width * inside width)', 152.4],
    ['-inside depth + 3 * (1 mm + 2 mm)', -41.8],
    ['12 mm', 12],
    ['2 cm', 20],
  ])('%s works out', (formula, expected) => {
    expectClose(valueOf(formula), expected, 1e-6);
  });
  it('knows numbers and angles', () => {
    expectClose(valueOf('inside width / inside depth'), 3, 1e-12);
    expectClose(valueOf('sin(30°)'), 0.5, 1e-12);
    expectClose(valueOf('atan2(1 mm, 1 mm)'), 45, 1e-9);
    expectClose(valueOf('2 ^ 3 ^ 2'), 512, 1e-9);
    expectClose(valueOf('180° / pi / 1°'), 57.29577951308232, 1e-6);
    expectClose(valueOf('ceil(inside width / 1 in - 0.2)'), 6, 0);
  });
  it('takes the longest name', () => {
    const model = compilePattern(
      bare({ inside: '1 mm', 'inside width max': '3 mm', probe: 'inside width max + inside' }),
    );
    expect(model.ok).toBe(true);
  });

  it.each([
    ['inside widht', 'No measure is called “inside widht”. The nearest name is “inside width”.'],
    [
      'inside width + 2',
      'A length + a whole number. Both sides of “+” must be of one kind; a bare number needs its unit, such as 2 in or 5 mm.',
    ],
    ['sin(inside width)', 'Sin was given a length. Give sin an angle, such as 30°.'],
    ['inside width *', 'The formula stops too soon. Go on with a measure or a number.'],
    [
      'inside width inside depth',
      '“inside depth” stands after the end of the formula. Put a sign between them, or take it out.',
    ],
    ['arc lenght(1 in, 2 in)', 'No function is called “arc lenght”. The nearest function is “arc length”.'],
    ['if spine is bent then 1 mm else 2 mm', 'Spine has no option “bent”. It can be curved or quite straight.'],
    ['spine', 'The choice “spine” is not a value. Ask which option it is: if spine is … then … else …'],
    ['inside width is curved', '“inside width” is not a choice. Use = to compare values; “is” is for choices.'],
    ['inside width * inside depth', 'This works out an area. It must work out a length.'],
    ['2 ? 3', '“?” means nothing here. Take it out.'],
    ['', 'There is no formula. Type a measure, a number with its unit, or a sum of them.'],
    ['min()', 'Min was given 0 values. Give min values of one kind.'],
    ['if inside width then 1 mm else 2 mm', 'This is a length. Compare two values, or ask which option a choice is.'],
  ])('refuses “%s” when it is written', (formula, sentence) => {
    expect(firstFault(formula)).toBe(sentence);
  });
  it('marks the characters at fault and what would cure them', () => {
    expect(faultsOf('2 * inside widht + 1 mm')[0]).toMatchObject({
      span: { from: 4, to: 16 },
      cure: 'inside width',
      where: 'measure “probe”',
    });
  });
  it('reports a circle as its chain of names', () => {
    const compiled = compilePattern(bare({ a: 'b + 1 mm', b: 'c', c: 'a' }));
    expect(compiled.ok ? [] : compiled.faults.map(explain)).toEqual([
      'It depends on itself: a → b → c → a. Break the circle at one of them.',
    ]);
  });
  it('reports all faults of a pattern at once', () => {
    const compiled = compilePattern(bare({ a: 'nowhere', b: 'inside width + 1', if: '1 mm' }));
    expect(compiled.ok ? [] : compiled.faults.map((fault) => fault.code)).toEqual([
      'pattern reserved name',
      'formula unknown name',
      'formula mixed',
    ]);
  });
  it('sets limits to length, depth and size', () => {
    expect(firstFault(`1 mm${' + 1 mm'.repeat(100)}`)).toBe(
      'The formula has 704 characters. Split it into two worked measures.',
    );
    expect(firstFault(`${'('.repeat(60)}1 mm${')'.repeat(60)}`)).toContain('more than 40 deep');
  });
  it('agrees with mathjs on generated arithmetic', () => {
    const random = seeded(3);
    const grow = (depth: number): string => {
      if (depth === 0 || random() < 0.2)
        return `${Math.ceil(random() * 9)}${random() < 0.5 ? '' : `.${Math.ceil(random() * 9)}`}`;
      const sign = ['+', '-', '*', '/'][Math.floor(random() * 4)];
      return random() < 0.15 ? `-(${grow(depth - 1)})` : `(${grow(depth - 1)} ${sign} ${grow(depth - 1)})`;
    };
    let compared = 0;
    for (let index = 0; index < 300; index += 1) {
      const formula = grow(4);
      const expected = Number(mathEvaluate(formula));
      if (!Number.isFinite(expected) || Math.abs(expected) > 1e6) continue;
      const actual = valueOf(formula);
      // A divisor within a nanometre of nothing counts as nothing here.
      if (Number.isNaN(actual)) continue;
      expectClose(actual, expected, Math.max(1e-6, Math.abs(expected) * 1e-9), formula);
      compared += 1;
    }
    expect(compared).toBeGreaterThan(200);
  });
});

describe('arcs', () => {
  const group = (id: string) => groups.find((one) => one.id === id)?.cases ?? [];
  type Quantities = Record<string, { value: number; unit: string }>;
  const at = (quantities: unknown, name: string): number => (quantities as Quantities)[name]?.value ?? NaN;

  // Source: Machinery's Handbook, 31st edition, segment table formulas 13–15; values computed with mathjs at 40 digits.
  it('gives arc length, height and angle from chord and radius as the reference values', () => {
    for (const { inputs, expected } of group('chord-radius-to-arc')) {
      const [chord, radius] = [`${at(inputs, 'chord')} in`, `${at(inputs, 'radius')} in`];
      expectClose(valueOf(`arc length(${chord}, ${radius})`) / 25.4, at(expected, 'arc'), 1e-7);
      expectClose(valueOf(`arc height(${chord}, ${radius})`) / 25.4, at(expected, 'sagitta'), 1e-7);
      expectClose(valueOf(`arc angle(${chord}, ${radius})`), at(expected, 'central_angle'), 1e-6);
    }
    expect(group('chord-radius-to-arc').length).toBe(8);
  });
  it('gives the radius from chord and height as the reference values', () => {
    for (const { inputs, expected } of group('chord-sagitta-to-radius')) {
      expectClose(
        valueOf(`arc radius(${at(inputs, 'chord')} in, ${at(inputs, 'sagitta')} in)`) / 25.4,
        at(expected, 'radius'),
        1e-7,
      );
    }
  });
  it('works the handbook’s example: chord 16 in, height 6 in, radius 8 1/3 in (Machinery’s Handbook, 31st ed., p. 79)', () => {
    expectClose(valueOf('arc radius(16 in, 6 in)') / 25.4, 25 / 3, 1e-6);
  });
  it('gives half the circle for a chord as long as the diameter, and nothing beyond', () => {
    expectClose(valueOf('arc length(4 in, 2 in)'), Math.PI * 50.8, 1e-6);
    expect(valueOf('arc length(4.1 in, 2 in)')).toBeNaN();
  });
  it('says why an arc cannot be drawn', () => {
    const model = compilePattern(bare({ arc: 'arc length(inside width, inside depth)' }));
    if (!model.ok) throw new Error('compiles');
    expect(figuresOf(model.value).problems[0]?.sentence).toBe(
      '“arc” cannot be worked out at this size: a line of 6 in does not fit across a circle of 4 in.',
    );
  });
});
