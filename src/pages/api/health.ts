import type { APIRoute } from 'astro';
import { sqlite } from '@/db/client.server';

/** Whether the site can answer: reads the database once. Says nothing about what is in it. */
export const GET: APIRoute = () => {
  const headers = { 'content-type': 'application/json', 'cache-control': 'no-store' };
  try {
    sqlite().prepare('SELECT 1 FROM user LIMIT 1').get();
    return new Response('{"status":"ok"}', { headers });
  } catch (error) {
    console.error('The health check could not read the database:', error);
    return new Response('{"status":"no database"}', { status: 503, headers });
  }
};
