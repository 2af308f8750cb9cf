import { roundTo, showValue, type Figures } from '@/engine';

export interface MaterialRow {
  readonly name: string;
  readonly amount: string;
}

/** What a box takes, a line each, in the reader's units; nothing is said of what it takes none of. */
export function materialRows({ materials, sizing }: Figures): readonly MaterialRow[] {
  const area = (mm2: number) => showValue(mm2, 'area', sizing).text;
  return [
    ...materials.stocks.map((one) => ({ name: one.stock, amount: area(one.area) })),
    ...besides({ materials, sizing }),
  ];
}
/** The same without card and paper, where these are said in sheets. */
export function besides({ materials, sizing }: Pick<Figures, 'materials' | 'sizing'>): readonly MaterialRow[] {
  const area = (mm2: number) => showValue(mm2, 'area', sizing).text;
  const { seams, glued, extras } = materials;
  // Tape is torn off by eye: half inches or centimetres, and rather too much.
  const tape = roundTo(seams, sizing.units === 'in' ? 12.7 : 10, 'up');
  return [
    ...(seams > 0 ? [{ name: 'glue or tape along tabs', amount: showValue(tape, 'length', sizing).text }] : []),
    ...(glued > 0 ? [{ name: 'glued all over', amount: area(glued) }] : []),
    ...extras.map(({ name, kind, value }) => ({ name, amount: showValue(value, kind, sizing).text })),
  ];
}
