import type { APIRoute } from 'astro';
import { z } from 'zod';
import { requireRole } from '@/features/accounts/guard.server';
import { json, problem, readJson } from '@/features/http/problem';
import { takeTurn, tooMany } from '@/features/limits/limits.server';
import { noSuchProject, ownersDeed } from '@/features/projects/answers.server';
import { inviteCoAuthor, listCoAuthors } from '@/features/projects/co-authors.server';
import { listDraftLinks } from '@/features/projects/draft-links.server';
import { openProject } from '@/features/projects/projects.server';

/** Who works on the project, and who reads it before it is published: `{people, links}`. */
export const GET: APIRoute = (context) => {
  const user = requireRole(context, 'author');
  if (user instanceof Response) return user;
  const id = context.params.id ?? '';
  if (!openProject(id, user)) return noSuchProject();
  return json({ people: listCoAuthors(id, user), links: listDraftLinks(id, user) });
};

const invitation = z.object({ email: z.string().min(1, 'Type an e-mail address.').max(320) });

/** Asks somebody to work on the project: `{email}`. The answer does not tell whether anybody has that address. */
export const POST: APIRoute = async (context) => {
  const user = requireRole(context, 'author');
  if (user instanceof Response) return user;
  const id = context.params.id ?? '';
  if (!openProject(id, user)) return noSuchProject();
  const read = await readJson(context.request, invitation);
  if (!read.ok) return read.response;
  const turn = await takeTurn('co-author', { ip: context.clientAddress });
  if (!turn.ok) return tooMany(turn);
  const invited = inviteCoAuthor(id, user, read.value.email);
  if (invited === null) return ownersDeed();
  if (!invited.ok) return problem(422, 'Not invited', { detail: invited.sentence, code: invited.code });
  return json({ people: listCoAuthors(id, user) }, { status: 201 });
};
