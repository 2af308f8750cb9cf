import type { Result } from '@/engine';
import type { Node as ProseMirrorNode } from '@tiptap/pm/model';
import { z } from 'zod';
import { WRITE_UP_VERSION, type DocNode, type WriteUp } from './document';
import { writeUpFault } from './messages';
import { writeUpSchema } from './schema';
import { storedForm } from './stored-form';

/** Characters of all texts and attribute values together, nesting, and parts in one write-up. */
const WRITE_UP_LIMITS = { characters: 500_000, depth: 44, parts: 5_000 } as const;

const scalar = z.union([z.string(), z.number().finite(), z.boolean(), z.null()]);
const attribute = z.union([scalar, z.record(scalar)]);
const mark = z.object({ type: z.string().max(40), attrs: z.record(attribute).optional() });
interface RawNode {
  type: string;
  text?: string | undefined;
  attrs?: Record<string, z.infer<typeof attribute>> | undefined;
  marks?: z.infer<typeof mark>[] | undefined;
  content?: RawNode[] | undefined;
}
const node: z.ZodType<RawNode> = z.lazy(() =>
  z.object({
    type: z.string().max(40),
    text: z.string().optional(),
    attrs: z.record(attribute).optional(),
    marks: z.array(mark).max(8).optional(),
    content: z.array(node).optional(),
  }),
);
const shape = z.object({ version: z.literal(WRITE_UP_VERSION), doc: node });

/**
 * Reads a write-up that came from outside: size and depth first, then the same schema that the editor uses.
 * Attributes that the schema does not know are dropped; parts that it does not know are refused, so that nothing is lost unseen.
 */
export function readWriteUp(json: unknown): Result<WriteUp> {
  const size = measureUp(json);
  if (size.depth > WRITE_UP_LIMITS.depth) return refuse('too deep', 'Lists lie too deep inside one another');
  if (size.parts > WRITE_UP_LIMITS.parts * 6) return refuse('too many parts', 'The write-up has too many parts');
  if (size.characters > WRITE_UP_LIMITS.characters)
    return refuse('too large', `The write-up has ${size.characters} characters`);

  const parsed = shape.safeParse(json);
  if (!parsed.success) {
    const issue = parsed.error.issues[0];
    return refuse(
      'not a write-up',
      `What was sent does not read as a write-up (${issue?.path.join(' › ') || 'whole'}: ${issue?.message ?? 'unreadable'})`,
    );
  }
  const raw = parsed.data.doc;
  const { nodes, marks } = writeUpSchema();
  let parts = 0;
  for (const part of everyNode(raw)) {
    parts += 1;
    if (!(part.type in nodes)) return refuse('unknown part', `A part of the kind “${part.type}” was found`);
    const strange = part.marks?.find(({ type }) => !(type in marks));
    if (strange) return refuse('unknown part', `Text of the kind “${strange.type}” was found`);
  }
  if (parts > WRITE_UP_LIMITS.parts) return refuse('too many parts', `The write-up has ${parts} parts`);
  if (raw.type !== 'doc') return refuse('not a write-up', `The outermost part is a “${raw.type}”`);

  let doc: ProseMirrorNode;
  try {
    doc = writeUpSchema().nodeFromJSON(raw);
  } catch (error) {
    return refuse('wrong value', sentence(error));
  }
  try {
    doc.check();
  } catch (error) {
    return error instanceof RangeError && /^Invalid content/.test(error.message)
      ? refuse('wrong place', sentence(error))
      : refuse('wrong value', sentence(error));
  }
  for (const part of everyNode(doc.toJSON() as RawNode)) {
    const level = part.attrs?.['level'];
    if (part.type === 'heading' && level !== 2 && level !== 3)
      return refuse('wrong value', `A heading of level ${String(level)} was found`);
    const start = part.attrs?.['start'];
    if (
      part.type === 'orderedList' &&
      !(typeof start === 'number' && Number.isInteger(start) && start >= 0 && start < 1_000_000)
    ) {
      return refuse('wrong value', `A list that starts at ${String(start)} was found`);
    }
  }
  return { ok: true, value: { version: WRITE_UP_VERSION, doc: storedForm(doc.toJSON() as DocNode) } };
}

function* everyNode(root: RawNode): Generator<RawNode> {
  const waiting = [root];
  for (let part = waiting.pop(); part; part = waiting.pop()) {
    yield part;
    if (part.content) waiting.push(...part.content);
  }
}

/** Walks anything without recursion, so that a hostile depth cannot exhaust the stack before it is refused. */
function measureUp(json: unknown): { depth: number; parts: number; characters: number } {
  const size = { depth: 0, parts: 0, characters: 0 };
  const waiting: { value: unknown; depth: number }[] = [{ value: json, depth: 0 }];
  for (let next = waiting.pop(); next; next = waiting.pop()) {
    const { value, depth } = next;
    if (typeof value === 'string') size.characters += value.length;
    if (typeof value !== 'object' || value === null) continue;
    size.parts += 1;
    size.depth = Math.max(size.depth, depth);
    if (size.depth > WRITE_UP_LIMITS.depth || size.parts > WRITE_UP_LIMITS.parts * 6) break;
    for (const child of Object.values(value)) waiting.push({ value: child, depth: depth + 1 });
  }
  return size;
}

const sentence = (error: unknown) => `A part was refused (${error instanceof Error ? error.message : String(error)})`;

const refuse = (...given: Parameters<typeof writeUpFault>): Result<never> => ({
  ok: false,
  faults: [writeUpFault(...given)],
});
