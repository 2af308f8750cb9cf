/**
 * Reads a PDF as far as the tests look, after ISO 32000-1: objects by the cross-reference table, pages, what their content
 * streams draw, texts by the fonts' ToUnicode maps, the structure tree. Made for files with one plain table and Flate streams.
 */
import { inflateSync } from 'node:zlib';

type Value = number | boolean | null | string | Name | Ref | readonly Value[] | Dict;
interface Name {
  readonly name: string;
}
interface Ref {
  readonly ref: number;
}
interface Dict {
  readonly [key: string]: Value;
}
interface Op {
  readonly op: string;
}

export interface ReadText {
  readonly text: string;
  /** Where it begins, in points from the top left. */
  readonly x: number;
  readonly y: number;
  readonly size: number;
  readonly font: string;
}
export interface ReadPath {
  /** SVG path data in millimetres from the top left. */
  readonly d: string;
  /** Every point it goes to, millimetres. */
  readonly points: readonly (readonly [number, number])[];
  readonly stroked: boolean;
  readonly filled: boolean;
  /** Millimetres. */
  readonly lineWidth: number;
  readonly dash: readonly number[];
}
export interface ReadPage {
  readonly width: number;
  readonly height: number;
  readonly texts: readonly ReadText[];
  readonly paths: readonly ReadPath[];
}
export interface ReadNode {
  readonly type: string;
  readonly alt: string;
  /** Its own and its children's text, in reading order. */
  readonly text: string;
  readonly children: readonly ReadNode[];
}
export interface ReadPdf {
  readonly version: string;
  readonly info: Readonly<Record<string, string>>;
  readonly language: string;
  readonly viewer: Dict;
  readonly marked: boolean;
  readonly xmp: string;
  readonly fonts: readonly { readonly name: string; readonly embedded: boolean }[];
  readonly links: readonly string[];
  readonly pages: readonly ReadPage[];
  readonly structure: ReadNode;
}

const isName = (value: Value | Op): value is Name => typeof value === 'object' && value !== null && 'name' in value;
const isRef = (value: Value): value is Ref => typeof value === 'object' && value !== null && 'ref' in value;
const isDict = (value: Value): value is Dict =>
  typeof value === 'object' && value !== null && !Array.isArray(value) && !isName(value) && !isRef(value);

/** Tokens of a file or a content stream, one value at a time. */
class Scanner {
  constructor(
    readonly text: string,
    public at = 0,
  ) {}

  next(): Value | Op | undefined {
    this.#skip();
    const { text, at } = this;
    const mark = text[at];
    if (mark === undefined) return undefined;
    if (mark === '/') return this.#name();
    if (mark === '(') return this.#string();
    if (mark === '[') {
      this.at += 1;
      return this.#until(']');
    }
    if (text.startsWith('<<', at)) {
      this.at += 2;
      const parts = this.#until('>>');
      return Object.fromEntries(
        parts.flatMap((part, i) => (i % 2 === 0 ? [[(part as Name).name, parts[i + 1] as Value]] : [])),
      );
    }
    if (mark === '<') {
      const end = text.indexOf('>', at);
      this.at = end + 1;
      return Buffer.from(text.slice(at + 1, end).replace(/\s/g, ''), 'hex').toString('latin1');
    }
    const reference = /^(\d+) \d+ R(?![A-Za-z])/.exec(text.slice(at, at + 24));
    if (reference) {
      this.at += reference[0].length;
      return { ref: Number(reference[1]) };
    }
    const word = /^[^\s()<>[\]/%]+/.exec(text.slice(at, at + 64))?.[0] ?? mark;
    this.at += word.length;
    if (/^[+-]?(\d+\.?\d*|\.\d+)$/.test(word)) return Number(word);
    if (word === 'true' || word === 'false') return word === 'true';
    return word === 'null' ? null : { op: word };
  }

  #skip(): void {
    const blank = /(?:\s|\u0000|%[^\n\r]*)*/y;
    blank.lastIndex = this.at;
    this.at += blank.exec(this.text)?.[0].length ?? 0;
  }

  #until(end: string): Value[] {
    const values: Value[] = [];
    for (;;) {
      this.#skip();
      if (this.text.startsWith(end, this.at)) {
        this.at += end.length;
        return values;
      }
      values.push(this.next() as Value);
    }
  }

  #name(): Name {
    const word = /^\/[^\s()<>[\]/%]*/.exec(this.text.slice(this.at, this.at + 200))?.[0] as string;
    this.at += word.length;
    return {
      name: word.slice(1).replace(/#([0-9a-f]{2})/gi, (_, hex: string) => String.fromCharCode(parseInt(hex, 16))),
    };
  }

  #string(): string {
    let depth = 0;
    let out = '';
    for (;;) {
      const mark = this.text[this.at] as string;
      this.at += 1;
      if (mark === '\\') {
        const next = this.text[this.at] as string;
        this.at += 1;
        out += { n: '\n', r: '\r', t: '\t', b: '\b', f: '\f' }[next] ?? next;
        continue;
      }
      if (mark === '(' && (depth += 1) === 1) continue;
      if (mark === ')' && (depth -= 1) === 0) return out;
      out += mark;
    }
  }
}

/** Text strings are Latin, or UTF-16 after a byte order mark. */
const asText = (value: Value | undefined): string => {
  if (typeof value !== 'string') return '';
  if (!value.startsWith('\u00fe\u00ff')) return value;
  return Buffer.from(value.slice(2), 'latin1').swap16().toString('utf16le');
};

class File {
  readonly #text: string;
  readonly #offsets: readonly number[];
  readonly trailer: Dict;

  constructor(bytes: Uint8Array) {
    this.#text = Buffer.from(bytes).toString('latin1');
    const start = Number(/startxref\s+(\d+)\s+%%EOF\s*$/.exec(this.#text)?.[1]);
    const [, count] = (/^xref\s+0 (\d+)/.exec(this.#text.slice(start)) as RegExpExecArray).map(Number);
    const rows = this.#text
      .slice(start)
      .split('\n')
      .slice(2, 2 + (count as number));
    this.#offsets = rows.map((row) => Number(row.slice(0, 10)));
    this.trailer = new Scanner(this.#text, this.#text.indexOf('trailer', start) + 7).next() as Dict;
  }

  get version(): string {
    return /^%PDF-([\d.]+)/.exec(this.#text)?.[1] ?? '';
  }

  get(value: Value | undefined): Value {
    if (value === undefined) return null;
    return isRef(value) ? this.#object(value.ref).value : value;
  }
  dict(value: Value | undefined): Dict {
    const found = this.get(value);
    return isDict(found) ? found : {};
  }
  list(value: Value | undefined): readonly Value[] {
    const found = this.get(value);
    return Array.isArray(found) ? (found as readonly Value[]) : found === null ? [] : [found];
  }
  stream(value: Value | undefined): Buffer {
    if (value === undefined || !isRef(value)) throw new Error('a stream is always an object of its own');
    const { value: dict, end } = this.#object(value.ref);
    const from = /stream\r?\n/.exec(this.#text.slice(end, end + 20));
    if (!from) throw new Error(`object ${value.ref} has no stream`);
    const begin = end + from.index + from[0].length;
    const raw = Buffer.from(this.#text.slice(begin, begin + Number(this.get((dict as Dict).Length))), 'latin1');
    return (dict as Dict).Filter === undefined ? raw : inflateSync(raw);
  }

  #object(number: number): { readonly value: Value; readonly end: number } {
    const scanner = new Scanner(this.#text, this.#offsets[number] as number);
    const head = [scanner.next(), scanner.next(), scanner.next()];
    if (head[0] !== number) throw new Error(`object ${number} is not where the table says`);
    return { value: scanner.next() as Value, end: scanner.at };
  }
}

export function readPdf(bytes: Uint8Array): ReadPdf {
  const file = new File(bytes);
  const root = file.dict(file.trailer.Root);
  const marks = new Map<string, string>();
  const refs = pageRefs(file, root.Pages as Value);
  const fonts = new Map<string, { name: string; embedded: boolean }>();
  const pages = refs.map((ref) => readPage(file, ref, marks, fonts));
  const annotations = refs.flatMap((ref) => file.list(file.dict(ref).Annots).map((one) => file.dict(one)));
  return {
    version: file.version,
    info: Object.fromEntries(
      Object.entries(file.dict(file.trailer.Info)).map(([key, value]) => [key, asText(file.get(value))]),
    ),
    language: asText(file.get(root.Lang)),
    viewer: file.dict(root.ViewerPreferences),
    marked: file.dict(root.MarkInfo).Marked === true,
    xmp: root.Metadata === undefined ? '' : file.stream(root.Metadata).toString('utf8'),
    fonts: [...fonts.values()],
    links: annotations.map((one) => asText(file.get(file.dict(one.A).URI))),
    pages,
    structure: readNode(file, root.StructTreeRoot as Value, null, marks),
  };
}

function pageRefs(file: File, node: Value): readonly Ref[] {
  const { Type, Kids } = file.dict(node);
  return (Type as Name).name === 'Page' ? [node as Ref] : file.list(Kids).flatMap((kid) => pageRefs(file, kid));
}

type Matrix = readonly [number, number, number, number, number, number];
const times = (m: Matrix, n: Matrix): Matrix => [
  m[0] * n[0] + m[1] * n[2],
  m[0] * n[1] + m[1] * n[3],
  m[2] * n[0] + m[3] * n[2],
  m[2] * n[1] + m[3] * n[3],
  m[4] * n[0] + m[5] * n[2] + n[4],
  m[4] * n[1] + m[5] * n[3] + n[5],
];

interface Font {
  readonly name: string;
  readonly unicode: ReadonlyMap<number, string>;
}

function readPage(
  file: File,
  ref: Ref,
  marks: Map<string, string>,
  fonts: Map<string, { name: string; embedded: boolean }>,
): ReadPage {
  const page = file.dict(ref);
  const [, , width, height] = file.list(page.MediaBox) as readonly number[] as [number, number, number, number];
  const known = new Map<string, Font>();
  for (const [name, value] of Object.entries(file.dict(file.dict(page.Resources).Font))) {
    const dict = file.dict(value);
    const descendant = file.dict(file.list(dict.DescendantFonts)[0]);
    const { FontFile2, FontFile3 } = file.dict(descendant.FontDescriptor);
    const base = (file.get(dict.BaseFont) as Name).name;
    fonts.set(base, { name: base, embedded: FontFile2 !== undefined || FontFile3 !== undefined });
    known.set(name, { name: base, unicode: readUnicode(file.stream(dict.ToUnicode).toString('latin1')) });
  }
  const texts: ReadText[] = [];
  const paths: ReadPath[] = [];
  const properties = file.dict(file.dict(page.Resources).Properties);
  let state = { matrix: [1, 0, 0, 1, 0, 0] as Matrix, lineWidth: 1, dash: [] as readonly number[] };
  const saved: (typeof state)[] = [];
  const open: { mcid: number | null; actual: string | null }[] = [];
  let font: Font | undefined;
  let size = 0;
  let line: Matrix = [1, 0, 0, 1, 0, 0];
  let d = '';
  let points: [number, number][] = [];
  const place = (x: number, y: number): [number, number] => {
    const [, , , , e, f] = times([1, 0, 0, 1, x, y], state.matrix);
    return [(e * 25.4) / 72, ((height - f) * 25.4) / 72];
  };
  const go = (letter: string, ...all: number[]) => {
    const placed: number[] = [];
    for (let i = 0; i < all.length; i += 2) placed.push(...place(all[i] as number, all[i + 1] as number));
    d += `${letter}${placed.map((value) => value.toFixed(5)).join(' ')}`;
    points.push([placed.at(-2) as number, placed.at(-1) as number]);
  };
  const end = (stroked: boolean, filled: boolean) => {
    const scale = Math.sqrt(Math.abs(state.matrix[0] * state.matrix[3] - state.matrix[1] * state.matrix[2]));
    const mm = (scale * 25.4) / 72;
    if (d !== '' && (stroked || filled))
      paths.push({
        d,
        points,
        stroked,
        filled,
        lineWidth: state.lineWidth * mm,
        dash: state.dash.map((one) => one * mm),
      });
    d = '';
    points = [];
  };
  const say = (text: string) => {
    const actual = open.findLast((one) => one.actual !== null);
    const mcid = open.findLast((one) => one.mcid !== null)?.mcid;
    if (mcid === undefined || mcid === null) return;
    const key = `${ref.ref} ${mcid}`;
    const words = actual ? '' : text;
    marks.set(key, (marks.get(key) ?? '') + words);
  };
  const scanner = new Scanner(
    file
      .list(page.Contents)
      .map((_, i) =>
        file.stream(Array.isArray(page.Contents) ? (page.Contents[i] as Value) : page.Contents).toString('latin1'),
      )
      .join('\n'),
  );
  let operands: Value[] = [];
  for (let token = scanner.next(); token !== undefined; token = scanner.next()) {
    if (typeof token !== 'object' || token === null || !('op' in token)) {
      operands.push(token as Value);
      continue;
    }
    const n = operands as readonly number[];
    const [a, b, c, dd, e, f] = n as [number, number, number, number, number, number];
    switch ((token as Op).op) {
      case 'q':
        saved.push(state);
        break;
      case 'Q':
        state = saved.pop() as typeof state;
        break;
      case 'cm':
        state = { ...state, matrix: times([a, b, c, dd, e, f], state.matrix) };
        break;
      case 'w':
        state = { ...state, lineWidth: a };
        break;
      case 'd':
        state = { ...state, dash: operands[0] as readonly number[] };
        break;
      case 'm':
        go('M', a, b);
        break;
      case 'l':
        go('L', a, b);
        break;
      case 'c':
        go('C', a, b, c, dd, e, f);
        break;
      case 'h':
        d += 'Z';
        break;
      case 're':
        go('M', a, b);
        go('L', a + c, b);
        go('L', a + c, b + dd);
        go('L', a, b + dd);
        d += 'Z';
        break;
      case 'S':
        end(true, false);
        break;
      case 'f':
      case 'f*':
        end(false, true);
        break;
      case 'B':
      case 'B*':
        end(true, true);
        break;
      case 'n':
        end(false, false);
        break;
      case 'BT':
        line = [1, 0, 0, 1, 0, 0];
        break;
      case 'Tm':
        line = [a, b, c, dd, e, f];
        break;
      case 'Tf':
        font = known.get((operands[0] as Name).name);
        size = b;
        break;
      case 'TJ':
      case 'Tj': {
        const parts = Array.isArray(operands[0]) ? (operands[0] as readonly Value[]) : [operands[0] as Value];
        const text = parts
          .filter((part): part is string => typeof part === 'string')
          .map((part) => decode(part, font as Font))
          .join('');
        const [, , , , x, y] = times(line, state.matrix);
        texts.push({ text, x, y: height - y, size, font: font?.name ?? '' });
        say(text);
        break;
      }
      case 'BDC': {
        const given = operands[1];
        const dict = given !== undefined && isName(given) ? file.dict(properties[given.name]) : file.dict(given);
        const actual = dict.ActualText === undefined ? null : asText(dict.ActualText);
        open.push({ mcid: typeof dict.MCID === 'number' ? dict.MCID : null, actual });
        if (actual !== null) {
          open[open.length - 1] = { mcid: null, actual: null };
          say(actual);
          open[open.length - 1] = { mcid: null, actual };
        }
        break;
      }
      case 'BMC':
        open.push({ mcid: null, actual: null });
        break;
      case 'EMC':
        open.pop();
        break;
    }
    operands = [];
  }
  return { width, height, texts, paths };
}

const decode = (codes: string, { unicode }: Font): string => {
  let text = '';
  for (let i = 0; i < codes.length; i += 2) {
    text += unicode.get(codes.charCodeAt(i) * 256 + codes.charCodeAt(i + 1)) ?? '\ufffd';
  }
  return text;
};

function readUnicode(map: string): ReadonlyMap<number, string> {
  const unicode = new Map<number, string>();
  const hex = (text: string) => Buffer.from(text, 'hex').swap16().toString('utf16le');
  for (const [, from, to, list] of map.matchAll(/<([0-9a-f]{4})> <([0-9a-f]{4})> \[([^\]]*)\]/gi)) {
    const texts = [...(list as string).matchAll(/<([0-9a-f]*)>/gi)].map(([, text]) => hex(text as string));
    for (let code = parseInt(from as string, 16); code <= parseInt(to as string, 16); code += 1)
      unicode.set(code, texts[code - parseInt(from as string, 16)] ?? '');
  }
  return unicode;
}

function readNode(file: File, value: Value, page: Value, marks: ReadonlyMap<string, string>): ReadNode {
  const dict = file.dict(value);
  const own = dict.Pg ?? page;
  const children: ReadNode[] = [];
  let text = '';
  for (const kid of file.list(dict.K)) {
    if (typeof kid === 'number') text += marks.get(`${(own as Ref).ref} ${kid}`) ?? '';
    else if (isRef(kid) || isDict(kid)) {
      const inner = file.dict(kid);
      if (inner.MCID !== undefined) text += marks.get(`${((inner.Pg ?? own) as Ref).ref} ${String(inner.MCID)}`) ?? '';
      else if (inner.S !== undefined) {
        const child = readNode(file, kid, own, marks);
        children.push(child);
        text += `${text === '' || text.endsWith('\n') ? '' : '\n'}${child.text}\n`;
      }
    }
  }
  const type = dict.S === undefined ? 'root' : (dict.S as Name).name;
  return { type, alt: asText(file.get(dict.Alt)), text: text.replace(/\n+/g, '\n').trimEnd(), children };
}

/** Every node below one, itself first. */
export const nodesOf = (node: ReadNode): readonly ReadNode[] => [node, ...node.children.flatMap(nodesOf)];
