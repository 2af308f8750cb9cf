import { useState } from 'react';
import { cleanName, explain, explainAt, type Fault } from '@/engine';
import { renamedWords } from '@/features/projects/rename';
import type { DeskStore } from './desk-store';

export interface Renaming {
  /** What is typed so far; null while the name stands as it is. */
  readonly typed: string | null;
  readonly trouble: string | null;
  begin(): void;
  type(name: string): void;
  take(): void;
  leave(): void;
}

/** The name of a measure as it is typed anew. The focus goes back to the name, wherever it stands then. */
export function useRenaming(
  store: DeskStore,
  name: string,
  onRenamed: (name: string, words: string) => void,
): Renaming {
  const [typed, setTyped] = useState<string | null>(null);
  const [trouble, setTrouble] = useState<string | null>(null);
  const close = (called: string) => {
    setTyped(null);
    setTrouble(null);
    requestAnimationFrame(() =>
      document.querySelector<HTMLElement>(`[data-place="name:${CSS.escape(called)}"]`)?.focus(),
    );
  };
  return {
    typed,
    trouble,
    begin() {
      store.select(name);
      setTyped(name);
    },
    type(next) {
      setTyped(next);
      setTrouble(null);
    },
    take() {
      const to = cleanName(typed ?? name);
      if (to === name) return close(name);
      const renamed = store.rename({ what: 'measure', from: name, to });
      if (!renamed.ok) return setTrouble(renamed.faults.slice(0, 1).map(sentence).join(''));
      onRenamed(to, renamedWords(renamed.value));
      close(to);
    },
    leave: () => close(name),
  };
}

/** A formula that does not read is said with its place: it stands elsewhere. */
const sentence = (fault: Fault): string => (fault.code.startsWith('formula') ? explainAt(fault) : explain(fault));
