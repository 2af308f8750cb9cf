import type { Renaming } from './use-renaming';

export interface NameFieldProps {
  readonly name: string;
  readonly renaming: Renaming;
  /** The id of the words that say what is wrong. */
  readonly describedBy: string;
}

/** The name of a measure while it is typed anew. It grows with its text; Enter renames, Escape leaves it as it was. */
export function NameField({ name, renaming, describedBy }: NameFieldProps) {
  return (
    <textarea
      className="plain-input name-input"
      rows={1}
      aria-label={`New name for ${name}`}
      aria-invalid={renaming.trouble === null ? undefined : true}
      aria-describedby={describedBy}
      autoFocus
      spellCheck={false}
      autoComplete="off"
      autoCapitalize="off"
      maxLength={60}
      value={renaming.typed ?? name}
      onFocus={(event) => event.currentTarget.select()}
      onChange={(event) => renaming.type(event.currentTarget.value.replace(/\n/gu, ' '))}
      onKeyDown={(event) => {
        if (event.key === 'Enter') renaming.take();
        else if (event.key === 'Escape') renaming.leave();
        else return;
        event.preventDefault();
      }}
    />
  );
}

/** Under the name: what will happen, or why it cannot be called so. */
export function RenameWords({ id, renaming }: { readonly id: string; readonly renaming: Renaming }) {
  return (
    <>
      <div id={id}>
        {renaming.trouble === null ? (
          <p className="small soft">Formulas, fits, pieces and the text will follow.</p>
        ) : (
          <p className="fault-words" role="alert">
            {renaming.trouble}
          </p>
        )}
      </div>
      <p className="fault-cure">
        <button type="button" className="btn small-btn" onClick={renaming.take}>
          Rename
        </button>
        <button type="button" className="text-button small" onClick={renaming.leave}>
          Leave it
        </button>
      </p>
    </>
  );
}
