import { etagOf, revisionIn } from '@/features/projects/revision';
import type { SaveAnswer } from '@/features/workroom/saving/autosave';
import type { MailingInput } from '../mailing-text-input';
import type { MailingView } from '../mailing-view';

const UNREACHABLE = 'The server cannot be reached. What you typed is kept on this machine.';

interface Problem {
  readonly title?: string;
  readonly detail?: string;
}
const sentenceOf = async (response: Response): Promise<string> => {
  const problem = (await response.json().catch(() => ({}))) as Problem;
  return problem.detail ?? problem.title ?? 'The server did not take it. Try again in a minute.';
};

export async function fetchMailing(path: string): Promise<MailingView> {
  const response = await fetch(path);
  if (!response.ok) throw new Error(await sentenceOf(response));
  return (await response.json()) as MailingView;
}

export async function fetchText(path: string): Promise<string> {
  const response = await fetch(path);
  if (!response.ok) throw new Error(await sentenceOf(response));
  return response.text();
}

export async function saveMailing(
  id: string,
  input: MailingInput,
  revision: number,
  { leaving }: { readonly leaving: boolean },
): Promise<SaveAnswer> {
  let response: Response;
  try {
    response = await fetch(`/api/mailings/${id}`, {
      method: 'PUT',
      headers: { 'content-type': 'application/json', 'if-match': etagOf(revision) },
      body: JSON.stringify(input),
      keepalive: leaving,
    });
  } catch {
    return { kind: 'unreachable', sentence: UNREACHABLE };
  }
  const now = revisionIn(response.headers.get('etag'));
  if (response.ok && now !== null) return { kind: 'saved', revision: now, updatedAt: Date.now() };
  if (response.status === 412 && now !== null) {
    return {
      kind: 'changed',
      revision: now,
      updatedAt: Date.parse(response.headers.get('last-modified') ?? '') || Date.now(),
    };
  }
  const sentence = await sentenceOf(response);
  return response.status >= 500 || response.status === 401 || response.status === 429
    ? { kind: 'unreachable', sentence }
    : { kind: 'refused', sentence };
}

export type Told<T> = { readonly ok: true; readonly value: T } | { readonly ok: false; readonly sentence: string };

/** One of the buttons: `test`, `send`, `pause`, `resume`, `stop`. */
export async function tell<T>(id: string, what: string, body: object = {}): Promise<Told<T>> {
  try {
    const response = await fetch(`/api/mailings/${id}/${what}`, {
      method: 'POST',
      headers: { 'content-type': 'application/json' },
      body: JSON.stringify(body),
    });
    return response.ok
      ? { ok: true, value: (await response.json()) as T }
      : { ok: false, sentence: await sentenceOf(response) };
  } catch {
    return { ok: false, sentence: 'The server cannot be reached. Nothing was done; try again.' };
  }
}
