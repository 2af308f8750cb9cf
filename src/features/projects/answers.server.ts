import { problem } from '@/features/http/problem';
import { etagOf } from './revision';
import type { Version } from './projects.server';

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

export const versionHeaders = ({ revision, updatedAt }: Version): Record<string, string> => ({
  etag: etagOf(revision),
  'last-modified': new Date(updatedAt).toUTCString(),
});
