import { MM_PER, same, show, snap, STOCKS, stockOf, type PlanOptions, type Stock, type Unit } from '@/engine';

/** How the grain of a sheet runs, as packets say it: along its long or its short side. */
export type Grain = 'long' | 'short';

/** Smallest and largest side of a sheet of one's own, millimetres: a card for a name, a whole sheet of board. */
export const OWN_SIDES = { least: 50, most: 1500 } as const;

const OWN = /^(\d{1,4}(?:\.\d{1,6})?)x(\d{1,4}(?:\.\d{1,6})?)(in|mm|cm)$/;

/**
 * A sheet as it stands in links and forms: the name of one that is sold everywhere (`a4`) or a size of one's own
 * (`8.5x13in`), and how its grain runs where that is to be heeded (`a4-long`). Null for anything else. A size of one's own
 * that is sold everywhere is that sheet: `8.5x11in` is Letter.
 */
export function readStock(text: string): Stock | null {
  const [, size = '', grain] = /^(.*?)(?:-(long|short))?$/.exec(text.trim().toLowerCase()) ?? [];
  const known = stockOf(size);
  if (known) return withGrain(known, grain as Grain | undefined);
  const [, across, along, unit] = OWN.exec(size) ?? [];
  return unit === undefined
    ? null
    : ownStock({ across: Number(across), along: Number(along), unit: unit as Unit }, grain as Grain | undefined);
}

/** A sheet of one's own, its sides in `unit`; null when a side is out of `OWN_SIDES`. */
export function ownStock(
  { across, along, unit }: { readonly across: number; readonly along: number; readonly unit: Unit },
  grain?: Grain,
): Stock | null {
  const [wide, tall] = [snap(across * MM_PER[unit]), snap(along * MM_PER[unit])];
  if (![wide, tall].every((mm) => mm >= OWN_SIDES.least && mm <= OWN_SIDES.most)) return null;
  const sold = Object.values(STOCKS).find((one) => same(one.across, wide) && same(one.along, tall));
  if (sold) return withGrain(sold, grain);
  const typed = (mm: number) => String(Number((mm / MM_PER[unit]).toFixed(6)));
  const shown = (mm: number, bare: boolean) => show(mm, { units: unit, bare }).typeset;
  return withGrain(
    {
      id: `${typed(wide)}x${typed(tall)}${unit}`,
      name: `${shown(wide, true)} × ${shown(tall, false)}`,
      across: wide,
      along: tall,
    },
    grain,
  );
}

/** The same sheet with its grain one way or the other, or no longer heeded. */
export function withGrain({ id, name, across, along }: Stock, grain: Grain | undefined): Stock {
  const plain = id.replace(/-(?:long|short)$/, '');
  if (!grain) return { id: plain, name, across, along };
  const longRuns = along >= across ? 'along' : 'across';
  const shortRuns = longRuns === 'along' ? 'across' : 'along';
  return { id: `${plain}-${grain}`, name, across, along, grain: grain === 'long' ? longRuns : shortRuns };
}

/** How the grain runs, as a packet says it; null when it is not heeded. On a square sheet both sides are long. */
export const grainOf = ({ id }: Stock): Grain | null => (/-(long|short)$/.exec(id)?.[1] as Grain | undefined) ?? null;

/** What tells sheets apart in a list: `A4`, `A4, grain along the long side`. */
export function stockWords(stock: Stock): string {
  const grain = grainOf(stock);
  return grain === null ? stock.name : `${stock.name}, ${grainWords(grain)}`;
}
export const grainWords = (grain: Grain): string => `grain along the ${grain} side`;

/** How a plan uses a sheet: folds run along its grain when the reader has said how that runs. */
export const planOn = (stock: Stock): Pick<PlanOptions, 'stock' | 'folds'> => ({
  stock,
  folds: stock.grain ? 'along the grain' : 'either',
});
