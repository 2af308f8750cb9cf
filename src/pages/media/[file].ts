import type { APIRoute } from 'astro';
import { servePicture } from '@/features/uploads/serve-picture.server';

export const prerender = false;

export const GET: APIRoute = ({ params }) => servePicture(params.file ?? '');
