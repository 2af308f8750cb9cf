import type { APIRoute } from 'astro';
import { requireRole } from '@/features/accounts/guard.server';
import { json, problem } from '@/features/http/problem';
import { noSuchProject } from '@/features/projects/answers.server';
import { listCoAuthors, removeCoAuthor } from '@/features/projects/co-authors.server';
import { openProject } from '@/features/projects/projects.server';

/** Ends somebody's part in the project, or an invitation; a co-author may end their own. */
export const DELETE: APIRoute = (context) => {
  const user = requireRole(context, 'author');
  if (user instanceof Response) return user;
  const { id = '', person = '' } = context.params;
  if (!openProject(id, user)) return noSuchProject();
  return removeCoAuthor(id, person, user)
    ? json({ people: listCoAuthors(id, user) })
    : problem(404, 'Nobody to take out', {
        detail: 'Nobody of that kind works on this project.',
        code: 'no-such-person',
      });
};
