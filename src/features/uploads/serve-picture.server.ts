import { Readable } from 'node:stream';
import { openPictureFile, type PictureFile } from './storage.server';

const NAME = /^([a-f0-9]{24})(?:-(480\.webp|960\.webp|1600\.webp)|\.(jpg))$/;

/**
 * A stored picture by its file name, `<id>-<480|960|1600>.webp` or `<id>.jpg`. Whoever knows the id may see it. A picture
 * never changes, so it may be kept for ever; the headers keep a browser from taking it for anything but a picture.
 */
export async function servePicture(name: string): Promise<Response> {
  const [, id, webp, jpg] = NAME.exec(name) ?? [];
  const found = id ? await openPictureFile(id, (webp ?? jpg) as PictureFile) : null;
  if (!found)
    return new Response('There is no such picture.', {
      status: 404,
      headers: { 'content-type': 'text/plain; charset=utf-8', 'cache-control': 'no-store' },
    });
  return new Response(Readable.toWeb(found.stream) as ReadableStream, {
    headers: {
      'content-type': jpg ? 'image/jpeg' : 'image/webp',
      'content-length': String(found.length),
      'cache-control': 'public, max-age=31536000, immutable',
      'x-content-type-options': 'nosniff',
      'content-security-policy': "default-src 'none'; sandbox",
    },
  });
}
