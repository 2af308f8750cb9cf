import { useState } from 'react';
import type { Planned } from '@/features/projects/planned';
import { localInput, momentWords, zoneWords } from './local-input';
import { call } from './project-api';

export interface PlannedNoteProps {
  readonly projectId: string;
  readonly planned: Planned;
  readonly onPlanned: (planned: Planned | null) => void;
}

/** What is planned and when, or why it did not come out; it can be dropped. */
export function PlannedNote({ projectId, planned, onPlanned }: PlannedNoteProps) {
  const [trouble, setTrouble] = useState<string | null>(null);
  const { publishAt, revision, problem } = planned;
  const drop = async () => {
    const answer = await call(`/api/projects/${projectId}/schedule`, { method: 'DELETE' });
    if (answer.ok) onPlanned(null);
    else setTrouble(answer.refusal.sentence);
  };
  return (
    <div className={problem === null ? 'note' : 'problem'} role={problem === null ? undefined : 'alert'}>
      {problem === null ? (
        <p>
          <b>Revision {revision} comes out by itself</b> on {momentWords(publishAt)} ({zoneWords(localInput(publishAt))}
          ). What was saved after it waits for the next edition.
        </p>
      ) : (
        <p>
          <b>Revision {revision} did not come out</b> on {momentWords(publishAt)}. {problem}
        </p>
      )}
      <button type="button" className="btn small-btn" onClick={() => void drop()}>
        Drop the plan
      </button>
      {trouble === null ? null : <p className="error">{trouble}</p>}
    </div>
  );
}
