import type { PieceDef } from '@/engine';

/** The formulas that give each named cell of a piece its size: those of its column and of its row. */
export function cellSizes(piece: Pick<PieceDef, 'cells' | 'columns' | 'rows'>): ReadonlyMap<string, readonly string[]> {
  const sizes = new Map<string, string[]>();
  piece.cells.forEach((row, r) =>
    row.forEach((cell, c) => {
      const name = /^(?:panel|tab|cap)\s+(.+?)(?:\s+on\s+.+)?$/u.exec(cell)?.[1];
      if (name === undefined) return;
      const own = [piece.columns[c]?.size, piece.rows[r]?.size].filter((size) => size !== undefined);
      sizes.set(name, [...(sizes.get(name) ?? []), ...own]);
    }),
  );
  return sizes;
}
