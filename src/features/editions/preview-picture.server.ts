import { Resvg } from '@resvg/resvg-js';
import { drawFolded } from '@/engine';
import { drawingSvgStandalone } from '@/exports/svg/drawing';
import type { Edition } from './editions.server';
import { authorsFigures } from './models.server';

/** The size that places which preview links ask for. */
const WIDTH = 1200;
const HEIGHT = 630;
const GROUND = '#eaf3ef';
const KEPT = 50;
const kept = new Map<string, Uint8Array>();

/** A project's folded box as a PNG for previews of links, for a project without a photo. An edition never changes, nor does this. */
export function previewPicture(edition: Edition): Uint8Array {
  const found = kept.get(edition.id);
  if (found) return found;
  const { model, figures } = authorsFigures(edition);
  const box = drawFolded(model, figures, { width: WIDTH - 160, height: HEIGHT - 80 });
  const inner = drawingSvgStandalone(box).replace('<svg ', '<svg x="80" y="40" ');
  const svg = `<svg xmlns="http://www.w3.org/2000/svg" width="${WIDTH}" height="${HEIGHT}"><rect width="100%" height="100%" fill="${GROUND}"/>${inner}</svg>`;
  const png = new Resvg(svg, { font: { loadSystemFonts: false } }).render().asPng();
  if (kept.size >= KEPT) kept.clear();
  kept.set(edition.id, png);
  return png;
}
