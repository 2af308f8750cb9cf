/** What may be handed in as a picture. The browser says so before it sends; the server checks it again. */
export const PICTURE_LIMITS = {
  /** 12 MB, as file managers count them. */
  bytes: 12 * 1024 * 1024,
  pixels: 40_000_000,
  /** Pictures kept for one project. */
  perProject: 400,
  /** Pictures that may wait for their turn. */
  waiting: 24,
} as const;
