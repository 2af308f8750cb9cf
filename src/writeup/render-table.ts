import type { BlockNode, TableCellNode, TableNode } from './document';

/** A table that scrolls for itself where it is wider than the page; `inside` renders what stands in a cell. */
export function renderTable({ content }: TableNode, inside: (content: readonly BlockNode[]) => string): string {
  const [first, ...rest] = content;
  const headed = first !== undefined && rest.length > 0 && first.content.every(({ type }) => type === 'tableHeader');
  const row = (cells: readonly TableCellNode[], inHead: boolean) =>
    `<tr>${cells.map((cell) => cellHtml(cell, inHead)).join('')}</tr>`;
  const cellHtml = ({ type, attrs, content: text }: TableCellNode, inHead: boolean) => {
    const tag = type === 'tableHeader' ? 'th' : 'td';
    const scope = tag === 'td' ? '' : ` scope="${inHead ? 'col' : 'row'}"`;
    return `<${tag}${scope}${spanOf('colspan', attrs?.colspan)}${spanOf('rowspan', attrs?.rowspan)}>${inside(text)}</${tag}>`;
  };
  const head = headed ? `<thead>${row(first.content, true)}</thead>` : '';
  const body = (headed ? rest : content).map((one) => row(one.content, false)).join('');
  return `<div class="table-scroll" role="region" aria-label="Table" tabindex="0"><table class="table">${head}<tbody>${body}</tbody></table></div>`;
}

const spanOf = (name: string, value = 1): string => (value > 1 ? ` ${name}="${Math.trunc(value)}"` : '');
