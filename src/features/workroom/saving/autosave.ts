/** What the desk says about saving. */
export type SaveStatus =
  | { readonly kind: 'saved' }
  | { readonly kind: 'waiting' | 'saving' }
  /** The server did not take it or could not be reached; it is tried again at `retryAt`. */
  | { readonly kind: 'failed'; readonly sentence: string; readonly retryAt: number }
  /** The server will not take it as it is; the next change is tried again. */
  | { readonly kind: 'refused'; readonly sentence: string }
  /** Another tab or person saved meanwhile: nothing more is sent until one is chosen. */
  | { readonly kind: 'conflict'; readonly other: { readonly revision: number; readonly updatedAt: number } };

export interface SaveState {
  readonly status: SaveStatus;
  readonly revision: number;
  readonly savedAt: number;
}
export type SaveAnswer =
  | { readonly kind: 'saved'; readonly revision: number; readonly updatedAt: number }
  | { readonly kind: 'changed'; readonly revision: number; readonly updatedAt: number }
  | { readonly kind: 'refused'; readonly sentence: string }
  | { readonly kind: 'unreachable'; readonly sentence: string };

export interface AutosaveParts<T> {
  /** Sends a state made from `revision`. Never throws. `leaving`: the page is going away. */
  send(state: T, revision: number, options: { readonly leaving: boolean }): Promise<SaveAnswer>;
  /** Keeps a copy on this machine until the server has it. */
  keepCopy(state: T, revision: number): void;
  dropCopy(): void;
  onState(state: SaveState): void;
  readonly now: () => number;
  readonly start: { readonly revision: number; readonly savedAt: number };
}

export interface Autosave<T> {
  /** A new state to save; the newest one wins. */
  changed(state: T): void;
  /** Sends what waits at once. Resolves when nothing is under way any more. */
  flush(options?: { readonly leaving?: boolean }): Promise<void>;
  /** After a conflict was settled: goes on from this version. */
  goOn(version: { readonly revision: number; readonly updatedAt: number }): void;
  /** Says that another version is there, found before anything was sent; `base` is the revision that ours was made from. */
  conflict(other: { readonly revision: number; readonly updatedAt: number }, base?: number): void;
  stop(): void;
  readonly state: () => SaveState;
}

export const SAVE_DELAY = 1000;
const RETRY_FIRST = 2000;
const RETRY_MOST = 30_000;

/** Saves a second after the last change: one request under way, the newest state queued, a local copy until it is taken. */
export function createAutosave<T>({ send, keepCopy, dropCopy, onState, now, start }: AutosaveParts<T>): Autosave<T> {
  let state: SaveState = { status: { kind: 'saved' }, ...start };
  let queued: { readonly value: T } | null = null;
  let underWay: Promise<void> | null = null;
  let timer: ReturnType<typeof setTimeout> | null = null;
  let failures = 0;
  let stopped = false;

  const set = (status: SaveStatus, version: Partial<Omit<SaveState, 'status'>> = {}): void => {
    state = { ...state, ...version, status };
    if (!stopped) onState(state);
  };
  const wait = (ms: number): void => {
    if (timer !== null) clearTimeout(timer);
    timer = setTimeout(() => void run(false), ms);
  };

  async function run(leaving: boolean): Promise<void> {
    if (timer !== null) clearTimeout(timer);
    timer = null;
    if (underWay !== null) return underWay;
    if (queued === null || stopped || state.status.kind === 'conflict') return;
    const { value } = queued;
    queued = null;
    set({ kind: 'saving' });
    underWay = send(value, state.revision, { leaving }).then((answer) => {
      underWay = null;
      take(answer, value);
    });
    await underWay;
  }

  function take(answer: SaveAnswer, value: T): void {
    if (answer.kind === 'saved') {
      failures = 0;
      const version = { revision: answer.revision, savedAt: answer.updatedAt };
      if (queued === null) {
        dropCopy();
        set({ kind: 'saved' }, version);
      } else {
        keepCopy(queued.value, answer.revision);
        set({ kind: 'waiting' }, version);
        wait(SAVE_DELAY);
      }
      return;
    }
    queued ??= { value };
    if (answer.kind === 'changed')
      return set({ kind: 'conflict', other: { revision: answer.revision, updatedAt: answer.updatedAt } });
    if (answer.kind === 'refused') return set({ kind: 'refused', sentence: answer.sentence });
    const delay = Math.min(RETRY_MOST, RETRY_FIRST * 2 ** failures);
    failures += 1;
    set({ kind: 'failed', sentence: answer.sentence, retryAt: now() + delay });
    wait(delay);
  }

  return {
    changed(value) {
      queued = { value };
      keepCopy(value, state.revision);
      if (state.status.kind === 'conflict') return;
      if (underWay === null) {
        if (state.status.kind !== 'failed') set({ kind: 'waiting' });
        wait(SAVE_DELAY);
      }
    },
    async flush({ leaving = false } = {}) {
      await run(leaving);
      if (queued !== null && underWay === null && state.status.kind === 'waiting') await run(leaving);
    },
    goOn(version) {
      queued = null;
      failures = 0;
      dropCopy();
      set({ kind: 'saved' }, { revision: version.revision, savedAt: version.updatedAt });
    },
    conflict(other, base = state.revision) {
      if (timer !== null) clearTimeout(timer);
      set({ kind: 'conflict', other }, { revision: base });
    },
    stop() {
      stopped = true;
      if (timer !== null) clearTimeout(timer);
    },
    state: () => state,
  };
}
