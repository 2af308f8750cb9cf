import { useStore } from '@nanostores/react';
import { atom } from 'nanostores';
import { useState } from 'react';
import { namesOf } from '@/features/projects/formula-names';
import { usesAny } from '@/features/projects/followers';
import type { StepNode } from '@/writeup/document';
import { WriteUpEditor } from '@/writeup/editor/WriteUpEditor';
import { collectUses } from '@/writeup/uses';
import { BringIn } from '../bringing-in/BringIn';
import { ColumnHead } from './ColumnHead';
import type { DeskStore } from './desk-store';

/** The write-up's editor, with what the selected measure lights in it counted. */
export function WriteUpColumn({ store, projectId }: { readonly store: DeskStore; readonly projectId: string }) {
  const writeUp = useStore(store.$writeUp);
  const lit = useStore(store.$lit);
  const draft = useStore(store.$draft);
  const generation = useStore(store.$generation);
  const [incoming] = useState(() => atom<readonly StepNode[] | null>(null));
  const names = namesOf(draft.pattern);
  const places =
    lit === null
      ? 0
      : collectUses(writeUp.doc).formulas.filter(({ formula }) => usesAny(formula, names, lit.names)).length;
  return (
    <section className="desk-column" data-column="write-up" aria-label="Write-up" tabIndex={-1}>
      <ColumnHead
        title="Write-up"
        shortcut="Alt 3"
        lit={lit === null ? null : places === 1 ? '1 place lit' : `${places} places lit`}
        places=".lit"
      />
      <BringIn projectId={projectId} figures={store.$live} onSteps={(steps) => incoming.set(steps)} />
      <WriteUpEditor
        key={generation}
        initial={store.$writeUp.get()}
        figures={store.$live}
        lit={store.$litNames}
        renamed={store.$renamed}
        merged={store.$merged}
        incoming={incoming}
        uploads={{ projectId }}
        onChange={store.setWriteUp}
        onSelectMeasure={(name) => {
          // Putting the caret elsewhere keeps the light: Escape puts it out.
          if (name !== null) store.select(name);
        }}
      />
    </section>
  );
}
