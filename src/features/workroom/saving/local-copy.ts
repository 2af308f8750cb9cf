import type { ProjectState } from '@/features/projects/project';

/** What was typed and not yet taken by the server, kept on this machine for each tab. */
export interface LocalCopy {
  /** The revision that it was made from. */
  readonly revision: number;
  readonly keptAt: number;
  readonly state: ProjectState;
}
const PREFIX = 'foldwright.desk';
const TAB = `${PREFIX}.tab`;

export interface CopyKeeper {
  keep(state: ProjectState, revision: number): void;
  drop(): void;
  /** Copies that no open tab is busy with, newest first. Reading takes them over: they are this tab's from now on. */
  takeOrphans(): Promise<readonly LocalCopy[]>;
  close(): void;
}

/**
 * Keeps copies in local storage under this tab's own name, so that two tabs never write over each other. A tab holds a lock
 * of that name while it is open: a copy without a lock was left behind by a tab that is gone.
 */
export async function openCopyKeeper(projectId: string): Promise<CopyKeeper> {
  const { tab, release } = await claimTab();
  const key = `${PREFIX}.${projectId}.${tab}`;
  return {
    keep: (state, revision) => write(key, JSON.stringify({ state, revision, keptAt: Date.now() } satisfies LocalCopy)),
    drop: () => localStorage.removeItem(key),
    async takeOrphans() {
      const held = await heldTabs();
      const copies: LocalCopy[] = [];
      for (const found of Object.keys(localStorage)) {
        const owner = found.startsWith(`${PREFIX}.${projectId}.`) ? found.slice(`${PREFIX}.${projectId}.`.length) : null;
        if (owner === null || (owner !== tab && held.has(owner))) continue;
        const copy = read(localStorage.getItem(found));
        if (copy !== null) copies.push(copy);
        if (found !== key) localStorage.removeItem(found);
      }
      return copies.sort((a, b) => b.keptAt - a.keptAt);
    },
    close: release,
  };
}

/** The name in the session survives a reload; a duplicated tab finds it locked and takes a new one. */
async function claimTab(): Promise<{ readonly tab: string; readonly release: () => void }> {
  const known = sessionStorage.getItem(TAB);
  const free = known === null ? null : await hold(known);
  if (known !== null && free !== null) return { tab: known, release: free };
  const tab = crypto.randomUUID();
  sessionStorage.setItem(TAB, tab);
  return { tab, release: (await hold(tab)) ?? (() => undefined) };
}

function hold(tab: string): Promise<(() => void) | null> {
  return new Promise((resolve) => {
    if (!('locks' in navigator)) return resolve(() => undefined);
    void navigator.locks.request(`${TAB}.${tab}`, { ifAvailable: true }, (lock) => {
      if (lock === null) return resolve(null);
      return new Promise<void>((release) => resolve(() => release()));
    });
  });
}

async function heldTabs(): Promise<ReadonlySet<string>> {
  if (!('locks' in navigator)) return new Set();
  const { held = [] } = await navigator.locks.query();
  return new Set(held.map((lock) => lock.name ?? '').filter((name) => name.startsWith(`${TAB}.`)).map((name) => name.slice(TAB.length + 1)));
}

function write(key: string, text: string): void {
  try {
    localStorage.setItem(key, text);
  } catch {
    // Storage is full or forbidden: the copy is a second net, the save goes on without it.
  }
}

function read(text: string | null): LocalCopy | null {
  try {
    const copy: unknown = JSON.parse(text ?? 'null');
    return typeof copy === 'object' && copy !== null && 'state' in copy && 'revision' in copy ? (copy as LocalCopy) : null;
  } catch {
    return null;
  }
}
