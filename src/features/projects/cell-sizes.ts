import type { PieceDef } from '@/engine';

/** The formulas that give each named cell of a piece its size: those of its column and of its row. Only a grid has cells. */
export function cellSizes(piece: PieceDef): ReadonlyMap<string, readonly string[]> {
  const sizes = new Map<string, string[]>();
  if (piece.builder !== 'grid') return sizes;
  piece.cells.forEach((row, r) =>
    row.forEach((cell, c) => {
      const name = /^(?:panel|tab|flap|cap)\s+(.+?)(?:\s+on\s+.+)?$/u.exec(cell)?.[1];
      if (name === undefined) return;
      const own = [piece.columns[c]?.size, piece.rows[r]?.size].filter((size) => size !== undefined);
      sizes.set(name, [...(sizes.get(name) ?? []), ...own]);
    }),
  );
  return sizes;
}
