import { panelNames, type LayerPieceDef, type Pattern, type PieceDef } from '@/engine';
import { freeName } from './list-edits';

/** What a new piece begins as: complete, of plain sizes, so that it is drawn at once and changed from there. */
export const STARTS = [
  { id: 'sheet', label: 'Sheet', says: 'one panel, to be divided into columns and rows' },
  { id: 'tray', label: 'Tray', says: 'a floor, four walls, a tab at every corner' },
  { id: 'strip', label: 'Strip', says: 'a strip that rolls into a tube, with a seam and teeth' },
  { id: 'fan', label: 'Fan', says: 'a regular polygon with a wall on every side' },
  { id: 'disc', label: 'Disc', says: 'a circle, with teeth or without' },
  { id: 'sector', label: 'Sector', says: 'part of a ring that rolls into a cone' },
  { id: 'outline', label: 'Outline', says: 'panels between points that you place' },
  { id: 'layer', label: 'Layer', says: 'paper glued on a face of another piece' },
] as const;
export type StartId = (typeof STARTS)[number]['id'];

/** A layer needs a piece to lie on. */
export const canStart = (pattern: Pattern, id: StartId): boolean =>
  id !== 'layer' || pattern.pieces.some((piece) => piece.builder !== 'layer');

/** A new piece of that kind, at the sizes that the pattern asks for, where there are any. */
export function startingPiece(pattern: Pattern, id: StartId): PieceDef {
  const label = STARTS.find((start) => start.id === id)?.label ?? 'Piece';
  const name = freeName(
    label,
    pattern.pieces.map((piece) => piece.name),
  );
  const sizes = sizesOf(pattern);
  const card = { name, stock: 'card' } as const;
  switch (id) {
    case 'sheet':
      return {
        ...card,
        builder: 'grid',
        columns: [{ name: 'wide', size: sizes.long }],
        rows: [{ name: 'tall', size: sizes.wide }],
        cells: [['panel panel']],
      };
    case 'tray':
      return tray(card, sizes);
    case 'strip':
      return strip(card, sizes);
    case 'fan':
      return {
        ...card,
        builder: 'fan',
        centre: 'floor',
        sides: '6',
        side: sizes.wide === '3 in' ? '2 in' : `${sizes.wide} / 2`,
        flap: { name: 'wall', shape: 'rectangle', height: sizes.tall, angle: '90°' },
        tab: { width: '1/4 in', low: '45°', high: '75°', angle: '60°' },
      };
    case 'disc':
      return { ...card, builder: 'disc', disc: 'disc', diameter: sizes.wide };
    case 'sector':
      return {
        ...card,
        builder: 'sector',
        body: 'wall',
        'inner radius': '3 in',
        'outer radius': '6 in',
        angle: '120°',
        seam: { width: '3/8 in', low: '60°', high: '60°' },
      };
    case 'outline':
      return {
        ...card,
        builder: 'outline',
        points: [
          { name: 'a', across: '0 in', along: '0 in' },
          { name: 'b', across: sizes.long, along: '0 in' },
          { name: 'c', across: sizes.long, along: sizes.wide },
          { name: 'd', across: '0 in', along: sizes.wide },
        ],
        panels: [{ name: 'panel', loop: ['a', 'b', 'c', 'd'] }],
      };
    case 'layer':
      return layer(name, pattern);
  }
}

interface Card {
  readonly name: string;
  readonly stock: 'card';
}
interface Sizes {
  readonly long: string;
  readonly wide: string;
  readonly tall: string;
}
/** The first three lengths that the reader is asked for; plain ones in their place. */
function sizesOf(pattern: Pattern): Sizes {
  const [long, wide, tall] = pattern.measures.flatMap(({ name, kind = 'length', ask }) =>
    ask && !ask.finer && kind === 'length' ? [name] : [],
  );
  return { long: long ?? '4 in', wide: wide ?? '3 in', tall: tall ?? '1 in' };
}

const tray = (card: Card, { long, wide, tall }: Sizes): PieceDef => ({
  ...card,
  builder: 'grid',
  columns: [
    { name: 'left side', size: tall },
    { name: 'length', size: long },
    { name: 'right side', size: tall },
  ],
  rows: [
    { name: 'far side', size: tall },
    { name: 'width', size: wide },
    { name: 'near side', size: tall },
  ],
  cells: [
    ['tab corner 1 on left end', 'panel far wall', 'tab corner 2 on right end'],
    ['panel left end', 'panel floor', 'panel right end'],
    ['tab corner 3 on left end', 'panel near wall', 'tab corner 4 on right end'],
  ],
  tabs: [
    { cells: ['corner 1', 'corner 3'], left: { by: '1/16 in' }, right: { from: '1/32 in', by: '1/16 in' } },
    { cells: ['corner 2', 'corner 4'], left: { from: '1/32 in', by: '1/16 in' }, right: { by: '1/16 in' } },
  ],
});

/** As long as the circle round its first width, with a toothed rim at the foot. */
const strip = (card: Card, { wide, tall }: Sizes): PieceDef => ({
  ...card,
  builder: 'grid',
  columns: [
    { name: 'round', size: `pi * ${wide}` },
    { name: 'seam', size: '1/2 in' },
  ],
  rows: [
    { name: 'tall', size: tall },
    { name: 'teeth', size: '3/8 in' },
  ],
  cells: [
    ['panel wall', 'tab seam on wall'],
    ['tab rim on wall', 'away'],
  ],
  tabs: [
    { cells: ['seam'], top: { by: '1/16 in' }, bottom: { by: '1/16 in' } },
    { cells: ['rim'], teeth: '24', 'tooth angle': '15°' },
  ],
  rolls: [{ cell: 'wall', radius: `${wide} / 2` }],
});

function layer(name: string, pattern: Pattern): LayerPieceDef {
  const host = pattern.pieces.find((piece) => piece.builder !== 'layer');
  const [face = ''] = host === undefined ? [] : panelNames(host);
  const panel = host?.builder === 'grid' ? (panelIn(host.cells.flat()) ?? face) : face;
  return {
    name,
    builder: 'layer',
    stock: 'patterned paper',
    of: host?.name ?? '',
    panels: [panel],
    margin: '1/8 in',
  };
}
const panelIn = (cells: readonly string[]): string | undefined =>
  cells.find((text) => text.startsWith('panel '))?.slice('panel '.length);
