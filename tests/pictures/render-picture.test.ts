import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import sharp from 'sharp';
import { describe, expect, it } from 'vitest';
import { renderPicture } from '@/features/pictures/render-picture.server';
import { woffToTtf } from '@/exports/woff-to-ttf.server';

const woff = readFileSync(
  createRequire(import.meta.url).resolve('@fontsource/figtree/files/figtree-latin-600-normal.woff'),
);

describe('a font inside a WOFF file', () => {
  it('comes out with every table where its directory says, at its stated length', () => {
    const font = woffToTtf(woff);
    const tables = woff.readUInt16BE(12);
    expect(font.readUInt32BE(0)).toBe(woff.readUInt32BE(4));
    expect(font.readUInt16BE(4)).toBe(tables);
    const entries = Array.from({ length: tables }, (_, table) => {
      const at = 12 + 16 * table;
      return {
        tag: font.toString('latin1', at, at + 4),
        from: font.readUInt32BE(at + 8),
        length: font.readUInt32BE(at + 12),
      };
    });
    expect(entries.map(({ tag }) => tag)).toEqual(expect.arrayContaining(['cmap', 'glyf', 'head', 'loca']));
    expect(entries.every(({ from, length }) => from % 4 === 0 && from + length <= font.length)).toBe(true);
    // The head table says so of itself (OpenType: magicNumber at its byte 12).
    const head = entries.find(({ tag }) => tag === 'head');
    expect(font.readUInt32BE((head?.from ?? 0) + 12)).toBe(0x5f0f3cf5);
  });
  it('is refused when the file is something else', () => {
    expect(() => woffToTtf(Buffer.from('wOF2 and more bytes'))).toThrow('not a WOFF 1.0 file');
  });
});

describe('a rendered picture', () => {
  const svg = (inside: string) =>
    `<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 200 100" width="200" height="100"><rect width="200" height="100" fill="#fff"/>${inside}</svg>`;
  const text = (weight: number) =>
    svg(`<text x="20" y="60" font-family="Figtree" font-size="40" font-weight="${weight}" fill="#000">Fold</text>`);
  const ink = async (picture: Uint8Array) => {
    const { data } = await sharp(picture).greyscale().raw().toBuffer({ resolveWithObject: true });
    return data.filter((value) => value < 128).length;
  };
  it('is as wide as asked', async () => {
    expect(await sharp(await renderPicture(svg(''), { width: 400 })).metadata()).toMatchObject({
      width: 400,
      height: 200,
      format: 'png',
    });
  });
  it('has ink where there is text, and more of it where the text is bolder', async () => {
    const [none, medium, heavy] = [svg(''), text(500), text(800)].map(async (one) =>
      ink(await renderPicture(one, { width: 400 })),
    );
    expect(await none).toBe(0);
    expect(await medium).toBeGreaterThan(500);
    expect(await heavy).toBeGreaterThan(((await medium) ?? 0) * 1.2);
  });
});
