import type { APIRoute } from 'astro';
import { cuttingRoute } from '@/features/editions/cutting/cutting-route.server';

/** Each piece in a file of its own as SVG and as DXF, at the sizing in the address. */
export const GET: APIRoute = (context) => cuttingRoute(context, { of: 'zip' });
