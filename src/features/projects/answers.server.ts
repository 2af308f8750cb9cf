import { json, problem } from '@/features/http/problem';
import { etagOf } from './revision';
import type { PublishRefusal } from '@/features/editions/publish.server';
import type { SaveOutcome, Version } from './projects.server';

/** Also for a project of someone else's: whether it exists is nobody's business. */
export const noSuchProject = (): Response =>
  problem(404, 'No such project', {
    detail: 'There is no such project among yours. Look for it in the workroom.',
    code: 'no-such-project',
  });

export const revisionMissing = (): Response =>
  problem(428, 'Which revision?', {
    detail: 'Say in If-Match which revision this changes, such as If-Match: "48".',
    code: 'revision-missing',
  });

/** The other version's revision stands in ETag, its time in Last-Modified. */
export const changedMeanwhile = ({ revision, updatedAt }: Version): Response =>
  problem(412, 'Changed meanwhile', {
    detail: `Revision ${revision} was saved from another place. Nothing was overwritten: keep yours as a new revision, or take the other.`,
    code: 'changed-meanwhile',
    headers: versionHeaders({ revision, updatedAt }),
  });

export const noSuchRevision = (): Response =>
  problem(404, 'No such revision', {
    detail: 'This revision is not kept. Older ones are thinned out: one for an hour or a day stays.',
    code: 'no-such-revision',
  });

/** For co-authors, who may not do everything. */
export const ownersDeed = (): Response =>
  problem(403, 'The owner’s to do', {
    detail: 'You work on this project with its owner, who alone may do this.',
    code: 'owner-only',
  });

/** `{revision, updatedAt}` of what was saved, or why it was not. */
export function savedAnswer(saved: SaveOutcome): Response {
  if (saved.ok)
    return json({ revision: saved.revision, updatedAt: saved.updatedAt }, { headers: versionHeaders(saved) });
  if (saved.code === 'changed meanwhile') return changedMeanwhile(saved);
  if (saved.code === 'not found') return noSuchProject();
  return problem(422, 'No such picture', {
    detail: 'The first picture is none of yours. Choose another, or put it in again.',
    code: 'no-such-picture',
  });
}

export const versionHeaders = ({ revision, updatedAt }: Version): Record<string, string> => ({
  etag: etagOf(revision),
  'last-modified': new Date(updatedAt).toUTCString(),
});

/** Why something is not published or planned: the other version, or what stands in the way. */
export function publishRefused(
  refusal: PublishRefusal,
  { sentence, version }: { readonly sentence: string; readonly version: Version },
): Response {
  if (refusal.code === 'not found') return noSuchProject();
  if (refusal.code === 'changed meanwhile') return changedMeanwhile(version);
  return problem(422, 'Not published', {
    detail: sentence,
    code: refusal.code.replaceAll(' ', '-'),
    errors:
      refusal.code === 'proof blocks'
        ? refusal.items.map((item) => ({ where: item.place.label, sentence: `${item.title}. ${item.detail}` }))
        : undefined,
  });
}
