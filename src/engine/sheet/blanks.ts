import { toNanometres } from '../measure';

/** What is cut from sheets of one size, in columns of figures for the search: whole nanometres, one place a blank. */
export interface Blanks {
  readonly count: number;
  readonly across: Float64Array;
  readonly along: Float64Array;
  readonly area: Float64Array;
  /** 1 where the blank may be laid a quarter turn round, and that makes a difference. */
  readonly turns: Uint8Array;
  /** 1 where it may only be laid a quarter turn round. */
  readonly turned: Uint8Array;
  /** What may be used of a sheet. */
  readonly sheet: { readonly across: number; readonly along: number; readonly area: number };
}
/** How a blank may lie: as drawn, a quarter turn round, or either way. */
export type Lie = 'as drawn' | 'turned' | 'either';
export interface Blank {
  readonly across: number;
  readonly along: number;
  readonly lie: Lie;
}

export function blanksOf(blanks: readonly Blank[], sheet: { readonly across: number; readonly along: number }): Blanks {
  const [across, along] = [toNanometres(sheet.across), toNanometres(sheet.along)];
  const wide = Float64Array.from(blanks, (blank) => toNanometres(blank.across));
  const tall = Float64Array.from(blanks, (blank) => toNanometres(blank.along));
  return {
    count: blanks.length,
    across: wide,
    along: tall,
    area: wide.map((size, index) => size * (tall[index] as number)),
    turns: Uint8Array.from(blanks, ({ lie }, index) => (lie === 'either' && wide[index] !== tall[index] ? 1 : 0)),
    turned: Uint8Array.from(blanks, ({ lie }) => (lie === 'turned' ? 1 : 0)),
    sheet: { across, along, area: across * along },
  };
}

/**
 * Fewer sheets than this cannot hold the blanks: neither by area, nor because blanks whose shorter side is more than half of
 * the sheet's longer one never share a sheet.
 */
export function fewestSheets(blanks: Blanks): number {
  const { count, across, along, sheet } = blanks;
  const half = Math.max(sheet.across, sheet.along) / 2;
  let large = 0;
  for (let blank = 0; blank < count; blank += 1) {
    if (Math.min(across[blank] as number, along[blank] as number) > half) large += 1;
  }
  // Sums of areas pass the 53 bits of a double; a hair less than a whole sheet is a whole sheet.
  return Math.max(Math.ceil(areaShare(blanks) * (1 - 1e-12)), large, count > 0 ? 1 : 0);
}

/** The area of all blanks, in sheets. */
export const areaShare = ({ area, sheet }: Blanks): number => area.reduce((sum, one) => sum + one, 0) / sheet.area;
