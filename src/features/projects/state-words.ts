import type { BlockNode } from '@/writeup/document';

/** Any part of a write-up, also of a kind that is not known here. */
export interface LooseNode {
  readonly type: string;
  readonly text?: string;
  readonly attrs?: Readonly<Record<string, unknown>>;
  readonly content?: readonly LooseNode[];
}

/** Of what a reader sees nothing in words, and what words stand for it. */
const SAID: Readonly<Record<string, string>> = {
  hardBreak: '\n',
  cutList: 'Cut list',
  stepRef: 'step …',
};
/** Attributes that are for the machine. */
const UNSAID = new Set(['upload', 'width', 'height', 'bare', 'level', 'start', 'key']);

/** What stands in a part of a write-up as plain text: live measures as `[formula]`, paragraphs on lines of their own. */
export function blockWords(node: BlockNode | LooseNode): string {
  return wordsOf(node as LooseNode)
    .replace(/\n{2,}/gu, '\n')
    .trim();
}

function wordsOf({ type, text, attrs = {}, content = [] }: LooseNode): string {
  if (type === 'text') return text ?? '';
  if (type === 'measure') return `[${String(attrs['formula'])}]`;
  const said = SAID[type];
  if (said !== undefined) return said;
  const own = Object.entries(attrs)
    .filter(([name, value]) => !UNSAID.has(name) && typeof value !== 'boolean' && value !== null && value !== '')
    .map(([, value]) => (typeof value === 'object' ? JSON.stringify(value) : String(value)));
  const inside = content.map(wordsOf).join('');
  const isInline = type === 'paragraph' || type === 'heading';
  const head = isInline ? '' : own.join(' · ');
  return `${head === '' ? '' : `${head}\n`}${inside}\n`;
}

/** What a block is called in lists: "Step 3, The lower spine", "Photo", "Caution". */
export function blockName(node: BlockNode | LooseNode, step: number | null): string {
  const { type, attrs = {} } = node as LooseNode;
  if (type === 'step') {
    const title = String(attrs['title'] ?? '');
    return `Step ${step ?? ''}${title === '' ? '' : `, ${title}`}`;
  }
  return NAMES[type] ?? sentenceCase(type.replaceAll(/([A-Z])/gu, ' $1').toLowerCase());
}
const NAMES: Readonly<Record<string, string>> = {
  paragraph: 'Text',
  heading: 'Heading',
  bulletList: 'List',
  orderedList: 'Numbered list',
  pieceCard: 'Piece card',
  cutList: 'Cut list',
};
const sentenceCase = (words: string): string => words.slice(0, 1).toUpperCase() + words.slice(1);

export const isStep = (node: BlockNode | LooseNode): boolean => node.type === 'step';

/** Whether two blocks may be one block before and after a change. */
export function alikeBlocks(a: LooseNode, b: LooseNode): boolean {
  if (a.type !== b.type) return false;
  if (a.type === 'step' && a.attrs?.['title'] !== '' && a.attrs?.['title'] === b.attrs?.['title']) return true;
  const [was, is] = [wordSet(a), wordSet(b)];
  if (was.size === 0 || is.size === 0) return true;
  const shared = [...was].filter((word) => is.has(word)).length;
  return shared * 3 >= Math.min(was.size, is.size);
}
const wordSet = (node: LooseNode): ReadonlySet<string> =>
  new Set(
    blockWords(node)
      .toLowerCase()
      .match(/[\p{L}\p{N}]+/gu) ?? [],
  );

/** A thing of the pattern as lines of words, one for each of its fields: "columns, front, size: inside width". */
export function fieldLines(value: unknown): readonly string[] {
  const lines: string[] = [];
  const walk = (inner: unknown, path: readonly string[]): void => {
    if (inner === undefined || inner === null) return;
    if (Array.isArray(inner)) {
      if (inner.every((item) => typeof item !== 'object' || item === null))
        return void lines.push(line(path, inner.join(', ')));
      return inner.forEach((item: unknown, i) => walk(item, [...path, nameOf(item) ?? String(i + 1)]));
    }
    if (typeof inner === 'object') {
      for (const [field, part] of Object.entries(inner)) if (field !== 'name') walk(part, [...path, field]);
      return;
    }
    lines.push(line(path, String(inner)));
  };
  walk(value, []);
  return lines;
}
const line = (path: readonly string[], value: string): string =>
  path.length === 0 ? value : `${path.join(', ')}: ${value}`;

function nameOf(item: unknown): string | undefined {
  return typeof item === 'object' && item !== null && 'name' in item && typeof item.name === 'string'
    ? item.name
    : undefined;
}
