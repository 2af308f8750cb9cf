import type { ProjectState } from '@/features/projects/project';
import { openCopies } from './copies';

/** What was typed and not yet taken by the server, kept on this machine for each tab. */
export interface LocalCopy {
  /** The revision that it was made from, and what that held; null when it is not known. */
  readonly revision: number;
  readonly base: ProjectState | null;
  readonly keptAt: number;
  readonly state: ProjectState;
}
const PREFIX = 'foldwright.desk';
const TAB = `${PREFIX}.tab`;

export interface CopyKeeper {
  keep(copy: Omit<LocalCopy, 'keptAt'>): void;
  drop(): void;
  /** Copies that no other open tab is busy with, newest first; each stays until it is forgotten. */
  orphans(): Promise<readonly (LocalCopy & { forget(): void })[]>;
  close(): void;
}

/**
 * Keeps copies under this tab's own name, so that two tabs never write over each other. A tab holds a lock of that name while
 * it is open: a copy without a lock was left behind by a tab that is gone.
 */
export async function openCopyKeeper(projectId: string): Promise<CopyKeeper> {
  const [{ tab, release }, copies] = await Promise.all([claimTab(), openCopies()]);
  const key = `${PREFIX}.${projectId}.${tab}`;
  return {
    keep: (copy) => copies.put(key, { ...copy, keptAt: Date.now() } satisfies LocalCopy),
    drop: () => copies.remove(key),
    async orphans() {
      const held = await heldTabs();
      const prefix = `${PREFIX}.${projectId}.`;
      const found = await copies.below(prefix);
      return found
        .filter(({ key: of }) => of === key || !held.has(of.slice(prefix.length)))
        .flatMap(({ key: of, value }) => {
          const copy = readCopy(value);
          return copy === null ? [] : [{ ...copy, forget: () => copies.remove(of) }];
        })
        .sort((a, b) => b.keptAt - a.keptAt);
    },
    close() {
      copies.close();
      release();
    },
  };
}

function readCopy(value: unknown): LocalCopy | null {
  if (typeof value !== 'object' || value === null || !('state' in value) || !('revision' in value)) return null;
  const copy = value as Omit<LocalCopy, 'base'> & { readonly base?: ProjectState | null };
  return { ...copy, base: copy.base ?? null };
}

/**
 * The name in the session survives a reload; a duplicated tab finds it locked and takes a new one. After a reload the page
 * that is going may hold its lock for a moment longer, so it is asked for more than once.
 */
async function claimTab(): Promise<{ readonly tab: string; readonly release: () => void }> {
  const known = sessionStorage.getItem(TAB);
  for (let tries = 0; known !== null && tries < 5; tries += 1) {
    const free = await hold(known);
    if (free !== null) return { tab: known, release: free };
    await new Promise((resolve) => setTimeout(resolve, 150));
  }
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
  return new Set(
    held
      .map((lock) => lock.name ?? '')
      .filter((name) => name.startsWith(`${TAB}.`))
      .map((name) => name.slice(TAB.length + 1)),
  );
}
