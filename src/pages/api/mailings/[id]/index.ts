import type { APIRoute } from 'astro';
import { json, readJson } from '@/features/http/problem';
import { askedMailing, beingSent } from '@/features/mailing/mailing-answers.server';
import { mailingInputSchema } from '@/features/mailing/mailing-text-input';
import { saveMailing, viewMailing } from '@/features/mailing/mailings.server';
import { changedMeanwhile, revisionMissing, versionHeaders } from '@/features/projects/answers.server';
import { revisionIn } from '@/features/projects/revision';

/** The mailing as its page shows it, with its counts while it is being sent. */
export const GET: APIRoute = async (context) => {
  const asked = askedMailing(context);
  if (asked instanceof Response) return asked;
  return json(await viewMailing(asked.mailing, asked.user));
};

/** Saves the words over the revision named in If-Match; 412 when another save came between, 409 once it is being sent. */
export const PUT: APIRoute = async (context) => {
  const asked = askedMailing(context);
  if (asked instanceof Response) return asked;
  const revision = revisionIn(context.request.headers.get('if-match'));
  if (revision === null) return revisionMissing();
  const read = await readJson(context.request, mailingInputSchema, { maxBytes: 16 * 1024 });
  if (!read.ok) return read.response;
  const saved = saveMailing(asked.mailing, read.value, revision);
  if (saved.ok)
    return json({ revision: saved.revision, updatedAt: saved.updatedAt }, { headers: versionHeaders(saved) });
  return saved.code === 'being sent' ? beingSent() : changedMeanwhile(saved);
};
