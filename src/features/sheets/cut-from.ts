import { readValue, showValue, snap, STOCKS, type PieceDef, type PlanOptions, type Stock, type Unit } from '@/engine';
import { slugOf } from '@/features/sizing/sizing-link';
import { grainOf, planOn, readStock, withGrain, type Grain } from './stock-link';

export type Material = PieceDef['stock'];
/** Materials that may come in sheets of another size than the card. */
export const OTHER_MATERIALS = ['patterned paper', 'greyboard'] as const satisfies readonly Material[];

/** What a box is cut from and how: all that a sheet plan depends on besides the pieces. */
export interface CutFrom {
  /** Sheets of card, and of every material that is not in `others`. */
  readonly stock: Stock;
  readonly others: Readonly<Partial<Record<Material, Stock>>>;
  /** Border that is trimmed off every sheet first, millimetres. */
  readonly margin: number;
  /** How many of the whole box. */
  readonly copies: number;
  /** Pieces made of two should they be too large, named as in links: `lower-spine`. */
  readonly join: readonly string[];
}

/** Cardstock is mostly sold in scrapbook squares. */
export const USUAL_STOCK: Stock = STOCKS['12x12in'];
export const USUAL_CUT_FROM: CutFrom = { stock: USUAL_STOCK, others: {}, margin: 0, copies: 1, join: [] };

/** Planning for more takes long, and anybody may ask. */
export const MOST_COPIES = 12;
/** A wider border is a slip of the pen. Millimetres. */
export const MOST_MARGIN = 50;

/** Names in links and forms alike; sheets of other materials go by the material's own name. */
export const CUT_FIELD = {
  card: 'card',
  grain: 'grain',
  margin: 'sheet-margin',
  copies: 'copies',
  join: 'join',
} as const;
export const materialField = slugOf;

export interface ReadCutFrom {
  readonly value: CutFrom;
  /** Fields that do not read, with what was said; `before` stands in their place. */
  readonly typed: Readonly<Record<string, { readonly text: string; readonly sentence: string }>>;
}

/**
 * Reads a link, or a form that was drawn at `before`. What is not said stays as it was; a number without a unit is in
 * `units`. A field that still says what it was drawn with keeps its exact value, and a grain counts where it was changed:
 * another sheet has its own.
 */
export function readCutFrom(
  params: URLSearchParams,
  { units, before = USUAL_CUT_FROM }: { readonly units: Unit; readonly before?: CutFrom },
): ReadCutFrom {
  const typed: Record<string, { text: string; sentence: string }> = {};
  const refuse = (name: string, text: string, sentence: string) => (typed[name] = { text, sentence });
  const sheetOf = (name: string, was: Stock | undefined): Stock | undefined => {
    const text = params.get(name);
    if (text === null) return was;
    const stock = readStock(text);
    if (!stock && text.trim() !== '') refuse(name, text, noSheet(text));
    return stock ?? (text.trim() === '' ? undefined : was);
  };

  const card = sheetOf(CUT_FIELD.card, before.stock) ?? USUAL_STOCK;
  const grain = params.get(CUT_FIELD.grain);
  const sameGrain = grain === null || grain === (grainOf(before.stock) ?? '');
  const others = OTHER_MATERIALS.flatMap((material) => {
    const stock = sheetOf(materialField(material), before.others[material]);
    return stock ? [[material, stock] as const] : [];
  });

  const marginSaid = params.get(CUT_FIELD.margin)?.trim() ?? null;
  let { margin, copies } = before;
  if (marginSaid === '') margin = 0;
  else if (marginSaid !== null && marginSaid !== marginText(before.margin, units)) {
    const read = readValue({ kind: 'length' }, marginSaid, { units });
    if (read.ok && read.value >= 0 && read.value <= MOST_MARGIN) margin = read.value;
    else
      refuse(
        CUT_FIELD.margin,
        marginSaid,
        read.ok
          ? `A border is from nothing to ${MOST_MARGIN} mm (about 2 in).`
          : `“${marginSaid}” does not read as a length. Write it like 1/4 or 5 mm.`,
      );
  }
  const copiesSaid = params.get(CUT_FIELD.copies)?.trim() ?? null;
  if (copiesSaid === '') copies = 1;
  else if (copiesSaid !== null) {
    const count = /^\d{1,4}$/.test(copiesSaid) ? Number(copiesSaid) : 0;
    if (count >= 1 && count <= MOST_COPIES) copies = count;
    else
      refuse(
        CUT_FIELD.copies,
        copiesSaid,
        `“${copiesSaid}” is no number of boxes. Give a whole number from 1 to ${MOST_COPIES}.`,
      );
  }
  return {
    value: {
      stock: sameGrain
        ? card
        : withGrain(
            card,
            GRAINS.find((one) => one === grain),
          ),
      others: Object.fromEntries(others),
      margin,
      copies,
      join: params.has(CUT_FIELD.join) ? [...new Set(params.getAll(CUT_FIELD.join).map(slugOf))] : before.join,
    },
    typed,
  };
}
const GRAINS: readonly Grain[] = ['long', 'short'];

/** Adds what is not as usual to a link's parameters; `readCutFrom` gives the same back. */
export function writeCutFrom(params: URLSearchParams, { stock, others, margin, copies, join }: CutFrom): void {
  if (stock.id !== USUAL_STOCK.id) params.set(CUT_FIELD.card, stock.id);
  for (const material of OTHER_MATERIALS) {
    const other = others[material];
    if (other) params.set(materialField(material), other.id);
  }
  if (margin > 0) params.set(CUT_FIELD.margin, `${snap(margin)}mm`);
  if (copies > 1) params.set(CUT_FIELD.copies, String(copies));
  for (const piece of join) params.append(CUT_FIELD.join, piece);
}

/** The same as one text, to tell two of them apart. */
export function cutFromKey(cutFrom: CutFrom): string {
  const params = new URLSearchParams();
  writeCutFrom(params, cutFrom);
  return params.toString();
}

/** What the planner is asked for the pieces of one box. */
export function planOptions(
  { stock, others, margin, copies, join }: CutFrom,
  pieces: readonly { readonly name: string }[],
): PlanOptions {
  return {
    ...planOn(stock),
    stocks: others,
    margin,
    copies,
    join: pieces.map(({ name }) => name).filter((name) => join.includes(slugOf(name))),
  };
}

/** The border as it stands in its field, without its unit. */
export const marginText = (margin: number, units: Unit): string =>
  showValue(margin, 'length', { units, grid: units === 'in' ? '1/16in' : '1mm', bare: true }).text;

const noSheet = (text: string): string =>
  `“${text}” is no sheet that is known here. It can be ${Object.keys(STOCKS).join(', ')}, or a size such as 8.5x13in.`;

/** What stays in every link on the page beside the sizing: the sheets, and an edition that is not the newest. */
export function keepParams(cutFrom: CutFrom, edition: number | string | null): string {
  const params = new URLSearchParams();
  writeCutFrom(params, cutFrom);
  if (edition !== null) params.set('edition', String(edition));
  return params.toString();
}
