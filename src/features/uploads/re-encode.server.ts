import sharp, { type Sharp } from 'sharp';
import { PICTURE_WIDTHS } from '@/writeup/pictures';
import { PICTURE_LIMITS } from './limits';
import type { PictureFile } from './storage.server';

// SVG, PDF and the general loaders can reach files and run programs; nothing here needs them.
sharp.block({ operation: ['VipsForeignLoadSvg', 'VipsForeignLoadPdf', 'VipsForeignLoadMagick'] });

const LARGEST = PICTURE_WIDTHS[PICTURE_WIDTHS.length - 1] ?? 1600;
/** A picture is kept at most this many times as tall as it is wide; WebP ends at 16,383 pixels. */
const TALLEST = 4;

export interface ReEncoded {
  readonly width: number;
  readonly height: number;
  readonly files: ReadonlyMap<PictureFile, Uint8Array>;
}

/**
 * Decodes a JPEG, PNG or WebP once and encodes it anew: upright, sRGB, without EXIF, place or profile, the first picture
 * of an animation alone. Never enlarges. Throws what sharp throws for damage and for too many pixels.
 */
export async function reEncode(bytes: Uint8Array): Promise<ReEncoded> {
  const options = { limitInputPixels: PICTURE_LIMITS.pixels, failOn: 'error', autoOrient: true } as const;
  const { data, info } = await sharp(bytes, options)
    .resize({ width: LARGEST, height: LARGEST * TALLEST, fit: 'inside', withoutEnlargement: true })
    .toColourspace('srgb')
    .raw({ depth: 'uchar' })
    .toBuffer({ resolveWithObject: true });
  const upright = () => sharp(data, { raw: { width: info.width, height: info.height, channels: info.channels } });
  const narrowed = (width: number) => upright().resize({ width, withoutEnlargement: true });

  const encoded = async (file: PictureFile, picture: Sharp) => [file, await picture.toBuffer()] as const;

  // Side by side, for each encoder keeps to one core.
  const files = await Promise.all([
    ...PICTURE_WIDTHS.map((width) => encoded(`${width}.webp`, narrowed(width).webp({ quality: 78 }))),
    encoded('jpg', narrowed(1200).flatten({ background: '#ffffff' }).jpeg({ quality: 80, mozjpeg: true })),
  ]);
  return { width: info.width, height: info.height, files: new Map(files) };
}
