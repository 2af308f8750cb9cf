/** Sheets as sold. ISO 216 for A sizes, ANSI/ASME Y14.1 for Letter; scrapbook squares by common practice. Millimetres. */
export interface Stock {
  readonly id: string;
  readonly name: string;
  readonly across: number;
  readonly along: number;
  /** How the grain runs; usual: along. */
  readonly grain?: 'across' | 'along';
}
export type StockId = '12x12in' | 'letter' | 'a4' | 'a3' | '8x8in' | '6x6in' | '30x30cm';
const stock = (id: StockId, name: string, across: number, along: number): Stock & { readonly id: StockId } => ({
  id,
  name,
  across,
  along,
});
export const STOCKS: Readonly<Record<StockId, Stock & { readonly id: StockId }>> = {
  '12x12in': stock('12x12in', '12 × 12 in', 304.8, 304.8),
  letter: stock('letter', 'Letter', 215.9, 279.4),
  a4: stock('a4', 'A4', 210, 297),
  a3: stock('a3', 'A3', 297, 420),
  '8x8in': stock('8x8in', '8 × 8 in', 203.2, 203.2),
  '6x6in': stock('6x6in', '6 × 6 in', 152.4, 152.4),
  '30x30cm': stock('30x30cm', '30 × 30 cm', 300, 300),
};
export const stockOf = (id: string): Stock | undefined =>
  Object.values(STOCKS).find((one) => one.id === id.trim().toLowerCase());
