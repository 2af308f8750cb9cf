import { useEffect, useRef } from 'react';
import { Icon } from '@/components/Icon';
import type { Pattern } from '@/engine';
import { addPiece } from '@/features/projects/piece-edits';
import { canStart, STARTS, startingPiece, type StartId } from '@/features/projects/starting-pieces';
import type { DeskStore } from '../desk-store';

/** Opens what a piece may begin as. */
export function AddPieceButton({ open, onOpen }: { readonly open: boolean; readonly onOpen: (open: boolean) => void }) {
  return (
    <button type="button" className="bar-button" aria-expanded={open} onClick={() => onOpen(!open)}>
      <Icon name={open ? 'close' : 'plus'} /> Piece
    </button>
  );
}

export interface PieceStartsProps {
  readonly store: DeskStore;
  readonly pattern: Pattern;
  readonly focus: boolean;
  readonly onAdded: (name: string) => void;
  readonly onClose: () => void;
}

/** What a new piece may begin as. */
export function PieceStarts({ store, pattern, focus, onAdded, onClose }: PieceStartsProps) {
  const list = useRef<HTMLUListElement>(null);
  useEffect(() => {
    if (focus) list.current?.querySelector<HTMLElement>('button:not(:disabled)')?.focus();
  }, [focus]);
  const add = (id: StartId) => {
    const piece = startingPiece(pattern, id);
    store.editPattern(null, (now) => addPiece(now, piece));
    onAdded(piece.name);
  };
  return (
    <ul
      ref={list}
      className="piece-starts"
      aria-label="Begin a piece as"
      onKeyDown={(event) => {
        if (event.key !== 'Escape') return;
        event.preventDefault();
        onClose();
      }}
    >
      {STARTS.map(({ id, label, says }) => (
        <li key={id}>
          <button type="button" disabled={!canStart(pattern, id)} onClick={() => add(id)}>
            <b>{label}</b>
            <span className="small soft">{says}</span>
          </button>
        </li>
      ))}
    </ul>
  );
}
