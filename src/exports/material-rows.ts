import { showValue, type Figures } from '@/engine';

/** What a box takes, a line each, in the reader's units; nothing is said of what it takes none of. */
export function materialRows({
  materials,
  sizing,
}: Figures): readonly { readonly name: string; readonly amount: string }[] {
  const area = (mm2: number) => showValue(mm2, 'area', sizing).text;
  const { stocks, seams, glued, extras } = materials;
  return [
    ...stocks.map((one) => ({ name: one.stock, amount: area(one.area) })),
    ...(seams > 0 ? [{ name: 'glue or tape along tabs', amount: showValue(seams, 'length', sizing).text }] : []),
    ...(glued > 0 ? [{ name: 'glued all over', amount: area(glued) }] : []),
    ...extras.map(({ name, kind, value }) => ({ name, amount: showValue(value, kind, sizing).text })),
  ];
}
