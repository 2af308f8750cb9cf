import type { APIRoute } from 'astro';
import { getCollection } from 'astro:content';
import { config } from '@/config.server';
import { listPublished } from '@/features/editions/editions.server';
import { hasTag, notModified, publicHeaders, tagOf } from '@/features/editions/public-answer';
import { sitemap } from '@/features/editions/sitemap';

/** One sitemap may list this many addresses. */
const MOST = 50_000;

export const GET: APIRoute = async ({ request }) => {
  const guides = (await getCollection('handbook')).map(({ id }) => ({ path: `/handbook/${id}` }));
  const boxes = (await getCollection('boxes')).map(({ id }) => ({ path: `/handbook/boxes/${id}` }));
  const projects = listPublished({ limit: MOST - guides.length - boxes.length - 4 }).map(({ slug, publishedAt }) => ({
    path: `/projects/${slug}`,
    changed: publishedAt,
  }));
  const places = [
    { path: '/' },
    { path: '/projects' },
    { path: '/handbook' },
    { path: '/subscribe' },
    ...guides,
    ...boxes,
    ...projects,
  ];
  const xml = sitemap(config.siteUrl, places);
  const tag = tagOf(['sitemap', xml]);
  if (hasTag(request, tag)) return notModified(tag);
  return new Response(xml, { headers: { ...publicHeaders(tag), 'content-type': 'application/xml; charset=utf-8' } });
};
