import type { APIRoute } from 'astro';
import { json, readJson } from '@/features/http/problem';
import { tooMany } from '@/features/limits/limits.server';
import { trySubscribing } from '@/features/subscribers/subscribe-forms.server';
import { GENERIC_ANSWER, signUpSchema } from '@/features/subscribers/sign-up';

/** The sign-up form, sent without leaving the page. Everyone gets the same answer. */
export const POST: APIRoute = async ({ request, clientAddress }) => {
  const read = await readJson(request, signUpSchema, { maxBytes: 4 * 1024 });
  if (!read.ok) return read.response;
  const asked = await trySubscribing(read.value, clientAddress);
  if (!asked.ok) return tooMany(asked);
  return json({ sentence: GENERIC_ANSWER }, { status: 202 });
};
