import { existsSync, mkdirSync, readFileSync, renameSync, writeFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { join } from 'node:path';
import { renderAsync } from '@resvg/resvg-js';
import { config } from '@/config.server';
import { underFirstName, woffToTtf } from '@/exports/woff-to-ttf.server';

const WEIGHTS = [500, 600, 800] as const;
const { resolve } = createRequire(join(config.root, 'package.json'));

/** Figtree as the renderer reads it: from files alone, and TrueType alone. Unwrapped once and kept in the data folder. */
function fontFiles(): string[] {
  const folder = join(config.dataDir, 'fonts');
  mkdirSync(folder, { recursive: true });
  return WEIGHTS.map((weight) => {
    const file = join(folder, `figtree-${weight}.ttf`);
    if (!existsSync(file)) {
      const whole = underFirstName(
        woffToTtf(readFileSync(resolve(`@fontsource/figtree/files/figtree-latin-${weight}-normal.woff`))),
      );
      // Renamed into place, so that no one reads half a font.
      const unfinished = `${file}.${process.pid}`;
      writeFileSync(unfinished, whole);
      renameSync(unfinished, file);
    }
    return file;
  });
}

/** An SVG file as PNG, `width` pixels wide, its text in Figtree. */
export async function renderPicture(svg: string, { width }: { readonly width: number }): Promise<Uint8Array> {
  const rendered = await renderAsync(svg, {
    fitTo: { mode: 'width', value: width },
    font: { loadSystemFonts: false, fontFiles: fontFiles(), defaultFontFamily: 'Figtree' },
  });
  return rendered.asPng();
}
