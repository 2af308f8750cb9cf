/**
 * The write-up as stored: the editor's own JSON (ProseMirror), narrowed to our nodes.
 * Never rename or remove a node or attribute: raise WRITE_UP_VERSION and migrate on read.
 */
export const WRITE_UP_VERSION = 1;

export interface WriteUp {
  readonly version: typeof WRITE_UP_VERSION;
  readonly doc: DocNode;
}
export interface DocNode {
  readonly type: 'doc';
  readonly content: readonly BlockNode[];
}
export type BlockNode =
  | StepNode
  | ParagraphNode
  | HeadingNode
  | ListNode
  | PieceCardNode
  | CutListNode
  | PhotoNode
  | NoteNode
  | ForwardNode
  | MaterialsNode
  | LiveBlockNode
  | CurveTemplateNode
  | TableNode;
export type InlineNode =
  | TextNode
  | MeasureNode
  | StepRefNode
  | AmountNode
  | { readonly type: 'hardBreak'; readonly marks?: readonly MarkNode[] };

/** A numbered step. `mark` is a few words beside the title, such as "optional". */
export interface StepNode {
  readonly type: 'step';
  readonly attrs: {
    readonly title: string;
    readonly mark: string;
    /** Where the step begins in a video. Usual: null. */
    readonly moment?: VideoMoment | null;
    /** A formula that is yes or no: the step is there, and counted, only when it holds. Usual: empty, always. */
    readonly when?: string;
    /** May be skipped. Usual: false. */
    readonly optional?: boolean;
    /** What references speak of; no two steps have the same. Usual: empty, as long as nothing refers to it. */
    readonly key?: string;
  };
  readonly content: readonly BlockNode[];
}
/** A place in a video: whole seconds from its beginning, and its https address when there is one to go to. */
export interface VideoMoment {
  readonly seconds: number;
  readonly address: string | null;
}
export interface ParagraphNode {
  readonly type: 'paragraph';
  readonly content?: readonly InlineNode[];
}
export interface HeadingNode {
  readonly type: 'heading';
  readonly attrs: { readonly level: 2 | 3 };
  readonly content?: readonly InlineNode[];
}
export interface ListNode {
  readonly type: 'bulletList' | 'orderedList';
  /** Ordered lists: the first number, when it is not 1. */
  readonly attrs?: { readonly start: number };
  readonly content: readonly { readonly type: 'listItem'; readonly content: readonly BlockNode[] }[];
}
/** A live measure: the name of a measure or a formula, worked out at the reader's size. `bare` leaves the unit away. */
export interface MeasureNode {
  readonly type: 'measure';
  readonly attrs: { readonly formula: string; readonly bare: boolean };
  readonly marks?: readonly MarkNode[];
}
/** “step 4”, counted anew wherever it is read: `key` is that of the step. */
export interface StepRefNode {
  readonly type: 'stepRef';
  readonly attrs: { readonly key: string };
  readonly marks?: readonly MarkNode[];
}
/** What the box takes of something, as `amounts.ts` names it: `sheets card`, `tape`. */
export interface AmountNode {
  readonly type: 'amount';
  readonly attrs: { readonly of: string };
  readonly marks?: readonly MarkNode[];
}
/** A piece's drawing with its cut and score sentences. */
export interface PieceCardNode {
  readonly type: 'pieceCard';
  readonly attrs: { readonly piece: string };
}
export interface CutListNode {
  readonly type: 'cutList';
}
/** Blocks that are worked out whole: what the box takes, how its pieces lie on sheets, how it looks folded, its sizes. */
export interface LiveBlockNode {
  readonly type: 'amounts' | 'sheetPlan' | 'foldedView' | 'sizeSummary';
}
/** The curves of a piece at full size, to be printed and cut along. */
export interface CurveTemplateNode {
  readonly type: 'curveTemplate';
  readonly attrs: { readonly piece: string };
}
export interface TableNode {
  readonly type: 'table';
  readonly content: readonly { readonly type: 'tableRow'; readonly content: readonly TableCellNode[] }[];
}
export interface TableCellNode {
  readonly type: 'tableCell' | 'tableHeader';
  /** Columns and rows that it covers, where that is more than one. */
  readonly attrs?: { readonly colspan?: number; readonly rowspan?: number };
  readonly content: readonly BlockNode[];
}
/** The content is the caption, which may hold live measures. Photos that follow one another stand side by side. */
export interface PhotoNode {
  readonly type: 'photo';
  readonly attrs: {
    readonly upload: string;
    readonly alt: string;
    readonly width: number;
    readonly height: number;
    /** What stays in sight when it is cropped, in tenths across and down. Usual: null, the middle. */
    readonly focus?: { readonly across: number; readonly down: number } | null;
    /** Usual: whole. */
    readonly crop?: PhotoCrop;
  };
  readonly content?: readonly InlineNode[];
}
export type PhotoCrop = 'whole' | 'wide' | 'square';
/** `correction`: what an earlier edition had wrong, said where it stood. */
export interface NoteNode {
  readonly type: 'tip' | 'caution' | 'correction';
  readonly content: readonly BlockNode[];
}
/** What is done now because a later step needs it: `word` says why now, `key` is that step's, or empty. */
export interface ForwardNode {
  readonly type: 'forward';
  readonly attrs: { readonly word: string; readonly key: string };
  readonly content: readonly BlockNode[];
}
export interface MaterialsNode {
  readonly type: 'materials' | 'tools';
  readonly content: readonly BlockNode[];
}
export interface TextNode {
  readonly type: 'text';
  readonly text: string;
  readonly marks?: readonly MarkNode[];
}
export type MarkNode =
  | { readonly type: 'bold' }
  | { readonly type: 'italic' }
  /** A typed number that is meant to stay as it is, at every size. */
  | { readonly type: 'asTyped' }
  /** A phrase that is said only when a formula, which is yes or no, holds. */
  | { readonly type: 'onlyWhen'; readonly attrs: { readonly when: string } }
  | { readonly type: 'link'; readonly attrs: { readonly href: string } };
