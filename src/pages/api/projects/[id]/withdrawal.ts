import type { APIRoute } from 'astro';
import { z } from 'zod';
import { requireRole } from '@/features/accounts/guard.server';
import { putBack, REASON_LIMIT, withdraw } from '@/features/editions/withdrawal.server';
import { json, problem, readJson } from '@/features/http/problem';
import { noSuchProject, ownersDeed } from '@/features/projects/answers.server';
import { mayOwn } from '@/features/projects/project-access.server';
import { openProject } from '@/features/projects/projects.server';

const wish = z.object({
  reason: z
    .string()
    .trim()
    .min(1, 'Say why: it stands on the page for those who come by their link.')
    .max(REASON_LIMIT, `A reason has at most ${REASON_LIMIT} characters.`),
});

/** Takes the published project back from readers: `{reason}`, which its page then says. */
export const PUT: APIRoute = async (context) => {
  const user = requireRole(context, 'author');
  if (user instanceof Response) return user;
  const id = context.params.id ?? '';
  if (!openProject(id, user)) return noSuchProject();
  if (!mayOwn(id, user)) return ownersDeed();
  const read = await readJson(context.request, wish);
  if (!read.ok) return read.response;
  return withdraw(id, user, read.value.reason)
    ? json({ withdrawn: true })
    : problem(409, 'Nothing to withdraw', {
        detail: 'This project was never published, so readers have nothing of it.',
        code: 'never-published',
      });
};

/** Shows the newest edition to readers again. */
export const DELETE: APIRoute = (context) => {
  const user = requireRole(context, 'author');
  if (user instanceof Response) return user;
  const id = context.params.id ?? '';
  if (!openProject(id, user)) return noSuchProject();
  return putBack(id, user) ? json({ withdrawn: false }) : ownersDeed();
};
