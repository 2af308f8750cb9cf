import { useId, useState } from 'react';
import { Icon } from '@/components/Icon';
import type { DeskStore, Draft } from './desk-store';
import { NameField, RenameWords } from './RenameMeasure';
import { useRenaming, type Named } from './use-renaming';

export interface NamePlateProps {
  readonly store: DeskStore;
  readonly named: Named;
  /** What it is, for those who hear the page: `column`, `piece`. */
  readonly what: string;
  readonly onRenamed?: (name: string) => void;
}

/** A name of the pattern, and the way to change it everywhere: pencil or F2. */
export function NamePlate({ store, named, what, onRenamed }: NamePlateProps) {
  const id = useId();
  const [said, setSaid] = useState<{ readonly words: string; readonly draft: Draft } | null>(null);
  const renaming = useRenaming(store, named, {
    onRenamed(name, words) {
      setSaid({ words, draft: store.$draft.get() });
      onRenamed?.(name);
    },
    backTo: () => `[data-name-plate="${id}"]`,
  });
  // What was renamed is worth a word until the next edit.
  const words = said !== null && said.draft === store.$draft.get() ? said.words : null;
  return (
    <div className="name-plate">
      {renaming.typed === null ? (
        <button
          type="button"
          className="name-button"
          aria-keyshortcuts="F2"
          title="F2 renames it"
          data-name-plate={id}
          onClick={renaming.begin}
          onKeyDown={(event) => {
            if (event.key !== 'F2') return;
            event.preventDefault();
            renaming.begin();
          }}
        >
          <b>{named.from}</b>
          <Icon name="pencil" label={`Rename ${what} ${named.from}`} />
        </button>
      ) : (
        <>
          <NameField name={named.from} renaming={renaming} describedBy={id} />
          <RenameWords id={id} renaming={renaming} />
        </>
      )}
      <p className="small soft" role="status">
        {words}
      </p>
    </div>
  );
}
