import { useEffect, useRef, useState } from 'react';
import type { OpenProject, ProjectState } from '@/features/projects/project';
import { createAutosave, type Autosave, type SaveState } from '../saving/autosave';
import { openCopyKeeper, type CopyKeeper } from '../saving/local-copy';
import { sameState } from '../saving/same-state';
import type { DeskStore } from './desk-store';
import { call, fetchProject, sendState } from './project-api';

export interface Saving {
  readonly state: SaveState;
  /** What was brought back from this machine, or what became of a conflict; null when there is nothing to say. */
  readonly notice: { readonly words: string; readonly link?: { readonly href: string; readonly words: string } } | null;
  say(notice: NonNullable<Saving['notice']>): void;
  dismiss(): void;
  flush(): Promise<SaveState>;
  keepMine(): Promise<void>;
  takeOther(): Promise<void>;
}

/** Saves the desk while it is open: after a pause, when a field is left, when the page is hidden or closed. */
export function useSaving(store: DeskStore, project: OpenProject): Saving {
  const start = { revision: project.revision, savedAt: project.updatedAt };
  const [state, setState] = useState<SaveState>({ status: { kind: 'saved' }, ...start });
  const [notice, setNotice] = useState<Saving['notice']>(null);
  const autosave = useRef<Autosave<ProjectState> | null>(null);
  /** While a state is put in place that is stored already, nothing is to be saved. */
  const quiet = useRef(false);

  useEffect(() => {
    let keeper: CopyKeeper | null = null;
    let gone = false;
    const saver = createAutosave<ProjectState>({
      send: (value, revision, options) => sendState(project.id, value, revision, options),
      keepCopy: (value, revision) => keeper?.keep(value, revision),
      dropCopy: () => keeper?.drop(),
      onState: setState,
      now: Date.now,
      start,
    });
    autosave.current = saver;

    const unlisten = store.$state.listen((value) => {
      if (!quiet.current) saver.changed(value);
    });
    void openCopyKeeper(project.id).then(async (opened) => {
      if (gone) return opened.close();
      keeper = opened;
      const [copy, ...older] = await opened.orphans();
      for (const other of older) if (await keepAsDraft(project.id, other.state, store.$state.get())) other.forget();
      if (copy === undefined || gone) return;
      copy.forget();
      if (sameState(copy.state, store.$state.get())) return;
      if (copy.revision === project.revision) {
        setNotice({ words: 'What was typed here and not yet saved has been brought back.' });
      } else {
        // Before the state is put in place: nothing may be sent over a revision that it was not made from.
        saver.conflict({ revision: project.revision, updatedAt: project.updatedAt }, copy.revision);
      }
      store.replace(copy.state);
    });

    const leave = () => void saver.flush({ leaving: true });
    const hidden = () => {
      if (document.visibilityState === 'hidden') leave();
    };
    const blurred = () => void saver.flush();
    window.addEventListener('pagehide', leave);
    document.addEventListener('visibilitychange', hidden);
    document.addEventListener('focusout', blurred);
    window.addEventListener('online', blurred);
    return () => {
      gone = true;
      unlisten();
      saver.stop();
      keeper?.close();
      window.removeEventListener('pagehide', leave);
      document.removeEventListener('visibilitychange', hidden);
      document.removeEventListener('focusout', blurred);
      window.removeEventListener('online', blurred);
    };
    // The desk is opened anew for another project.
    // eslint-disable-next-line react-hooks/exhaustive-deps
  }, [store, project.id]);

  return {
    state,
    notice,
    say: setNotice,
    dismiss: () => setNotice(null),
    async flush() {
      const saver = autosave.current;
      if (saver === null) return state;
      await saver.flush();
      return saver.state();
    },
    async keepMine() {
      const saver = autosave.current;
      const { status } = saver?.state() ?? state;
      if (saver === null || status.kind !== 'conflict') return;
      const mine = store.$state.get();
      const answer = await sendState(project.id, mine, status.other.revision, { leaving: false, keepOther: true });
      if (answer.kind === 'saved') {
        saver.goOn(answer);
        if (store.$state.get() !== mine) saver.changed(store.$state.get());
        setNotice({
          words: `Yours is revision ${answer.revision} now. The other is in the workroom as a draft of its own, “(from the other tab)”.`,
          link: { href: '/workroom', words: 'Open the workroom' },
        });
      } else if (answer.kind === 'changed') saver.conflict(answer);
      else setNotice({ words: answer.sentence });
    },
    async takeOther() {
      const saver = autosave.current;
      if (saver === null) return;
      const copy = await call<{ id: string; title: string }>(`/api/projects/${project.id}/duplicate`, {
        method: 'POST',
        body: { state: store.$state.get() },
      });
      if (!copy.ok) return setNotice({ words: copy.refusal.sentence });
      const other = await fetchProject(project.id);
      if (!other.ok) return setNotice({ words: other.refusal.sentence });
      quiet.current = true;
      store.replace(other.value.state);
      quiet.current = false;
      saver.goOn(other.value);
      setNotice({
        words: `The other is shown now, revision ${other.value.revision}. Yours is kept as the draft “${copy.value.title}”.`,
        link: { href: `/workroom/${copy.value.id}`, words: 'Open it' },
      });
    },
  };
}

/** Stores a state as a draft of its own, unless it says nothing that is not there already. False: it could not be stored. */
async function keepAsDraft(projectId: string, state: ProjectState, now: ProjectState): Promise<boolean> {
  if (sameState(state, now)) return true;
  return (await call(`/api/projects/${projectId}/duplicate`, { method: 'POST', body: { state } })).ok;
}
