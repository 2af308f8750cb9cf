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
  | MaterialsNode;
export type InlineNode =
  | TextNode
  | MeasureNode
  | StepRefNode
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
/** A piece's drawing with its cut and score sentences. */
export interface PieceCardNode {
  readonly type: 'pieceCard';
  readonly attrs: { readonly piece: string };
}
export interface CutListNode {
  readonly type: 'cutList';
}
/** The content is the caption, which may hold live measures. */
export interface PhotoNode {
  readonly type: 'photo';
  readonly attrs: { readonly upload: string; readonly alt: string; readonly width: number; readonly height: number };
  readonly content?: readonly InlineNode[];
}
export interface NoteNode {
  readonly type: 'tip' | 'caution';
  readonly content: readonly BlockNode[];
}
export interface MaterialsNode {
  readonly type: 'materials';
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
