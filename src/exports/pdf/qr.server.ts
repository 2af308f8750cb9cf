import { create } from 'qrcode';
import type { Doc } from './document.server';

/** Modules of white that readers of the code need round it. */
const QUIET = 4;

/** Text as a QR code in a square of `side` points, its white border included. A long text takes less error correction. */
export function drawQr(doc: Doc, text: string, { x, y, side }: { x: number; y: number; side: number }): void {
  const { modules } = create(text, { errorCorrectionLevel: text.length > 300 ? 'L' : 'M' });
  const { size } = modules;
  const step = side / (size + 2 * QUIET);
  for (let row = 0; row < size; row += 1) {
    let from = -1;
    for (let column = 0; column <= size; column += 1) {
      const dark = column < size && modules.get(row, column) !== 0;
      if (dark && from < 0) from = column;
      if (dark || from < 0) continue;
      doc.rect(x + (from + QUIET) * step, y + (row + QUIET) * step, (column - from) * step, step);
      from = -1;
    }
  }
  doc.fill('#000000');
}
