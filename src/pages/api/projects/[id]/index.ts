import type { APIRoute } from 'astro';
import { requireRole } from '@/features/accounts/guard.server';
import { json, readJson } from '@/features/http/problem';
import {
  noSuchProject,
  ownersDeed,
  revisionMissing,
  savedAnswer,
  versionHeaders,
} from '@/features/projects/answers.server';
import { projectStateSchema, STATE_BYTES } from '@/features/projects/project-input';
import { deleteProject, openProject, saveProject } from '@/features/projects/projects.server';
import { revisionIn } from '@/features/projects/revision';

/** The whole project; its revision also stands in ETag. 304 while If-None-Match names that revision. */
export const GET: APIRoute = (context) => {
  const user = requireRole(context, 'author');
  if (user instanceof Response) return user;
  const project = openProject(context.params.id ?? '', user);
  if (!project) return noSuchProject();
  const headers = versionHeaders(project);
  return revisionIn(context.request.headers.get('if-none-match')) === project.revision
    ? new Response(null, { status: 304, headers })
    : json(project, { headers });
};

/**
 * Saves the whole state over the revision named in If-Match and answers the new one in ETag. 412 when another save came
 * between, with that version in ETag and Last-Modified.
 */
export const PUT: APIRoute = async (context) => {
  const user = requireRole(context, 'author');
  if (user instanceof Response) return user;
  const id = context.params.id ?? '';
  if (!openProject(id, user)) return noSuchProject();
  const revision = revisionIn(context.request.headers.get('if-match'));
  if (revision === null) return revisionMissing();
  const read = await readJson(context.request, projectStateSchema, { maxBytes: STATE_BYTES });
  if (!read.ok) return read.response;

  return savedAnswer(saveProject(id, user, { state: read.value, revision }));
};

/** Takes the project out of the workroom and off the site; `…/restore` brings it back. */
export const DELETE: APIRoute = (context) => {
  const user = requireRole(context, 'author');
  if (user instanceof Response) return user;
  const id = context.params.id ?? '';
  if (!openProject(id, user)) return noSuchProject();
  return deleteProject(id, user) ? json({ restore: `/api/projects/${id}/restore` }) : ownersDeed();
};
