import type { Node, Scope } from './syntax';

/**
 * A checked formula without its text, for a reader's page, which needs no parser and no messages: signs before what they
 * join, a space between any two, names as slots. `inside width + 2 * tab` is `+ $3 * 2 $7`.
 */
export function codeOf(node: Node, scope: Scope): string {
  const into = (...parts: readonly (string | Node)[]): string =>
    parts.map((part) => (typeof part === 'string' ? part : codeOf(part, scope))).join(' ');
  switch (node.type) {
    case 'number':
      return `${node.value}${node.unit ?? ''}`;
    case 'name':
      return node.name === 'pi' ? 'pi' : `$${scope.slot(node.name)}`;
    case 'is':
      return `${node.not ? 'isnt' : 'is'} ${scope.slot(node.choice)} ${scope.options(node.choice)?.indexOf(node.option) ?? -1}`;
    case 'unary':
      return into(node.sign === 'not' ? 'not' : 'minus', node.of);
    case 'if':
      return into('if', node.test, node.then, node.otherwise);
    case 'call':
      return into(`${node.args.length}:${node.name.replaceAll(' ', '_')}`, ...node.args);
    default:
      return into(node.sign, node.left, node.right);
  }
}

/** The way back. The code comes from {@link codeOf} on this site, never from a person, so nothing is checked again. */
export function nodeOf(
  code: string,
  names: readonly { readonly name: string; readonly options?: readonly string[] }[],
): Node {
  const words = code.split(' ');
  const span = { from: 0, to: 0 };
  const next = (): Node => {
    const word = words.shift() as string;
    const number = /^([-\d.e+]*\d)(in|mm|cm|°)?$/.exec(word);
    if (number) return { type: 'number', value: Number(number[1]), unit: (number[2] ?? null) as 'mm' | null, span };
    if (word === 'pi') return { type: 'name', name: word, span };
    if (word.startsWith('$')) return { type: 'name', name: names[Number(word.slice(1))]?.name ?? '', span };
    const [count, name] = word.split(':');
    if (name !== undefined) {
      const args = Array.from({ length: Number(count) }, next);
      return { type: 'call', name: name.replaceAll('_', ' '), args, nameSpan: span, span };
    }
    switch (word) {
      case 'is':
      case 'isnt': {
        const { name: choice = '', options = [] } = names[Number(words.shift())] ?? {};
        const option = options[Number(words.shift())] ?? '';
        return { type: 'is', choice, option, not: word === 'isnt', optionSpan: span, span };
      }
      case 'not':
      case 'minus':
        return { type: 'unary', sign: word === 'not' ? 'not' : '-', of: next(), span };
      case 'if':
        return { type: 'if', test: next(), then: next(), otherwise: next(), span };
    }
    const sides = { left: next(), right: next(), span };
    if (word === 'and' || word === 'or') return { type: 'logic', sign: word, ...sides };
    if (/^[-+*/^]$/.test(word)) return { type: 'arithmetic', sign: word as '+', ...sides };
    return { type: 'comparison', sign: word as '<', ...sides };
  };
  return next();
}
