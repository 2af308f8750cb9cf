import { drawFolded } from '@/engine';
import { esc } from '@/exports/escape';
import { LIGHT_THEME } from '@/exports/line-styles';
import { textWidth } from '@/exports/pdf/fonts.server';
import { drawingSvgStandalone } from '@/exports/svg/drawing';
import { renderPicture } from '@/features/pictures/render-picture.server';
import { sizesTogether } from '@/features/sizing/facts';
import type { Edition } from './editions.server';
import { authorsFigures } from './models.server';

/** The size that places which preview links ask for. */
export const WIDTH = 1200;
export const HEIGHT = 630;
/** What is drawn where, in pixels: words to the left, the folded box to the right of them. */
export const WORDS = { left: 72, right: 632, top: 96, bottom: 558 } as const;
export const BOX = { left: 680, right: 1136, top: 64, bottom: 566 } as const;
export const GROUND = '#eaf3ef';

const TITLE = { leading: 1.12, largest: 68, smallest: 44, lines: 4 } as const;
const SIZE = { size: 34, leading: 46 } as const;
const MAKER = { size: 26, words: 'Foldwright' } as const;
const KEPT = 50;
const kept = new Map<string, Promise<Uint8Array>>();

/**
 * A project's folded box with its title and finished size as a PNG of 1200 × 630, for previews of links to a project without a
 * photo. An edition never changes, nor does this.
 */
export function previewPicture(edition: Edition): Promise<Uint8Array> {
  const found = kept.get(edition.id);
  if (found) return found;
  const png = renderPicture(previewSvg(edition), { width: WIDTH });
  if (kept.size >= KEPT) kept.clear();
  kept.set(edition.id, png);
  return png;
}

function previewSvg(edition: Edition): string {
  const { model, figures } = authorsFigures(edition);
  const drawing = drawFolded(model, figures, { width: BOX.right - BOX.left, height: BOX.bottom - BOX.top });
  const at = {
    x: (BOX.left + BOX.right - drawing.width) / 2,
    y: (BOX.top + BOX.bottom - drawing.height) / 2,
  };
  const box = drawingSvgStandalone(drawing).replace('<svg ', `<svg x="${at.x}" y="${at.y}" `);
  const title = titleLines(edition.title, WORDS.right - WORDS.left);
  // The font has no narrow space.
  const size = sizesTogether(figures.finished.outside, figures.sizing).replaceAll('\u202f', '\u00a0');
  const line = (text: string, y: number, look: { size: number; weight: number; colour: string }) =>
    `<text x="${WORDS.left}" y="${y}" font-family="Figtree" font-size="${look.size}" font-weight="${look.weight}" fill="${look.colour}">${esc(text)}</text>`;
  const titles = title.lines.map((text, k) =>
    line(text, WORDS.top + title.size + k * title.size * TITLE.leading, {
      size: title.size,
      weight: 800,
      colour: LIGHT_THEME.ink,
    }),
  );
  const below = WORDS.top + title.size * (1 + (title.lines.length - 1) * TITLE.leading) + SIZE.leading + 14;
  const sizes = size === '' ? '' : line(size, below, { ...SIZE, weight: 500, colour: LIGHT_THEME.ink });
  const maker = line(MAKER.words, WORDS.bottom, { ...MAKER, weight: 600, colour: LIGHT_THEME.valley });
  return `<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 ${WIDTH} ${HEIGHT}" width="${WIDTH}" height="${HEIGHT}"><rect width="${WIDTH}" height="${HEIGHT}" fill="${GROUND}"/>${titles.join('')}${sizes}${maker}${box}</svg>`;
}

/** A title in as large a size as fits it into three lines, else in four small ones that end in `…`; long words are broken. */
export function titleLines(title: string, width: number): { readonly size: number; readonly lines: readonly string[] } {
  const words = title.trim().split(/\s+/u);
  for (let size: number = TITLE.largest; size > TITLE.smallest; size -= 4) {
    const fits = fitting(size, width);
    const lines = broken(words, fits);
    if (lines.length < TITLE.lines && words.every(fits)) return { size, lines };
  }
  const fits = fitting(TITLE.smallest, width);
  const lines = broken(
    words.flatMap((word) => partsOf(word, fits)),
    fits,
  );
  if (lines.length <= TITLE.lines) return { size: TITLE.smallest, lines };
  const last = [...(lines[TITLE.lines - 1] as string)];
  while (!fits(`${last.join('')}…`)) last.pop();
  return { size: TITLE.smallest, lines: [...lines.slice(0, TITLE.lines - 1), `${last.join('')}…`] };
}

type Fits = (text: string) => boolean;
const fitting =
  (size: number, width: number): Fits =>
  (text) =>
    textWidth(text, { size, weight: 800 }) <= width;

function broken(words: readonly string[], fits: Fits): readonly string[] {
  return words.reduce<readonly string[]>((lines, word) => {
    const last = lines.at(-1);
    if (last === undefined || !fits(`${last} ${word}`)) return [...lines, word];
    return [...lines.slice(0, -1), `${last} ${word}`];
  }, []);
}

/** A word in stretches that each fit a line. */
const partsOf = (word: string, fits: Fits): readonly string[] =>
  [...word].reduce<readonly string[]>((parts, mark) => {
    const last = parts.at(-1);
    return last === undefined || !fits(last + mark) ? [...parts, mark] : [...parts.slice(0, -1), last + mark];
  }, []);
