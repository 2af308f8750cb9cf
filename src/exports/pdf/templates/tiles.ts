import type { Point } from '@/engine';
import type { Size } from './pack';

/** One page of a piece that is larger than a page. */
export interface Tile {
  /** `B2`: second column, second row. */
  readonly name: string;
  readonly column: number;
  readonly row: number;
  /** The top left corner on the piece as it lies. */
  readonly x: number;
  readonly y: number;
}
export interface Tiling {
  readonly turned: boolean;
  readonly columns: number;
  readonly rows: number;
  /** Row by row; fewer than columns times rows where the piece leaves some of them empty. */
  readonly tiles: readonly Tile[];
}

/** Pages of one size that cover a piece, neighbours sharing a strip of `overlap`; laid the way that takes fewer pages. */
export function tile({ across, along }: Size, page: Size, overlap: number): Tiling {
  const count = (length: number, room: number) => Math.max(1, Math.ceil((length - overlap) / (room - overlap) - 1e-9));
  const ways = [false, true].map((turned) => {
    const [w, h] = turned ? [along, across] : [across, along];
    return { turned, columns: count(w, page.across), rows: count(h, page.along) };
  });
  const [upright, turned] = ways as [(typeof ways)[0], (typeof ways)[0]];
  const way = turned.columns * turned.rows < upright.columns * upright.rows ? turned : upright;
  const tiles = Array.from({ length: way.columns * way.rows }, (_, i): Tile => {
    const [column, row] = [i % way.columns, Math.floor(i / way.columns)];
    return {
      name: `${String.fromCharCode(65 + column)}${row + 1}`,
      column,
      row,
      x: column * (page.across - overlap),
      y: row * (page.along - overlap),
    };
  });
  return { ...way, tiles };
}

/** The same without the pages that nothing of the piece is on; `outline` is a closed line round the piece as it lies, in points much closer together than a page. */
export function withoutEmpty(tiling: Tiling, page: Size, outline: readonly Point[]): Tiling {
  const tiles = tiling.tiles.filter(({ x, y }) => {
    const on = (point: Point) => point.x > x && point.x < x + page.across && point.y > y && point.y < y + page.along;
    return outline.some(on) || holds(outline, { x: x + page.across / 2, y: y + page.along / 2 });
  });
  return { ...tiling, tiles };
}

const holds = (outline: readonly Point[], { x, y }: Point): boolean =>
  outline.reduce((inside, a, i) => {
    const b = outline[(i + 1) % outline.length] as Point;
    const crosses = a.y > y !== b.y > y && x < a.x + ((y - a.y) / (b.y - a.y)) * (b.x - a.x);
    return crosses ? !inside : inside;
  }, false);
