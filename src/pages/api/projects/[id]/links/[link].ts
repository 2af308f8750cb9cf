import type { APIRoute } from 'astro';
import { requireRole } from '@/features/accounts/guard.server';
import { json, problem } from '@/features/http/problem';
import { noSuchProject } from '@/features/projects/answers.server';
import { listDraftLinks, revokeDraftLink } from '@/features/projects/draft-links.server';
import { openProject } from '@/features/projects/projects.server';

/** Makes a link to the draft stop working. */
export const DELETE: APIRoute = (context) => {
  const user = requireRole(context, 'author');
  if (user instanceof Response) return user;
  const { id = '', link = '' } = context.params;
  if (!openProject(id, user)) return noSuchProject();
  return revokeDraftLink(id, link, user)
    ? json({ links: listDraftLinks(id, user) })
    : problem(404, 'No such link', { detail: 'This project has no such link.', code: 'no-such-link' });
};
