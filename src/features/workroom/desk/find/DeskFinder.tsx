import { useStore } from '@nanostores/react';
import { useMemo } from 'react';
import type { ProofPlace } from '@/features/projects/proof-place';
import type { DeskStore } from '../desk-store';
import { placesOf } from './desk-places';
import { GoToDialog, type DeskAct } from './GoToDialog';
import { KeysDialog } from './KeysDialog';

export type FinderDialog = 'go to' | 'keys';
export interface DeskFinderProps {
  readonly store: DeskStore;
  readonly open: FinderDialog | null;
  readonly acts: readonly DeskAct[];
  readonly onOpen: (dialog: FinderDialog | null) => void;
  readonly onGo: (place: ProofPlace) => void;
}

/** Finds anything on the desk by its name, and says what keys there are. */
export function DeskFinder({ store, open, acts, onOpen, onGo }: DeskFinderProps) {
  const { pattern } = useStore(store.$draft);
  const writeUp = useStore(store.$writeUp);
  const isOpen = open === 'go to';
  const places = useMemo(() => (isOpen ? placesOf({ pattern, writeUp }) : []), [isOpen, pattern, writeUp]);
  const keys: DeskAct = { label: 'Keys', what: 'Alt K', act: () => onOpen('keys') };
  return (
    <>
      <GoToDialog open={isOpen} places={places} acts={[...acts, keys]} onGo={onGo} onClose={() => onOpen(null)} />
      <KeysDialog open={open === 'keys'} onClose={() => onOpen(null)} />
    </>
  );
}
