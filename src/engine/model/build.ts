import type { Formula, Values } from '../formula';
import { isZero } from '../measure';
import { buildGrid, type Built, type EndShape, type GridPiece, type TabShape } from '../piece';
import type { Side } from '../types';
import type { CompiledPiece } from './model';
import { isInUse } from './values';

/** The piece with every formula worked out; columns and rows that are not in use, or of no size, are left out with their cells. */
export function resolvePiece(piece: CompiledPiece, values: Values): GridPiece {
  const used = (tracks: CompiledPiece['columns']) =>
    tracks
      .map((track, index) => ({ index, size: track.size.work(values), kept: isInUse(track, values) }))
      .filter((track) => track.kept && !isZero(track.size));
  const [columns, rows] = [used(piece.columns), used(piece.rows)];
  const cells = rows.map((row, r) =>
    columns.map((column, c) => ({
      ...(piece.cells[row.index]?.[column.index] as GridPiece['cells'][number][number]),
      row: r,
      column: c,
    })),
  );
  const inUse = <T extends { readonly when?: Formula }>(list: readonly T[]): readonly T[] =>
    list.filter((one) => isInUse(one, values));
  const tabs = new Map<string, TabShape>();
  for (const tab of inUse(piece.tabs)) {
    const ends = Object.fromEntries(
      Object.entries(tab.ends).map(([side, end]): [string, EndShape] => {
        const by = end.by?.work(values) ?? 0;
        return [
          side,
          { from: end.from?.work(values) ?? 0, by: end.by?.kind.type === 'angle' ? { degrees: by } : { mm: by } },
        ];
      }),
    ) as Partial<Record<Side, EndShape>>;
    for (const cell of tab.cells) {
      const before = tabs.get(cell);
      tabs.set(cell, {
        depth: tab.depth?.work(values) ?? before?.depth ?? null,
        ends: { ...before?.ends, ...ends },
        teeth: tab.teeth?.work(values) ?? before?.teeth ?? 1,
        toothAngle: tab.toothAngle?.work(values) ?? before?.toothAngle ?? 0,
      });
    }
  }
  return {
    columns: columns.map((column) => column.size),
    rows: rows.map((row) => row.size),
    cells,
    lines: inUse(piece.lines).map(({ between, is, angle }) => ({ between, is, angle: angle?.work(values) ?? 90 })),
    tabs,
    caps: new Map(piece.caps.map(({ cell, radius }) => [cell, radius.work(values)])),
    corners: inUse(piece.corners).map(({ cell, corner, radius }) => ({ cell, corner, radius: radius.work(values) })),
    notches: inUse(piece.notches).map(({ cell, side, at, radius }) => ({
      cell,
      side,
      at: at.work(values),
      radius: radius.work(values),
    })),
    slots: inUse(piece.slots).map(({ cell, across, along, width, height }) => ({
      cell,
      across: across.work(values),
      along: along.work(values),
      width: width.work(values),
      height: height.work(values),
    })),
    rolls: new Map(inUse(piece.rolls).map(({ cell, radius }) => [cell, { radius: radius.work(values) }])),
    edges: piece.def.edges ?? [],
  };
}

export const buildPiece = (
  piece: CompiledPiece,
  values: Values,
): { readonly grid: GridPiece; readonly built: Built } => {
  const grid = resolvePiece(piece, values);
  return { grid, built: buildGrid(grid) };
};
