import type { APIRoute } from 'astro';
import { z } from 'zod';
import { requireRole } from '@/features/accounts/guard.server';
import { json, problem, readJson } from '@/features/http/problem';
import { BLANK, blankPattern } from '@/features/patterns/blank-pattern';
import { getOwnPattern } from '@/features/patterns/own-patterns.server';
import { getPattern } from '@/features/patterns/patterns.server';
import { TITLE_LIMIT } from '@/features/projects/project';
import { listProjects } from '@/features/projects/project-list.server';
import { slugOf } from '@/features/projects/project-slug';
import { createProject } from '@/features/projects/projects.server';

/** The asker's projects, last touched first; an admin gets everybody's. */
export const GET: APIRoute = (context) => {
  const user = requireRole(context, 'author');
  if (user instanceof Response) return user;
  return json(listProjects(user));
};

/** A pattern's name is shorter than a project's title may be. */
const PATTERN_NAME = 80;

const newProject = z.object({
  pattern: z.string().min(1).max(80),
  title: z
    .string()
    .trim()
    .min(1, 'Give the project a title.')
    .max(TITLE_LIMIT, `A title has at most ${TITLE_LIMIT} characters.`),
});

/** A new project from a pattern of the shelf, from one of the asker's own or from blank: `{pattern, title}`. Answers `{id, slug}`. */
export const POST: APIRoute = async (context) => {
  const user = requireRole(context, 'author');
  if (user instanceof Response) return user;
  const read = await readJson(context.request, newProject);
  if (!read.ok) return read.response;
  const { title, pattern: asked } = read.value;
  const pattern =
    asked === BLANK
      ? blankPattern(title.slice(0, PATTERN_NAME), slugOf(title))
      : (getPattern(asked) ?? getOwnPattern(asked, user.id));
  if (!pattern) {
    return problem(422, 'No such pattern', {
      detail: `No pattern is called “${asked}”. Choose one from the workroom's shelf.`,
      code: 'no-such-pattern',
    });
  }
  const created = createProject(pattern, { title, asker: user });
  return json(created, { status: 201, headers: { location: `/workroom/${created.id}` } });
};
