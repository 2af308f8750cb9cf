import {
  ANGLE,
  LENGTH,
  NUMBER,
  TRUTH,
  WHOLE,
  AREA,
  compileFormula,
  kindOf,
  nearestName,
  sayKind,
  type Formula,
  type Kind,
  type Scope,
} from '../formula';
import { isFunctionName, isName, keyOf, reservedWordIn, sizeNames, drawnNames } from '../pattern/names';
import { SAYS } from '../pattern/messages';
import { SIDES, readCell, type Cell } from '../piece';
import type { Fault, Pattern, PieceDef, Result, Track } from '../types';
import type {
  CompiledEnd,
  CompiledFit,
  CompiledMeasure,
  CompiledPiece,
  CompiledTrack,
  CompiledValue,
  Model,
} from './model';

/** One step of the reader's cut grid; nothing in the exact evaluation. Always there, for tolerances. */
export const CUT_GRID = 'cut grid';
const MOST = { measures: 200, choices: 20, pieces: 30, cells: 400, fits: 60 };

/**
 * Checks a pattern and compiles its formulas. All faults are reported at once, each with its place and what to try; with any
 * fault there is no model. The order in which measures are written does not matter; a circle is reported as its chain.
 */
export function compilePattern(pattern: Pattern): Result<Model> {
  return new Compiler(pattern).compile();
}

interface Entry {
  readonly slot: number;
  readonly kind: Kind;
  readonly options?: readonly string[];
  readonly late?: boolean;
}

class Compiler {
  private readonly faults: Fault[] = [];
  private readonly entries = new Map<string, Entry>();

  constructor(private readonly pattern: Pattern) {}

  compile(): Result<Model> {
    this.limits();
    this.declareNames();
    const measures = this.pattern.measures.flatMap((_, index) => this.measure(index) ?? []);
    const choices = this.pattern.choices.map((def) => {
      const when = this.optional(def.when, TRUTH, `choice “${def.name}”, when`);
      return { def, slot: this.entries.get(keyOf(def.name))?.slot ?? -1, ...(when ? { when } : {}) };
    });
    const pieces = this.pattern.pieces.flatMap((def) => this.piece(def) ?? []);
    const fits = this.pattern.fits.flatMap((def) => this.fit(def) ?? []);
    const size = (place: string) => (def: { name: string; formula: string }) => {
      const formula = this.formula(def.formula, LENGTH, `${place} “${def.name}”`);
      return formula ? [{ def, formula }] : [];
    };
    const finished = {
      inside: this.pattern.finished.inside.flatMap(size('finished inside')),
      outside: this.pattern.finished.outside.flatMap(size('finished outside')),
    };
    const placements = this.pattern.assembly.flatMap((def, index) => this.placement(def, index) ?? []);
    const worked = this.order(measures, pieces);
    if (this.faults.length > 0) return { ok: false, faults: this.faults };
    return {
      ok: true,
      value: {
        pattern: this.pattern,
        scope: this.scope(true),
        slots: this.entries.size,
        worked,
        measures,
        choices,
        pieces,
        fits,
        finished,
        placements,
      },
    };
  }

  private complain(code: string, where: string, says: readonly string[]): void {
    const [found = '', expected = '', hint = ''] = says;
    this.faults.push({ code: `pattern ${code}`, where, found, expected, hint });
  }
  private limits(): void {
    const { measures, choices, pieces, fits } = this.pattern;
    const cells = pieces.reduce((sum, piece) => sum + piece.cells.flat().length, 0);
    const counts = {
      measures: measures.length,
      choices: choices.length,
      pieces: pieces.length,
      cells,
      fits: fits.length,
    };
    for (const [what, most] of Object.entries(MOST)) {
      const has = counts[what as keyof typeof counts];
      if (has > most) this.complain('too many', 'the pattern', SAYS.tooMany(what, has, most));
    }
  }

  // ── Names ──────────────────────────────────────────────────────────────────────────────────────────────────────────

  private declare(name: string, where: string, entry: Omit<Entry, 'slot'>): void {
    const key = keyOf(name);
    if (this.entries.has(key)) this.complain('twice', where, SAYS.twice(name));
    else this.entries.set(key, { ...entry, slot: this.entries.size });
  }
  private checkName(name: string, where: string): void {
    const reserved = reservedWordIn(name);
    if (!isName(name)) this.complain('bad name', where, SAYS.badName(name));
    else if (reserved) this.complain('reserved name', where, SAYS.reserved(name, reserved));
    else if (isFunctionName(name)) this.complain('function name', where, SAYS.functionName(name));
  }
  private declareNames(): void {
    this.declare(CUT_GRID, 'the pattern', { kind: LENGTH });
    for (const def of this.pattern.measures) {
      this.checkName(def.name, `measure “${def.name}”`);
      this.declare(def.name, `measure “${def.name}”`, { kind: kindOf(def.kind ?? 'length') });
    }
    for (const def of this.pattern.choices) {
      const where = `choice “${def.name}”`;
      this.checkName(def.name, where);
      if (def.options.length < 2) this.complain('few options', where, SAYS.fewOptions());
      if (!def.options.includes(def.usual)) this.complain('bad option', where, SAYS.badOption(def.usual, def.options));
      this.declare(def.name, where, { kind: { type: 'choice', name: keyOf(def.name) }, options: def.options });
    }
    for (const piece of this.pattern.pieces) {
      const where = `piece “${piece.name}”`;
      if (!isName(piece.name)) this.complain('bad name', where, SAYS.badName(piece.name));
      const names = sizeNames(piece);
      this.declare(names.across, where, { kind: LENGTH });
      this.declare(names.along, where, { kind: LENGTH });
      for (const name of new Set([...piece.columns, ...piece.rows].map((track) => names.track(track.name)))) {
        if (name !== names.across && name !== names.along) this.declare(name, where, { kind: LENGTH });
      }
      for (const name of drawnNames(piece))
        this.declare(name, where, { kind: name.endsWith('.area') ? AREA : LENGTH, late: true });
    }
  }
  /** Late names are known only once pieces are drawn; measures may not wait for them. */
  private scope(late: boolean): Scope {
    const known = (name: string) => {
      const entry = this.entries.get(name);
      return entry && (late || !entry.late) ? entry : undefined;
    };
    return {
      has: (name) => name === 'pi' || known(name) !== undefined,
      all: () => [...this.entries].flatMap(([name, entry]) => (late || !entry.late ? [name] : [])),
      options: (name) => known(name)?.options,
      slot: (name) => known(name)?.slot ?? -1,
      kind: (name) => known(name)?.kind ?? NUMBER,
    };
  }

  // ── Formulas ───────────────────────────────────────────────────────────────────────────────────────────────────────

  private formula(text: string, wanted: Kind | undefined, where: string, late = true): Formula | undefined {
    const compiled = compileFormula(text, this.scope(late), where, wanted);
    if (compiled.ok) return compiled.value;
    this.faults.push(...compiled.faults);
    return undefined;
  }
  private optional(text: string | undefined, wanted: Kind, where: string): Formula | undefined {
    return text === undefined ? undefined : this.formula(text, wanted, where, false);
  }

  private measure(index: number): CompiledMeasure | undefined {
    const def = this.pattern.measures[index] as Pattern['measures'][number];
    const where = `measure “${def.name}”`;
    const kind = kindOf(def.kind ?? 'length');
    if (def.ask && def.formula !== undefined) this.complain('both', where, SAYS.both());
    if (!def.ask && def.formula === undefined) {
      this.complain('neither', where, SAYS.neither());
      return undefined;
    }
    const slot = this.entries.get(keyOf(def.name))?.slot ?? -1;
    if (!def.ask) {
      const formula = this.formula(def.formula ?? '', kind, where, false);
      return formula && { def, slot, kind, formula };
    }
    const formula = this.formula(def.ask.usual, kind, `${where}, usual value`, false);
    const from = this.formula(def.ask.from, kind, `${where}, smallest`, false);
    const to = this.formula(def.ask.to, kind, `${where}, largest`, false);
    const when = this.optional(def.ask.when, TRUTH, `${where}, when`);
    return formula && from && to && { def, slot, kind, formula, from, to, ...(when ? { when } : {}) };
  }

  private track(track: Track, where: string): CompiledTrack | undefined {
    const place = `${where}, “${track.name}”`;
    const size = this.formula(track.size, LENGTH, place, false);
    const when = this.optional(track.when, TRUTH, `${place}, when`);
    return size && { name: track.name, size, ...(when ? { when } : {}) };
  }

  private piece(def: PieceDef): CompiledPiece | undefined {
    const where = `piece “${def.name}”`;
    const before = this.faults.length;
    const cells = this.cells(def, where);
    const names = new Set(cells.flat().map((cell) => cell.name));
    const mustBeCell = (name: string, place: string) => {
      if (!names.has(keyOf(name))) this.complain('no cell', place, SAYS.noCell(name, nearestName(name, names)));
      return keyOf(name);
    };
    const length = (text: string, place: string) => this.formula(text, LENGTH, place, false);
    const when = (text: string | undefined, place: string) => {
      const formula = this.optional(text, TRUTH, `${place}, when`);
      return formula ? { when: formula } : {};
    };
    const columns = def.columns.flatMap((track) => this.track(track, `${where}, column`) ?? []);
    const rows = def.rows.flatMap((track) => this.track(track, `${where}, row`) ?? []);
    const count = this.formula(def.count ?? '1', WHOLE, `${where}, count`, false);
    const lines = (def.lines ?? []).map((one, index) => {
      const place = `${where}, line ${index + 1}`;
      const angle = this.optional(one.angle, ANGLE, place);
      return {
        between: [mustBeCell(one.between[0], place), mustBeCell(one.between[1], place)] as const,
        is: one.is,
        ...(angle ? { angle } : {}),
        ...when(one.when, place),
      };
    });
    const tabs = (def.tabs ?? []).map((one, index) => {
      const place = `${where}, tabs ${index + 1}`;
      const depth = this.optional(one.depth, LENGTH, `${place}, depth`);
      const teeth = this.optional(one.teeth, WHOLE, `${place}, teeth`);
      const toothAngle = this.optional(one['tooth angle'], ANGLE, `${place}, tooth angle`);
      const ends = Object.fromEntries(
        SIDES.flatMap((side) => (one[side] ? [[side, this.end(one[side], `${place}, ${side}`)]] : [])),
      );
      return {
        cells: one.cells.map((cell) => mustBeCell(cell, place)),
        ends,
        ...(depth ? { depth } : {}),
        ...(teeth ? { teeth } : {}),
        ...(toothAngle ? { toothAngle } : {}),
        ...when(one.when, place),
      };
    });
    const caps = (def.caps ?? []).flatMap((one) => {
      const place = `${where}, cap “${one.cell}”`;
      const radius = length(one.radius, place);
      return radius ? [{ cell: mustBeCell(one.cell, place), radius }] : [];
    });
    for (const cell of cells.flat()) {
      if (cell.kind === 'cap' && !caps.some((cap) => cap.cell === cell.name))
        this.complain('no cap', where, SAYS.noCap(cell.name));
    }
    const corners = (def.corners ?? []).flatMap((one) => {
      const place = `${where}, ${one.corner} corner of “${one.cell}”`;
      const radius = length(one.radius, place);
      return radius
        ? [{ cell: mustBeCell(one.cell, place), corner: one.corner, radius, ...when(one.when, place) }]
        : [];
    });
    const notches = (def.notches ?? []).flatMap((one) => {
      const place = `${where}, notch of “${one.cell}”`;
      const [at, radius] = [length(one.at, place), length(one.radius, place)];
      return at && radius
        ? [{ cell: mustBeCell(one.cell, place), side: one.side, at, radius, ...when(one.when, place) }]
        : [];
    });
    const slots = (def.slots ?? []).flatMap((one) => {
      const place = `${where}, slot of “${one.cell}”`;
      const [across, along, width, height] = [
        length(one.across, place),
        length(one.along, place),
        length(one.width, place),
        length(one.height, place),
      ];
      return across && along && width && height
        ? [{ cell: mustBeCell(one.cell, place), across, along, width, height, ...when(one.when, place) }]
        : [];
    });
    const rolls = (def.rolls ?? []).flatMap((one) => {
      const place = `${where}, roll of “${one.cell}”`;
      const radius = length(one.radius, place);
      return radius ? [{ cell: mustBeCell(one.cell, place), radius, ...when(one.when, place) }] : [];
    });
    for (const edge of def.edges ?? []) mustBeCell(edge.cell, `${where}, edge “${edge.name}”`);
    if (this.faults.length > before || !count) return undefined;
    return {
      def,
      count,
      columns,
      rows,
      cells,
      lines,
      tabs,
      caps,
      corners,
      notches,
      slots,
      rolls,
      drawn: this.drawn(def),
      ...when(def.when, where),
    };
  }
  private drawn(def: PieceDef): CompiledPiece['drawn'] {
    const [area, perimeter, ...edges] = drawnNames(def).map((name) => this.entries.get(name)?.slot ?? -1);
    return [
      { slot: area as number, of: 'area' },
      { slot: perimeter as number, of: 'perimeter' },
      ...edges.map((slot, index) => ({ slot, of: { edge: def.edges?.[index]?.name ?? '' } })),
    ];
  }
  private end(end: { from?: string; by?: string }, where: string): CompiledEnd {
    const from = this.optional(end.from, LENGTH, where);
    const by = end.by === undefined ? undefined : this.formula(end.by, undefined, where, false);
    if (by && by.kind.type !== 'angle' && !(by.kind.type === 'quantity' && by.kind.power === 1))
      this.complain('bad taper', where, SAYS.badAngleOrLength(sayKind(by.kind)));
    return { ...(from ? { from } : {}), ...(by ? { by } : {}) };
  }
  private cells(def: PieceDef, where: string): readonly (readonly Cell[])[] {
    if (def.cells.length !== def.rows.length)
      this.complain('cell count', where, SAYS.cellCount(def.cells.length, def.rows.length, 'rows of cells'));
    return def.cells.map((row, r) => {
      if (row.length !== def.columns.length)
        this.complain('cell count', `${where}, row ${r + 1}`, SAYS.cellCount(row.length, def.columns.length, 'cells'));
      return row.map((text, c) => {
        const cell = readCell(text, r, c);
        if (!cell) this.complain('bad cell', `${where}, row ${r + 1}, column ${c + 1}`, SAYS.badCell(text));
        return cell ?? { kind: 'away' as const, name: `away ${r + 1}.${c + 1}`, on: null, row: r, column: c };
      });
    });
  }

  private fit(def: Pattern['fits'][number]): CompiledFit | undefined {
    const where = `fit “${def.name}”`;
    const left = this.formula(def.left, undefined, `${where}, left side`);
    const right = this.formula(def.right, left?.kind, `${where}, right side`);
    const tolerance =
      def.tolerance === undefined ? undefined : this.formula(def.tolerance, left?.kind, `${where}, tolerance`);
    const when = this.optional(def.when, TRUTH, `${where}, when`);
    const measures = this.pattern.measures.map((measure) => measure.name);
    for (const name of def.change ?? []) {
      if (!measures.some((one) => keyOf(one) === keyOf(name)))
        this.complain('no measure', where, SAYS.noMeasure(name, nearestName(name, measures)));
    }
    return left && right && { def, left, right, ...(tolerance ? { tolerance } : {}), ...(when ? { when } : {}) };
  }
  private placement(def: Pattern['assembly'][number], index: number) {
    const where = `assembly ${index + 1}`;
    const piece = this.pattern.pieces.find((one) => keyOf(one.name) === keyOf(def.piece));
    if (!piece) {
      const names = this.pattern.pieces.map((one) => one.name);
      this.complain('no piece', where, SAYS.noPiece(def.piece, nearestName(def.piece, names)));
      return undefined;
    }
    const [x, y, z] = def.at.map((text) => this.formula(text, LENGTH, where));
    const when = this.optional(def.when, TRUTH, `${where}, when`);
    return x && y && z ? { def, at: [x, y, z] as const, ...(when ? { when } : {}) } : undefined;
  }

  // ── Order ──────────────────────────────────────────────────────────────────────────────────────────────────────────

  /** Measures and sizes in an order in which each needs only earlier ones; circles are reported as the chain of names. */
  private order(measures: readonly CompiledMeasure[], pieces: readonly CompiledPiece[]): CompiledValue[] {
    const values = new Map<string, { readonly value: CompiledValue; readonly needs: ReadonlySet<string> }>();
    for (const measure of measures) {
      values.set(keyOf(measure.def.name), {
        value: { type: 'measure', slot: measure.slot, measure },
        needs: new Set(measure.formula.uses),
      });
    }
    for (const piece of pieces)
      for (const { name, parts } of sizesOf(piece)) {
        const slot = this.entries.get(name)?.slot;
        if (slot === undefined || values.has(name)) continue;
        values.set(name, {
          value: { type: 'size', slot, name, parts },
          needs: new Set(parts.flatMap((part) => [...part.size.uses, ...(part.when?.uses ?? [])])),
        });
      }
    const order: CompiledValue[] = [];
    const state = new Map<string, 'open' | 'done'>();
    const visit = (name: string, chain: readonly string[]): void => {
      const entry = values.get(name);
      if (!entry || state.get(name) === 'done') return;
      if (state.get(name) === 'open') {
        const circle = [...chain.slice(chain.indexOf(name)), name];
        this.complain('circle', `measure “${name}”`, SAYS.circle(circle));
        return;
      }
      state.set(name, 'open');
      for (const need of entry.needs) visit(need, [...chain, name]);
      state.set(name, 'done');
      order.push(entry.value);
    };
    for (const name of values.keys()) visit(name, []);
    return order;
  }
}

function sizesOf(piece: CompiledPiece): { readonly name: string; readonly parts: readonly CompiledTrack[] }[] {
  const names = sizeNames(piece.def);
  const tracks = [...piece.columns, ...piece.rows];
  const single = [...new Set(tracks.map((track) => track.name))].map((name) => ({
    name: names.track(name),
    parts: tracks.filter((track) => track.name === name),
  }));
  return [{ name: names.across, parts: piece.columns }, { name: names.along, parts: piece.rows }, ...single];
}
