/** The engine's public data, in one place. Lengths in millimetres, angles in degrees, areas in square millimetres. */

export type Unit = 'in' | 'mm' | 'cm';
export type GridId = '1/8in' | '1/16in' | '1/32in' | '1mm' | '0.5mm';
export type Rounding = 'nearest' | 'up' | 'down' | 'exact';
/** What a value is. A choice is the index of its option; a yes/no is 1 or 0. */
export type KindName = 'length' | 'area' | 'volume' | 'angle' | 'number' | 'whole number' | 'choice' | 'yes/no';

/** Something that does not read or does not work, with its place and its cure. Never thrown. */
export interface Fault {
  readonly code: string;
  /** Where it stands: `measure "arc"`, `piece "Floor", row 2`, `fit "lid goes on"`. */
  readonly where: string;
  /** Character range in the formula at `where`, when there is one. */
  readonly span?: { readonly from: number; readonly to: number };
  readonly found: string;
  readonly expected: string;
  /** What to try next, as a sentence; empty when there is nothing sensible to say. */
  readonly hint: string;
  /** The text that cures it, put in place of `span`. */
  readonly cure?: string;
}
export type Result<T> =
  | { readonly ok: true; readonly value: T }
  | { readonly ok: false; readonly faults: readonly Fault[] };

// ── Pattern: the parametric description of a box. Data, never code. ──────────────────────────────────────────────────

export interface Pattern {
  readonly format: 1;
  readonly slug: string;
  readonly name: string;
  /** One sentence: what the box is. */
  readonly summary: string;
  /** Kind of box, for browsing: "Trays and lidded boxes". */
  readonly group: string;
  readonly measures: readonly MeasureDef[];
  readonly choices: readonly ChoiceDef[];
  readonly pieces: readonly PieceDef[];
  readonly fits: readonly FitDef[];
  /** Inside and outside sizes of the finished box, in the order a person says them. */
  readonly finished: { readonly inside: readonly NamedFormula[]; readonly outside: readonly NamedFormula[] };
  /** The order of making, in plain words; `[[formula]]` inside becomes a live measure. */
  readonly order: readonly OrderLine[];
  readonly materials?: readonly MaterialDef[];
  /** Degrees that the folded picture is turned about the upright axis; usual −35, which shows the front and the right. */
  readonly turn?: number;
  /** Where each piece stands in space in the folded picture. */
  readonly assembly: readonly Placement[];
}
/** A sentence of the order of making, or one that is said only when a condition holds. */
export type OrderLine = string | { readonly says: string; readonly when: string };
/** What it takes besides card, paper and glue: a length of ribbon, a number of knobs. */
export interface MaterialDef {
  readonly name: string;
  /** A length, an area or a number. */
  readonly formula: string;
  readonly when?: string;
}
export interface NamedFormula {
  readonly name: string;
  readonly formula: string;
}

export interface MeasureDef {
  readonly name: string;
  /** Usual: length. */
  readonly kind?: 'length' | 'area' | 'angle' | 'number' | 'whole number';
  /** Present on an asked measure. */
  readonly ask?: Ask;
  /** Present on a worked measure. Exactly one of `ask` and `formula`. */
  readonly formula?: string;
  /** How the measure is rounded to the cut grid. Usual: nearest for a length, exact for everything else. */
  readonly rounds?: Rounding;
  /** Always shown in this unit, whatever the reader chose (card thickness in mm). */
  readonly unit?: Unit;
  readonly note?: string;
}
export interface Ask {
  readonly question: string;
  /** Literal or formula of other measures. */
  readonly usual: string;
  readonly from: string;
  readonly to: string;
  /** Among the finer points. */
  readonly finer?: boolean;
  /** Asked only when this holds. */
  readonly when?: string;
}
export interface ChoiceDef {
  readonly name: string;
  readonly question: string;
  readonly options: readonly string[];
  readonly usual: string;
  readonly finer?: boolean;
  readonly when?: string;
}
export interface FitDef {
  readonly name: string;
  /** Left and right side; it holds when left − right ≥ −tolerance, in the direction given by `is`. */
  readonly left: string;
  readonly is: 'at least' | 'at most' | 'more than' | 'less than' | 'same as';
  readonly right: string;
  /** Length formula or literal; usual 0. */
  readonly tolerance?: string;
  readonly when?: string;
  /** What fails when it does not hold, and what to do. */
  readonly otherwise: string;
  /** The measures to change first when it fails, in order. */
  readonly change?: readonly string[];
  /** Advice is shown but never stops a sizing. */
  readonly advice?: boolean;
}

export type PieceDef = GridPieceDef | FanPieceDef | DiscPieceDef | SectorPieceDef | OutlinePieceDef | LayerPieceDef;
export type Look = 'card' | 'pages' | 'paper';
interface PieceBase {
  readonly name: string;
  readonly count?: string;
  readonly stock: 'card' | 'patterned paper' | 'greyboard';
  readonly when?: string;
  /** Colour role in the folded picture. Usual: card; paper for a layer. */
  readonly look?: Look;
  /** Words for the maker that geometry cannot know, said after the sentences from geometry. */
  readonly remarks?: readonly string[];
}

/** Columns and rows of card. */
export interface GridPieceDef extends PieceBase {
  readonly builder: 'grid';
  readonly columns: readonly Track[];
  readonly rows: readonly Track[];
  /** One list per row, one cell per column; cells of one name are one cell, and together a rectangle. */
  readonly cells: readonly (readonly CellDef[])[];
  /** Lines between two named cells that are not the usual ones. */
  readonly lines?: readonly LineDef[];
  readonly tabs?: readonly TabDef[];
  /** Radius of the arc of each cap cell. */
  readonly caps?: readonly { readonly cell: string; readonly radius: string }[];
  readonly corners?: readonly CornerDef[];
  readonly notches?: readonly NotchDef[];
  readonly slots?: readonly SlotDef[];
  readonly holes?: readonly HoleDef[];
  readonly creases?: readonly CreaseDef[];
  /** Panels that are rolled instead of lying flat, by cell name. */
  readonly rolls?: readonly { readonly cell: string; readonly radius: string; readonly when?: string }[];
  /** Sides that fits may measure: `Floor.curve length`. */
  readonly edges?: readonly { readonly name: string; readonly cell: string; readonly side: Side }[];
}

/** A regular polygon with a flap on every side, and a tab on one end of every flap. */
export interface FanPieceDef extends PieceBase {
  readonly builder: 'fan';
  readonly centre: string;
  readonly sides: string;
  readonly side: string;
  readonly flap: {
    readonly name: string;
    readonly shape: 'rectangle' | 'triangle';
    /** Out from the polygon's side. */
    readonly height: string;
    /** Turn from flat. */
    readonly angle: string;
    /** A round hole on the middle line, by its distance from the tip of the flap. */
    readonly hole?: { readonly diameter: string; readonly 'from tip': string; readonly when?: string };
  };
  readonly tab?: {
    readonly width: string;
    /** Between the hinge and the tab's end, at the polygon and at the tip. */
    readonly low: string;
    readonly high: string;
    readonly angle: string;
    readonly when?: string;
  };
}

/** A circle of card, with or without a toothed rim. */
export interface DiscPieceDef extends PieceBase {
  readonly builder: 'disc';
  readonly disc: string;
  /** The circle itself; the teeth stand outside it. */
  readonly diameter: string;
  readonly rim?: {
    readonly teeth: string;
    readonly depth: string;
    readonly 'tooth angle': string;
    readonly angle: string;
    readonly when?: string;
  };
}

/** A ring sector that rolls into a cone or the frustum of one, with a seam tab. */
export interface SectorPieceDef extends PieceBase {
  readonly builder: 'sector';
  readonly body: string;
  /** Nothing for a pointed cone. */
  readonly 'inner radius': string;
  readonly 'outer radius': string;
  readonly angle: string;
  readonly seam: { readonly width: string; readonly low: string; readonly high: string };
}

/** Panels between named points: what the other builders do not make. */
export interface OutlinePieceDef extends PieceBase {
  readonly builder: 'outline';
  readonly points: readonly { readonly name: string; readonly across: string; readonly along: string }[];
  readonly panels: readonly OutlinePanelDef[];
  readonly lines?: readonly LineDef[];
  /** Rectangular holes; the cell is a panel, measured from the left and top of the upright rectangle round it. */
  readonly slots?: readonly SlotDef[];
  /** Edges that fits may measure, from point to point along one panel. */
  readonly edges?: readonly {
    readonly name: string;
    readonly panel: string;
    readonly from: string;
    readonly to: string;
  }[];
}
export interface OutlinePanelDef {
  readonly name: string;
  readonly role?: 'panel' | 'tab';
  /** Point names in order, clockwise on the drawing; `b bowed out by r` goes to `b` along an arc of radius `r` (out or in). */
  readonly loop: readonly string[];
  /**
   * Bent about lines that run along, so far that a crease across the whole panel, an arc of this radius, lies in a plane at
   * 45°: a face of a pillow, or one of its closing flaps, which then stands square.
   */
  readonly bent?: string;
  readonly when?: string;
}
/** A flat sheet glued on the outside of a face of another piece: the face's outline, smaller by a margin all round. */
export interface LayerPieceDef extends PieceBase {
  readonly builder: 'layer';
  /** The piece that it is glued to; not itself a layer. */
  readonly of: string;
  /**
   * Panels of that piece that make one face, such as a floor and the cap that it runs out into. One that is not there at a
   * sizing is left out; with none there the layer is not made. The first flap of a fan stands for all of them.
   */
  readonly panels: readonly string[];
  /** Further faces of the same shape that copies go on. */
  readonly also?: readonly (readonly string[])[];
  /** From every edge of the face and from every hole in it. */
  readonly margin: string;
}
/** A round hole; position of its middle from the cell's left and top. */
export interface HoleDef {
  readonly cell: string;
  readonly across: string;
  readonly along: string;
  readonly diameter: string;
  readonly when?: string;
}
/**
 * A fold inside a cell that lets a flat box open: drawn and said, lying flat in the folded picture. With `parts` it runs from
 * edge to edge and parts the cell: what lies to its right is a panel of that name, turned by `angle` (usual 90°).
 */
export interface CreaseDef {
  readonly cell: string;
  readonly is: 'valley' | 'mountain';
  /** Across and along from the cell's top left corner. */
  readonly from: readonly [string, string];
  readonly to: readonly [string, string];
  readonly parts?: string;
  readonly angle?: string;
  readonly when?: string;
}
export interface Track {
  readonly name: string;
  readonly size: string;
  readonly when?: string;
}
/**
 * What a cell of the grid is: `away`, `panel floor`, `tab left`, `tab corner 1 on left end`, `flap dust on second`,
 * `cap curve on floor`. A tab (glued) or flap (not glued) is hinged on one neighbour only (`on …`; needed when it touches
 * several) and cut free from the others. A cap is a circular segment that continues its neighbour without a fold.
 */
export type CellDef = string;
export type Side = 'top' | 'right' | 'bottom' | 'left';
export interface LineDef {
  readonly between: readonly [string, string];
  readonly is: 'valley' | 'mountain' | 'slit' | 'nothing';
  /** Turn from flat; usual 90°. */
  readonly angle?: string;
  /** Turn in the folded picture, where it stands open to show the inside; usual the angle itself. */
  readonly shown?: string;
  readonly when?: string;
}
/** How tabs are shaped. Ends are named by the side they lie on; the tip is the side away from the hinge. */
export interface TabDef {
  readonly cells: readonly string[];
  /** How far it stands out from its hinge; usual: the whole cell. */
  readonly depth?: string;
  readonly left?: TabEnd;
  readonly right?: TabEnd;
  readonly top?: TabEnd;
  readonly bottom?: TabEnd;
  /** Number of teeth that the tab is cut into; usual 1, a plain tab. */
  readonly teeth?: string;
  /** Radius of the two corners of the tip. */
  readonly round?: string;
  /** A shape of its own instead: corners as `[along the hinge, out from it]`, hinge from left to right or top to bottom. */
  readonly shape?: readonly (readonly [string, string])[];
  /** Half the angle that each tooth must give way to its neighbour when the tab is bent. */
  readonly 'tooth angle'?: string;
  readonly when?: string;
}
export interface TabEnd {
  /** How far in from the end of the hinge the tab starts; usual 0. */
  readonly from?: string;
  /** How much narrower the tip is at this end: a length, or an angle off square. */
  readonly by?: string;
}
export interface CornerDef {
  readonly cell: string;
  readonly corner: 'top left' | 'top right' | 'bottom right' | 'bottom left';
  readonly radius: string;
  readonly when?: string;
}
/** A half-round bite out of a free edge. */
export interface NotchDef {
  readonly cell: string;
  readonly side: Side;
  /** From the left (or top) end of that side to the middle of the notch. */
  readonly at: string;
  readonly radius: string;
  readonly when?: string;
}
/** A rectangular hole; position of its middle from the cell's left and top. */
export interface SlotDef {
  readonly cell: string;
  readonly across: string;
  readonly along: string;
  readonly width: string;
  readonly height: string;
  readonly when?: string;
}
/** Puts the root panel of one copy of a piece in space; the rest follows by folding. */
export interface Placement {
  readonly piece: string;
  /** The cell that is placed; the others fold from it. */
  readonly root: string;
  /** Where the top left corner of the root cell goes; the middle of a fan or disc, the apex of a sector (`along` its axis). */
  readonly at: readonly [string, string, string];
  /** Directions in space of the flat piece's across and along. */
  readonly across: Axis;
  readonly along: Axis;
  readonly when?: string;
  readonly look?: Look;
  /** The face that the flat drawing shows is the outside here: a piece with two like faces, used the other way up. */
  readonly over?: boolean;
}
export type Axis = '+x' | '-x' | '+y' | '-y' | '+z' | '-z';

/** A pattern without the formulas of its pieces: what is still asked of it once it is compiled. */
export type PatternHead = Omit<Pattern, 'pieces'> & { readonly pieces: readonly PieceHead[] };
type Said = 'name' | 'builder' | 'stock' | 'look' | 'remarks';
export type PieceHead =
  | Pick<GridPieceDef, Said | 'edges'>
  | (Pick<FanPieceDef, Said | 'centre'> & { readonly flap: Pick<FanPieceDef['flap'], 'name' | 'shape'> })
  | Pick<DiscPieceDef, Said | 'disc'>
  | Pick<SectorPieceDef, Said | 'body'>
  | Pick<OutlinePieceDef, Said | 'edges'>
  | Pick<LayerPieceDef, Said>;

// ── Sizing: one reader's answers. ────────────────────────────────────────────────────────────────────────────────────

export interface Sizing {
  /** Asked values that the reader set, by measure name; the rest are usual. */
  readonly values: Readonly<Record<string, number>>;
  readonly choices: Readonly<Record<string, string>>;
  readonly units: Unit;
  readonly grid: GridId;
}

// ── Net: a flat piece. ───────────────────────────────────────────────────────────────────────────────────────────────

export interface Point {
  readonly x: number;
  readonly y: number;
}
export interface Line {
  readonly type: 'line';
  readonly from: Point;
  readonly to: Point;
}
/** `clockwise` as seen on screen (y down). */
export interface Arc {
  readonly type: 'arc';
  readonly from: Point;
  readonly to: Point;
  readonly centre: Point;
  readonly radius: number;
  readonly clockwise: boolean;
}
export type Curve = Line | Arc;
/** Closed chain of curves, each beginning where the last ended; clockwise on screen for outlines, the other way for holes. */
export type Loop = readonly Curve[];

export interface Panel {
  readonly name: string;
  readonly role: 'panel' | 'tab';
  readonly loop: Loop;
  /** One tooth of a toothed tab; always glued out of sight. */
  readonly tooth?: boolean;
  /** Rolled to this radius about an axis that runs along. */
  readonly roll?: { readonly radius: number };
  /** Rolled into a cone about this point of the flat, over this angle in degrees. */
  readonly cone?: { readonly apex: Point; readonly angle: number };
  /** Bent about lines that run along, after a crease of this radius that lies in a plane at 45°. */
  readonly bent?: { readonly radius: number };
}
export interface Fold {
  readonly curve: Curve;
  readonly kind: 'valley' | 'mountain';
  /** Degrees turned from flat; 0 lies flat. */
  readonly angle: number;
  /** Degrees turned in the folded picture, where that is not all the way. */
  readonly shown?: number;
  /** Names of the two panels that meet there. */
  readonly panels: readonly [string, string];
}
export interface Net {
  readonly outline: Loop;
  readonly holes: readonly Loop[];
  readonly panels: readonly Panel[];
  readonly folds: readonly Fold[];
  /** Folds inside panels, lying flat when the box stands. */
  readonly creases: readonly { readonly curve: Curve; readonly kind: Fold['kind'] }[];
  /** Lines where two panels go on without a fold. */
  readonly joins: readonly { readonly curve: Curve; readonly panels: readonly [string, string] }[];
  /** Cuts that end inside the card. */
  readonly slits: readonly Line[];
  /** Rectangles of the blank that are cut away, for the crossed-out drawing. */
  readonly away: readonly { readonly x: number; readonly y: number; readonly across: number; readonly along: number }[];
  readonly across: number;
  readonly along: number;
  /** Length of each named edge as drawn. */
  readonly edges: Readonly<Record<string, number>>;
  /** Boundaries of columns and rows, from 0 to across and along. */
  readonly columns: readonly number[];
  readonly rows: readonly number[];
}

// ── Figures: everything that follows from a sizing. ──────────────────────────────────────────────────────────────────

export interface Figures {
  readonly sizing: Sizing;
  readonly measures: readonly MeasureFigure[];
  readonly pieces: readonly PieceFigure[];
  readonly fits: readonly FitFigure[];
  readonly finished: { readonly inside: readonly SizeFigure[]; readonly outside: readonly SizeFigure[] };
  /** What making it takes. */
  readonly materials: Materials;
  /** The largest difference that cutting to the grid makes, and where. */
  readonly departure: { readonly mm: number; readonly where: string };
  /** What keeps this sizing from being made; empty when it can be. */
  readonly problems: readonly SizingProblem[];
}
export interface Materials {
  /** For each stock in use, what its pieces come to once cut, all counted, in square millimetres. */
  readonly stocks: readonly { readonly stock: PieceDef['stock']; readonly area: number }[];
  /** Millimetres of glue or double-sided tape: the folds that glued tabs hang on, all counted. */
  readonly seams: number;
  /** Glued all over: layers, in square millimetres. */
  readonly glued: number;
  /** What the pattern names besides; as cut. */
  readonly extras: readonly { readonly name: string; readonly kind: KindName; readonly value: number }[];
}
export interface MeasureFigure {
  readonly name: string;
  readonly kind: KindName;
  readonly asked: boolean;
  /** Value before and after rounding to the cut grid. */
  readonly exact: number;
  readonly cut: number;
  readonly unit?: Unit;
  /** Asked measures: the range, in the same unit as the value. */
  readonly from?: number;
  readonly to?: number;
  /** Asked measures: the usual value at this sizing; `set` when the reader changed it. */
  readonly usual?: number;
  readonly set?: boolean;
  /** Asked measures with a condition that does not hold are not in use. */
  readonly inUse: boolean;
}
export interface SizeFigure {
  readonly name: string;
  readonly mm: number;
}
export interface PieceFigure {
  readonly name: string;
  readonly count: number;
  readonly stock: PieceDef['stock'];
  /** As cut. */
  readonly net: Net;
  readonly across: number;
  readonly along: number;
  readonly scores: { readonly across: readonly number[]; readonly along: readonly number[] };
  /** A fan's side that lies level at the foot, and how far the flap on it stands out. */
  readonly fan?: { readonly side: Line; readonly height: number };
  /** A layer: the piece it is glued to and the faces, by their panels, each with room round it. */
  readonly layer?: {
    readonly of: string;
    readonly faces: readonly (readonly string[])[];
    readonly margin: number;
    /** Where the corner of its blank lies on the flat piece, on the first face. */
    readonly at: Point;
  };
  /** Card thickness at this sizing; 0 when the pattern has none. */
  readonly thickness: number;
  readonly area: number;
  readonly perimeter: number;
}
/** Words with figures in them; `say` in `drawing` turns it into text in the reader's units. */
export type Sentence = readonly (string | SentenceFigure)[];
export interface SentenceFigure {
  readonly mm: number;
  /** Without its unit. */
  readonly bare?: boolean;
  /** Card thicknesses to add to `mm`: said in words, since no ruler shows them. */
  readonly cards?: number;
  /** Written as a + or − for each of them, as on the drawing; an earlier sentence says what that means. */
  readonly signed?: boolean;
}
export interface FitFigure {
  readonly name: string;
  readonly holds: boolean;
  /** Room to spare (negative: missing), in mm as cut; null when it could not be worked out. */
  readonly gap: number | null;
  readonly is: FitDef['is'];
  readonly advice: boolean;
  readonly otherwise: string;
  readonly change: readonly string[];
}
export interface SizingProblem {
  readonly code: 'below range' | 'above range' | 'not whole' | 'fit fails' | 'cannot be worked out' | 'piece fails';
  /** The measure to change. */
  readonly measure: string;
  readonly sentence: string;
  /** The nearest value of `measure` that works, in mm (or plain number); null when none in its range does. */
  readonly nearest: number | null;
}

// ── Drawing: plain shapes with roles, in drawing units (CSS pixels on a page, millimetres where asked). ──────────────

export type Role =
  | 'cut'
  | 'valley'
  | 'mountain'
  | 'slit'
  | 'glue'
  | 'panel'
  | 'away'
  | 'hidden'
  | 'dimension'
  | 'extension'
  | 'origin'
  | 'ruler'
  | 'figure'
  | 'label'
  | 'face'
  | 'face edge'
  | 'glass';
export type Shape =
  | { readonly type: 'path'; readonly role: Role; readonly d: string; readonly tone?: string; readonly of?: string }
  | {
      readonly type: 'text';
      readonly role: 'figure' | 'label';
      readonly x: number;
      readonly y: number;
      readonly text: string;
      readonly anchor: 'start' | 'middle' | 'end';
      readonly turned?: boolean;
      readonly of?: string;
    };
export interface Drawing {
  readonly width: number;
  readonly height: number;
  readonly title: string;
  /** Text alternative: size and scores in words. */
  readonly alt: string;
  readonly shapes: readonly Shape[];
}
