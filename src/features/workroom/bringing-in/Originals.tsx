import { useEffect, useState } from 'react';
import { Icon } from '@/components/Icon';
import { KIND_WORDS, type KeptSource } from '@/features/bringing-in/source';
import { call } from '../desk/project-api';

/** The originals that were brought in, to read beside the write-up. */
export function Originals({ projectId, onClose }: { readonly projectId: string; readonly onClose: () => void }) {
  const path = `/api/projects/${projectId}/sources`;
  const [sources, setSources] = useState<readonly KeptSource[] | null>(null);
  const [shown, setShown] = useState<{ readonly id: string; readonly text: string } | null>(null);
  const [trouble, setTrouble] = useState<string | null>(null);

  useEffect(() => {
    let gone = false;
    void call<{ sources: readonly KeptSource[] }>(path).then((answer) => {
      if (gone) return;
      if (answer.ok) setSources(answer.value.sources);
      else setTrouble(answer.refusal.sentence);
    });
    return () => {
      gone = true;
    };
  }, [path]);

  const show = async (id: string) => {
    const answer = await call<{ text: string }>(`${path}/${id}`);
    if (answer.ok) setShown({ id, text: answer.value.text });
    else setTrouble(answer.refusal.sentence);
  };
  const remove = async (id: string) => {
    const answer = await call<{ sources: readonly KeptSource[] }>(`${path}/${id}`, { method: 'DELETE' });
    if (!answer.ok) return setTrouble(answer.refusal.sentence);
    setSources(answer.value.sources);
    if (shown?.id === id) setShown(null);
  };

  return (
    <aside className="originals" aria-label="Originals">
      <div className="originals-head">
        <h3>Originals</h3>
        <button type="button" className="btn small-btn" onClick={onClose}>
          <Icon name="close" label="Close the originals" />
        </button>
      </div>
      {trouble === null ? null : (
        <p className="problem" role="alert">
          {trouble}
        </p>
      )}
      {sources?.length === 0 ? (
        <p className="hint">Nothing was brought in yet. What you bring in is kept here.</p>
      ) : null}
      <ul>
        {sources?.map(({ id, name, kind, characters }) => (
          <li key={id}>
            <button
              type="button"
              className="text-button"
              aria-expanded={shown?.id === id}
              onClick={() => void show(id)}
            >
              {name}
            </button>
            <small>
              {KIND_WORDS[kind]}, {characters} characters
            </small>
            <button type="button" className="btn small-btn" onClick={() => void remove(id)}>
              <Icon name="trash" label={`Remove the original ${name}`} />
            </button>
          </li>
        ))}
      </ul>
      {shown === null ? null : (
        <pre className="original-text" tabIndex={0} aria-label="Text of the original">
          {shown.text}
        </pre>
      )}
    </aside>
  );
}
