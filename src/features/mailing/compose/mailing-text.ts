import type { Block } from './mailing-blocks';

const WIDTH = 58;
const RULE = Array.from({ length: 29 }, () => '-').join(' ');

/** The plain twin: the same blocks in the same order, wrapped at 58 characters; addresses stand on lines of their own. */
export function mailingText(blocks: readonly Block[]): string {
  return `${blocks.map(blockText).join('\n\n')}\n`;
}

function blockText(block: Block): string {
  switch (block.type) {
    case 'masthead':
      return `${block.name.toUpperCase()}\n${block.url}`;
    case 'title':
      return underlined(block.text);
    case 'paragraph':
      return block.text.split('\n').map(wrap).join('\n');
    case 'picture':
      return wrap(`[Picture: ${block.alt}]`);
    case 'rows': {
      const widest = Math.max(...block.rows.map(({ label }) => label.length));
      return block.rows.map(({ label, value }) => `  ${label.padEnd(widest)}   ${value}`).join('\n');
    }
    case 'button':
      return `${block.label}:\n${block.url}`;
    case 'correction':
      return `${RULE}\n\n${underlined(block.title)}\n\n${block.text.split('\n').map(wrap).join('\n')}\n\n${RULE}`;
    case 'footer':
      return [
        RULE,
        wrap(block.why),
        block.links.map(({ label, url }) => `${label}:\n${url}`).join('\n'),
        wrap(block.sender),
      ].join('\n\n');
  }
}

const underlined = (text: string): string => {
  const lines = wrap(text.toUpperCase()).split('\n');
  return [...lines, '='.repeat(Math.max(...lines.map((line) => line.length)))].join('\n');
};

/** Breaks at spaces; a word that is longer than a line stays whole. */
function wrap(text: string): string {
  const lines: string[] = [];
  let line = '';
  for (const word of text.split(/[^\S\u00a0\u202f]+/u).filter(Boolean)) {
    if (line && line.length + 1 + word.length > WIDTH) {
      lines.push(line);
      line = word;
    } else line = line ? `${line} ${word}` : word;
  }
  return [...lines, line].join('\n');
}
