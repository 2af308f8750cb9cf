import type { APIRoute } from 'astro';
import { paperRoute } from '@/features/editions/paper/paper-route.server';

/** Every piece at true size, at the sizing in the address, for `paper=a4` or `paper=letter`. */
export const GET: APIRoute = (context) => paperRoute(context, 'templates');
