import { getSchema, Node, type Extensions } from '@tiptap/core';
import type { Schema } from '@tiptap/pm/model';
import { StarterKit } from '@tiptap/starter-kit';
import { AsTyped } from './marks/as-typed/schema';
import { Link } from './marks/link/schema';
import { OnlyWhen } from './marks/only-when/schema';
import { Amount } from './nodes/amount/schema';
import { Amounts } from './nodes/amounts/schema';
import { Caution } from './nodes/caution/schema';
import { Correction } from './nodes/correction/schema';
import { CurveTemplate } from './nodes/curve-template/schema';
import { CutList } from './nodes/cut-list/schema';
import { FoldedViewBlock } from './nodes/folded-view/schema';
import { Forward } from './nodes/forward/schema';
import { Materials } from './nodes/materials/schema';
import { Measure } from './nodes/measure/schema';
import { Photo } from './nodes/photo/schema';
import { PieceCard } from './nodes/piece-card/schema';
import { SheetPlanBlock } from './nodes/sheet-plan/schema';
import { SizeSummary } from './nodes/size-summary/schema';
import { StepRef } from './nodes/step-ref/schema';
import { Step } from './nodes/step/schema';
import { Tools } from './nodes/tools/schema';
import { Table, TableCell, TableHeader, TableRow } from './nodes/table/schema';
import { Tip } from './nodes/tip/schema';

/** The whole write-up: text and steps in any order; a step never stands inside anything else. */
const WholeWriteUp = Node.create({ name: 'doc', topNode: true, content: '(block | part)+' });

/** Paragraphs, headings, lists, bold and italic as Tiptap has them; everything else of the kit is left out. */
export const plainText = StarterKit.configure({
  document: false,
  blockquote: false,
  code: false,
  codeBlock: false,
  horizontalRule: false,
  strike: false,
  underline: false,
  link: false,
  trailingNode: false,
  heading: { levels: [2, 3] },
  dropcursor: { color: 'var(--plum)', width: 3 },
});

/** Our own nodes and marks, without views: the editor swaps in those with a view, under the same names. */
export const ownNodes: Extensions = [
  WholeWriteUp,
  Step,
  Measure,
  StepRef,
  Amount,
  PieceCard,
  CutList,
  Photo,
  Tip,
  Caution,
  Correction,
  Forward,
  Materials,
  Tools,
  Amounts,
  SheetPlanBlock,
  CurveTemplate,
  FoldedViewBlock,
  SizeSummary,
  Table,
  TableRow,
  TableCell,
  TableHeader,
  Link,
  OnlyWhen,
  AsTyped,
];

let schema: Schema | undefined;

/** The one schema that the editor, the server and the renderer's tests agree on. Needs no DOM. */
export function writeUpSchema(): Schema {
  schema ??= getSchema([plainText, ...ownNodes]);
  return schema;
}
