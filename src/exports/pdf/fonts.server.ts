import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { join } from 'node:path';
import { config } from '@/config.server';
import { woffToTtf } from '../woff-to-ttf.server';

export type Weight = 400 | 600 | 800;
/** Figtree comes as two files: what most texts need, and further letters of European languages. */
export type Subset = 'latin' | 'latin-ext';
export const WEIGHTS: readonly Weight[] = [400, 600, 800];
export const SUBSETS: readonly Subset[] = ['latin', 'latin-ext'];

const { resolve } = createRequire(join(config.root, 'package.json'));
const read = new Map<string, Buffer>();

/** A font file as the PDF library embeds it; read and unwrapped once, which the library would do anew for every document. */
export function fontFile(weight: Weight, subset: Subset): Buffer {
  const name = `figtree-${subset}-${weight}-normal.woff`;
  let file = read.get(name);
  if (!file) read.set(name, (file = woffToTtf(readFileSync(resolve(`@fontsource/figtree/files/${name}`)))));
  return file;
}
