import { show, showPosition, type Figures, type PieceFigure, type SheetPlan } from '@/engine';

/** A row of the cut list, in the reader's units. */
export interface CutRow {
  readonly number: number;
  readonly piece: PieceFigure;
  readonly across: string;
  readonly along: string;
  /** Numbers of the sheets that it is cut from. */
  readonly sheets: readonly number[];
}
/** Where one side of a piece is scored; `number` is null on the second row of a piece. */
export interface ScoreRow {
  readonly number: number | null;
  readonly piece: string;
  readonly side: string;
  readonly at: readonly string[];
  readonly from: 'left' | 'top';
}

export function cutRows({ pieces, sizing }: Figures, plan: SheetPlan): readonly CutRow[] {
  const bare = (mm: number) => show(mm, { units: sizing.units, grid: sizing.grid, bare: true }).typeset;
  return pieces.map((piece, i) => ({
    number: i + 1,
    piece,
    across: bare(piece.across),
    along: bare(piece.along),
    sheets: plan.sheets.flatMap(({ parts }, k) => (parts.some((part) => part.piece === piece.name) ? [k + 1] : [])),
  }));
}

/** Every scored side, positions as on a scoring board. */
export function scoreRows({ pieces, sizing }: Figures): readonly ScoreRow[] {
  const { units, grid } = sizing;
  return pieces.flatMap((piece, i) =>
    [
      { from: 'left' as const, size: piece.across, at: piece.scores.across },
      { from: 'top' as const, size: piece.along, at: piece.scores.along },
    ]
      .filter(({ at }) => at.length > 0)
      .map(({ from, size, at }, k) => ({
        number: k === 0 ? i + 1 : null,
        piece: piece.name,
        side: show(size, { units, grid, bare: true }).typeset,
        at: at.map((mm) => showPosition(mm, piece.thickness, { units, grid }).typeset),
        from,
      })),
  );
}

/** Said under the table when a position carries a sign. */
export const CARD_STEPS = '+ a card’s thickness more, − one less.';
export const hasCardSteps = (rows: readonly ScoreRow[]): boolean =>
  rows.some(({ at }) => at.some((position) => /[+−]/u.test(position)));
