import { MM_PER, atLeast, isZero, moreThan, same } from '../measure';
import type { Fault, Result } from '../types';
import { FUNCTIONS } from './functions';
import { ANGLE, LENGTH, NUMBER, TRUTH, WHOLE, sameKind, sayKind, type Kind } from './kind';
import { SAYS } from './messages';
import { parseFormula, type Names } from './parse';
import type { Node } from './syntax';

/** Where values live while a formula works: one number a name. */
export type Values = Float64Array;
export type Work = (values: Values) => number;

/** What the names in a formula stand for. */
export interface Scope extends Names {
  readonly slot: (name: string) => number;
  readonly kind: (name: string) => Kind;
}
export interface Formula {
  readonly text: string;
  readonly node: Node;
  readonly kind: Kind;
  readonly work: Work;
  /** Names that the formula reads, without repeats. */
  readonly uses: readonly string[];
}

/**
 * Text to a checked, compiled function. Kinds are checked here, so that a length plus a bare number is refused when it is
 * written and not when it runs. Compiled to closures; nothing is generated as code.
 */
export function compileFormula(text: string, scope: Scope, where: string, wanted?: Kind): Result<Formula> {
  const parsed = parseFormula(text, scope, where);
  if (!parsed.ok) return parsed;
  const faults: Fault[] = [];
  const uses = new Set<string>();
  const compiled = compileNode(parsed.value, scope, { where, faults, uses });
  if (faults.length > 0) return { ok: false, faults };
  if (wanted && !accepts(wanted, compiled.kind)) {
    return {
      ok: false,
      faults: [faultAt(where, 'wrong result', SAYS.wrongResult(sayKind(wanted), sayKind(compiled.kind)), parsed.value)],
    };
  }
  return { ok: true, value: { text, node: parsed.value, kind: compiled.kind, work: compiled.work, uses: [...uses] } };
}

/** A whole number is a number, but not every number is whole. */
export function accepts(wanted: Kind, kind: Kind): boolean {
  if (!sameKind(wanted, kind)) return false;
  return !(wanted.type === 'quantity' && wanted.whole && kind.type === 'quantity' && !kind.whole);
}

interface Compiled {
  readonly kind: Kind;
  readonly work: Work;
}
interface Context {
  readonly where: string;
  readonly faults: Fault[];
  readonly uses: Set<string>;
}

function faultAt(
  where: string,
  code: string,
  says: readonly string[],
  node: { span: { from: number; to: number } },
): Fault {
  const [found = '', expected = '', hint = ''] = says;
  return { code: `formula ${code}`, where, span: { from: node.span.from, to: node.span.to }, found, expected, hint };
}

function compileNode(node: Node, scope: Scope, context: Context): Compiled {
  const complain = (
    code: string,
    says: readonly string[],
    at: { span: { from: number; to: number } } = node,
    kind: Kind = NUMBER,
  ): Compiled => {
    context.faults.push(faultAt(context.where, code, says, at));
    return { kind, work: () => NaN };
  };
  const into = (inner: Node) => compileNode(inner, scope, context);

  switch (node.type) {
    case 'number': {
      const { value, unit } = node;
      if (unit === null) return { kind: Number.isInteger(value) ? WHOLE : NUMBER, work: () => value };
      if (unit === '°') return { kind: ANGLE, work: () => value };
      const mm = value * MM_PER[unit];
      return { kind: LENGTH, work: () => mm };
    }
    case 'name': {
      const { name } = node;
      if (name === 'pi') return { kind: NUMBER, work: () => Math.PI };
      if (scope.options(name) !== undefined) return complain('choice alone', SAYS.choiceAlone(name));
      context.uses.add(name);
      const slot = scope.slot(name);
      return { kind: scope.kind(name), work: (values) => values[slot] as number };
    }
    case 'is': {
      context.uses.add(node.choice);
      const slot = scope.slot(node.choice);
      const index = scope.options(node.choice)?.indexOf(node.option) ?? -1;
      const { not } = node;
      return { kind: TRUTH, work: (values) => Number((values[slot] === index) !== not) };
    }
    case 'unary': {
      const { kind, work } = into(node.of);
      if (node.sign === 'not') {
        if (kind.type !== 'truth') return complain('not yes or no', SAYS.notYesNo(sayKind(kind)), node.of, TRUTH);
        return { kind, work: (values) => (work(values) === 0 ? 1 : 0) };
      }
      if (kind.type === 'truth' || kind.type === 'choice')
        return complain('wants', SAYS.wants('“−”', 'a measure or a number', sayKind(kind)), node.of);
      return { kind, work: (values) => -work(values) };
    }
    case 'logic': {
      const sides = [into(node.left), into(node.right)] as const;
      const wrong = sides.findIndex((side) => side.kind.type !== 'truth');
      if (wrong >= 0)
        return complain(
          'not yes or no',
          SAYS.notYesNo(sayKind((sides[wrong] as Compiled).kind)),
          wrong === 0 ? node.left : node.right,
          TRUTH,
        );
      const [left, right] = [sides[0].work, sides[1].work];
      return node.sign === 'and'
        ? { kind: TRUTH, work: (values) => (left(values) !== 0 ? right(values) : 0) }
        : { kind: TRUTH, work: (values) => (left(values) !== 0 ? 1 : right(values)) };
    }
    case 'if': {
      const test = into(node.test);
      const then = into(node.then);
      const otherwise = into(node.otherwise);
      if (test.kind.type !== 'truth')
        return complain('not yes or no', SAYS.notYesNo(sayKind(test.kind)), node.test, then.kind);
      if (!sameKind(then.kind, otherwise.kind)) {
        return complain(
          'mixed',
          SAYS.mixed('else', sayKind(then.kind), sayKind(otherwise.kind)),
          node.otherwise,
          then.kind,
        );
      }
      const kind = accepts(then.kind, otherwise.kind) ? then.kind : otherwise.kind;
      const [a, b, c] = [test.work, then.work, otherwise.work];
      return { kind, work: (values) => (a(values) !== 0 ? b(values) : c(values)) };
    }
    case 'comparison': {
      const left = into(node.left);
      const right = into(node.right);
      if (!sameKind(left.kind, right.kind))
        return complain('mixed', SAYS.mixed(node.sign, sayKind(left.kind), sayKind(right.kind)), node, TRUTH);
      return { kind: TRUTH, work: comparisonWork(node.sign, left.work, right.work) };
    }
    case 'arithmetic': {
      const left = into(node.left);
      const right = into(node.right);
      if (context.faults.length > 0) return { kind: left.kind, work: () => NaN };
      const kind = arithmeticKind(node, left.kind, right.kind);
      if (Array.isArray(kind)) return complain(kind[0] as string, kind[1] as readonly string[], node, left.kind);
      return { kind: kind as Kind, work: arithmeticWork(node.sign, left.work, right.work) };
    }
    case 'call': {
      const definition = FUNCTIONS[node.name];
      if (!definition) throw new Error(`the parser let the function ${node.name} through`);
      const args = node.args.map(into);
      if (args.length < definition.least || args.length > definition.most) {
        return complain('wrong count', SAYS.wrongCount(node.name, definition.wants, args.length), {
          span: node.nameSpan,
        });
      }
      if (context.faults.length > 0) return { kind: NUMBER, work: () => NaN };
      const kind = definition.kind(args.map((arg) => arg.kind));
      if ('argument' in kind) {
        const at = node.args[kind.argument] ?? node;
        return complain(
          'wants',
          SAYS.wants(node.name, kind.wanted, sayKind((args[kind.argument] as Compiled).kind)),
          at,
        );
      }
      return {
        kind,
        work: callWork(
          definition.work,
          args.map((arg) => arg.work),
        ),
      };
    }
  }
}

function comparisonWork(sign: string, left: Work, right: Work): Work {
  switch (sign) {
    case '<':
      return (values) => Number(moreThan(right(values), left(values)));
    case '>':
      return (values) => Number(moreThan(left(values), right(values)));
    case '<=':
      return (values) => Number(atLeast(right(values), left(values)));
    case '>=':
      return (values) => Number(atLeast(left(values), right(values)));
    case '=':
      return (values) => Number(same(left(values), right(values)));
    default:
      return (values) => Number(!same(left(values), right(values)));
  }
}

/** The kind of `left sign right`, or a code with its words. */
function arithmeticKind(
  node: Node & { type: 'arithmetic' },
  left: Kind,
  right: Kind,
): Kind | [string, readonly string[]] {
  const { sign } = node;
  const mixed = (): [string, readonly string[]] => ['mixed', SAYS.mixed(sign, sayKind(left), sayKind(right))];
  const whole = left.type === 'quantity' && left.whole && right.type === 'quantity' && right.whole;
  if (sign === '+' || sign === '-') {
    if (!sameKind(left, right) || left.type === 'truth' || left.type === 'choice') return mixed();
    return left.type === 'quantity' ? { ...left, whole } : left;
  }
  if (sign === '^') {
    if (right.type !== 'quantity' || right.power !== 0)
      return ['wants', SAYS.wants('“^”', 'a plain number after it', sayKind(right))];
    if (left.type !== 'quantity') return ['wants', SAYS.wants('“^”', 'a measure or a number', sayKind(left))];
    if (left.power === 0)
      return { ...left, whole: whole && constant(node.right) !== null && (constant(node.right) as number) >= 0 };
    const power = constant(node.right);
    if (power === null || !Number.isInteger(power) || Math.abs(power * left.power) > 6)
      return ['bad power', SAYS.badPower()];
    return { type: 'quantity', power: left.power * power, whole: false };
  }
  if (left.type === 'angle' && right.type === 'angle') return sign === '/' ? NUMBER : mixed();
  if (left.type === 'angle' && right.type === 'quantity' && right.power === 0) return ANGLE;
  if (right.type === 'angle' && left.type === 'quantity' && left.power === 0 && sign === '*') return ANGLE;
  if (left.type !== 'quantity' || right.type !== 'quantity') return mixed();
  const power = sign === '*' ? left.power + right.power : left.power - right.power;
  return { type: 'quantity', power, whole: whole && sign === '*' };
}

function constant(node: Node): number | null {
  if (node.type === 'number' && node.unit === null) return node.value;
  if (node.type === 'unary' && node.sign === '-') {
    const inner = constant(node.of);
    return inner === null ? null : -inner;
  }
  return null;
}

function arithmeticWork(sign: string, left: Work, right: Work): Work {
  switch (sign) {
    case '+':
      return (values) => left(values) + right(values);
    case '-':
      return (values) => left(values) - right(values);
    case '*':
      return (values) => left(values) * right(values);
    case '^':
      return (values) => left(values) ** right(values);
    default:
      return (values) => {
        const divisor = right(values);
        return isZero(divisor) ? NaN : left(values) / divisor;
      };
  }
}

function callWork(work: (...args: number[]) => number, args: readonly Work[]): Work {
  const [a, b] = args;
  if (args.length === 1 && a) return (values) => work(a(values));
  if (args.length === 2 && a && b) return (values) => work(a(values), b(values));
  return (values) => work(...args.map((arg) => arg(values)));
}
