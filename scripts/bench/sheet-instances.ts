import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { seeded } from '@/engine';

/** Rectangles to cut from sheets of one size. */
export interface Instance {
  readonly name: string;
  readonly sheet: { readonly across: number; readonly along: number };
  readonly pieces: readonly { readonly across: number; readonly along: number; readonly count: number }[];
  /** Fewest sheets that anyone has reported: turned at will, and as drawn; null when nobody has looked. */
  readonly best: { readonly turned: number; readonly drawn: number } | null;
}
export interface Instances {
  readonly from: string;
  readonly all: readonly Instance[];
}

const PUBLISHED = ['berkey-wang-1-6.json', 'martello-vigo-7-10.json'];

interface PublishedFile {
  readonly instances: readonly {
    readonly name: string;
    readonly bin: readonly [number, number];
    readonly pieces: readonly (readonly [number, number, number])[];
    readonly known: { readonly best: { readonly 'R|G3': number; readonly 'O|G3': number } };
  }[];
}

/**
 * The 500 instances of Berkey and Wang (1987) and of Martello and Vigo (1998), where `PACKING_INSTANCES` or the folder beside
 * the repository has them; they are not ours to ship. Else our own, from a seed.
 */
export function sheetInstances(): Instances {
  const folder =
    process.env.PACKING_INSTANCES ?? new URL('../../../shared/reference/packing', import.meta.url).pathname;
  if (!existsSync(folder) || !PUBLISHED.every((file) => readdirSync(folder).includes(file)))
    return { from: `our own, seeded (nothing published in ${folder})`, all: ownInstances(100) };
  const all = PUBLISHED.flatMap((file) => {
    const { instances } = JSON.parse(readFileSync(`${folder}/${file}`, 'utf8')) as PublishedFile;
    return instances.map(({ name, bin, pieces, known }): Instance => {
      return {
        name,
        sheet: { across: bin[0], along: bin[1] },
        pieces: pieces.map(([across, along, count]) => ({ across, along, count })),
        best: { turned: known.best['R|G3'], drawn: known.best['O|G3'] },
      };
    });
  });
  return { from: 'Berkey and Wang 1987, Martello and Vigo 1998', all };
}

/** Twenty to a hundred pieces from sheets of 100 by 100: mostly small, mixed, or long and narrow, in turn. */
function ownInstances(count: number): Instance[] {
  const random = seeded(1987);
  const between = (low: number, high: number) => low + Math.floor(random() * (high - low + 1));
  return Array.from({ length: count }, (_, index): Instance => {
    const pieces = Array.from({ length: 20 + 20 * (index % 5) }, () => {
      const kind = (index + (random() < 0.3 ? 1 : 0)) % 3;
      if (kind === 0) return { across: between(5, 35), along: between(5, 35), count: 1 };
      if (kind === 1) return { across: between(1, 100), along: between(1, 100), count: 1 };
      return { across: between(66, 100), along: between(1, 50), count: 1 };
    });
    return { name: `own ${index + 1}`, sheet: { across: 100, along: 100 }, pieces, best: null };
  });
}
