/** What a file is by its first bytes, whatever its name says. */
export type PictureKind = 'JPEG' | 'PNG' | 'WebP' | 'GIF' | 'HEIC' | 'AVIF' | 'SVG' | 'TIFF' | 'PDF' | 'unknown';

export const ACCEPTED_KINDS: readonly PictureKind[] = ['JPEG', 'PNG', 'WebP'];

const HEIC_BRANDS = new Set(['heic', 'heix', 'hevc', 'hevx', 'heim', 'heis', 'mif1', 'msf1']);

/** Recognises a picture by content; twelve bytes suffice for all but SVG, which is text. */
export function pictureKind(bytes: Uint8Array): PictureKind {
  const ascii = (from: number, to: number) => String.fromCharCode(...bytes.subarray(from, to));
  if (bytes[0] === 0xff && bytes[1] === 0xd8 && bytes[2] === 0xff) return 'JPEG';
  if (ascii(0, 8) === '\x89PNG\r\n\x1a\n') return 'PNG';
  if (ascii(0, 4) === 'RIFF' && ascii(8, 12) === 'WEBP') return 'WebP';
  if (/^GIF8[79]a$/.test(ascii(0, 6))) return 'GIF';
  if (ascii(4, 8) === 'ftyp') {
    const brand = ascii(8, 12);
    if (brand === 'avif' || brand === 'avis') return 'AVIF';
    if (HEIC_BRANDS.has(brand)) return 'HEIC';
  }
  if (ascii(0, 4) === 'II*\0' || ascii(0, 4) === 'MM\0*') return 'TIFF';
  if (ascii(0, 5) === '%PDF-') return 'PDF';
  if (/<svg[\s>]/i.test(ascii(0, 2048))) return 'SVG';
  return 'unknown';
}
