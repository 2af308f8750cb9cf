import { ANGLE, LENGTH, TRUTH, WHOLE, nearestName, sayKind, type Formula, type Kind } from '../formula';
import { SAYS } from '../pattern/messages';
import { keyOf } from '../pattern/names';
import { SIDES, panelNames, readCell, readStop, type Cell } from '../piece';
import type {
  FanPieceDef,
  DiscPieceDef,
  GridPieceDef,
  LayerPieceDef,
  LineDef,
  OutlinePieceDef,
  PieceDef,
  SectorPieceDef,
  SlotDef,
  TabDef,
  Track,
} from '../types';
import type { CompiledEnd, CompiledGrid, CompiledLine, CompiledShape, CompiledTab, Conditional, Pair } from './model';

/** What compiling a piece needs from the compiler of its pattern. Faults are gathered there; a formula with faults is missing. */
export interface Tools {
  readonly formula: (text: string, wanted: Kind | undefined, where: string) => Formula | undefined;
  /** Every piece of the pattern, for one that hangs on another. */
  readonly pieces: readonly PieceDef[];
  readonly complain: (code: string, where: string, says: readonly string[]) => void;
}

/** A piece's data with every formula compiled. With faults the result is of no use; the compiler then drops the pattern. */
export function compileShape(def: PieceDef, where: string, tools: Tools): CompiledShape {
  const shape = new ShapeCompiler(where, tools);
  switch (def.builder) {
    case 'grid':
      return shape.grid(def);
    case 'fan':
      return shape.fan(def);
    case 'disc':
      return shape.disc(def);
    case 'sector':
      return shape.sector(def);
    case 'outline':
      return shape.outline(def);
    case 'layer':
      return shape.layer(def);
  }
}

class ShapeCompiler {
  constructor(
    private readonly where: string,
    private readonly tools: Tools,
  ) {}

  /** A missing formula has left a fault behind, so what stands here is never run. */
  private formula(text: string, wanted: Kind | undefined, place: string): Formula {
    return this.tools.formula(text, wanted, `${this.where}, ${place}`) as Formula;
  }
  private length(text: string, place: string): Formula {
    return this.formula(text, LENGTH, place);
  }
  private angle(text: string, place: string): Formula {
    return this.formula(text, ANGLE, place);
  }
  private maybe<K extends string>(
    key: K,
    text: string | undefined,
    wanted: Kind,
    place: string,
  ): { readonly [P in K]?: Formula } {
    return text === undefined ? {} : ({ [key]: this.formula(text, wanted, place) } as { readonly [P in K]?: Formula });
  }
  private when(text: string | undefined, place: string): Conditional {
    return this.maybe('when', text, TRUTH, `${place}, when`);
  }
  private pair([a, b]: readonly [string, string], place: string): Pair {
    return [this.length(a, place), this.length(b, place)];
  }
  private nameIn(names: ReadonlySet<string>, name: string, place: string): string {
    if (!names.has(keyOf(name)))
      this.tools.complain('no cell', `${this.where}, ${place}`, SAYS.noCell(name, nearestName(name, names)));
    return keyOf(name);
  }
  private lines(lines: readonly LineDef[] | undefined, names: ReadonlySet<string>): readonly CompiledLine[] {
    return (lines ?? []).map((one, index) => {
      const place = `line ${index + 1}`;
      return {
        between: [this.nameIn(names, one.between[0], place), this.nameIn(names, one.between[1], place)],
        is: one.is,
        ...this.maybe('angle', one.angle, ANGLE, place),
        ...this.maybe('shown', one.shown, ANGLE, `${place}, shown`),
        ...this.when(one.when, place),
      };
    });
  }
  private slots(slots: readonly SlotDef[] | undefined, names: ReadonlySet<string>): CompiledGrid['slots'] {
    return (slots ?? []).map((one) => {
      const place = `slot of “${one.cell}”`;
      return {
        cell: this.nameIn(names, one.cell, place),
        at: this.pair([one.across, one.along], place),
        size: this.pair([one.width, one.height], place),
        ...this.when(one.when, place),
      };
    });
  }

  // ── Grid ───────────────────────────────────────────────────────────────────────────────────────────────────────────

  grid(def: GridPieceDef): CompiledGrid {
    const cells = this.cells(def);
    const parted = (def.creases ?? []).flatMap(({ parts }) => (parts === undefined ? [] : [keyOf(parts)]));
    const names = new Set([...cells.flat().map((cell) => cell.name), ...parted]);
    const cell = (name: string, place: string) => this.nameIn(names, name, place);
    const track = (kind: string) => (one: Track) => {
      const place = `${kind}, “${one.name}”`;
      return { name: one.name, size: this.length(one.size, place), ...this.when(one.when, place) };
    };
    const caps = (def.caps ?? []).map((one) => {
      const place = `cap “${one.cell}”`;
      return { cell: cell(one.cell, place), radius: this.length(one.radius, place) };
    });
    for (const one of cells.flat()) {
      if (one.kind === 'cap' && !caps.some((cap) => cap.cell === one.name))
        this.tools.complain('no cap', this.where, SAYS.noCap(one.name));
    }
    for (const edge of def.edges ?? []) cell(edge.cell, `edge “${edge.name}”`);
    return {
      builder: 'grid',
      columns: def.columns.map(track('column')),
      rows: def.rows.map(track('row')),
      cells,
      lines: this.lines(def.lines, names),
      tabs: (def.tabs ?? []).map((one, index) => this.tab(one, `tabs ${index + 1}`, cell)),
      caps,
      corners: (def.corners ?? []).map((one) => {
        const place = `${one.corner} corner of “${one.cell}”`;
        return {
          cell: cell(one.cell, place),
          corner: one.corner,
          radius: this.length(one.radius, place),
          ...this.when(one.when, place),
        };
      }),
      notches: (def.notches ?? []).map((one) => {
        const place = `notch of “${one.cell}”`;
        return {
          cell: cell(one.cell, place),
          side: one.side,
          at: this.length(one.at, place),
          radius: this.length(one.radius, place),
          ...this.when(one.when, place),
        };
      }),
      slots: this.slots(def.slots, names),
      holes: (def.holes ?? []).map((one) => {
        const place = `hole of “${one.cell}”`;
        return {
          cell: cell(one.cell, place),
          at: this.pair([one.across, one.along], place),
          diameter: this.length(one.diameter, place),
          ...this.when(one.when, place),
        };
      }),
      creases: (def.creases ?? []).map((one) => {
        const place = `crease of “${one.cell}”`;
        return {
          cell: cell(one.cell, place),
          is: one.is,
          from: this.pair(one.from, place),
          to: this.pair(one.to, place),
          parts: one.parts === undefined ? null : keyOf(one.parts),
          ...this.maybe('angle', one.angle, ANGLE, place),
          ...this.when(one.when, place),
        };
      }),
      rolls: (def.rolls ?? []).map((one) => {
        const place = `roll of “${one.cell}”`;
        return { cell: cell(one.cell, place), radius: this.length(one.radius, place), ...this.when(one.when, place) };
      }),
    };
  }
  private cells(def: GridPieceDef): readonly (readonly Cell[])[] {
    const { where, tools } = this;
    if (def.cells.length !== def.rows.length)
      tools.complain('cell count', where, SAYS.cellCount(def.cells.length, def.rows.length, 'rows of cells'));
    return def.cells.map((row, r) => {
      if (row.length !== def.columns.length)
        tools.complain('cell count', `${where}, row ${r + 1}`, SAYS.cellCount(row.length, def.columns.length, 'cells'));
      return row.map((text, c) => {
        const cell = readCell(text, r, c);
        if (!cell) tools.complain('bad cell', `${where}, row ${r + 1}, column ${c + 1}`, SAYS.badCell(text));
        return cell ?? { kind: 'away' as const, name: `away ${r + 1}.${c + 1}`, on: null, row: r, column: c };
      });
    });
  }
  private tab(one: TabDef, place: string, cell: (name: string, place: string) => string): CompiledTab {
    return {
      cells: one.cells.map((name) => cell(name, place)),
      ends: Object.fromEntries(
        SIDES.flatMap((side) => (one[side] ? [[side, this.end(one[side], `${place}, ${side}`)]] : [])),
      ),
      ...this.maybe('depth', one.depth, LENGTH, `${place}, depth`),
      ...this.maybe('teeth', one.teeth, WHOLE, `${place}, teeth`),
      ...this.maybe('toothAngle', one['tooth angle'], ANGLE, `${place}, tooth angle`),
      ...this.maybe('round', one.round, LENGTH, `${place}, round`),
      ...(one.shape
        ? { shape: one.shape.map((point, index) => this.pair(point, `${place}, corner ${index + 1}`)) }
        : {}),
      ...this.when(one.when, place),
    };
  }
  private end(end: { readonly from?: string; readonly by?: string }, place: string): CompiledEnd {
    const by = end.by === undefined ? undefined : this.tools.formula(end.by, undefined, `${this.where}, ${place}`);
    if (by && by.kind.type !== 'angle' && !(by.kind.type === 'quantity' && by.kind.power === 1)) {
      this.tools.complain('bad taper', `${this.where}, ${place}`, SAYS.badAngleOrLength(sayKind(by.kind)));
    }
    return { ...this.maybe('from', end.from, LENGTH, place), ...(by ? { by } : {}) };
  }

  // ── The other builders ─────────────────────────────────────────────────────────────────────────────────────────────

  fan({ sides, side, flap, tab }: FanPieceDef): CompiledShape {
    return {
      builder: 'fan',
      sides: this.formula(sides, WHOLE, 'sides'),
      side: this.length(side, 'side'),
      height: this.length(flap.height, 'flap height'),
      angle: this.angle(flap.angle, 'flap angle'),
      ...(flap.hole
        ? {
            hole: {
              diameter: this.length(flap.hole.diameter, 'hole'),
              fromTip: this.length(flap.hole['from tip'], 'hole'),
              ...this.when(flap.hole.when, 'hole'),
            },
          }
        : {}),
      ...(tab
        ? {
            tab: {
              width: this.length(tab.width, 'tab width'),
              low: this.angle(tab.low, 'tab, low end'),
              high: this.angle(tab.high, 'tab, high end'),
              angle: this.angle(tab.angle, 'tab angle'),
              ...this.when(tab.when, 'tab'),
            },
          }
        : {}),
    };
  }
  disc({ diameter, rim }: DiscPieceDef): CompiledShape {
    return {
      builder: 'disc',
      diameter: this.length(diameter, 'diameter'),
      ...(rim
        ? {
            rim: {
              teeth: this.formula(rim.teeth, WHOLE, 'teeth'),
              depth: this.length(rim.depth, 'tooth depth'),
              toothAngle: this.angle(rim['tooth angle'], 'tooth angle'),
              angle: this.angle(rim.angle, 'angle of the rim'),
              ...this.when(rim.when, 'rim'),
            },
          }
        : {}),
    };
  }
  sector(def: SectorPieceDef): CompiledShape {
    return {
      builder: 'sector',
      inner: this.length(def['inner radius'], 'inner radius'),
      outer: this.length(def['outer radius'], 'outer radius'),
      angle: this.angle(def.angle, 'angle'),
      seam: {
        width: this.length(def.seam.width, 'seam width'),
        low: this.angle(def.seam.low, 'seam, low end'),
        high: this.angle(def.seam.high, 'seam, high end'),
      },
    };
  }
  outline(def: OutlinePieceDef): CompiledShape {
    const points = new Set(def.points.map((point) => keyOf(point.name)));
    const panels = new Set(def.panels.map((panel) => keyOf(panel.name)));
    const point = (name: string, place: string) => {
      if (!points.has(keyOf(name)))
        this.tools.complain('no point', `${this.where}, ${place}`, SAYS.noPoint(name, nearestName(name, points)));
      return keyOf(name);
    };
    for (const edge of def.edges ?? []) {
      this.nameIn(panels, edge.panel, `edge “${edge.name}”`);
      point(edge.from, `edge “${edge.name}”`);
      point(edge.to, `edge “${edge.name}”`);
    }
    return {
      builder: 'outline',
      points: def.points.map((one) => ({
        name: keyOf(one.name),
        at: this.pair([one.across, one.along], `point “${one.name}”`),
      })),
      panels: def.panels.map((panel) => {
        const place = `panel “${panel.name}”`;
        const loop = panel.loop.map((text) => {
          const stop = readStop(text);
          return {
            point: point(stop.point, place),
            bow: stop.bow && { to: stop.bow.to, radius: this.length(stop.bow.radius, place) },
          };
        });
        return {
          name: keyOf(panel.name),
          role: panel.role ?? 'panel',
          loop,
          ...this.maybe('bent', panel.bent, LENGTH, `${place}, bent`),
          ...this.when(panel.when, place),
        };
      }),
      lines: this.lines(def.lines, panels),
      slots: this.slots(def.slots, panels),
    };
  }
  layer(def: LayerPieceDef): CompiledShape {
    const hosts = this.tools.pieces.filter((piece) => piece.builder !== 'layer');
    const host = hosts.find((piece) => keyOf(piece.name) === keyOf(def.of));
    if (!host) {
      const names = hosts.map((piece) => piece.name);
      this.tools.complain('no piece', `${this.where}, of`, SAYS.noPiece(def.of, nearestName(def.of, names)));
    }
    const known = new Set(host ? panelNames(host) : []);
    const faces = [def.panels, ...(def.also ?? [])].map((face) =>
      face.map((name) => {
        if (host && !known.has(keyOf(name)))
          this.tools.complain(
            'no panel',
            `${this.where}, panels`,
            SAYS.noPanel(name, host.name, nearestName(name, known)),
          );
        return keyOf(name);
      }),
    );
    return { builder: 'layer', of: keyOf(def.of), faces, margin: this.length(def.margin, 'margin') };
  }
}
