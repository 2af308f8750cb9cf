import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { join } from 'node:path';
import { config } from '@/config.server';

export type Weight = 400 | 600 | 800;
/** Figtree comes as two files: what most texts need, and further letters of European languages. */
export type Subset = 'latin' | 'latin-ext';
export const WEIGHTS: readonly Weight[] = [400, 600, 800];
export const SUBSETS: readonly Subset[] = ['latin', 'latin-ext'];

const { resolve } = createRequire(join(config.root, 'package.json'));
const read = new Map<string, Buffer>();

/** A font file as the PDF library embeds it; read once. */
export function fontFile(weight: Weight, subset: Subset): Buffer {
  const name = `figtree-${subset}-${weight}-normal.woff`;
  let file = read.get(name);
  if (!file) read.set(name, (file = readFileSync(resolve(`@fontsource/figtree/files/${name}`))));
  return file;
}
