import type { Figures } from '@/engine';

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
    <ul
      className="piece-list"
      onKeyDown={(event) => {
        if (event.key !== 'ArrowDown' && event.key !== 'ArrowUp') return;
        event.preventDefault();
        const buttons = [...event.currentTarget.querySelectorAll('button')];
        const at = buttons.findIndex((button) => button === document.activeElement);
        buttons[(at + (event.key === 'ArrowDown' ? 1 : -1) + buttons.length) % buttons.length]?.focus();
      }}
    >
      {pieces.map(({ name, count, stock }, n) => (
        <li key={name}>
          <button type="button" autoFocus={n === 0} onClick={() => onTake(name)}>
            <span>{name}</span>
            <small>
              cut {count} · {stock}
              {shown.has(name) ? ' · shown already' : ''}
            </small>
          </button>
        </li>
      ))}
    </ul>
  );
}
