import type { APIRoute } from 'astro';
import { requireRole } from '@/features/accounts/guard.server';
import { forgetSource, listSources, sourceText } from '@/features/bringing-in/sources.server';
import { json, problem } from '@/features/http/problem';
import { noSuchProject } from '@/features/projects/answers.server';
import { openProject } from '@/features/projects/projects.server';

const noSuchSource = (): Response =>
  problem(404, 'No such original', { detail: 'This project keeps no such text.', code: 'no-such-source' });

/** One original as it was brought in: `{text}`. */
export const GET: APIRoute = (context) => {
  const user = requireRole(context, 'author');
  if (user instanceof Response) return user;
  const { id = '', source = '' } = context.params;
  if (!openProject(id, user)) return noSuchProject();
  const text = sourceText(id, source, user);
  return text === null ? noSuchSource() : json({ text });
};

/** Forgets an original. The write-up stays as it is. */
export const DELETE: APIRoute = (context) => {
  const user = requireRole(context, 'author');
  if (user instanceof Response) return user;
  const { id = '', source = '' } = context.params;
  if (!openProject(id, user)) return noSuchProject();
  return forgetSource(id, source, user) ? json({ sources: listSources(id, user) }) : noSuchSource();
};
