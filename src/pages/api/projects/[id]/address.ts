import type { APIRoute } from 'astro';
import { requireRole } from '@/features/accounts/guard.server';
import { json, problem, readJson } from '@/features/http/problem';
import { noSuchProject } from '@/features/projects/answers.server';
import { slugSchema } from '@/features/projects/project-input';
import { moveProject, openProject } from '@/features/projects/projects.server';

/** Gives a project that was never published another address: `{slug}`. */
export const PUT: APIRoute = async (context) => {
  const user = requireRole(context, 'author');
  if (user instanceof Response) return user;
  const id = context.params.id ?? '';
  if (!openProject(id, user)) return noSuchProject();
  const read = await readJson(context.request, slugSchema);
  if (!read.ok) return read.response;
  const moved = moveProject(id, user, read.value.slug);
  if (moved.ok) return json({ slug: moved.slug });
  if (moved.code === 'not found') return noSuchProject();
  return moved.code === 'taken'
    ? problem(409, 'Address taken', {
        detail: `Another project is at /projects/${read.value.slug}. Choose another address.`,
        code: 'address-taken',
      })
    : problem(409, 'Address fixed', {
        detail: 'A published project keeps its address: readers have links to it.',
        code: 'address-fixed',
      });
};
