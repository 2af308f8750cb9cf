import type { APIRoute } from 'astro';
import { z } from 'zod';
import { config } from '@/config.server';
import { requireRole } from '@/features/accounts/guard.server';
import { json, problem, readJson } from '@/features/http/problem';
import { noSuchProject } from '@/features/projects/answers.server';
import { listDraftLinks, makeDraftLink } from '@/features/projects/draft-links.server';
import { openProject } from '@/features/projects/projects.server';
import { LABEL_LIMIT } from '@/features/projects/sharing';

const wish = z.object({
  label: z.string().trim().max(LABEL_LIMIT, `At most ${LABEL_LIMIT} characters say whom it is for.`),
});

/** A link by which somebody reads the project as it stands: `{label}`. Answers `{link, links}`; the link is told this once. */
export const POST: APIRoute = async (context) => {
  const user = requireRole(context, 'author');
  if (user instanceof Response) return user;
  const id = context.params.id ?? '';
  if (!openProject(id, user)) return noSuchProject();
  const read = await readJson(context.request, wish);
  if (!read.ok) return read.response;
  const made = makeDraftLink(id, user, read.value.label);
  if (made === null) {
    const detail = 'There are twenty links that work. Stop one that is no longer needed, then make another.';
    return problem(409, 'Too many links', { detail, code: 'many-links' });
  }
  const link = `${config.siteUrl}/draft/${made.token}`;
  return json({ link, links: listDraftLinks(id, user) }, { status: 201 });
};
