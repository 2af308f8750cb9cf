import type { APIRoute } from 'astro';
import { z } from 'zod';
import { requireRole } from '@/features/accounts/guard.server';
import { json, readJson } from '@/features/http/problem';
import { noSuchProject } from '@/features/projects/answers.server';
import { projectStateSchema, STATE_BYTES } from '@/features/projects/project-input';
import { duplicateProject, openProject } from '@/features/projects/projects.server';

/** `state` stands for what is stored: a tab that gives way keeps what was typed in it as a draft of its own. */
const copySchema = z.object({ state: projectStateSchema.optional() });

/** A copy as a new draft. Answers `{id, title}`. */
export const POST: APIRoute = async (context) => {
  const user = requireRole(context, 'author');
  if (user instanceof Response) return user;
  const id = context.params.id ?? '';
  if (!openProject(id, user)) return noSuchProject();
  const read = await readJson(context.request, copySchema, { maxBytes: STATE_BYTES });
  if (!read.ok) return read.response;
  const { state } = read.value;
  const copy = duplicateProject(id, user, state === undefined ? {} : { state, tail: '(from this tab)' });
  return copy ? json(copy, { status: 201, headers: { location: `/workroom/${copy.id}` } }) : noSuchProject();
};
