import {
  AREA,
  LENGTH,
  NUMBER,
  TRUTH,
  WHOLE,
  compileFormula,
  kindName,
  kindOf,
  nearestName,
  sayKind,
  sameKind,
  type Formula,
  type Kind,
  type Scope,
} from '../formula';
import { SAYS } from '../pattern/messages';
import {
  CARD_THICKNESS,
  CUT_GRID,
  drawnNames,
  isFunctionName,
  isName,
  keyOf,
  reservedWordIn,
  sizeNames,
} from '../pattern/names';
import type { Fault, MaterialDef, Pattern, PieceDef, Result } from '../types';
import { compileShape } from './compile-shape';
import {
  formulasOf,
  sizesOf,
  sizeStep,
  stepOf,
  type CompiledFit,
  type CompiledMaterial,
  type CompiledMeasure,
  type CompiledPiece,
  type Model,
  type Step,
} from './model';

const MOST = { measures: 300, choices: 20, pieces: 30, cells: 400, fits: 60 };

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
  private readonly readsOf = new Map<string, readonly number[]>();

  constructor(private readonly pattern: Pattern) {}

  compile(): Result<Model> {
    this.limits();
    this.declareNames();
    const measures = this.pattern.measures.flatMap((_, index) => this.measure(index) ?? []);
    const choices = this.pattern.choices.map((def) => {
      const when = this.optional(def.when, TRUTH, `choice “${def.name}”, when`);
      return { def, slot: this.entries.get(keyOf(def.name))?.slot ?? -1, ...(when ? { when } : {}) };
    });
    // A layer needs the net of the piece that it is glued to: layers come last, however they are written.
    const isLayer = (def: PieceDef) => Number(def.builder === 'layer');
    const layersLast = [...this.pattern.pieces].sort((a, b) => isLayer(a) - isLayer(b));
    const pieces = layersLast.flatMap((def) => this.piece(def) ?? []);
    const fits = this.pattern.fits.flatMap((def) => this.fit(def) ?? []);
    const size = (place: string) => (def: { name: string; formula: string }) => {
      const formula = this.formula(def.formula, LENGTH, `${place} “${def.name}”`);
      return formula ? [{ def, formula }] : [];
    };
    const finished = {
      inside: this.pattern.finished.inside.flatMap(size('finished inside')),
      outside: this.pattern.finished.outside.flatMap(size('finished outside')),
    };
    const order = this.pattern.order.map((line, index) => {
      if (typeof line === 'string') return { says: line };
      const when = this.condition(line.when, `order ${index + 1}, when`);
      return { says: line.says, ...(when ? { when } : {}) };
    });
    const materials = (this.pattern.materials ?? []).flatMap((def) => this.material(def) ?? []);
    const placements = this.pattern.assembly.flatMap((def, index) => this.placement(def, index) ?? []);
    const steps = this.order(measures, pieces);
    if (this.faults.length > 0) return { ok: false, faults: this.faults };
    return {
      ok: true,
      value: {
        pattern: this.pattern,
        read: (text) => compileFormula(text, this.scope(true), 'live measure'),
        scope: this.scope(true),
        slots: this.entries.size,
        steps,
        measures,
        choices,
        pieces,
        fits,
        finished,
        order,
        materials,
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
    const cells = pieces.reduce((sum, piece) => sum + (piece.builder === 'grid' ? piece.cells.flat().length : 1), 0);
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
      for (const name of sizeNames(piece)) this.declare(name, where, { kind: LENGTH });
      for (const { name, of } of drawnNames(piece))
        this.declare(name, where, { kind: of === 'area' ? AREA : LENGTH, late: true });
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
  /** A condition on what is known once the pieces are drawn. */
  private condition(text: string | undefined, where: string): Formula | undefined {
    return text === undefined ? undefined : this.formula(text, TRUTH, where);
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
    const key = keyOf(def.name);
    const base = {
      def,
      key,
      slot: this.entries.get(key)?.slot ?? -1,
      kind,
      says: def.kind ?? 'length',
      rounds: def.rounds ?? (sameKind(kind, LENGTH) ? 'nearest' : 'exact'),
    } as const;
    if (!def.ask) {
      const formula = this.formula(def.formula ?? '', kind, where, false);
      return formula && { ...base, formula };
    }
    const formula = this.formula(def.ask.usual, kind, `${where}, usual value`, false);
    const from = this.formula(def.ask.from, kind, `${where}, smallest`, false);
    const to = this.formula(def.ask.to, kind, `${where}, largest`, false);
    const when = this.optional(def.ask.when, TRUTH, `${where}, when`);
    return formula && from && to && { ...base, formula, from, to, ...(when ? { when } : {}) };
  }

  private piece(def: PieceDef): CompiledPiece | undefined {
    const where = `piece “${def.name}”`;
    const before = this.faults.length;
    const count = this.formula(def.count ?? '1', WHOLE, `${where}, count`, false);
    const when = this.optional(def.when, TRUTH, `${where}, when`);
    const shape = compileShape(def, where, {
      formula: (text, wanted, place) => this.formula(text, wanted, place, false),
      pieces: this.pattern.pieces,
      complain: (code, place, says) => this.complain(code, place, says),
    });
    if (this.faults.length > before || !count) return undefined;
    const reads = this.reads(def, [count, ...(when ? [when] : []), ...formulasOf(shape)]);
    return { def, count, shape, reads, drawn: this.drawn(def), ...(when ? { when } : {}) };
  }
  /** Besides its own formulas a piece reads the grid and the card; a layer is made from the piece that it is glued to. */
  private reads(def: PieceDef, formulas: readonly Formula[]): readonly number[] {
    const names = new Set([CUT_GRID, CARD_THICKNESS, ...formulas.flatMap(({ uses }) => uses)]);
    const own = [...names].flatMap((name) => this.entries.get(name)?.slot ?? []);
    const host = def.builder === 'layer' ? (this.readsOf.get(keyOf(def.of)) ?? []) : [];
    const reads = [...new Set([...own, ...host])];
    this.readsOf.set(keyOf(def.name), reads);
    return reads;
  }
  private drawn(def: PieceDef): CompiledPiece['drawn'] {
    return drawnNames(def).map(({ name, of }) => ({ slot: this.entries.get(name)?.slot ?? -1, of }));
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
  private material(def: MaterialDef): CompiledMaterial | undefined {
    const where = `material “${def.name}”`;
    const formula = this.formula(def.formula, undefined, where);
    const when = this.condition(def.when, `${where}, when`);
    const kind = formula ? kindName(formula.kind) : null;
    if (!formula) return undefined;
    if (kind !== 'length' && kind !== 'area' && kind !== 'number' && kind !== 'whole number') {
      this.complain('bad material', where, SAYS.badMaterial(sayKind(formula.kind)));
      return undefined;
    }
    return { def, kind, formula, ...(when ? { when } : {}) };
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
  private order(measures: readonly CompiledMeasure[], pieces: readonly CompiledPiece[]): Step[] {
    const values = new Map<string, { readonly step: Step; readonly needs: ReadonlySet<string> }>();
    for (const measure of measures) {
      values.set(keyOf(measure.def.name), {
        step: stepOf(measure),
        needs: new Set(measure.formula.uses),
      });
    }
    for (const piece of pieces)
      for (const { name, parts } of sizesOf(piece)) {
        const slot = this.entries.get(name)?.slot;
        if (slot === undefined || values.has(name)) continue;
        values.set(name, {
          step: sizeStep(slot, parts),
          needs: new Set(parts.flatMap((part) => [...part.size.uses, ...(part.when?.uses ?? [])])),
        });
      }
    const order: Step[] = [];
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
      order.push(entry.step);
    };
    for (const name of values.keys()) visit(name, []);
    return order;
  }
}
