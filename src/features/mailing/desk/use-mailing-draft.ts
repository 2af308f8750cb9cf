import { useEffect, useRef, useState } from 'react';
import { createAutosave, type Autosave, type SaveState } from '@/features/workroom/saving/autosave';
import type { MailingInput } from '../mailing-text-input';
import type { MailingView } from '../mailing-view';
import { fetchMailing, saveMailing } from './mailing-api';

export interface MailingDraft {
  readonly input: MailingInput;
  readonly save: SaveState;
  change(part: Partial<MailingInput>): void;
  /** Saves what waits; resolves with where that led. */
  flush(): Promise<SaveState>;
  keepMine(): void;
  takeOther(): Promise<void>;
}

const inputOf = ({ subject, greeting, excerpt, withHero }: MailingView): MailingInput => ({
  subject,
  greeting,
  excerpt,
  withHero,
});

/** What is typed into a mailing, saved a second after the last change, when the page is hidden and when it is left. */
export function useMailingDraft(view: MailingView, onSaved: () => void): MailingDraft {
  // Where this page began; what the server says later is no new beginning.
  const [start] = useState({ revision: view.revision, savedAt: view.updatedAt });
  const [input, setInput] = useState(() => inputOf(view));
  const [save, setSave] = useState<SaveState>({ status: { kind: 'saved' }, ...start });
  const saver = useRef<Autosave<MailingInput> | null>(null);
  const newest = useRef(input);
  const told = useRef(onSaved);
  told.current = onSaved;

  useEffect(() => {
    const key = `foldwright.mailing.${view.id}`;
    const made = createAutosave<MailingInput>({
      send: (value, revision, options) => saveMailing(view.id, value, revision, options),
      keepCopy: (value, revision) => localStorage.setItem(key, JSON.stringify({ value, revision })),
      dropCopy: () => localStorage.removeItem(key),
      onState: (state) => {
        setSave(state);
        if (state.status.kind === 'saved') told.current();
      },
      now: Date.now,
      start,
    });
    saver.current = made;
    const copy = readCopy(localStorage.getItem(key));
    if (copy) {
      newest.current = copy.value;
      setInput(copy.value);
      // Typed over a revision that has been replaced since: the person decides.
      if (copy.revision === start.revision) made.changed(copy.value);
      else made.conflict({ revision: start.revision, updatedAt: start.savedAt }, copy.revision);
    }
    const leave = () => void made.flush({ leaving: true });
    const hidden = () => {
      if (document.visibilityState === 'hidden') leave();
    };
    window.addEventListener('pagehide', leave);
    document.addEventListener('visibilitychange', hidden);
    return () => {
      window.removeEventListener('pagehide', leave);
      document.removeEventListener('visibilitychange', hidden);
      made.stop();
    };
    // One saver for as long as the page shows this mailing.
  }, [view.id, start]);

  return {
    input,
    save,
    change(part) {
      const next = { ...newest.current, ...part };
      newest.current = next;
      setInput(next);
      saver.current?.changed(next);
    },
    async flush() {
      await saver.current?.flush();
      return saver.current?.state() ?? save;
    },
    keepMine() {
      const status = saver.current?.state().status;
      if (status?.kind !== 'conflict') return;
      saver.current?.goOn(status.other);
      saver.current?.changed(newest.current);
    },
    async takeOther() {
      const other = await fetchMailing(`/api/mailings/${view.id}`);
      newest.current = inputOf(other);
      setInput(newest.current);
      saver.current?.goOn({ revision: other.revision, updatedAt: other.updatedAt });
    },
  };
}

function readCopy(text: string | null): { readonly value: MailingInput; readonly revision: number } | null {
  try {
    const copy: unknown = JSON.parse(text ?? 'null');
    return typeof copy === 'object' && copy !== null && 'value' in copy && 'revision' in copy
      ? (copy as { value: MailingInput; revision: number })
      : null;
  } catch {
    return null;
  }
}
