import type {
  ChoiceDef,
  FitDef,
  GridPieceDef,
  LineDef,
  MaterialDef,
  MeasureDef,
  NamedFormula,
  OrderLine,
  Pattern,
  PieceDef,
  Placement,
  SlotDef,
  TabEnd,
} from '../types';

/**
 * What a text of a pattern is: words that say nothing of other parts, a formula, prose with `[[formula]]` in it, or a name.
 * A `cell` is a panel of the piece at hand, a `cell words` one as a grid writes it, a `stop` one of an outline's loop.
 */
export type Role =
  | 'words'
  | 'formula'
  | 'prose'
  | 'measure'
  | 'choice'
  | 'option'
  | 'fit'
  | 'piece'
  | 'track'
  | 'cell'
  | 'cell words'
  | 'stop';

/** Data of the shape of `T` with a role in place of every text: a field without one does not compile. */
type Roles<T> = T extends string | number | boolean
  ? Role
  : T extends readonly (infer Item)[]
    ? Roles<Item>
    : { readonly [Field in keyof T]-?: Roles<NonNullable<T[Field]>> };
type RoleTree = Role | { readonly [field: string]: RoleTree };

const MEASURE: Roles<MeasureDef> = {
  name: 'measure',
  kind: 'words',
  ask: { question: 'words', usual: 'formula', from: 'formula', to: 'formula', finer: 'words', when: 'formula' },
  formula: 'formula',
  rounds: 'words',
  unit: 'words',
  note: 'words',
};
const CHOICE: Roles<ChoiceDef> = {
  name: 'choice',
  question: 'words',
  options: 'option',
  usual: 'option',
  finer: 'words',
  when: 'formula',
};
const FIT: Roles<FitDef> = {
  name: 'fit',
  left: 'formula',
  is: 'words',
  right: 'formula',
  tolerance: 'formula',
  when: 'formula',
  otherwise: 'words',
  change: 'measure',
  advice: 'words',
};
const SIZE: Roles<NamedFormula> = { name: 'words', formula: 'formula' };
const ORDER_LINE: Roles<Exclude<OrderLine, string>> = { says: 'prose', when: 'formula' };
const MATERIAL: Roles<MaterialDef> = { name: 'words', formula: 'formula', when: 'formula' };
const PLACEMENT: Roles<Placement> = {
  piece: 'piece',
  root: 'cell',
  at: 'formula',
  across: 'words',
  along: 'words',
  when: 'formula',
  look: 'words',
  over: 'words',
};

const PIECE = {
  name: 'piece',
  count: 'formula',
  stock: 'words',
  builder: 'words',
  when: 'formula',
  look: 'words',
  remarks: 'prose',
} as const;
const TRACK: Roles<GridPieceDef['columns'][number]> = { name: 'track', size: 'formula', when: 'formula' };
const END: Roles<TabEnd> = { from: 'formula', by: 'formula' };
const LINE: Roles<LineDef> = { between: 'cell', is: 'words', angle: 'formula', shown: 'formula', when: 'formula' };
const SLOT: Roles<SlotDef> = {
  cell: 'cell',
  across: 'formula',
  along: 'formula',
  width: 'formula',
  height: 'formula',
  when: 'formula',
};
const PIECES: { readonly [Builder in PieceDef['builder']]: Roles<Extract<PieceDef, { builder: Builder }>> } = {
  grid: {
    ...PIECE,
    columns: TRACK,
    rows: TRACK,
    cells: 'cell words',
    lines: LINE,
    tabs: {
      cells: 'cell',
      depth: 'formula',
      left: END,
      right: END,
      top: END,
      bottom: END,
      teeth: 'formula',
      round: 'formula',
      shape: 'formula',
      'tooth angle': 'formula',
      when: 'formula',
    },
    caps: { cell: 'cell', radius: 'formula' },
    corners: { cell: 'cell', corner: 'words', radius: 'formula', when: 'formula' },
    notches: { cell: 'cell', side: 'words', at: 'formula', radius: 'formula', when: 'formula' },
    slots: SLOT,
    holes: { cell: 'cell', across: 'formula', along: 'formula', diameter: 'formula', when: 'formula' },
    creases: {
      cell: 'cell',
      is: 'words',
      from: 'formula',
      to: 'formula',
      parts: 'cell',
      angle: 'formula',
      when: 'formula',
    },
    rolls: { cell: 'cell', radius: 'formula', when: 'formula' },
    edges: { name: 'words', cell: 'cell', side: 'words' },
  },
  fan: {
    ...PIECE,
    centre: 'cell',
    sides: 'formula',
    side: 'formula',
    flap: {
      name: 'cell',
      shape: 'words',
      height: 'formula',
      angle: 'formula',
      hole: { diameter: 'formula', 'from tip': 'formula', when: 'formula' },
    },
    tab: { width: 'formula', low: 'formula', high: 'formula', angle: 'formula', when: 'formula' },
  },
  disc: {
    ...PIECE,
    disc: 'cell',
    diameter: 'formula',
    rim: { teeth: 'formula', depth: 'formula', 'tooth angle': 'formula', angle: 'formula', when: 'formula' },
  },
  sector: {
    ...PIECE,
    body: 'cell',
    'inner radius': 'formula',
    'outer radius': 'formula',
    angle: 'formula',
    seam: { width: 'formula', low: 'formula', high: 'formula' },
  },
  outline: {
    ...PIECE,
    points: { name: 'words', across: 'formula', along: 'formula' },
    panels: { name: 'cell', role: 'words', loop: 'stop', bent: 'formula', when: 'formula' },
    lines: LINE,
    slots: SLOT,
    edges: { name: 'words', panel: 'cell', from: 'words', to: 'words' },
  },
  layer: { ...PIECE, of: 'piece', panels: 'cell', also: 'cell', margin: 'formula' },
};

/** Where a text stands. */
export interface TextAt {
  readonly role: Role;
  /** For a cell or track the piece that has it, for an option its choice. */
  readonly owner: string;
  /** `measure “arc”, usual`: for faults. */
  readonly where: string;
}
type Change = (text: string, at: TextAt) => string;

/** The pattern with every text changed. Parts in which nothing changes stay the same objects. */
export function mapTexts(pattern: Pattern, change: Change): Pattern {
  function list<T>(items: readonly T[], roles: RoleTree, label: (item: T, index: number) => string): readonly T[] {
    const changed = items.map((item, index) =>
      mapPart(item, roles, { owner: ownerIn(item), where: label(item, index), change }),
    );
    return keep(items, changed);
  }
  const named = (kind: string) => (item: { readonly name: string }) => `${kind} “${item.name}”`;
  const { inside, outside } = pattern.finished;
  const finished = {
    inside: list(inside, SIZE, named('finished inside')),
    outside: list(outside, SIZE, named('finished outside')),
  };
  return {
    ...pattern,
    measures: list(pattern.measures, MEASURE, named('measure')),
    choices: list(pattern.choices, CHOICE, named('choice')),
    pieces: keep(
      pattern.pieces,
      pattern.pieces.map((piece) => mapPiece(piece, change)),
    ),
    fits: list(pattern.fits, FIT, named('fit')),
    finished,
    order: keep(
      pattern.order,
      pattern.order.map((line, index) => {
        const roles: RoleTree = typeof line === 'string' ? 'prose' : ORDER_LINE;
        return mapPart(line, roles, { owner: '', where: `order ${index + 1}`, change });
      }),
    ),
    ...(pattern.materials ? { materials: list(pattern.materials, MATERIAL, named('material')) } : {}),
    assembly: list(pattern.assembly, PLACEMENT, (_, index) => `assembly ${index + 1}`),
  };
}

const mapPiece = (piece: PieceDef, change: Change): PieceDef =>
  mapPart(piece, PIECES[piece.builder], { owner: ownerIn(piece), where: `piece “${piece.name}”`, change });

/** The cells that a layer or a placement speaks of are those of the piece that it names. */
function ownerIn(part: unknown): string {
  const { of, piece, name } = part as { readonly of?: string; readonly piece?: string; readonly name?: string };
  return of ?? piece ?? name ?? '';
}

function mapPart<T>(part: T, roles: RoleTree, at: Omit<TextAt, 'role'> & { readonly change: Change }): T {
  const into = (value: unknown, inner: RoleTree, where: string): unknown => {
    if (typeof value === 'string') return at.change(value, { role: inner as Role, owner: at.owner, where });
    if (Array.isArray(value))
      return keep(
        value,
        value.map((item) => into(item, inner, where)),
      );
    if (typeof value !== 'object' || value === null) return value;
    const entries = Object.entries(value).map(([field, item]) => {
      const role = (inner as Readonly<Record<string, RoleTree>>)[field] ?? 'words';
      return [field, into(item, role, `${where}, ${field}`)] as const;
    });
    return entries.some(([field, item]) => item !== (value as Record<string, unknown>)[field])
      ? Object.fromEntries(entries)
      : value;
  };
  return into(part, roles, at.where) as T;
}
function keep<T>(before: readonly T[], after: readonly T[]): readonly T[] {
  return after.some((item, index) => item !== before[index]) ? after : before;
}

/** The radius of a bowed edge, in `b bowed out by r`. */
export const BOWED = /^(.*? bowed (?:out|in) by )(.+)$/iu;

/** Every formula of a pattern, with its place, in the pattern's order. */
export function formulasOfPattern(pattern: Pattern): readonly { readonly text: string; readonly where: string }[] {
  const found: { text: string; where: string }[] = [];
  mapTexts(pattern, (text, { role, where }) => {
    const formula = formulaIn(text, role);
    if (formula !== null) found.push({ text: formula, where });
    return text;
  });
  return found;
}
/** Every formula of a piece: sizes, counts, conditions, angles, radii, places of points. */
export function formulasOfPiece(piece: PieceDef): readonly string[] {
  const found: string[] = [];
  mapPiece(piece, (text, { role }) => {
    const formula = formulaIn(text, role);
    if (formula !== null) found.push(formula);
    return text;
  });
  return found;
}
function formulaIn(text: string, role: Role): string | null {
  if (role === 'formula') return text;
  return role === 'stop' ? (BOWED.exec(text)?.[2] ?? null) : null;
}
