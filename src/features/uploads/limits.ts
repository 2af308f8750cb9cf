import { PICTURE_BYTES } from '@/writeup/pictures';

/** What may be handed in as a picture. The browser says so before it sends; the server checks it again. */
export const PICTURE_LIMITS = {
  bytes: PICTURE_BYTES,
  pixels: 40_000_000,
  /** Pictures kept for one project. */
  perProject: 400,
  /** Pictures that may wait for their turn. */
  waiting: 24,
} as const;
