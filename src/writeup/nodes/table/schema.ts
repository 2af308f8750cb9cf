import { Node, type ParentConfig } from '@tiptap/core';
import { span } from '../attributes';

declare module '@tiptap/core' {
  interface NodeConfig<Options, Storage> {
    /** What the table commands take a node for. */
    tableRole?:
      | string
      | ((this: {
          name: string;
          options: Options;
          storage: Storage;
          parent: ParentConfig<NodeConfig<Options>>['tableRole'];
        }) => string);
  }
}

/** Rows of cells, for what a list cannot say. */
export const Table = Node.create({
  name: 'table',
  group: 'block',
  content: 'tableRow+',
  tableRole: 'table',
  isolating: true,

  parseHTML() {
    return [{ tag: 'table' }];
  },

  renderHTML() {
    return ['table', { class: 'table' }, ['tbody', 0]];
  },

  extendNodeSchema(extension) {
    return { tableRole: extension.config.tableRole as unknown };
  },
});

export const TableRow = Node.create({
  name: 'tableRow',
  content: '(tableCell | tableHeader)+',
  tableRole: 'row',

  parseHTML() {
    return [{ tag: 'tr' }];
  },

  renderHTML() {
    return ['tr', 0];
  },
});

const cell = (name: string, tag: string, tableRole: string) =>
  Node.create({
    name,
    content: '(paragraph | bulletList | orderedList)+',
    tableRole,
    isolating: true,

    addAttributes() {
      return {
        colspan: { default: 1, validate: span },
        rowspan: { default: 1, validate: span },
        // The table commands look for it; columns are as wide as what stands in them.
        colwidth: { default: null, validate: 'null', parseHTML: () => null, rendered: false },
      };
    },

    parseHTML() {
      return [{ tag }];
    },

    renderHTML({ HTMLAttributes }) {
      return [tag, HTMLAttributes, 0];
    },
  });

export const TableCell = cell('tableCell', 'td', 'cell');
export const TableHeader = cell('tableHeader', 'th', 'header_cell');
