import Fraction from 'fraction.js';
import { evaluate as mathEvaluate } from 'mathjs';
import { expect, it } from 'vitest';
import { expectClose } from '../setup/expect-close';
import { valueOf } from './bare-pattern';
import { seeded } from './patterns';

// Generated formulas against mathjs (floating point, trigonometry, conditions) and fraction.js (exact fractions of an inch).

const random = seeded(31);
const pick = <T>(list: readonly T[]): T => list[Math.floor(random() * list.length)] as T;
const whole = (most: number): number => 1 + Math.floor(random() * most);

/** A formula as a maker writes it and as mathjs reads it. */
interface Twin {
  readonly ours: string;
  readonly theirs: string;
}
const both = (text: string): Twin => ({ ours: text, theirs: text });
const joined = (a: Twin, sign: string, b: Twin): Twin => ({
  ours: `${a.ours} ${sign} ${b.ours}`,
  theirs: `${a.theirs} ${sign} ${b.theirs}`,
});
const wrapped = (inner: Twin, before = '(', after = ')'): Twin => ({
  ours: `${before}${inner.ours}${after}`,
  theirs: `${before}${inner.theirs}${after}`,
});

/** Arithmetic without parentheses where none are needed: precedence and grouping are the language's own. */
function number(depth: number): Twin {
  if (depth === 0 || random() < 0.15) return both(random() < 0.6 ? `${whole(9)}` : `${whole(9)}.${whole(9)}`);
  const kind = random();
  if (kind < 0.1) return wrapped(number(depth - 1), '-(');
  if (kind < 0.18) return both(`-${whole(9)} ^ ${whole(3)}`);
  if (kind < 0.26) return both(`${whole(3)} ^ ${whole(2)} ^ ${whole(2)}`);
  if (kind < 0.36) return wrapped(joined(number(depth - 1), pick(['+', '-']), number(depth - 1)));
  if (kind < 0.42) return wrapped(number(depth - 1), `${pick(['abs', 'floor', 'ceil'])}(`);
  if (kind < 0.48) return wrapped(joined(number(depth - 1), ',', number(depth - 1)), `${pick(['min', 'max'])}(`);
  if (kind < 0.56) {
    const [name, degrees] = [pick(['sin', 'cos']), whole(359)];
    return { ours: `${name}(${degrees}°)`, theirs: `${name}(${degrees} deg)` };
  }
  if (kind < 0.66) {
    const [test, then, otherwise] = [truth(depth - 1), number(depth - 1), number(depth - 1)];
    return {
      ours: `(if ${test.ours} then ${then.ours} else ${otherwise.ours})`,
      theirs: `((${test.theirs}) ? (${then.theirs}) : (${otherwise.theirs}))`,
    };
  }
  return joined(number(depth - 1), pick(['+', '-', '*', '/']), number(depth - 1));
}
function truth(depth: number): Twin {
  // Half a unit apart at least: what is equal to the nanometre here is not a matter of taste.
  const compared = (): Twin => joined(both(`${whole(9)}`), pick(['<', '>', '<=', '>=']), both(`${whole(9)}`));
  if (depth <= 0 || random() < 0.4) return compared();
  if (random() < 0.3) return wrapped(truth(depth - 1), 'not (');
  return joined(wrapped(truth(depth - 1)), pick(['and', 'or']), wrapped(truth(depth - 1)));
}
const UNITS = ['in', 'mm', 'cm'] as const;
const MM: Readonly<Record<(typeof UNITS)[number], number>> = { in: 25.4, mm: 1, cm: 10 };
const PARTS = [2, 4, 8, 16, 32, 64] as const;

/** Our formula, its exact value in millimetres. */
interface Exact {
  readonly formula: string;
  readonly mm: Fraction;
}
function literal(): Exact {
  const unit = pick(UNITS);
  const scale = new Fraction(MM[unit] * 10, 10);
  const kind = random();
  if (kind < 0.5) {
    const [units, bottom] = [whole(12), pick(PARTS)];
    const top = whole(bottom - 1);
    return {
      formula: `${units} ${top}/${bottom} ${unit}`,
      mm: new Fraction(units).add(new Fraction(top, bottom)).mul(scale),
    };
  }
  if (kind < 0.75) return { formula: `${whole(40)}/${whole(9)} ${unit}`, mm: new Fraction(0) };
  const tenths = whole(400);
  return { formula: `${tenths / 10} ${unit}`, mm: new Fraction(tenths, 10).mul(scale) };
}
function length(depth: number): Exact {
  if (depth === 0 || random() < 0.2) {
    const one = literal();
    const [, top, bottom, unit] = /^(\d+)\/(\d+) (in|mm|cm)$/.exec(one.formula) ?? [];
    if (top === undefined) return one;
    return { ...one, mm: new Fraction(Number(top), Number(bottom)).mul(MM[unit as 'in'] * 10).div(10) };
  }
  const [a, b, kind] = [length(depth - 1), length(depth - 1), random()];
  if (kind < 0.3) return { formula: `${a.formula} + ${b.formula}`, mm: a.mm.add(b.mm) };
  if (kind < 0.5) return { formula: `${a.formula} - (${b.formula})`, mm: a.mm.sub(b.mm) };
  if (kind < 0.6) return { formula: `-(${a.formula})`, mm: a.mm.neg() };
  const [top, bottom] = [whole(7), whole(9)];
  if (kind < 0.75) return { formula: `${top} * (${a.formula})`, mm: a.mm.mul(top) };
  if (kind < 0.9) return { formula: `(${a.formula}) / ${bottom}`, mm: a.mm.div(bottom) };
  const [more, less] = a.mm.compare(b.mm) >= 0 ? [a, b] : [b, a];
  return { formula: `max(${a.formula}, ${b.formula}) - min(${a.formula}, ${b.formula})`, mm: more.mm.sub(less.mm) };
}

it('agrees with mathjs on 2,500 formulas of numbers, angles, conditions and powers', () => {
  let compared = 0;
  for (let index = 0; index < 2500; index += 1) {
    const { ours, theirs } = number(4);
    if (ours.length > 380) continue;
    const expected = Number(mathEvaluate(theirs));
    if (!Number.isFinite(expected) || Math.abs(expected) > 1e6) continue;
    const actual = valueOf(ours);
    // A divisor within a nanometre of nothing counts as nothing here; mathjs leaves noise of sines in it.
    if (Number.isNaN(actual)) continue;
    expectClose(actual, expected, Math.max(2e-6, Math.abs(expected) * 1e-8), ours);
    compared += 1;
  }
  expect(compared).toBeGreaterThan(1800);
});
it('agrees with fraction.js on 2,000 sums of mixed fractions in inches, millimetres and centimetres', () => {
  let compared = 0;
  for (let index = 0; index < 2000; index += 1) {
    const { formula, mm } = length(3);
    if (formula.length > 380) continue;
    // Shown to the nanometre.
    expectClose(valueOf(formula), mm.valueOf(), 1e-6, formula);
    compared += 1;
  }
  expect(compared).toBeGreaterThan(1900);
});
it('binds unary minus as mathematics does: −3² is −9, and powers to the right: 2^3^2 is 512', () => {
  expect(
    ['-3 ^ 2', '2 ^ 3 ^ 2', '2 - 3 - 4', '12 / 3 / 2', '2 + 3 * 4 ^ 2', '-2 * -3'].map((one) => valueOf(one)),
  ).toEqual([-9, 512, -5, 2, 50, 6]);
});
