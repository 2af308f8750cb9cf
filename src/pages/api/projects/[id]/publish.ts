import type { APIRoute } from 'astro';
import { z } from 'zod';
import { requireRole } from '@/features/accounts/guard.server';
import { NOTE_LIMIT, publishEdition } from '@/features/editions/publish.server';
import { json, readJson } from '@/features/http/problem';
import { noSuchProject, publishRefused } from '@/features/projects/answers.server';
import { openProject } from '@/features/projects/projects.server';

const wish = z.object({
  revision: z.number().int().positive(),
  note: z.string().max(NOTE_LIMIT, `A correction note has at most ${NOTE_LIMIT} characters.`).optional(),
});

/** Freezes the revision that the author saw into the next edition. Answers `{n, slug}`; 422 with what stands in the way. */
export const POST: APIRoute = async (context) => {
  const user = requireRole(context, 'author');
  if (user instanceof Response) return user;
  const id = context.params.id ?? '';
  if (!openProject(id, user)) return noSuchProject();
  const read = await readJson(context.request, wish);
  if (!read.ok) return read.response;

  const published = publishEdition(id, { by: user.id, ...read.value });
  if (published.ok) return json({ n: published.edition.n, slug: published.edition.slug }, { status: 201 });
  const version = openProject(id, user);
  if (!version) return noSuchProject();
  return publishRefused(published.refusal, { sentence: published.sentence, version });
};
