import { useEffect, useState } from 'react';
import { Icon } from '@/components/Icon';
import type { SaveState } from '../saving/autosave';

export interface SaveWordsProps {
  readonly state: SaveState;
  /** Where older revisions are, when they are kept. */
  readonly revisions?: string;
}

/** "Saved 2 s ago · revision 48", which leads to the revisions, and what is the matter when it is not. */
export function SaveWords({ state, revisions }: SaveWordsProps) {
  const now = useClock();
  const { status, revision, savedAt } = state;
  const ago = agoWords(now - savedAt);
  switch (status.kind) {
    case 'saved': {
      const words = (
        <>
          <Icon name="saved" />
          <span>Saved {ago}</span>
          <span className="soft"> · revision {revision}</span>
        </>
      );
      return revisions === undefined ? (
        <span className="save-words good">{words}</span>
      ) : (
        <a className="save-words good" href={revisions} title="See the revisions">
          {words}
        </a>
      );
    }
    case 'waiting':
    case 'saving':
      return (
        <span className="save-words">
          <Icon name="saved" />
          <span>{status.kind === 'saving' ? 'Saving…' : 'Not saved yet'}</span>
          <span className="soft"> · revision {revision}</span>
        </span>
      );
    case 'failed':
      return (
        <span className="save-words bad" role="alert">
          <Icon name="warning" />
          <span>
            Not saved: {status.sentence} Trying again in {Math.max(1, Math.ceil((status.retryAt - now) / 1000))} s.
          </span>
        </span>
      );
    case 'refused':
      return (
        <span className="save-words bad" role="alert">
          <Icon name="warning" />
          <span>Not saved: {status.sentence}</span>
        </span>
      );
    case 'conflict':
      return (
        <span className="save-words bad">
          <Icon name="warning" />
          <span>Waiting for a choice</span>
        </span>
      );
  }
}

/** "just now", "12 s ago", "5 min ago", "2 h ago". */
export function agoWords(ms: number): string {
  const seconds = Math.round(ms / 1000);
  if (seconds < 2) return 'just now';
  if (seconds < 60) return `${seconds} s ago`;
  if (seconds < 3600) return `${Math.floor(seconds / 60)} min ago`;
  return seconds < 86_400 ? `${Math.floor(seconds / 3600)} h ago` : `${Math.floor(seconds / 86_400)} d ago`;
}

function useClock(): number {
  const [now, setNow] = useState(Date.now);
  useEffect(() => {
    const timer = setInterval(() => setNow(Date.now()), 1000);
    return () => clearInterval(timer);
  }, []);
  return now;
}
