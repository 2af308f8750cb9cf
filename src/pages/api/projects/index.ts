import type { APIRoute } from 'astro';
import { z } from 'zod';
import { requireRole } from '@/features/accounts/guard.server';
import { json, problem, readJson } from '@/features/http/problem';
import { getPattern } from '@/features/patterns/patterns.server';
import { TITLE_LIMIT } from '@/features/projects/project';
import { listProjects } from '@/features/projects/project-list.server';
import { createProject } from '@/features/projects/projects.server';

/** The asker's projects, last touched first; an admin gets everybody's. */
export const GET: APIRoute = (context) => {
  const user = requireRole(context, 'author');
  if (user instanceof Response) return user;
  return json(listProjects(user));
};

const newProject = z.object({
  pattern: z.string().min(1).max(80),
  title: z
    .string()
    .trim()
    .min(1, 'Give the project a title.')
    .max(TITLE_LIMIT, `A title has at most ${TITLE_LIMIT} characters.`),
});

/** A new project from a pattern: `{pattern, title}`. Answers `{id, slug}`. */
export const POST: APIRoute = async (context) => {
  const user = requireRole(context, 'author');
  if (user instanceof Response) return user;
  const read = await readJson(context.request, newProject);
  if (!read.ok) return read.response;
  const pattern = getPattern(read.value.pattern);
  if (!pattern) {
    return problem(422, 'No such pattern', {
      detail: `No pattern is called “${read.value.pattern}”. Choose one from the workroom's shelf.`,
      code: 'no-such-pattern',
    });
  }
  const created = createProject(pattern, { title: read.value.title, asker: user });
  return json(created, { status: 201, headers: { location: `/workroom/${created.id}` } });
};
