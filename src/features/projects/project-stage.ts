import type { Pattern, Sizing } from '@/engine';
import type { WriteUp } from '@/writeup/document';

/** Where a project stands: never published, published as it is, or changed since. */
export type Stage =
  | { readonly stage: 'draft' }
  | { readonly stage: 'published'; readonly edition: number }
  | { readonly stage: 'changed'; readonly edition: number };

export function stageOf(project: {
  readonly revision: number;
  readonly publishedRevision: number | null;
  readonly editions: number;
}): Stage {
  if (project.editions === 0) return { stage: 'draft' };
  const stage = project.publishedRevision === project.revision ? 'published' : 'changed';
  return { stage, edition: project.editions };
}

/** "Draft, never published" · "Published, edition 3" · "Changed since edition 2". */
export function stageWords(stage: Stage): string {
  if (stage.stage === 'draft') return 'Draft, never published';
  return stage.stage === 'published' ? `Published, edition ${stage.edition}` : `Changed since edition ${stage.edition}`;
}

interface Content {
  readonly title: string;
  readonly summary: string;
  readonly pattern: Pattern;
  readonly sizing: Sizing;
  readonly writeUp: WriteUp;
}

/** In a few words, what differs from the newest edition: "4 measures and 2 steps differ"; empty when nothing of it does. */
export function differenceWords(edition: Content, now: Content): string {
  const parts = [
    counted(
      differing(edition.pattern.measures, now.pattern.measures, (m) => m.name),
      'measure',
    ),
    counted(
      differing(edition.pattern.pieces, now.pattern.pieces, (p) => p.name),
      'piece',
    ),
    counted(
      differing(steps(edition.writeUp), steps(now.writeUp), (_, n) => String(n)),
      'step',
    ),
    same(rest(edition.writeUp), rest(now.writeUp)) ? '' : 'the text around the steps',
    same(edition.sizing, now.sizing) ? '' : 'the size shown first',
    edition.title === now.title && edition.summary === now.summary ? '' : 'the title or summary',
  ].filter((part) => part !== '');
  if (parts.length === 0) return '';
  const last = parts.at(-1) ?? '';
  const words = parts.length === 1 ? last : `${parts.slice(0, -1).join(', ')} and ${last}`;
  const single = parts.length === 1 && !/^([2-9]|\d\d)/u.test(last);
  return `${words} ${single ? 'differs' : 'differ'}`;
}

const same = (a: unknown, b: unknown): boolean => JSON.stringify(a) === JSON.stringify(b);
const counted = (n: number, word: string): string => (n === 0 ? '' : `${n} ${word}${n === 1 ? '' : 's'}`);
const steps = (writeUp: WriteUp) => writeUp.doc.content.filter((node) => node.type === 'step');
const rest = (writeUp: WriteUp) => writeUp.doc.content.filter((node) => node.type !== 'step');

function differing<T>(before: readonly T[], after: readonly T[], key: (item: T, index: number) => string): number {
  const old = new Map(before.map((item, i) => [key(item, i), JSON.stringify(item)]));
  const kept = after.map((item, i) => ({ key: key(item, i), text: JSON.stringify(item) }));
  const changed = kept.filter((item) => old.get(item.key) !== item.text).length;
  const gone = [...old.keys()].filter((name) => !kept.some((item) => item.key === name)).length;
  return changed + gone;
}
