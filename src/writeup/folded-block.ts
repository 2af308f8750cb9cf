import { drawFolded } from '@/engine';
import { drawingSvg } from '@/exports/svg/drawing';
import type { LiveFigures } from './live';

/** The folded box of a write-up, as SVG; apart from other blocks, since folding is much to load for a page without one. */
export const foldedInside = ({ model, figures }: LiveFigures): string =>
  drawingSvg(drawFolded(model, figures, { width: 420, height: 320 }));
