import type { Formula, Values } from '../formula';
import { isZero } from '../measure';
import {
  buildDisc,
  buildFan,
  buildGrid,
  buildLayer,
  buildOutline,
  buildSector,
  facesOf,
  type Built,
  type EndShape,
  type GridPiece,
  type TabShape,
} from '../piece';
import { CUT_GRID, keyOf } from '../pattern/names';
import type { Net, PieceFigure, Side } from '../types';
import type { CompiledGrid, CompiledLine, CompiledPiece, Conditional, Model, Pair } from './model';
import { isInUse } from './values';

/** A built piece, with the worked-out grid where there is one: its words need the cells. */
export interface BuiltPiece {
  readonly built: Built;
  readonly grid: GridPiece | null;
  readonly layer?: PieceFigure['layer'];
}

/**
 * Works every formula of a piece out and builds its net; `hosts` are the nets built before, by name. Null for a layer of what
 * is not there at this sizing.
 */
export function buildPiece(
  model: Model,
  piece: CompiledPiece,
  values: Values,
  hosts: ReadonlyMap<string, Net>,
): BuiltPiece | null {
  const { def, shape } = piece;
  const step = values[model.scope.slot(CUT_GRID)] as number;
  const at = (formula: Formula) => formula.work(values);
  switch (shape.builder) {
    case 'grid': {
      const grid = resolveGrid(shape, def.builder === 'grid' ? (def.edges ?? []) : [], values);
      return { grid, built: buildGrid(grid) };
    }
    case 'fan': {
      const { centre, flap } = def as Extract<typeof def, { builder: 'fan' }>;
      const { hole, tab } = shape;
      const fan = {
        centre,
        step,
        sides: Math.round(at(shape.sides)),
        side: at(shape.side),
        flap: {
          name: flap.name,
          shape: flap.shape,
          height: at(shape.height),
          angle: at(shape.angle),
          hole: hole && isInUse(hole, values) ? { diameter: at(hole.diameter), fromTip: at(hole.fromTip) } : null,
        },
        tab:
          tab && isInUse(tab, values)
            ? { width: at(tab.width), low: at(tab.low), high: at(tab.high), angle: at(tab.angle) }
            : null,
      };
      return { grid: null, built: buildFan(fan) };
    }
    case 'disc': {
      const { disc } = def as Extract<typeof def, { builder: 'disc' }>;
      const { rim } = shape;
      const made =
        rim && isInUse(rim, values)
          ? {
              teeth: Math.round(at(rim.teeth)),
              depth: at(rim.depth),
              toothAngle: at(rim.toothAngle),
              angle: at(rim.angle),
            }
          : null;
      return { grid: null, built: buildDisc({ disc, diameter: at(shape.diameter), rim: made, step }) };
    }
    case 'sector': {
      const { body } = def as Extract<typeof def, { builder: 'sector' }>;
      const seam = { width: at(shape.seam.width), low: at(shape.seam.low), high: at(shape.seam.high) };
      return {
        grid: null,
        built: buildSector({
          body,
          inner: at(shape.inner),
          outer: at(shape.outer),
          angle: at(shape.angle),
          seam,
          step,
        }),
      };
    }
    case 'outline': {
      const { edges = [] } = def as Extract<typeof def, { builder: 'outline' }>;
      const outline = {
        points: new Map(shape.points.map(({ name, at: [x, y] }) => [name, { x: at(x), y: at(y) }])),
        panels: shape.panels
          .filter((panel) => isInUse(panel, values))
          .map((panel) => ({
            name: panel.name,
            role: panel.role,
            loop: panel.loop.map(({ point, bow }) => ({ point, bow: bow && { to: bow.to, radius: at(bow.radius) } })),
            bent: panel.bent ? { radius: at(panel.bent) } : null,
          })),
        lines: linesOf(shape.lines, values),
        slots: slotsOf(shape.slots, values),
        edges,
        step,
      };
      return { grid: null, built: buildOutline(outline) };
    }
    case 'layer': {
      const host = hosts.get(shape.of);
      const hostDef = model.pattern.pieces.find(({ name }) => keyOf(name) === shape.of);
      const faces = host && hostDef ? facesOf(host, hostDef, shape.faces) : [];
      const [face] = faces;
      if (!host || !hostDef || !face) return null;
      const margin = at(shape.margin);
      const built = buildLayer({ name: def.name, host, face, margin, step });
      return { grid: null, built, ...(built.ok ? { layer: { of: hostDef.name, faces, margin, at: built.at } } : {}) };
    }
  }
}

const inUse = <T extends Conditional>(list: readonly T[], values: Values): readonly T[] =>
  list.filter((one) => isInUse(one, values));
const linesOf = (lines: readonly CompiledLine[], values: Values): GridPiece['lines'] =>
  inUse(lines, values).map(({ between, is, angle, shown }) => ({
    between,
    is,
    angle: angle?.work(values) ?? 90,
    ...(shown ? { shown: shown.work(values) } : {}),
  }));
const slotsOf = (slots: CompiledGrid['slots'], values: Values): GridPiece['slots'] =>
  inUse(slots, values).map(({ cell, at: [x, y], size: [w, h] }) => ({
    cell,
    across: x.work(values),
    along: y.work(values),
    width: w.work(values),
    height: h.work(values),
  }));

/** The grid with every formula worked out; columns and rows that are not in use, or of no size, are left out with their cells. */
function resolveGrid(shape: CompiledGrid, edges: GridPiece['edges'], values: Values): GridPiece {
  const used = (tracks: CompiledGrid['columns']) =>
    tracks
      .map((track, index) => ({ index, size: track.size.work(values), kept: isInUse(track, values) }))
      .filter((track) => track.kept && !isZero(track.size));
  const [columns, rows] = [used(shape.columns), used(shape.rows)];
  const at = (formula: Formula) => formula.work(values);
  const pair = ([a, b]: Pair): readonly [number, number] => [at(a), at(b)];
  return {
    columns: columns.map((column) => column.size),
    rows: rows.map((row) => row.size),
    cells: rows.map((row, r) =>
      columns.map((column, c) => ({
        ...(shape.cells[row.index]?.[column.index] as GridPiece['cells'][number][number]),
        row: r,
        column: c,
      })),
    ),
    lines: linesOf(shape.lines, values),
    tabs: tabsOf(shape, values),
    caps: new Map(shape.caps.map(({ cell, radius }) => [cell, at(radius)])),
    corners: inUse(shape.corners, values).map(({ cell, corner, radius }) => ({ cell, corner, radius: at(radius) })),
    notches: inUse(shape.notches, values).map(({ cell, side, at: place, radius }) => ({
      cell,
      side,
      at: at(place),
      radius: at(radius),
    })),
    slots: slotsOf(shape.slots, values),
    holes: inUse(shape.holes, values).map(({ cell, at: [x, y], diameter }) => ({
      cell,
      across: at(x),
      along: at(y),
      diameter: at(diameter),
    })),
    creases: inUse(shape.creases, values).map(({ cell, is, from, to, parts, angle }) => ({
      cell,
      is,
      from: pair(from),
      to: pair(to),
      parts,
      angle: angle?.work(values) ?? 90,
    })),
    rolls: new Map(inUse(shape.rolls, values).map(({ cell, radius }) => [cell, { radius: at(radius) }])),
    edges,
  };
}

/** What is said of a tab later adds to what was said before. */
function tabsOf(shape: CompiledGrid, values: Values): GridPiece['tabs'] {
  const tabs = new Map<string, TabShape>();
  for (const tab of inUse(shape.tabs, values)) {
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
        round: tab.round?.work(values) ?? before?.round ?? 0,
        shape: tab.shape?.map(([u, v]) => [u.work(values), v.work(values)] as const) ?? before?.shape ?? null,
      });
    }
  }
  return tabs;
}
