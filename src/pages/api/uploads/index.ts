import type { APIRoute } from 'astro';
import { requireRole } from '@/features/accounts/guard.server';
import { receiveUpload } from '@/features/uploads/receive-upload.server';

export const prerender = false;

export const POST: APIRoute = async (context) => {
  const user = requireRole(context, 'author');
  return user instanceof Response ? user : receiveUpload(context.request, user);
};
