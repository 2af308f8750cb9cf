import { useStore } from '@nanostores/react';
import { useRef, useState } from 'react';
import { Icon } from '@/components/Icon';
import { explain, type Fault, type Pattern } from '@/engine';
import { patternFileName, patternFileText } from '@/features/patterns/pattern-file';
import { PATTERN_BYTES, SCHEMA_PATH } from '@/features/patterns/pattern-limits';
import { slugOf } from '@/features/projects/project-slug';
import type { DeskStore } from './desk-store';
import { TextField } from './fields';
import { call } from './project-api';
import { FinishedSizes, MaterialsList, OrderLines } from './PatternLists';

interface Said {
  readonly words: string;
  readonly bad: boolean;
  readonly faults?: readonly Fault[];
  /** A pattern of this name is on the shelf already. */
  readonly taken?: true;
}

/** The pattern as a whole: what it is called, its finished sizes and order of making; as a file, and on the author's shelf. */
export function PatternPart({ store }: { readonly store: DeskStore }) {
  const { pattern, title } = useStore(store.$draft);
  const [said, setSaid] = useState<Said | null>(null);
  const input = useRef<HTMLInputElement>(null);
  const change = (field: string, part: Partial<Pattern>) =>
    store.editPattern(`pattern.${field}`, (now) => ({ ...now, ...part }));

  const keep = async (replace: boolean) => {
    const name = pattern.name.trim() === '' ? title : pattern.name;
    const answer = await call(`/api/patterns${replace ? '?replace=yes' : ''}`, {
      method: 'POST',
      body: { ...pattern, name, slug: slugOf(name) },
    });
    if (answer.ok) return setSaid({ words: `“${name}” stands on your shelf in the workroom.`, bad: false });
    const { sentence, code } = answer.refusal;
    setSaid({ words: sentence, bad: true, ...(code === 'name-taken' ? { taken: true } : {}) });
  };
  const read = async (file: File) => {
    if (file.size > PATTERN_BYTES)
      return setSaid({ words: `${file.name} has more than 512 kB: it is no pattern file.`, bad: true });
    // The checker is needed here alone.
    const { readPatternFile } = await import('@/features/patterns/read-pattern-file');
    const result = readPatternFile(await file.text());
    if (!result.ok) return setSaid({ words: `${file.name} cannot be used:`, bad: true, faults: result.faults });
    store.select(null);
    store.editPattern(null, () => result.value);
    setSaid({ words: `The pattern is now the one in ${file.name}. Undo brings the former one back.`, bad: false });
  };

  return (
    <details className="desk-block pattern-part">
      <summary>
        The pattern itself <span className="soft">{pattern.name}</span>
      </summary>
      <div className="pattern-fields">
        <TextField label="Name" of="pattern" value={pattern.name} onChange={(name) => change('name', { name })} />
        <TextField
          label="What the box is, in a sentence"
          value={pattern.summary}
          maxLength={1000}
          onChange={(summary) => change('summary', { summary })}
        />
        <FinishedSizes store={store} pattern={pattern} />
        <OrderLines store={store} pattern={pattern} />
        <MaterialsList store={store} pattern={pattern} />
        <div className="measure-deeds">
          <button type="button" className="text-button small" onClick={() => void keep(false)}>
            <Icon name="saved" /> Keep it as a pattern of my own
          </button>
          <button type="button" className="text-button small" onClick={() => download(pattern)}>
            <Icon name="download" /> Pattern as a file
          </button>
          <button type="button" className="text-button small" onClick={() => input.current?.click()}>
            <Icon name="upload" /> Pattern from a file
          </button>
          <input
            ref={input}
            type="file"
            accept=".json,application/json"
            hidden
            aria-label="Pattern file for this project"
            onChange={(event) => {
              const [file] = event.currentTarget.files ?? [];
              event.currentTarget.value = '';
              if (file) void read(file);
            }}
          />
        </div>
        <div role="status">
          {said === null ? null : (
            <>
              <p className={said.bad ? 'fault-words' : 'small'}>
                {said.words}{' '}
                {said.taken ? (
                  <button type="button" className="btn small-btn" onClick={() => void keep(true)}>
                    Replace it
                  </button>
                ) : null}
              </p>
              {said.faults ? (
                <ul className="plain-list small">
                  {said.faults.slice(0, 10).map((fault, i) => (
                    <li key={i}>
                      <b>{fault.where}</b>: {explain(fault)}
                    </li>
                  ))}
                </ul>
              ) : null}
            </>
          )}
        </div>
      </div>
    </details>
  );
}

function download(pattern: Pattern): void {
  const text = patternFileText(pattern, new URL(SCHEMA_PATH, location.origin).href);
  const address = URL.createObjectURL(new Blob([text], { type: 'application/json' }));
  const link = document.createElement('a');
  link.href = address;
  link.download = patternFileName(pattern);
  link.click();
  // Once the browser has taken it up.
  setTimeout(() => URL.revokeObjectURL(address), 10_000);
}
