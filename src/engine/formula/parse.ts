import type { Fault, Result } from '../types';
import { SAYS } from './messages';
import { nearestName } from './nearest';
import { FUNCTION_NAMES } from './functions';
import { KEYWORDS, type Arithmetic, type Comparison, type Names, type Node, type Span } from './syntax';

const LONGEST_FORMULA = 600;
const DEEPEST = 40;
const MOST_NODES = 400;

type Token = Span &
  (
    | { readonly type: 'number'; readonly value: number; readonly unit: 'in' | 'mm' | 'cm' | '°' | null }
    | { readonly type: 'words'; readonly words: readonly (Span & { readonly text: string })[] }
    | { readonly type: 'keyword'; readonly word: string }
    | { readonly type: 'sign'; readonly sign: string }
    | { readonly type: 'end' }
  );

class Unreadable extends Error {
  constructor(
    readonly code: string,
    readonly says: readonly string[],
    readonly span: Span,
    readonly cure?: string,
  ) {
    super(code);
  }
}

/**
 * Reads a formula: `inside width + 2 * tab`, `if spine is curved then arc length(inside depth, circle / 2) else inside depth`.
 * Names are matched longest first, so `inside width` wins over `inside`. Gives the first fault with the characters it concerns.
 */
export function parseFormula(text: string, names: Names, where: string): Result<Node> {
  return reading(text, where, () => new Parser(tokenize(text), text, names).whole());
}

/** A name as it stands in a formula: `name` as names are compared, the span as written. */
export interface NameAt extends Span {
  readonly name: string;
  /** The choice that is asked about, when this is one of its options. */
  readonly optionOf?: string;
}

/**
 * Every name in a formula, in order: measures, choices, pieces' sizes, and options behind their choice. Names need not be
 * known and the formula need not make sense, so this also serves one that does not read yet; only a mark that means nothing
 * is a fault, since nothing can be told behind it.
 */
export function namesAt(text: string, where: string): Result<readonly NameAt[]> {
  return reading(text, where, () => {
    const tokens = tokenize(text);
    return tokens.flatMap((token, at): NameAt[] => {
      if (token.type !== 'words') return [];
      const { from, to } = token;
      const name = wordsOf(token);
      const next = tokens[at + 1];
      if (next?.type === 'sign' && next.sign === '(' && FUNCTION_NAMES.has(name)) return [];
      const is = at - (isWord(tokens[at - 1], 'not') ? 2 : 1);
      const choice = tokens[is - 1];
      return isWord(tokens[is], 'is') && choice?.type === 'words'
        ? [{ name, from, to, optionOf: wordsOf(choice) }]
        : [{ name, from, to }];
    });
  });
}
const wordsOf = (token: Token & { type: 'words' }): string => token.words.map((word) => word.text).join(' ');
const isWord = (token: Token | undefined, word: string): boolean => token?.type === 'keyword' && token.word === word;

function reading<T>(text: string, where: string, read: () => T): Result<T> {
  try {
    if (text.length > LONGEST_FORMULA) {
      throw new Unreadable('too long', SAYS.tooLong(text.length, LONGEST_FORMULA), {
        from: LONGEST_FORMULA,
        to: text.length,
      });
    }
    return { ok: true, value: read() };
  } catch (error) {
    if (!(error instanceof Unreadable)) throw error;
    const [found = '', expected = '', hint = ''] = error.says;
    const fault: Fault = {
      code: `formula ${error.code}`,
      where,
      span: { from: error.span.from, to: error.span.to },
      found,
      expected,
      hint,
      ...(error.cure === undefined ? {} : { cure: error.cure }),
    };
    return { ok: false, faults: [fault] };
  }
}

const UNIT = String.raw`(?:\s*(in|mm|cm)(?![\p{L}\p{N}])|\s*(°))`;
const MIXED = new RegExp(String.raw`(\d+)(?:\s+|-)(\d+)[/⁄](\d+)(?!\d)${UNIT}?`, 'uy');
const FRACTION = new RegExp(String.raw`(\d+)[/⁄](\d+)(?!\d)${UNIT}`, 'uy');
const DECIMAL = new RegExp(String.raw`(\d+(?:\.\d+)?|\.\d+)${UNIT}?`, 'uy');
const WORD = /[\p{L}][\p{L}\p{N}]*(?:\.[\p{L}][\p{L}\p{N}]*)*/uy;
const SIGN = /<=|>=|<>|≤|≥|≠|[-+*/^()<>=,−×÷·]/uy;
const SAME_SIGN: Readonly<Record<string, string>> = {
  '≤': '<=',
  '≥': '>=',
  '≠': '<>',
  '−': '-',
  '×': '*',
  '·': '*',
  '÷': '/',
};

function tokenize(text: string): Token[] {
  const tokens: Token[] = [];
  let at = 0;
  const take = (pattern: RegExp): RegExpExecArray | null => {
    pattern.lastIndex = at;
    return pattern.exec(text);
  };
  while (at < text.length) {
    if (/\s/.test(text[at] ?? '')) {
      at += 1;
      continue;
    }
    const number = readNumber(take);
    if (number) {
      tokens.push({ type: 'number', from: at, to: at + number.length, value: number.value, unit: number.unit });
      at += number.length;
      continue;
    }
    const word = take(WORD);
    if (word) {
      const span = { from: at, to: at + word[0].length, text: word[0].toLowerCase() };
      at = span.to;
      const before = tokens.at(-1);
      if (KEYWORDS.has(span.text)) tokens.push({ type: 'keyword', word: span.text, from: span.from, to: span.to });
      else if (before?.type === 'words')
        tokens[tokens.length - 1] = { type: 'words', from: before.from, to: span.to, words: [...before.words, span] };
      else tokens.push({ type: 'words', from: span.from, to: span.to, words: [span] });
      continue;
    }
    const sign = take(SIGN);
    if (!sign) {
      const mark = String.fromCodePoint(text.codePointAt(at) ?? 0);
      throw new Unreadable('stray mark', SAYS.strayMark(mark), { from: at, to: at + mark.length });
    }
    tokens.push({ type: 'sign', sign: SAME_SIGN[sign[0]] ?? sign[0], from: at, to: at + sign[0].length });
    at += sign[0].length;
  }
  tokens.push({ type: 'end', from: text.length, to: text.length });
  return tokens;
}

function readNumber(take: (pattern: RegExp) => RegExpExecArray | null) {
  const unitOf = (name: string | undefined, degree: string | undefined) =>
    (degree ?? name ?? null) as 'in' | 'mm' | 'cm' | '°' | null;
  const mixed = take(MIXED);
  if (mixed && Number(mixed[3]) > 0) {
    return {
      value: Number(mixed[1]) + Number(mixed[2]) / Number(mixed[3]),
      unit: unitOf(mixed[4], mixed[5]),
      length: mixed[0].length,
    };
  }
  const fraction = take(FRACTION);
  if (fraction && Number(fraction[2]) > 0) {
    return {
      value: Number(fraction[1]) / Number(fraction[2]),
      unit: unitOf(fraction[3], fraction[4]),
      length: fraction[0].length,
    };
  }
  const decimal = take(DECIMAL);
  return decimal && { value: Number(decimal[1]), unit: unitOf(decimal[2], decimal[3]), length: decimal[0].length };
}

/** Recursive descent: if < or < and < not < comparison < sum < product < minus < power < value. */
class Parser {
  private at = 0;
  private depth = 0;
  private nodes = 0;

  constructor(
    private readonly tokens: Token[],
    private readonly text: string,
    private readonly names: Names,
  ) {}

  whole(): Node {
    if (this.atEnd()) throw new Unreadable('empty', SAYS.empty(), this.now);
    const node = this.expression();
    if (!this.atEnd()) throw new Unreadable('left over', SAYS.leftOver(this.textOf(this.now)), this.now);
    return node;
  }
  private atEnd(): boolean {
    return this.now.type === 'end';
  }

  private get now(): Token {
    return this.tokens[this.at] as Token;
  }
  private textOf(span: Span): string {
    return this.text.slice(span.from, span.to);
  }
  private isSign(...signs: string[]): boolean {
    return this.now.type === 'sign' && signs.includes(this.now.sign);
  }
  private isKeyword(word: string): boolean {
    return this.now.type === 'keyword' && this.now.word === word;
  }
  private fail(wanted: string): never {
    if (this.atEnd()) throw new Unreadable('unfinished', SAYS.unfinished(wanted), this.now);
    throw new Unreadable('unexpected', SAYS.unexpected(this.textOf(this.now), wanted), this.now);
  }
  private expect(kind: 'sign' | 'keyword', what: string): Span {
    const here = this.now;
    if (kind === 'sign' ? !this.isSign(what) : !this.isKeyword(what)) this.fail(`“${what}”`);
    this.at += 1;
    return here;
  }
  private make(node: Node): Node {
    this.nodes += 1;
    if (this.nodes > MOST_NODES) throw new Unreadable('too many parts', SAYS.tooMany(MOST_NODES), node.span);
    return node;
  }
  private deeper<T>(span: Span, read: () => T): T {
    this.depth += 1;
    if (this.depth > DEEPEST) throw new Unreadable('too deep', SAYS.tooDeep(DEEPEST), span);
    const result = read();
    this.depth -= 1;
    return result;
  }

  private expression(): Node {
    return this.deeper(this.now, () => {
      if (!this.isKeyword('if')) return this.either();
      const start = this.now.from;
      this.at += 1;
      const test = this.expression();
      this.expect('keyword', 'then');
      const then = this.expression();
      this.expect('keyword', 'else');
      const otherwise = this.expression();
      return this.make({ type: 'if', test, then, otherwise, span: { from: start, to: otherwise.span.to } });
    });
  }
  private either(): Node {
    let left = this.both();
    while (this.isKeyword('or')) {
      this.at += 1;
      const right = this.both();
      left = this.make({ type: 'logic', sign: 'or', left, right, span: around(left, right) });
    }
    return left;
  }
  private both(): Node {
    let left = this.negation();
    while (this.isKeyword('and')) {
      this.at += 1;
      const right = this.negation();
      left = this.make({ type: 'logic', sign: 'and', left, right, span: around(left, right) });
    }
    return left;
  }
  private negation(): Node {
    if (!this.isKeyword('not')) return this.comparison();
    const start = this.now.from;
    this.at += 1;
    const of = this.deeper(this.now, () => this.negation());
    return this.make({ type: 'unary', sign: 'not', of, span: { from: start, to: of.span.to } });
  }
  private comparison(): Node {
    const left = this.sum();
    if (!this.isSign('<', '>', '<=', '>=', '=', '<>')) return left;
    const sign = (this.now as { sign: Comparison }).sign;
    this.at += 1;
    const right = this.sum();
    return this.make({ type: 'comparison', sign, left, right, span: around(left, right) });
  }
  private sum(): Node {
    let left = this.product();
    while (this.isSign('+', '-')) left = this.operate(left, () => this.product());
    return left;
  }
  private product(): Node {
    let left = this.signed();
    while (this.isSign('*', '/')) left = this.operate(left, () => this.signed());
    return left;
  }
  private operate(left: Node, read: () => Node): Node {
    const sign = (this.now as { sign: Arithmetic }).sign;
    this.at += 1;
    const right = read();
    return this.make({ type: 'arithmetic', sign, left, right, span: around(left, right) });
  }
  private signed(): Node {
    if (!this.isSign('-', '+')) return this.power();
    const { from } = this.now;
    const minus = this.isSign('-');
    this.at += 1;
    const of = this.deeper(this.now, () => this.signed());
    return minus ? this.make({ type: 'unary', sign: '-', of, span: { from, to: of.span.to } }) : of;
  }
  private power(): Node {
    const left = this.value();
    if (!this.isSign('^')) return left;
    this.at += 1;
    const right = this.deeper(this.now, () => this.signed());
    return this.make({ type: 'arithmetic', sign: '^', left, right, span: around(left, right) });
  }
  private value(): Node {
    const here = this.now;
    if (here.type === 'number') {
      this.at += 1;
      return this.make({ type: 'number', value: here.value, unit: here.unit, span: here });
    }
    if (here.type === 'words') return this.nameOrCall(here);
    if (this.isKeyword('if')) return this.expression();
    if (this.isSign('(')) {
      this.at += 1;
      const inner = this.expression();
      const end = this.expect('sign', ')');
      return { ...inner, span: { from: here.from, to: end.to } };
    }
    return this.fail('a measure or a number');
  }

  /** A run of words is one name, or a function when a bracket follows; the longest known name wins. */
  private nameOrCall(token: Token & { type: 'words' }): Node {
    const next = this.tokens[this.at + 1];
    const whole = token.words.map((word) => word.text).join(' ');
    if (next?.type === 'sign' && next.sign === '(' && !this.names.has(whole)) return this.call(token, whole);
    if (!this.names.has(whole)) this.unknown(token, whole);
    this.at += 1;
    const span = { from: token.from, to: token.to };
    if (this.isKeyword('is')) return this.choiceTest(whole, span);
    return this.make({ type: 'name', name: whole, span });
  }
  private unknown(token: Token & { type: 'words' }, whole: string): never {
    // A known name with something after it: what is missing is the sign between them.
    for (let count = token.words.length - 1; count > 0; count -= 1) {
      const known = token.words
        .slice(0, count)
        .map((word) => word.text)
        .join(' ');
      const rest = token.words[count];
      if (rest && this.names.has(known)) {
        const tail = token.words
          .slice(count)
          .map((word) => word.text)
          .join(' ');
        if (this.names.has(tail))
          throw new Unreadable('left over', SAYS.leftOver(tail), { from: rest.from, to: token.to });
        break;
      }
    }
    const nearest = nearestName(whole, this.names.all());
    throw new Unreadable('unknown name', SAYS.unknownName(this.textOf(token), nearest), token, nearest ?? undefined);
  }
  private call(token: Token & { type: 'words' }, name: string): Node {
    const nameSpan = { from: token.from, to: token.to };
    if (!FUNCTION_NAMES.has(name)) {
      const nearest = nearestName(name, FUNCTION_NAMES);
      throw new Unreadable(
        'unknown function',
        SAYS.unknownFunction(this.textOf(token), nearest),
        nameSpan,
        nearest ?? undefined,
      );
    }
    this.at += 1;
    this.expect('sign', '(');
    const args: Node[] = [];
    if (!this.isSign(')')) {
      args.push(this.expression());
      while (this.isSign(',')) {
        this.at += 1;
        args.push(this.expression());
      }
    }
    const end = this.expect('sign', ')');
    return this.make({ type: 'call', name, args, nameSpan, span: { from: token.from, to: end.to } });
  }
  private choiceTest(choice: string, span: Span): Node {
    const options = this.names.options(choice);
    if (options === undefined) throw new Unreadable('not a choice', SAYS.notAChoice(choice), span);
    this.expect('keyword', 'is');
    const not = this.isKeyword('not');
    if (not) this.at += 1;
    const here = this.now;
    if (here.type !== 'words') this.fail(options.join(' or '));
    const said = (here as Token & { type: 'words' }).words.map((word) => word.text).join(' ');
    const option = options.find((one) => one.toLowerCase() === said);
    if (option === undefined) {
      throw new Unreadable(
        'unknown option',
        SAYS.unknownOption(choice, said, options),
        here,
        nearestName(said, options) ?? options[0],
      );
    }
    this.at += 1;
    return this.make({ type: 'is', choice, option, not, optionSpan: here, span: { from: span.from, to: here.to } });
  }
}

const around = (left: Node, right: Node): Span => ({ from: left.span.from, to: right.span.to });
