import type { APIRoute } from 'astro';
import { z } from 'zod';
import { json, problem, readJson } from '@/features/http/problem';
import { askedMailing } from '@/features/mailing/mailing-answers.server';
import { beginSending, openMailing, viewMailing } from '@/features/mailing/mailings.server';

const schema = z.object({ revision: z.number().int().positive() });

/** Fixes the mailing as it was seen in `revision` and begins to send it. */
export const POST: APIRoute = async (context) => {
  const asked = askedMailing(context);
  if (asked instanceof Response) return asked;
  const read = await readJson(context.request, schema, { maxBytes: 1024 });
  if (!read.ok) return read.response;
  const begun = await beginSending(asked.mailing, read.value.revision);
  if (!begun.ok) return problem(begun.status, 'Not sent', { detail: begun.sentence, code: begun.code });
  const now = openMailing(asked.mailing.row.id, asked.user) ?? asked.mailing;
  return json(await viewMailing(now, asked.user), { status: 202 });
};
