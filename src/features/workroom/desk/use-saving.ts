import { useEffect, useRef, useState } from 'react';
import type { Choices } from '@/features/projects/merge';
import type { OpenProject, ProjectState } from '@/features/projects/project';
import { differenceWords } from '@/features/projects/project-stage';
import { createAutosave, type Autosave, type SaveState } from '../saving/autosave';
import { openCopyKeeper, type CopyKeeper } from '../saving/local-copy';
import { meet, settled, type Meeting } from '../saving/meeting';
import { sameState } from '../saving/same-state';
import type { DeskStore } from './desk-store';
import { call, fetchIfNewer, fetchProject, sendMerged, sendState } from './project-api';

export interface Notice {
  readonly words: string;
  readonly link?: { readonly href: string; readonly words: string };
}
export interface Saving {
  readonly state: SaveState;
  /** What was brought back from this machine, or what came from elsewhere; null when there is nothing to say. */
  readonly notice: Notice | null;
  /** Parts that were changed here and elsewhere, to choose between; null when there are none. */
  readonly meeting: Meeting | null;
  say(notice: Notice): void;
  dismiss(): void;
  flush(): Promise<SaveState>;
  /** Goes on with these choices; both versions stay among the revisions. */
  settle(choices: Choices): Promise<void>;
}

/** How often the desk looks whether somebody else saved, while it is seen. */
const LOOK_EVERY = 15_000;
const MEET_AGAIN = 4_000;

/**
 * Saves the desk while it is open: after a pause, when a field is left, when the page is hidden or closed. What another tab or
 * person saved is put together with what is here; only where both changed the same part does it ask.
 */
export function useSaving(store: DeskStore, project: OpenProject): Saving {
  const start = { revision: project.revision, savedAt: project.updatedAt };
  const [state, setState] = useState<SaveState>({ status: { kind: 'saved' }, ...start });
  const [notice, setNotice] = useState<Notice | null>(null);
  const [meeting, setMeeting] = useState<Meeting | null>(null);
  const autosave = useRef<Autosave<ProjectState> | null>(null);
  /** Tells the other tabs of this browser that there is a newer revision. */
  const tellTabs = useRef<() => void>(() => undefined);
  /** What the server has, as far as this tab knows: what changes here are measured against. */
  const base = useRef<ProjectState | null>(project.state);
  /** While a state is put in place that is stored already, nothing is to be saved. */
  const quiet = useRef(false);

  const takeOver = (merged: ProjectState, other: Meeting['other']) => {
    quiet.current = true;
    store.takeMerged(merged);
    quiet.current = false;
    base.current = other.state;
    setMeeting(null);
    autosave.current?.goOn(other);
    if (!sameState(merged, other.state)) autosave.current?.changed(merged);
  };

  /** Puts a newer version together with what is here, or begins to ask. */
  const receive = ({ state: otherState, revision, updatedAt }: OpenProject) => {
    const saver = autosave.current;
    if (saver === null) return;
    const other = { state: otherState, revision, updatedAt };
    const met = meet(base.current, store.$state.get(), other);
    if ('meeting' in met) {
      setMeeting(met.meeting);
      return saver.conflict(other);
    }
    const words = base.current === null ? '' : differenceWords(base.current, otherState);
    takeOver(met.merged, other);
    if (words !== '')
      setNotice({
        words: `Changes from another place came in with revision ${revision}: ${words} from before. Yours stay.`,
        link: { href: `/workroom/${project.id}/revisions`, words: 'See the revisions' },
      });
  };

  useEffect(() => {
    let keeper: CopyKeeper | null = null;
    let gone = false;
    const saver = createAutosave<ProjectState>({
      send: async (value, revision, options) => {
        const answer = await sendState(project.id, value, revision, options);
        if (answer.kind === 'saved') {
          base.current = value;
          tellTabs.current();
        }
        return answer;
      },
      keepCopy: (value, revision) => keeper?.keep({ state: value, revision, base: base.current }),
      dropCopy: () => keeper?.drop(),
      onState(now) {
        setState(now);
        if (now.status.kind === 'conflict') void meetOther();
      },
      now: Date.now,
      start,
    });
    autosave.current = saver;
    const channel = 'BroadcastChannel' in window ? new BroadcastChannel(`foldwright.desk.${project.id}`) : null;
    tellTabs.current = () => channel?.postMessage('saved');

    let meeting = false;
    /** Asks for the version that came between until it is there. */
    const meetOther = async () => {
      if (meeting) return;
      meeting = true;
      const other = await fetchProject(project.id);
      meeting = false;
      if (gone || saver.state().status.kind !== 'conflict') return;
      if (other.ok) receive(other.value);
      else setTimeout(() => void meetOther(), MEET_AGAIN);
    };
    const look = async () => {
      if (document.visibilityState === 'hidden' || saver.state().status.kind !== 'saved') return;
      const newer = await fetchIfNewer(project.id, saver.state().revision);
      if (gone || newer === null || saver.state().status.kind === 'conflict') return;
      if (newer.revision > saver.state().revision && saver.state().status.kind !== 'saving') receive(newer);
    };

    const unlisten = store.$state.listen((value) => {
      if (!quiet.current) saver.changed(value);
    });
    void openCopyKeeper(project.id).then(async (opened) => {
      if (gone) return opened.close();
      keeper = opened;
      const [copy, ...older] = await opened.orphans();
      // Typed before there was anything to keep copies in.
      if (saver.state().status.kind !== 'saved') saver.changed(store.$state.get());
      for (const other of older) if (await keepAsDraft(project.id, other.state, store.$state.get())) other.forget();
      if (copy === undefined || gone) return;
      copy.forget();
      if (sameState(copy.state, store.$state.get())) return;
      if (copy.revision === project.revision) {
        setNotice({ words: 'What was typed here and not yet saved has been brought back.' });
        store.replace(copy.state);
        return;
      }
      // Before the state is put in place: nothing may be sent over a revision that it was not made from.
      base.current = copy.base;
      quiet.current = true;
      store.replace(copy.state);
      quiet.current = false;
      opened.keep(copy);
      saver.conflict({ revision: project.revision, updatedAt: project.updatedAt }, copy.revision);
    });

    const leave = () => void saver.flush({ leaving: true });
    const seen = () => {
      if (document.visibilityState === 'hidden') leave();
      else void look();
    };
    const blurred = () => void saver.flush();
    const looking = setInterval(() => void look(), LOOK_EVERY);
    channel?.addEventListener('message', () => void look());
    window.addEventListener('pagehide', leave);
    document.addEventListener('visibilitychange', seen);
    document.addEventListener('focusout', blurred);
    window.addEventListener('online', blurred);
    return () => {
      gone = true;
      unlisten();
      saver.stop();
      keeper?.close();
      tellTabs.current = () => undefined;
      channel?.close();
      clearInterval(looking);
      window.removeEventListener('pagehide', leave);
      document.removeEventListener('visibilitychange', seen);
      document.removeEventListener('focusout', blurred);
      window.removeEventListener('online', blurred);
    };
    // The desk is opened anew for another project.
    // eslint-disable-next-line react-hooks/exhaustive-deps
  }, [store, project.id]);

  return {
    state,
    notice,
    meeting,
    say: setNotice,
    dismiss: () => setNotice(null),
    async flush() {
      const saver = autosave.current;
      if (saver === null) return state;
      await saver.flush();
      return saver.state();
    },
    async settle(choices) {
      if (meeting === null) return;
      const mine = store.$state.get();
      const outcome = settled(meeting, mine, choices);
      if ('clashes' in outcome) return setMeeting({ ...meeting, clashes: outcome.clashes });
      const { merged, gaveWay } = outcome;
      const answer = await sendMerged(project.id, meeting.other.revision, {
        state: merged,
        ...(gaveWay ? { setAside: mine } : {}),
      });
      if (answer.kind === 'changed') {
        const newer = await fetchProject(project.id);
        return newer.ok ? receive(newer.value) : setNotice({ words: newer.refusal.sentence });
      }
      if (answer.kind !== 'saved') return setNotice({ words: answer.sentence });
      tellTabs.current();
      // What was typed while it was sent is a change to what came out.
      const later = store.$state.get();
      const now = sameState(later, mine) ? { merged } : meet(mine, later, { ...answer, state: merged });
      takeOver('merged' in now ? now.merged : later, { ...answer, state: merged });
      setNotice({
        words: `Put together as revision ${answer.revision}. Both versions are among the revisions as they were.`,
        link: { href: `/workroom/${project.id}/revisions`, words: 'See the revisions' },
      });
    },
  };
}

/** Stores a state as a draft of its own, unless it says nothing that is not there already. False: it could not be stored. */
async function keepAsDraft(projectId: string, state: ProjectState, now: ProjectState): Promise<boolean> {
  if (sameState(state, now)) return true;
  return (await call(`/api/projects/${projectId}/duplicate`, { method: 'POST', body: { state } })).ok;
}
