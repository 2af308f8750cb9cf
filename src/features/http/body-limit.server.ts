import type { IncomingMessage, ServerResponse } from 'node:http';

/** Above what any route takes, so that a route can refuse in its own words what is only too much for it. */
export const LIMITS = {
  usual: 3 * 2 ** 20,
  /** A picture of 12 MB and the form round it. */
  upload: 13 * 2 ** 20,
} as const;

const isUpload = (url: string) => /^\/api\/(?:[^?#]*\/)?uploads(?:[/?#]|$)/.test(url);

/**
 * Refuses a body that is too large: at once when its length is announced, else when that much has come.
 * Gives false when it has refused.
 */
export function limitBody(req: IncomingMessage, res: ServerResponse, refuse: (max: number) => void): boolean {
  const max = isUpload(req.url ?? '') ? LIMITS.upload : LIMITS.usual;
  const announced = req.headers['content-length'];
  if (announced !== undefined) {
    if (Number(announced) <= max) return true;
    refuse(max);
    return false;
  }
  // Chunked: counted as the parser hands it over, without reading ahead of whoever reads it.
  const push = req.push.bind(req);
  let received = 0;
  req.push = (chunk: Buffer | null, encoding?: BufferEncoding) => {
    received += chunk?.length ?? 0;
    if (received <= max) return push(chunk, encoding);
    if (!req.destroyed) {
      if (!res.headersSent) refuse(max);
      req.destroy(new Error('The body is too large.'));
    }
    return false;
  };
  return true;
}
