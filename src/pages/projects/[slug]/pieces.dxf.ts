import type { APIRoute } from 'astro';
import { cuttingRoute } from '@/features/editions/cutting/cutting-route.server';

/** Every piece side by side as DXF for cutting machines, at the sizing in the address. */
export const GET: APIRoute = (context) => cuttingRoute(context, { of: 'all', format: 'dxf' });
