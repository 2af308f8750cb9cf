import type { APIRoute } from 'astro';
import { z } from 'zod';
import { requireRole } from '@/features/accounts/guard.server';
import { readJson } from '@/features/http/problem';
import { noSuchProject, revisionMissing, savedAnswer } from '@/features/projects/answers.server';
import { projectStateSchema, STATE_BYTES } from '@/features/projects/project-input';
import { openProject, saveProject } from '@/features/projects/projects.server';
import { revisionIn } from '@/features/projects/revision';

const merged = z.object({ state: projectStateSchema, setAside: projectStateSchema.optional() });

/**
 * Saves what two versions became together over the revision named in If-Match: `{state, setAside?}`. `setAside` is what one
 * of them was before parts of it gave way; it is kept as a revision of its own.
 */
export const POST: APIRoute = async (context) => {
  const user = requireRole(context, 'author');
  if (user instanceof Response) return user;
  const id = context.params.id ?? '';
  if (!openProject(id, user)) return noSuchProject();
  const revision = revisionIn(context.request.headers.get('if-match'));
  if (revision === null) return revisionMissing();
  const read = await readJson(context.request, merged, { maxBytes: 2 * STATE_BYTES });
  if (!read.ok) return read.response;
  const { state, setAside } = read.value;
  return savedAnswer(saveProject(id, user, { state, revision, kind: 'merged', ...(setAside ? { setAside } : {}) }));
};
