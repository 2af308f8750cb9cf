import type { APIRoute } from 'astro';
import { projectFeed } from '@/features/editions/feed.server';
import { hasTag, notModified, publicHeaders, tagOf } from '@/features/editions/public-answer';

export const GET: APIRoute = ({ request }) => {
  const { xml, parts } = projectFeed();
  const tag = tagOf(['feed', ...parts]);
  if (hasTag(request, tag)) return notModified(tag);
  return new Response(xml, {
    headers: { ...publicHeaders(tag), 'content-type': 'application/atom+xml; charset=utf-8' },
  });
};
