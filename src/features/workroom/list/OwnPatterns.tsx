import { useRef, useState } from 'react';
import { Icon } from '@/components/Icon';
import { PATTERN_BYTES } from '@/features/patterns/pattern-limits';
import { call, type Refusal } from '../desk/project-api';
import type { ShelfPattern } from './NewProject';

export interface OwnPatternsProps {
  readonly patterns: readonly ShelfPattern[];
  readonly onChoose: (slug: string) => void;
  /** The author's patterns after something was put in or taken out. */
  readonly onChange: (patterns: readonly ShelfPattern[]) => void;
}
interface Said {
  readonly words: string;
  readonly faults?: Refusal['errors'];
  /** What was refused because its name is taken, so that it can be put in all the same. */
  readonly again?: unknown;
}

/** The author's own patterns: put in from a file, taken out as a file, begun from. */
export function OwnPatterns({ patterns, onChoose, onChange }: OwnPatternsProps) {
  const [said, setSaid] = useState<Said | null>(null);
  const input = useRef<HTMLInputElement>(null);
  const reload = async () => {
    const answer = await call<{ patterns: readonly ShelfPattern[] }>('/api/patterns');
    if (answer.ok) onChange(answer.value.patterns);
  };
  const send = async (pattern: unknown, replace: boolean) => {
    const answer = await call(`/api/patterns${replace ? '?replace=yes' : ''}`, { method: 'POST', body: pattern });
    if (answer.ok) {
      setSaid({ words: replace ? 'Replaced.' : 'It stands on your shelf now.' });
      return reload();
    }
    const { sentence, errors, code } = answer.refusal;
    setSaid({
      words: errors.length > 0 ? 'The pattern cannot be used:' : sentence,
      faults: errors,
      ...(code === 'name-taken' ? { again: pattern } : {}),
    });
  };
  const read = async (file: File) => {
    if (file.size > PATTERN_BYTES)
      return setSaid({
        words: `${file.name} has more than 512 kB. A pattern holds no pictures: is it the right file?`,
      });
    let pattern: unknown;
    try {
      pattern = JSON.parse(await file.text());
    } catch {
      return setSaid({ words: `${file.name} is no pattern file: it does not read as JSON.` });
    }
    await send(pattern, false);
  };
  const drop = async (slug: string) => {
    const answer = await call(`/api/patterns/${encodeURIComponent(slug)}`, { method: 'DELETE' });
    setSaid({ words: answer.ok ? 'Taken off the shelf. Projects made from it keep theirs.' : answer.refusal.sentence });
    await reload();
  };
  return (
    <section className="pattern-shelf" aria-labelledby="own-title">
      <div className="shelf-head">
        <h2 id="own-title">Your own patterns</h2>
        <p className="soft">
          {patterns.length === 0
            ? 'Save one from a desk, or put in a file that somebody gave you.'
            : 'Kept from a desk or put in from a file; yours alone.'}
        </p>
        <button type="button" className="text-button small" onClick={() => input.current?.click()}>
          <Icon name="upload" /> Put in a pattern file
        </button>
        <input
          ref={input}
          type="file"
          accept=".json,application/json"
          hidden
          aria-label="Pattern file"
          onChange={(event) => {
            const [file] = event.currentTarget.files ?? [];
            event.currentTarget.value = '';
            if (file) void read(file);
          }}
        />
      </div>
      <div role="status">
        {said === null ? null : (
          <div className={said.faults || said.again !== undefined ? 'problem' : 'note'}>
            <p>
              {said.words}{' '}
              {said.again === undefined ? null : (
                <button type="button" className="btn small-btn" onClick={() => void send(said.again, true)}>
                  Replace it
                </button>
              )}
            </p>
            {said.faults && said.faults.length > 0 ? (
              <ul>
                {said.faults.map(({ where, sentence }, i) => (
                  <li key={i}>
                    <b>{where}</b>: {sentence}
                  </li>
                ))}
              </ul>
            ) : null}
          </div>
        )}
      </div>
      {patterns.length === 0 ? null : (
        <ul className="shelf-patterns">
          {patterns.map((pattern) => (
            <li key={pattern.slug}>
              <button type="button" onClick={() => onChoose(pattern.slug)}>
                <span className="pattern-box" dangerouslySetInnerHTML={{ __html: pattern.folded }} />
                <span className="pattern-lip" aria-hidden="true">
                  <span className="ruled" />
                </span>
                <b>{pattern.name}</b>
                <span className="small soft">{pattern.asks}</span>
              </button>
              <p className="own-deeds">
                <a href={`/api/patterns/${pattern.slug}`} download>
                  File<span className="visually-hidden"> of {pattern.name}</span>
                </a>
                <button type="button" onClick={() => void drop(pattern.slug)}>
                  Take off<span className="visually-hidden"> {pattern.name}</span>
                </button>
              </p>
            </li>
          ))}
        </ul>
      )}
    </section>
  );
}
