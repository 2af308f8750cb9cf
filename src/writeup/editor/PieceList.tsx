import type { Figures } from '@/engine';
import { PickList } from './PickList';

export interface PieceListProps {
  readonly figures: Figures | null;
  /** Names of pieces that the write-up shows already. */
  readonly shown: ReadonlySet<string>;
  readonly onTake: (piece: string) => void;
}

/** The box's pieces; those that no card shows yet come first. */
export function PieceList({ figures, shown, onTake }: PieceListProps) {
  if (!figures || figures.pieces.length === 0)
    return <p className="hint">There are no pieces yet: draw one up first.</p>;
  const pieces = [...figures.pieces].sort((a, b) => Number(shown.has(a.name)) - Number(shown.has(b.name)));
  return (
    <PickList
      items={pieces.map(({ name, count, stock }) => ({
        key: name,
        label: name,
        small: `cut ${count} · ${stock}${shown.has(name) ? ' · shown already' : ''}`,
        take: () => onTake(name),
      }))}
    />
  );
}
