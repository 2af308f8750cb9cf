import { STOCKS, type PieceFigure, type Point } from '@/engine';
import type { PaperId } from '../../paper';
import { packPages, type Placed, type Size } from './pack';
import { pointsAlong, pointsOn, squareSpots, type Obstacle } from './spots';
import { tile, withoutEmpty, type Tile, type Tiling } from './tiles';

/** Millimetres. Printers leave up to six blank at the edges. */
export const MARGIN = 10;
/** The two squares that every page carries. */
export const SQUARES = { inches: 50.8, millimetres: 50 } as const;
/** The foot of a page of a large piece: both squares side by side, and words. */
export const FOOT = { height: SQUARES.inches, gap: 5 } as const;
/** The foot of every other page: words and what the lines mean. */
export const LINE = { height: 11.5, gap: 3 } as const;
/** A piece's name above it. */
export const NAME = 6;
const BETWEEN = 4;
/** What two neighbouring pages both show. */
export const OVERLAP = 10;

export interface Numbered extends Size {
  readonly piece: PieceFigure;
  readonly number: number;
}
export type TemplatePage =
  | { readonly kind: 'pieces'; readonly placed: readonly Placed<Numbered>[]; readonly squares: readonly Point[] }
  | { readonly kind: 'tile'; readonly item: Numbered; readonly tiling: Tiling; readonly tile: Tile };

/** The part of a page inside its margins. */
export const pageSize = (paper: PaperId): Size => ({
  across: STOCKS[paper].across - 2 * MARGIN,
  along: STOCKS[paper].along - 2 * MARGIN,
});
export const areaOver = (page: Size, foot: { readonly height: number; readonly gap: number }): Size => ({
  across: page.across,
  along: page.along - foot.height - foot.gap,
});

/**
 * Pages for every piece once, at true size: together where they fit, over several pages where one does not. The check squares stand
 * beside the pieces; on a page that one piece fills they stand inside it, clear of its lines and of `labels`, the names drawn in it.
 */
export function templatePages(
  pieces: readonly PieceFigure[],
  paper: PaperId,
  labels: (piece: PieceFigure) => readonly Obstacle[],
): readonly TemplatePage[] {
  const page = pageSize(paper);
  const room = areaOver(page, LINE);
  const items = pieces.map(
    (piece, i): Numbered => ({ piece, number: i + 1, across: piece.across, along: piece.along }),
  );
  const squaresFor = (placed: readonly Placed<Numbered>[]): readonly Point[] | null => {
    const beside = squareSpots(SIDES, room, placed.map(boxOf));
    const [only, ...others] = placed;
    if (beside || !only || others.length > 0) return beside;
    return squareSpots(SIDES, room, linesOf(only, labels));
  };
  const alone = (item: Numbered) =>
    [false, true].some((turned) => {
      const { across, along } = lying(item, turned);
      return across <= room.across && along + NAME <= room.along && squaresFor([{ item, x: 0, y: 0, turned }]) !== null;
    });
  const packed = packPages(items.filter(alone), {
    page: { across: room.across + BETWEEN, along: room.along + BETWEEN },
    taken: (item, turned) => {
      const { across, along } = lying(item, turned);
      return { across: across + BETWEEN, along: along + NAME + BETWEEN };
    },
    allowed: (placed) => squaresFor(placed) !== null,
  }).map((placed): TemplatePage => {
    const inOrder = [...placed].sort((a, b) => a.item.number - b.item.number);
    return { kind: 'pieces', placed: inOrder, squares: squaresFor(placed) ?? [] };
  });
  const tiled = items
    .filter((item) => !alone(item))
    .flatMap((item) => {
      const area = tileArea(page);
      const whole = tile(item, area, OVERLAP);
      const outline = pointsOn(item.piece.net.outline).map(({ x, y }) =>
        whole.turned ? { x: item.along - y, y: x } : { x, y },
      );
      const tiling = withoutEmpty(whole, area, outline);
      return tiling.tiles.map((one): TemplatePage => ({ kind: 'tile', item, tiling, tile: one }));
    });
  return [...packed, ...tiled].sort((a, b) => firstNumber(a) - firstNumber(b));
}

const SIDES = [SQUARES.inches, SQUARES.millimetres];
const firstNumber = (page: TemplatePage): number =>
  page.kind === 'tile' ? page.item.number : (page.placed[0] as Placed<Numbered>).item.number;

/** The part of a page that a large piece is shown in. */
export function tileArea(page: Size): Size {
  const { across, along } = areaOver(page, FOOT);
  return { across, along: along - NAME };
}

/** How much room a piece takes as it lies. */
export const lying = ({ across, along }: Size, turned: boolean): Size =>
  turned ? { across: along, along: across } : { across, along };

/** A piece with its name, as one obstacle. */
const boxOf = ({ item, x, y, turned }: Placed<Numbered>): Obstacle => {
  const { across, along } = lying(item, turned);
  return { x, y, across, along: along + NAME };
};

/** Its lines and its names, for squares that stand inside it. */
function linesOf(
  { item, x, y, turned }: Placed<Numbered>,
  labels: (piece: PieceFigure) => readonly Obstacle[],
): readonly Obstacle[] {
  const points = pointsAlong(item.piece.net).map((point) => ({ ...point, across: 0, along: 0 }));
  const name: Obstacle = { x, y, across: item.piece.across, along: NAME };
  const lines = [...points, ...labels(item.piece)].map((one): Obstacle => {
    const at = turned ? { x: item.along - one.y - one.along, y: one.x } : { x: one.x, y: one.y };
    const size = turned ? { across: one.along, along: one.across } : one;
    return { x: x + at.x, y: y + NAME + at.y, across: size.across, along: size.along };
  });
  return [name, ...lines];
}
