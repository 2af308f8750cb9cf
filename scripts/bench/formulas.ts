/**
 * The formulas of the patterns themselves, in three languages, so that every contestant works out the same measures: our own,
 * mathjs and spreadsheet cells. Every length that a pattern asks for is a share of one value x, so that one change reaches all.
 */
import { evaluate, keyOf, usualSizing, type MeasureDef, type Model } from '@/engine';
import { getPatternModel, listPatterns } from '@/features/patterns/patterns.server';

type Node = Model['measures'][number]['formula']['node'];
export interface BenchMeasure {
  /** One word, unlike any function's name. */
  readonly name: string;
  readonly kind: NonNullable<MeasureDef['kind']>;
  readonly node: Node;
  /** Takes a share of x, or is the same always. */
  readonly asked: boolean;
}
const span = { from: 0, to: 0 };
const number = (value: number, unit: 'mm' | '°' | null): Node => ({ type: 'number', value, unit, span });

/** The patterns' measures up to the first `count` worked ones, in an order in which each needs only those before it. */
export function realMeasures(count: number): readonly BenchMeasure[] {
  const all = listPatterns().flatMap(({ slug }, index) => measuresOf(getPatternModel(slug) as Model, `p${index}`));
  const last = all.filter(({ asked }) => !asked)[count - 1];
  return last ? all.slice(0, all.indexOf(last) + 1) : all;
}

function measuresOf(model: Model, stem: string): BenchMeasure[] {
  const usual = evaluate(model, usualSizing(model, 'mm'));
  const names = new Map<string, string>();
  const options = new Map(model.pattern.choices.map((choice) => [keyOf(choice.name), choice]));
  const made: BenchMeasure[] = [];
  for (const step of model.steps) {
    const measure = model.measures.find(({ slot }) => slot === step.slot);
    if (!measure) continue;
    const { def, formula } = measure;
    const kind = def.kind ?? 'length';
    const figure = usual.measures.find((one) => one.name === def.name);
    const name = `${stem}m${made.length}`;
    const node = def.ask ? asked(kind, figure?.exact ?? 0) : renamed(formula.node);
    if (!node) continue;
    names.set(keyOf(def.name), name);
    made.push({ name, kind, node, asked: def.ask !== undefined });
  }
  return made;

  /** A length is a share of x, which is 100 mm at first. */
  function asked(kind: BenchMeasure['kind'], value: number): Node {
    if (kind !== 'length') return number(value, kind === 'angle' ? '°' : null);
    return {
      type: 'arithmetic',
      sign: '*',
      left: { type: 'name', name: 'x', span },
      right: number(value / 100, null),
      span,
    };
  }
  /** Null for a formula that reads the size of a piece: the contestants have no pieces. A choice is as it usually is. */
  function renamed(node: Node): Node | null {
    switch (node.type) {
      case 'number':
        return node;
      case 'name': {
        const name = node.name === 'pi' ? 'pi' : names.get(node.name);
        return name === undefined ? null : { ...node, name };
      }
      case 'is': {
        const choice = options.get(node.choice);
        const place = (option: string | undefined) => number(choice?.options.indexOf(option ?? '') ?? -1, null);
        const [left, right] = [place(choice?.usual), place(node.option)];
        return { type: 'comparison', sign: node.not ? '<>' : '=', left, right, span };
      }
      case 'unary': {
        const of = renamed(node.of);
        return of && { ...node, of };
      }
      case 'if': {
        const [test, then, otherwise] = [renamed(node.test), renamed(node.then), renamed(node.otherwise)];
        return test && then && otherwise && { ...node, test, then, otherwise };
      }
      case 'call': {
        const args = node.args.map(renamed);
        return args.every((arg) => arg !== null) ? { ...node, args } : null;
      }
      default: {
        const [left, right] = [renamed(node.left), renamed(node.right)];
        return left && right && { ...node, left, right };
      }
    }
  }
}

/** How a language writes what ours writes otherwise. */
export interface Language {
  readonly name: (name: string) => string;
  readonly number: (value: number, unit: 'in' | 'mm' | 'cm' | '°' | null) => string;
  readonly choose: (test: string, then: string, otherwise: string) => string;
  readonly sign: (sign: string) => string;
  readonly logic: (sign: string, left: string, right: string) => string;
  readonly not: (of: string) => string;
  readonly call: (name: string, args: readonly string[]) => string;
}
const MM = { in: 25.4, mm: 1, cm: 10 } as const;
const bare = (value: number, unit: 'in' | 'mm' | 'cm' | '°' | null): string =>
  String(unit === null || unit === '°' ? value : value * MM[unit]);

export const OURS: Language = {
  name: (name) => name,
  number: (value, unit) => `${value}${unit === null ? '' : ` ${unit}`}`,
  choose: (test, then, otherwise) => `(if ${test} then ${then} else ${otherwise})`,
  sign: (sign) => sign,
  logic: (sign, left, right) => `(${left} ${sign} ${right})`,
  not: (of) => `(not ${of})`,
  call: (name, args) => `${name}(${args.join(', ')})`,
};
/** Arcs by the same closed forms as ours; angles outside are degrees. */
const spelled = (name: string, [a = '', b = '']: readonly string[], half: string, turn: string): string | null => {
  switch (name) {
    case 'arc length':
      return `(2*(${b})*${half})`;
    case 'arc height':
      return `((${b})-(${b})*cos(${half}))`;
    case 'arc angle':
      return `(2*${half}/${turn})`;
    case 'arc radius':
      return `(((${a})^2+4*(${b})^2)/(8*(${b})))`;
    case 'sin':
    case 'cos':
    case 'tan':
      return `${name}((${a})*${turn})`;
    case 'asin':
    case 'acos':
    case 'atan':
      return `(${name}(${a})/${turn})`;
    default:
      return null;
  }
};
const TURN = String(Math.PI / 180);
export const MATHJS: Language = {
  name: (name) => name,
  number: bare,
  choose: (test, then, otherwise) => `((${test}) ? (${then}) : (${otherwise}))`,
  sign: (sign) => ({ '=': '==', '<>': '!=' })[sign] ?? sign,
  logic: (sign, left, right) => `((${left}) ${sign} (${right}))`,
  not: (of) => `(not (${of}))`,
  call: (name, args) => {
    const [a = '', b = ''] = args;
    if (name === 'atan2') return `(atan2(${a}, ${b})/${TURN})`;
    if (name === 'up to') return `(ceil((${a})/(${b}))*(${b}))`;
    if (name === 'down to') return `(floor((${a})/(${b}))*(${b}))`;
    return spelled(name, args, `asin((${a})/(2*(${b})))`, TURN) ?? `${name}(${args.join(', ')})`;
  },
};
/** The same with lengths that carry their unit, as ours do: a length plus a bare number is refused there too. */
export const MATHJS_UNITS: Language = {
  ...MATHJS,
  number: (value, unit) => (unit === null || unit === '°' ? String(value) : `(${value} ${unit})`),
  call: (name, args) => {
    const inMm = args.map((arg) => `((${arg})/(1 mm))`);
    if (name === 'hypot') return `sqrt(${args.map((arg) => `(${arg})^2`).join('+')})`;
    return MATHJS.call(name, name === 'atan2' ? inMm : args);
  },
};
export const cells = (columnOf: (name: string) => string): Language => ({
  name: (name) => (name === 'pi' ? 'PI()' : columnOf(name)),
  number: bare,
  choose: (test, then, otherwise) => `IF(${test},${then},${otherwise})`,
  sign: (sign) => sign,
  logic: (sign, left, right) => `${sign.toUpperCase()}(${left},${right})`,
  not: (of) => `NOT(${of})`,
  call: (name, args) => {
    const [a = '', b = ''] = args;
    if (name === 'hypot') return `SQRT(${args.map((arg) => `(${arg})^2`).join('+')})`;
    if (name === 'atan2') return `(ATAN2(${b},${a})/${TURN})`;
    if (name === 'floor') return `ROUNDDOWN(${a},0)`;
    if (name === 'ceil') return `ROUNDUP(${a},0)`;
    if (name === 'up to') return `(ROUNDUP((${a})/(${b}),0)*(${b}))`;
    if (name === 'down to') return `(ROUNDDOWN((${a})/(${b}),0)*(${b}))`;
    return (
      spelled(name, args, `asin((${a})/(2*(${b})))`, TURN)?.replace(/[a-z]+(?=\()/g, (word) => word.toUpperCase()) ??
      `${name.toUpperCase()}(${args.join(',')})`
    );
  },
});

export function written(node: Node, language: Language): string {
  const into = (inner: Node) => written(inner, language);
  switch (node.type) {
    case 'number':
      return language.number(node.value, node.unit);
    case 'name':
      return language.name(node.name);
    case 'unary':
      return node.sign === 'not' ? language.not(into(node.of)) : `(-${into(node.of)})`;
    case 'logic':
      return language.logic(node.sign, into(node.left), into(node.right));
    case 'if':
      return language.choose(into(node.test), into(node.then), into(node.otherwise));
    case 'call':
      return language.call(node.name, node.args.map(into));
    case 'is':
      throw new Error('a choice was left in a bench formula');
    default:
      return `(${into(node.left)} ${language.sign(node.sign)} ${into(node.right)})`;
  }
}
