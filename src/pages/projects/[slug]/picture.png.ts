import type { APIRoute } from 'astro';
import { getEdition } from '@/features/editions/editions.server';
import { previewPicture } from '@/features/editions/preview-picture.server';
import { hasTag, notModified, publicHeaders, tagOf } from '@/features/editions/public-answer';
import { problem } from '@/features/http/problem';

export const GET: APIRoute = async ({ params, request }) => {
  const edition = getEdition(params.slug ?? '');
  if (!edition) return problem(404, 'No such project', { code: 'not-found' });
  const tag = tagOf(['picture', edition.id]);
  if (hasTag(request, tag)) return notModified(tag);
  return new Response(new Uint8Array(await previewPicture(edition)), {
    headers: { ...publicHeaders(tag), 'content-type': 'image/png' },
  });
};
