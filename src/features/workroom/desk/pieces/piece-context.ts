import { createContext, useContext } from 'react';
import type { Fault, Pattern, PieceDef } from '@/engine';
import { changePiece } from '@/features/projects/piece-edits';
import type { Lit } from '@/features/projects/followers';
import type { DeskStore } from '../desk-store';

/** The piece that is being drawn up, and what its fields need to know. */
export interface PieceDesk {
  readonly store: DeskStore;
  readonly pattern: Pattern;
  readonly piece: PieceDef;
  /** Measures and choices. */
  readonly names: readonly string[];
  readonly lit: Lit | null;
  /** Those of this piece. */
  readonly faults: readonly Fault[];
}
export const PieceContext = createContext<PieceDesk | null>(null);

export function usePieceDesk(): PieceDesk {
  const desk = useContext(PieceContext);
  if (desk === null) throw new Error('A field of a piece stands outside its desk.');
  return desk;
}

type Of<B extends PieceDef['builder']> = Extract<PieceDef, { readonly builder: B }>;
export interface Editing<P extends PieceDef> {
  readonly piece: P;
  /** Edits of one `field` in a row are one step back; null is always a step of its own. */
  edit(field: string | null, change: (piece: P) => PieceDef): void;
}

/** The piece as its builder has it, and the way to change it. */
export function usePiece<B extends PieceDef['builder']>(builder: B): Editing<Of<B>> {
  const { piece, store } = usePieceDesk();
  if (piece.builder !== builder) throw new Error(`A form for a ${builder} got a ${piece.builder}.`);
  const isOwn = (one: PieceDef): one is Of<B> => one.builder === builder;
  return {
    piece: piece as Of<B>,
    edit: (field, change) =>
      store.editPattern(field === null ? null : `${piece.name}.${field}`, (pattern) =>
        changePiece(pattern, piece.name, (one) => (isOwn(one) ? change(one) : one)),
      ),
  };
}
