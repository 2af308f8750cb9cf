import { z } from 'zod';
import type { Pattern } from '@/engine';

/*
 * The shape of a pattern, in a file or as an author's desk sends it. Formulas may be empty or not read yet: nothing typed is
 * lost, and the engine says what is wrong. What could not even be looked at is refused, and so is a field we do not know, so
 * that a slip in its name is found.
 */
const formula = z.string().max(1000, 'A formula has at most 1000 characters.');
const name = z.string().max(80, 'A name has at most 80 characters.');
const words = z.string().max(1000, 'A sentence has at most 1000 characters.');
const when = formula.optional();
const side = z.enum(['top', 'right', 'bottom', 'left']);
const axis = z.enum(['+x', '-x', '+y', '-y', '+z', '-z']);
const look = z.enum(['card', 'pages', 'paper']).optional();
const list = <T extends z.ZodTypeAny>(item: T) => z.array(item).max(200, 'At most 200 of these.');

const measure = z.strictObject({
  name,
  kind: z.enum(['length', 'area', 'angle', 'number', 'whole number']).optional(),
  ask: z
    .strictObject({ question: words, usual: formula, from: formula, to: formula, finer: z.boolean().optional(), when })
    .optional(),
  formula: formula.optional(),
  rounds: z.enum(['nearest', 'up', 'down', 'exact']).optional(),
  unit: z.enum(['in', 'mm', 'cm']).optional(),
  note: words.optional(),
});
const choice = z.strictObject({
  name,
  question: words,
  options: list(name),
  usual: name,
  finer: z.boolean().optional(),
  when,
});
const fit = z.strictObject({
  name,
  left: formula,
  is: z.enum(['at least', 'at most', 'more than', 'less than', 'same as']),
  right: formula,
  tolerance: formula.optional(),
  when,
  otherwise: words,
  change: list(name).optional(),
  advice: z.boolean().optional(),
});
const track = z.strictObject({ name, size: formula, when });
const tabEnd = z.strictObject({ from: formula.optional(), by: formula.optional() }).optional();
const base = {
  name,
  count: formula.optional(),
  stock: z.enum(['card', 'patterned paper', 'greyboard']),
  when,
  look,
  remarks: list(words).optional(),
};
const pair = z.tuple([formula, formula]);
const lines = list(
  z.strictObject({
    between: z.tuple([name, name]),
    is: z.enum(['valley', 'mountain', 'slit', 'nothing']),
    angle: formula.optional(),
    shown: formula.optional(),
    when,
  }),
).optional();
const slots = list(
  z.strictObject({ cell: name, across: formula, along: formula, width: formula, height: formula, when }),
).optional();
const grid = z.strictObject({
  ...base,
  builder: z.literal('grid'),
  columns: list(track),
  rows: list(track),
  cells: list(list(name)),
  lines,
  tabs: list(
    z.strictObject({
      cells: list(name),
      depth: formula.optional(),
      left: tabEnd,
      right: tabEnd,
      top: tabEnd,
      bottom: tabEnd,
      teeth: formula.optional(),
      'tooth angle': formula.optional(),
      round: formula.optional(),
      shape: list(pair).optional(),
      when,
    }),
  ).optional(),
  caps: list(z.strictObject({ cell: name, radius: formula })).optional(),
  corners: list(
    z.strictObject({
      cell: name,
      corner: z.enum(['top left', 'top right', 'bottom right', 'bottom left']),
      radius: formula,
      when,
    }),
  ).optional(),
  notches: list(z.strictObject({ cell: name, side, at: formula, radius: formula, when })).optional(),
  slots,
  holes: list(z.strictObject({ cell: name, across: formula, along: formula, diameter: formula, when })).optional(),
  creases: list(
    z.strictObject({
      cell: name,
      is: z.enum(['valley', 'mountain']),
      from: pair,
      to: pair,
      parts: name.optional(),
      angle: formula.optional(),
      when,
    }),
  ).optional(),
  rolls: list(z.strictObject({ cell: name, radius: formula, when })).optional(),
  edges: list(z.strictObject({ name, cell: name, side })).optional(),
});
const fan = z.strictObject({
  ...base,
  builder: z.literal('fan'),
  centre: name,
  sides: formula,
  side: formula,
  flap: z.strictObject({
    name,
    shape: z.enum(['rectangle', 'triangle']),
    height: formula,
    angle: formula,
    hole: z.strictObject({ diameter: formula, 'from tip': formula, when }).optional(),
  }),
  tab: z.strictObject({ width: formula, low: formula, high: formula, angle: formula, when }).optional(),
});
const disc = z.strictObject({
  ...base,
  builder: z.literal('disc'),
  disc: name,
  diameter: formula,
  rim: z.strictObject({ teeth: formula, depth: formula, 'tooth angle': formula, angle: formula, when }).optional(),
});
const sector = z.strictObject({
  ...base,
  builder: z.literal('sector'),
  body: name,
  'inner radius': formula,
  'outer radius': formula,
  angle: formula,
  seam: z.strictObject({ width: formula, low: formula, high: formula }),
});
const outline = z.strictObject({
  ...base,
  builder: z.literal('outline'),
  points: list(z.strictObject({ name, across: formula, along: formula })),
  panels: list(
    z.strictObject({
      name,
      role: z.enum(['panel', 'tab']).optional(),
      loop: list(words),
      bent: formula.optional(),
      when,
    }),
  ),
  lines,
  slots,
  edges: list(z.strictObject({ name, panel: name, from: name, to: name })).optional(),
});
const layer = z.strictObject({
  ...base,
  builder: z.literal('layer'),
  of: name,
  panels: list(name),
  also: list(list(name)).optional(),
  margin: formula,
});
const piece = z.discriminatedUnion('builder', [grid, fan, disc, sector, outline, layer]);
const size = list(z.strictObject({ name, formula }));

const pattern = z.strictObject({
  format: z.literal(1),
  slug: z.string().max(80),
  name,
  summary: words,
  group: name,
  measures: list(measure),
  choices: list(choice),
  pieces: list(piece),
  fits: list(fit),
  finished: z.strictObject({ inside: size, outside: size }),
  order: list(z.union([words, z.strictObject({ says: words, when: formula })])),
  materials: list(z.strictObject({ name, formula, when })).optional(),
  turn: z.number().finite().optional(),
  assembly: list(
    z.strictObject({
      piece: name,
      root: name,
      at: z.tuple([formula, formula, formula]),
      across: axis,
      along: axis,
      when,
      look,
      over: z.boolean().optional(),
    }),
  ),
});

export const patternSchema: z.ZodType<Pattern> = pattern;

/** A pattern as a file holds it: it may name the schema that it is written after. */
export const patternFileSchema = pattern.extend({ $schema: z.string().max(300).optional() });
