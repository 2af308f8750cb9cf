import { useState } from 'react';
import { cleanName, explain, explainAt, type Fault, type Rename } from '@/engine';
import { renamedWords } from '@/features/projects/rename';
import type { DeskStore } from './desk-store';

/** What is to be renamed: a rename without its new name. */
export type Named = Rename extends infer R ? (R extends Rename ? Omit<R, 'to'> : never) : never;

export interface Renaming {
  /** What is typed so far; null while the name stands as it is. */
  readonly typed: string | null;
  readonly trouble: string | null;
  begin(): void;
  type(name: string): void;
  take(): void;
  leave(): void;
}
export interface RenamingOptions {
  readonly onRenamed: (name: string, words: string) => void;
  /** Where the focus goes afterwards, by what the thing is then called. */
  readonly backTo: (name: string) => string;
  readonly onBegin?: () => void;
}

/** A name of the pattern as it is typed anew. The focus goes back to the name, wherever it stands then. */
export function useRenaming(store: DeskStore, named: Named, { onRenamed, backTo, onBegin }: RenamingOptions): Renaming {
  const [typed, setTyped] = useState<string | null>(null);
  const [trouble, setTrouble] = useState<string | null>(null);
  const close = (called: string) => {
    setTyped(null);
    setTrouble(null);
    requestAnimationFrame(() => document.querySelector<HTMLElement>(backTo(called))?.focus());
  };
  return {
    typed,
    trouble,
    begin() {
      onBegin?.();
      setTyped(named.from);
    },
    type(next) {
      setTyped(next);
      setTrouble(null);
    },
    take() {
      const to = cleanName(typed ?? named.from);
      if (to === named.from) return close(named.from);
      const renamed = store.rename({ ...named, to });
      if (!renamed.ok) return setTrouble(renamed.faults.slice(0, 1).map(sentence).join(''));
      onRenamed(to, renamedWords(renamed.value));
      close(to);
    },
    leave: () => close(named.from),
  };
}

/** A formula that does not read is said with its place: it stands elsewhere. */
const sentence = (fault: Fault): string => (fault.code.startsWith('formula') ? explainAt(fault) : explain(fault));
