import type { OpenProject, ProjectState } from '@/features/projects/project';
import { etagOf, revisionIn } from '@/features/projects/revision';
import type { SaveAnswer } from '../saving/autosave';

/** What the server says when it refuses, as words for a person. */
export interface Refusal {
  readonly sentence: string;
  readonly code: string;
  readonly errors: readonly { readonly where: string; readonly sentence: string }[];
}
export type Answer<T> = { readonly ok: true; readonly value: T } | { readonly ok: false; readonly refusal: Refusal };

const UNREACHABLE = 'The server cannot be reached. What you typed is kept on this machine.';

/** A browser takes at most 64 kB with a page that is going away. */
const LEAVING_BYTES = 60_000;

export async function sendState(
  id: string,
  state: ProjectState,
  revision: number,
  { leaving }: { readonly leaving: boolean },
): Promise<SaveAnswer> {
  const body = JSON.stringify(state);
  return save(`/api/projects/${id}`, {
    method: 'PUT',
    headers: { 'content-type': 'application/json', 'if-match': etagOf(revision) },
    body,
    keepalive: leaving && body.length < LEAVING_BYTES,
  });
}

/** Sends what two versions became together, with the one that gave way in parts, over the other's revision. */
export const sendMerged = (
  id: string,
  revision: number,
  merged: { readonly state: ProjectState; readonly setAside?: ProjectState },
): Promise<SaveAnswer> =>
  save(`/api/projects/${id}/merge`, {
    method: 'POST',
    headers: { 'content-type': 'application/json', 'if-match': etagOf(revision) },
    body: JSON.stringify(merged),
  });

async function save(path: string, request: RequestInit): Promise<SaveAnswer> {
  let response: Response;
  try {
    response = await fetch(path, request);
  } catch {
    return { kind: 'unreachable', sentence: UNREACHABLE };
  }
  const now = revisionIn(response.headers.get('etag'));
  if (response.ok && now !== null) {
    const saved: unknown = await response.json();
    const updatedAt =
      typeof saved === 'object' && saved !== null && 'updatedAt' in saved ? Number(saved.updatedAt) : Date.now();
    return { kind: 'saved', revision: now, updatedAt };
  }
  if (response.status === 412 && now !== null) {
    return {
      kind: 'changed',
      revision: now,
      updatedAt: Date.parse(response.headers.get('last-modified') ?? '') || Date.now(),
    };
  }
  const { sentence } = await refusalIn(response);
  return response.status >= 500 || response.status === 401 || response.status === 429
    ? { kind: 'unreachable', sentence }
    : { kind: 'refused', sentence };
}

/** Any other call of the API: its JSON, or what it refused and why. */
export async function call<T>(
  path: string,
  { method = 'GET', body }: { readonly method?: 'GET' | 'POST' | 'PUT' | 'DELETE'; readonly body?: unknown } = {},
): Promise<Answer<T>> {
  try {
    const response = await fetch(path, {
      method,
      ...(body === undefined ? {} : { headers: { 'content-type': 'application/json' }, body: JSON.stringify(body) }),
    });
    if (!response.ok) return { ok: false, refusal: await refusalIn(response) };
    return { ok: true, value: (await response.json()) as T };
  } catch {
    return { ok: false, refusal: { sentence: UNREACHABLE, code: 'unreachable', errors: [] } };
  }
}

export const fetchProject = (id: string): Promise<Answer<OpenProject>> => call(`/api/projects/${id}`);

/** The project when it has another revision than this; null when it has not, or when the server cannot be asked. */
export async function fetchIfNewer(id: string, revision: number): Promise<OpenProject | null> {
  try {
    const response = await fetch(`/api/projects/${id}`, { headers: { 'if-none-match': etagOf(revision) } });
    return response.ok ? ((await response.json()) as OpenProject) : null;
  } catch {
    return null;
  }
}

async function refusalIn(response: Response): Promise<Refusal> {
  const fallback = {
    sentence: `The server answered ${response.status}. Try again in a moment.`,
    code: 'unknown',
    errors: [],
  };
  try {
    const said = (await response.json()) as {
      detail?: string;
      title?: string;
      code?: string;
      errors?: Refusal['errors'];
    };
    return {
      sentence: said.detail ?? said.title ?? fallback.sentence,
      code: said.code ?? 'unknown',
      errors: said.errors ?? [],
    };
  } catch {
    return fallback;
  }
}
