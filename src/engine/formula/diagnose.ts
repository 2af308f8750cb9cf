import { show, decimal } from '../measure';
import type { GridId, Unit } from '../types';
import { compileFormula, type Formula, type Scope, type Values } from './compile';
import { LENGTH, sameKind } from './kind';
import { CANNOT } from './messages';
import type { Node } from './syntax';

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
  return failing(formula.node, formula.text) ?? CANNOT.other();

  function failing(node: Node, text: string): string | null {
    for (const child of childrenAtWork(node)) {
      const inner = failing(child, text);
      if (inner !== null) return inner;
    }
    return Number.isFinite(valueOf(node)) ? null : reason(node);
  }
  function part(node: Node) {
    const compiled = compileFormula(formula.text.slice(node.span.from, node.span.to), scope, '');
    return compiled.ok ? compiled.value : null;
  }
  function valueOf(node: Node): number {
    return part(node)?.work(values) ?? NaN;
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
    const kind = part(node)?.kind;
    return kind && sameKind(kind, LENGTH) ? show(value, options).text : decimal(value, 3);
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
