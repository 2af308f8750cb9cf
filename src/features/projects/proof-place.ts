import type { Fault } from '@/engine';
import type { WriteUp } from '@/writeup/document';

export type ProofColumn = 'facts' | 'measures' | 'pieces' | 'write-up';
/** Where an item stands, so that the desk can go there. */
export interface ProofPlace {
  readonly column: ProofColumn;
  /** "Measures · strip width", "Write-up, step 3, The lower spine". */
  readonly label: string;
  /** The measure, choice, fit, piece or fact that is meant. */
  readonly name?: string;
  /** Which of the write-up's live measures, photos or piece cards, counted from 0. */
  readonly nth?: number;
  readonly step?: number;
}

/** The place of the `nth` thing of its kind, in this step or outside the steps. */
export type PlaceAt = (step: number | null, nth?: number) => ProofPlace;

/** "Write-up, step 3, The lower spine" */
export function placesIn({ doc }: WriteUp): PlaceAt {
  const titles = doc.content.flatMap((node) => (node.type === 'step' ? [node.attrs.title] : []));
  return (step, nth) => {
    const counted = nth === undefined ? {} : { nth };
    if (step === null) return { column: 'write-up', label: 'Write-up, outside the steps', ...counted };
    const title = titles[step - 1] ?? '';
    const label = `Write-up, step ${step}${title === '' ? '' : `, ${title}`}`;
    return { column: 'write-up', label, ...counted, step };
  };
}

const COLUMNS: Readonly<Record<string, { readonly column: ProofPlace['column']; readonly heading: string }>> = {
  measure: { column: 'measures', heading: 'Measures' },
  choice: { column: 'measures', heading: 'Choices' },
  fit: { column: 'measures', heading: 'Fits' },
  piece: { column: 'pieces', heading: 'Pieces' },
};

/** The desk's place for a fault: `piece “Floor”, row, “side”` is "Pieces · Floor, row, “side”". */
export function placeOfFault(fault: Pick<Fault, 'where'>): ProofPlace {
  const match = /^(measure|choice|fit|piece) “([^”]*)”(.*)$/su.exec(fault.where);
  const column = COLUMNS[match?.[1] ?? ''];
  if (match === null || column === undefined)
    return { column: 'measures', label: fault.where === '' ? 'Measures' : `Measures · ${fault.where}` };
  return { column: column.column, name: match[2] ?? '', label: `${column.heading} · ${match[2]}${match[3]}` };
}

export type MeasureField = 'formula' | 'usual' | 'from' | 'to';
const FIELDS: Readonly<Record<string, MeasureField>> = { 'usual value': 'usual', smallest: 'from', largest: 'to' };

/** In which field of the measure called `name` a fault stands; null when it stands elsewhere. */
export function fieldOfFault(fault: Pick<Fault, 'where'>, name: string): MeasureField | null {
  const head = `measure “${name}”`;
  if (!fault.where.startsWith(head)) return null;
  return FIELDS[fault.where.slice(head.length).replace(/^[\s,]+/u, '')] ?? 'formula';
}

/** Whether a fault stands in a column or row of a piece. */
export const isInTrack = (
  fault: Pick<Fault, 'where'>,
  track: { readonly piece: string; readonly axis: 'column' | 'row'; readonly name: string },
): boolean => fault.where.startsWith(`piece “${track.piece}”, ${track.axis}, “${track.name}”`);
