import type { BlockNode, DocNode, InlineNode } from '@/writeup/document';
import type { DraftStep } from './split-steps';

/**
 * A document that was read by the write-up's own schema as steps: a heading begins one and is its title, so does each item of
 * a numbered list. Its pictures and links are left behind: the text is what is brought in.
 */
export function stepsOfDocument({ content }: DocNode): readonly DraftStep[] {
  const steps: { title: string; moment: null; paragraphs: string[] }[] = [];
  const begin = (title: string) => steps.push({ title: title.slice(0, 200), moment: null, paragraphs: [] });
  const say = (text: string) => {
    if (text === '') return;
    if (steps.length === 0) begin('');
    steps.at(-1)?.paragraphs.push(text);
  };
  const take = (block: BlockNode): void => {
    if (block.type === 'heading') begin(textOf(block.content));
    else if (block.type === 'paragraph') say(textOf(block.content));
    else if (block.type === 'orderedList')
      for (const item of block.content) {
        if (steps.at(-1)?.paragraphs.length !== 0) begin('');
        item.content.forEach(take);
      }
    else if (block.type === 'bulletList') block.content.forEach((item) => item.content.forEach(take));
    else if (block.type === 'step') {
      begin(block.attrs.title);
      block.content.forEach(take);
    } else if ('content' in block && (block.type === 'tip' || block.type === 'caution' || block.type === 'materials'))
      block.content.forEach(take);
  };
  content.forEach(take);
  return steps.filter(({ title, paragraphs }) => title !== '' || paragraphs.length > 0);
}

const textOf = (content: readonly InlineNode[] = []): string =>
  content
    .map((node) => (node.type === 'text' ? node.text : node.type === 'measure' ? node.attrs.formula : ' '))
    .join('')
    .replace(/\s+/g, ' ')
    .trim();
