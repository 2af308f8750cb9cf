import { faultsIn } from '@/features/projects/piece-faults';
import { LabelledFormula } from '../fields';
import { usePieceDesk } from './piece-context';

export interface PieceFormulaProps {
  readonly label: string;
  readonly of?: string;
  readonly value: string | undefined;
  /** The fault's place after the piece's own: `column, “length”`. */
  readonly at: string;
  /** Several fields share the place: a fault then stands where its words are found. */
  readonly shared?: boolean;
  readonly quiet?: boolean;
  readonly onChange: (value: string) => void;
}

/** A formula of the piece. */
export function PieceFormula({ value = '', at, shared, ...field }: PieceFormulaProps) {
  const { piece, faults, names, lit } = usePieceDesk();
  const own = faultsIn(faults, { piece: piece.name, at, ...(shared ? { text: value } : {}) });
  return <LabelledFormula {...field} value={value} names={names} lit={lit} faults={own} />;
}
