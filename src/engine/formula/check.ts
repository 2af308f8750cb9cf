import type { Fault } from '../types';
import type { FunctionName } from './functions';
import { ANGLE, LENGTH, NUMBER, TRUTH, WHOLE, sameKind, sayKind, type Kind } from './kind';
import { SAYS } from './messages';
import { SIGNATURES } from './signatures';
import type { Node, Scope } from './syntax';

/** What a formula gives and which names it reads, or what is wrong with it. */
export interface Checked {
  readonly kind: Kind;
  readonly uses: readonly string[];
  readonly faults: readonly Fault[];
}

/**
 * Checks the kinds of a formula that reads, so that a length plus a bare number is refused when it is written and not when
 * it runs. All faults at once; with any, the kind means nothing.
 */
export function checkFormula(node: Node, scope: Scope, where: string, wanted?: Kind): Checked {
  const faults: Fault[] = [];
  const uses = new Set<string>();
  const kind = kindOfNode(node, scope, { where, faults, uses });
  if (faults.length === 0 && wanted && !accepts(wanted, kind))
    faults.push(faultAt(where, 'wrong result', SAYS.wrongResult(sayKind(wanted), sayKind(kind)), node));
  return { kind, uses: [...uses], faults };
}

/** A whole number is a number, but not every number is whole. */
function accepts(wanted: Kind, kind: Kind): boolean {
  if (!sameKind(wanted, kind)) return false;
  return !(wanted.type === 'quantity' && wanted.whole && kind.type === 'quantity' && !kind.whole);
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

function kindOfNode(node: Node, scope: Scope, context: Context): Kind {
  const complain = (
    code: string,
    says: readonly string[],
    at: { span: { from: number; to: number } } = node,
    kind: Kind = NUMBER,
  ): Kind => {
    context.faults.push(faultAt(context.where, code, says, at));
    return kind;
  };
  const into = (inner: Node) => kindOfNode(inner, scope, context);

  switch (node.type) {
    case 'number':
      if (node.unit === null) return Number.isInteger(node.value) ? WHOLE : NUMBER;
      return node.unit === '°' ? ANGLE : LENGTH;
    case 'name': {
      const { name } = node;
      if (name === 'pi') return NUMBER;
      if (scope.options(name) !== undefined) return complain('choice alone', SAYS.choiceAlone(name));
      context.uses.add(name);
      return scope.kind(name);
    }
    case 'is':
      context.uses.add(node.choice);
      return TRUTH;
    case 'unary': {
      const kind = into(node.of);
      if (node.sign === 'not')
        return kind.type === 'truth' ? kind : complain('not yes or no', SAYS.notYesNo(sayKind(kind)), node.of, TRUTH);
      if (kind.type === 'truth' || kind.type === 'choice')
        return complain('wants', SAYS.wants('“−”', 'a measure or a number', sayKind(kind)), node.of);
      return kind;
    }
    case 'logic': {
      const [left, right] = [into(node.left), into(node.right)];
      const [wrong, at] = left.type === 'truth' ? [right, node.right] : [left, node.left];
      return wrong.type === 'truth' ? TRUTH : complain('not yes or no', SAYS.notYesNo(sayKind(wrong)), at, TRUTH);
    }
    case 'if': {
      const [test, then, otherwise] = [into(node.test), into(node.then), into(node.otherwise)];
      if (test.type !== 'truth') return complain('not yes or no', SAYS.notYesNo(sayKind(test)), node.test, then);
      if (!sameKind(then, otherwise))
        return complain('mixed', SAYS.mixed('else', sayKind(then), sayKind(otherwise)), node.otherwise, then);
      return accepts(then, otherwise) ? then : otherwise;
    }
    case 'comparison': {
      const [left, right] = [into(node.left), into(node.right)];
      return sameKind(left, right)
        ? TRUTH
        : complain('mixed', SAYS.mixed(node.sign, sayKind(left), sayKind(right)), node, TRUTH);
    }
    case 'arithmetic': {
      const [left, right] = [into(node.left), into(node.right)];
      if (context.faults.length > 0) return left;
      const kind = arithmeticKind(node, left, right);
      return 'type' in kind ? kind : complain(kind[0], kind[1], node, left);
    }
    case 'call': {
      const definition = SIGNATURES[node.name as FunctionName];
      const args = node.args.map(into);
      if (args.length < definition.least || args.length > definition.most)
        return complain('wrong count', SAYS.wrongCount(node.name, definition.wants, args.length), {
          span: node.nameSpan,
        });
      if (context.faults.length > 0) return NUMBER;
      const kind = definition.kind(args);
      if ('type' in kind) return kind;
      const found = sayKind(args[kind.argument] as Kind);
      return complain('wants', SAYS.wants(node.name, kind.wanted, found), node.args[kind.argument] ?? node);
    }
  }
}

/** The kind of `left sign right`, or a code with its words. */
function arithmeticKind(
  node: Node & { type: 'arithmetic' },
  left: Kind,
  right: Kind,
): Kind | readonly [string, readonly string[]] {
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
