import { MM_PER, atLeast, isZero, moreThan, same } from '../measure';
import { WORK, type FunctionName } from './functions';
import type { Comparison, Node, Scope, Work } from './syntax';

/**
 * A checked formula as a function of the values. Closures only: nothing is generated as code, since pages run without
 * unsafe-eval and authors are not trusted. The commonest shapes, a name or a number beside a sign, are one closure and not
 * three: a call costs more than the sum it makes.
 */
export function workOf(node: Node, scope: Scope): Work {
  const into = (inner: Node) => workOf(inner, scope);
  switch (node.type) {
    case 'number': {
      const value = numberOf(node);
      return () => value;
    }
    case 'name': {
      if (node.name === 'pi') return () => Math.PI;
      const slot = scope.slot(node.name);
      return (values) => values[slot] as number;
    }
    case 'is': {
      const slot = scope.slot(node.choice);
      const index = scope.options(node.choice)?.indexOf(node.option) ?? -1;
      return node.not ? (values) => (values[slot] === index ? 0 : 1) : (values) => (values[slot] === index ? 1 : 0);
    }
    case 'unary': {
      const of = into(node.of);
      return node.sign === 'not' ? (values) => (of(values) === 0 ? 1 : 0) : (values) => -of(values);
    }
    case 'logic': {
      const [left, right] = [into(node.left), into(node.right)];
      return node.sign === 'and'
        ? (values) => (left(values) !== 0 ? right(values) : 0)
        : (values) => (left(values) !== 0 ? 1 : right(values));
    }
    case 'if': {
      const [test, then, otherwise] = [into(node.test), into(node.then), into(node.otherwise)];
      return (values) => (test(values) !== 0 ? then(values) : otherwise(values));
    }
    case 'comparison': {
      const [left, right] = [into(node.left), into(node.right)];
      const holds = COMPARES[node.sign];
      return (values) => (holds(left(values), right(values)) ? 1 : 0);
    }
    case 'arithmetic':
      return arithmeticWork(node, scope);
    case 'call': {
      const work: (...args: number[]) => number = WORK[node.name as FunctionName];
      const args = node.args.map(into);
      const [a, b] = args as [Work, Work];
      if (args.length === 1) return (values) => work(a(values));
      if (args.length === 2) return (values) => work(a(values), b(values));
      return (values) => work(...args.map((arg) => arg(values)));
    }
  }
}

const numberOf = ({ value, unit }: Node & { type: 'number' }): number =>
  unit === null || unit === '°' ? value : value * MM_PER[unit];

const COMPARES: Readonly<Record<Comparison, (a: number, b: number) => boolean>> = {
  '<': (a, b) => moreThan(b, a),
  '>': moreThan,
  '<=': (a, b) => atLeast(b, a),
  '>=': atLeast,
  '=': same,
  '<>': (a, b) => !same(a, b),
};

function arithmeticWork({ sign, left, right }: Node & { type: 'arithmetic' }, scope: Scope): Work {
  const [x, y] = [workOf(left, scope), workOf(right, scope)];
  const a = left.type === 'name' && left.name !== 'pi' ? scope.slot(left.name) : -1;
  const b = right.type === 'name' && right.name !== 'pi' ? scope.slot(right.name) : -1;
  const k = right.type === 'number' ? numberOf(right) : NaN;
  const [bare, constant] = [a >= 0, !Number.isNaN(k)];
  switch (sign) {
    case '+':
      if (bare && b >= 0) return (v) => (v[a] as number) + (v[b] as number);
      if (bare && constant) return (v) => (v[a] as number) + k;
      if (b >= 0) return (v) => x(v) + (v[b] as number);
      return constant ? (v) => x(v) + k : (v) => x(v) + y(v);
    case '-':
      if (bare && b >= 0) return (v) => (v[a] as number) - (v[b] as number);
      if (bare && constant) return (v) => (v[a] as number) - k;
      if (b >= 0) return (v) => x(v) - (v[b] as number);
      return constant ? (v) => x(v) - k : (v) => x(v) - y(v);
    case '*':
      if (bare && b >= 0) return (v) => (v[a] as number) * (v[b] as number);
      if (bare && constant) return (v) => (v[a] as number) * k;
      if (left.type === 'number' && b >= 0) {
        const times = numberOf(left);
        return (v) => times * (v[b] as number);
      }
      return constant ? (v) => x(v) * k : (v) => x(v) * y(v);
    case '^':
      return (v) => x(v) ** y(v);
    case '/':
      if (constant && !isZero(k)) return bare ? (v) => (v[a] as number) / k : (v) => x(v) / k;
      return (v) => {
        const divisor = y(v);
        return isZero(divisor) ? NaN : x(v) / divisor;
      };
  }
}
