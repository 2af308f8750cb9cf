import { show, decimal } from '../measure';
import type { GridId, Unit } from '../types';
import { CANNOT } from './cannot';
import { LENGTH, sameKind } from './kind';
import type { Formula, Node, Scope, Values } from './syntax';
import { workOf } from './work';

/**
 * Why a formula has no answer at these values, as the end of a sentence: "a line of 5 in does not fit across a circle of
 * 4 1/2 in". Finds the innermost part that fails while all that it is given is sound.
 */
export function diagnose(
  formula: Formula,
  scope: Scope,
  values: Values,
  options: { units: Unit; grid: GridId },
): string {
  return failing(formula.node) ?? CANNOT.other();

  function failing(node: Node): string | null {
    for (const child of childrenAtWork(node)) {
      const inner = failing(child);
      if (inner !== null) return inner;
    }
    return Number.isFinite(valueOf(node)) ? null : reason(node);
  }
  function valueOf(node: Node): number {
    return workOf(node, scope)(values);
  }
  /** The branch of an `if` that is not taken cannot be at fault. */
  function childrenAtWork(node: Node): readonly Node[] {
    switch (node.type) {
      case 'unary':
        return [node.of];
      case 'arithmetic':
      case 'comparison':
      case 'logic':
        return [node.left, node.right];
      case 'if':
        return [node.test, valueOf(node.test) !== 0 ? node.then : node.otherwise];
      case 'call':
        return node.args;
      default:
        return [];
    }
  }
  function say(node: Node | undefined, times = 1): string {
    if (!node) return '?';
    const value = valueOf(node) * times;
    return isLength(node) ? show(value, options).text : decimal(value, 3);
  }
  /** Enough to say a value with its unit: the formula has been checked, so what it adds or compares is of one kind. */
  function isLength(node: Node): boolean {
    switch (node.type) {
      case 'number':
        return node.unit !== null && node.unit !== '°';
      case 'name':
        return sameKind(scope.kind(node.name), LENGTH);
      case 'unary':
        return isLength(node.of);
      case 'arithmetic':
        return node.sign === '*' ? isLength(node.left) !== isLength(node.right) : isLength(node.left);
      case 'if':
        return isLength(node.then);
      case 'call':
        return node.name === 'arc angle' ? false : node.args.some(isLength);
      default:
        return false;
    }
  }
  function reason(node: Node): string {
    if (node.type === 'name') return `“${node.name}” has no value`;
    if (node.type === 'arithmetic' && node.sign === '/') return CANNOT.divide();
    if (node.type !== 'call') return CANNOT.other();
    const [a, b] = node.args;
    switch (node.name) {
      case 'arc length':
      case 'arc height':
      case 'arc angle':
        return CANNOT.arc(say(a), say(b, 2));
      case 'arc radius':
        return CANNOT.arcRadius(say(a), say(b));
      case 'sqrt':
        return CANNOT.root(say(a));
      case 'asin':
      case 'acos':
        return CANNOT.ratio(node.name, say(a));
      case 'up to':
      case 'down to':
        return CANNOT.grid(say(b));
      default:
        return CANNOT.other();
    }
  }
}
