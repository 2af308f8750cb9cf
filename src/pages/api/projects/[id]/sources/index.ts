import type { APIRoute } from 'astro';
import { z } from 'zod';
import { requireRole } from '@/features/accounts/guard.server';
import { LONGEST_SOURCE, MOST_SOURCES, SOURCE_KINDS, SOURCE_NAME_LIMIT } from '@/features/bringing-in/source';
import { keepSource, listSources } from '@/features/bringing-in/sources.server';
import { json, problem, readJson } from '@/features/http/problem';
import { noSuchProject } from '@/features/projects/answers.server';
import { openProject } from '@/features/projects/projects.server';

const wish = z.object({
  name: z.string().trim().min(1, 'Say what it is called.').max(SOURCE_NAME_LIMIT),
  kind: z.enum(SOURCE_KINDS),
  text: z
    .string()
    .min(1, 'There is nothing in it.')
    .max(LONGEST_SOURCE, `At most ${LONGEST_SOURCE} characters are kept.`),
});
/** Most letters take one byte, none more than four. */
const BYTES = 5 * 2 ** 19;

/** The originals that were brought in: `{sources}`, newest first, without their text. */
export const GET: APIRoute = (context) => {
  const user = requireRole(context, 'author');
  if (user instanceof Response) return user;
  const id = context.params.id ?? '';
  return openProject(id, user) ? json({ sources: listSources(id, user) }) : noSuchProject();
};

/** Keeps an original beside the write-up: `{name, kind, text}`. Answers `{id}`; the same text is kept once. */
export const POST: APIRoute = async (context) => {
  const user = requireRole(context, 'author');
  if (user instanceof Response) return user;
  const id = context.params.id ?? '';
  if (!openProject(id, user)) return noSuchProject();
  const read = await readJson(context.request, wish, { maxBytes: BYTES });
  if (!read.ok) return read.response;
  const kept = keepSource(id, user, read.value);
  if (kept !== null) return json(kept, { status: 201 });
  const detail = `This project keeps ${MOST_SOURCES} originals. Remove one that is no longer needed, then bring this one in.`;
  return problem(409, 'Too many originals', { detail, code: 'many-sources' });
};
