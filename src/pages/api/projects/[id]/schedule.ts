import type { APIRoute } from 'astro';
import { z } from 'zod';
import { requireRole } from '@/features/accounts/guard.server';
import { NOTE_LIMIT } from '@/features/editions/publish.server';
import { dropPlan, plannedFor, planEdition } from '@/features/editions/schedule.server';
import { json, problem, readJson } from '@/features/http/problem';
import { noSuchProject, publishRefused } from '@/features/projects/answers.server';
import { openProject } from '@/features/projects/projects.server';

/** What is planned: `{planned}`, null when nothing is. */
export const GET: APIRoute = (context) => {
  const user = requireRole(context, 'author');
  if (user instanceof Response) return user;
  const id = context.params.id ?? '';
  return openProject(id, user) ? json({ planned: plannedFor(id, user) }) : noSuchProject();
};

const wish = z.object({
  revision: z.number().int().positive(),
  note: z.string().max(NOTE_LIMIT, `A correction note has at most ${NOTE_LIMIT} characters.`).default(''),
  /** Milliseconds since 1970, UTC. */
  publishAt: z.number().int().positive(),
});

/** Plans the revision that the author saw to be published by itself. Answers `{planned}`. */
export const PUT: APIRoute = async (context) => {
  const user = requireRole(context, 'author');
  if (user instanceof Response) return user;
  const id = context.params.id ?? '';
  const project = openProject(id, user);
  if (!project) return noSuchProject();
  const read = await readJson(context.request, wish);
  if (!read.ok) return read.response;
  const outcome = planEdition(id, user, read.value);
  if (outcome.ok) return json({ planned: outcome.planned });
  if (outcome.refusal.code === 'bad time')
    return problem(422, 'Not planned', { detail: outcome.sentence, code: 'bad-time' });
  return publishRefused(outcome.refusal, { sentence: outcome.sentence, version: project });
};

/** Drops what is planned; the project stays as it is. */
export const DELETE: APIRoute = (context) => {
  const user = requireRole(context, 'author');
  if (user instanceof Response) return user;
  const id = context.params.id ?? '';
  if (!openProject(id, user)) return noSuchProject();
  dropPlan(id, user);
  return json({ planned: null });
};
