import type { APIRoute } from 'astro';
import { z } from 'zod';
import { requireRole } from '@/features/accounts/guard.server';
import { json, problem, readJson } from '@/features/http/problem';
import { answerInvitation } from '@/features/projects/co-authors.server';

const reply = z.object({ accept: z.boolean() });

/** Takes or declines an invitation to work on somebody's project: `{accept}`. Answers `{project}`, its id. */
export const POST: APIRoute = async (context) => {
  const user = requireRole(context, 'author');
  if (user instanceof Response) return user;
  const read = await readJson(context.request, reply);
  if (!read.ok) return read.response;
  const project = answerInvitation(context.params.id ?? '', user, read.value);
  return project === null
    ? problem(404, 'No such invitation', {
        detail: 'This invitation no longer stands. Whoever sent it can invite you again.',
        code: 'no-such-invitation',
      })
    : json({ project });
};
