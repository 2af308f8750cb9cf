import type { APIRoute } from 'astro';
import { cuttingRoute } from '@/features/editions/cutting/cutting-route.server';

/** One piece as SVG for cutting machines, at the sizing in the address. */
export const GET: APIRoute = (context) =>
  cuttingRoute(context, { of: 'piece', key: context.params.piece ?? '', format: 'svg' });
