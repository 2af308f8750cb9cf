import { rulerTicks } from '@/components/ruler-ticks';
import { drawFolded, drawPiece, type Drawing, type Figures, type Model } from '@/engine';
import { esc } from '@/exports/escape';
import { LIGHT_THEME, type Theme } from '@/exports/line-styles';
import { drawingSvgStandalone } from '@/exports/svg/drawing';

/** Drawing units across; a picture is rendered larger. */
const WIDTH = 900;
/** 3 : 2, as photos are; pictures of flat things are lower. */
const HIGHEST = 600;
const ROOM = { beside: 55, between: 46, above: 56, name: 30 };
/** A first picture is shown in frames of other shapes, too, which cut off its sides. */
const ROOM_TO_CUT = 130;
/** From the table's edge, which is a ruler to the picture's own scale, to the picture's foot. */
const FOOT = 92;
const RULER = 40;

/** What a card is coloured like: lightest and darkest of its faces. */
export const CARDS = {
  plum: ['#7d3a69', '#43193a'],
  green: ['#3f9c7c', '#174a39'],
  kraft: ['#dba65f', '#8a5c20'],
  clay: ['#cf7a5b', '#7c3a26'],
  honey: ['#e8bd4f', '#8f6a14'],
  dusk: ['#6f93b8', '#2c4763'],
} as const satisfies Readonly<Record<string, Theme['card']>>;

/** A model and its figures, which may be of a pattern changed for the picture's sake. */
export interface Built {
  readonly model: Model;
  readonly figures: Figures;
}
/** Something that stands on the table or lies before it. */
export type Thing =
  | ({ readonly type: 'folded'; readonly turn?: number; readonly tilt?: number; readonly share?: number } & Built)
  | ({ readonly type: 'flat'; readonly pieces: readonly string[] } & Built);
export interface Scene {
  readonly things: readonly Thing[];
  readonly card: keyof typeof CARDS;
  /** Under the ruler, on the right; none on a picture whose sides may be cut off. */
  readonly words?: string;
  /** As tall as a photo, whatever it shows: for the first picture. */
  readonly whole?: boolean;
}

interface Placed {
  /** Millimetres. */
  readonly across: number;
  readonly up: number;
  readonly draw: (scale: number) => Drawing;
  readonly name?: string;
}

/**
 * A picture of our own: folded boxes or flat pieces, all at one scale, standing on a ruler that measures them. No sizes are
 * written on it, for the text beside it follows the reader's size and a picture cannot.
 */
export function pictureSvg(scene: Scene): string {
  const theme: Theme = { ...LIGHT_THEME, card: CARDS[scene.card] };
  const things = scene.things.flatMap(placedOf);
  const above = ROOM.above + (things.some(({ name }) => name !== undefined) ? ROOM.name : 0);
  const gaps = ROOM.between * (things.length - 1);
  const across = things.reduce((sum, thing) => sum + thing.across, 0);
  const tallest = Math.max(...things.map(({ up }) => up));
  const scale = Math.min(
    (WIDTH - 2 * (scene.whole ? ROOM_TO_CUT : ROOM.beside) - gaps) / across,
    (HIGHEST - FOOT - above) / tallest,
  );
  const height = scene.whole ? HIGHEST : Math.round(Math.min(HIGHEST, tallest * scale + above + FOOT));
  const table = height - FOOT;
  let x = (WIDTH - across * scale - gaps) / 2;
  const drawn = things.map((thing) => {
    const drawing = thing.draw(scale);
    const margin = (drawing.width - thing.across * scale) / 2;
    const top = table - drawing.height + margin - (thing.name === undefined ? 0 : 14);
    const inside = drawingSvgStandalone(drawing, theme).replace('<svg ', `<svg x="${n(x - margin)}" y="${n(top)}" `);
    const name =
      thing.name === undefined
        ? ''
        : words(thing.name, { x: x + (thing.across * scale) / 2, y: top - 8, anchor: 'middle' });
    x += thing.across * scale + ROOM.between;
    return inside + name;
  });
  return (
    `<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 ${WIDTH} ${height}" width="${WIDTH}" height="${height}">` +
    `<rect width="${WIDTH}" height="${height}" fill="${GROUND}"/>${rulerSvg({ scene, scale, table, theme })}${drawn.join('')}</svg>`
  );
}
const GROUND = '#eaf3ef';

function placedOf(thing: Thing): Placed[] {
  const { model, figures } = thing;
  if (thing.type === 'flat') {
    return thing.pieces.flatMap((name): Placed[] => {
      const piece = figures.pieces.find((one) => one.name === name);
      if (!piece) return [];
      const draw = (scale: number) =>
        drawPiece(piece, {
          ...figures.sizing,
          width: piece.across * scale + 12,
          tallest: piece.along * scale,
          scale,
          dims: false,
          labels: false,
        });
      return [
        {
          across: piece.across,
          up: piece.along,
          draw,
          name: piece.count > 1 ? `${piece.name}, ${piece.count} times` : piece.name,
        },
      ];
    });
  }
  const { turn, tilt, share } = thing;
  const view = {
    ...(turn === undefined ? {} : { turn }),
    ...(tilt === undefined ? {} : { tilt }),
    ...(share === undefined ? {} : { share }),
  };
  const { across, up } = extentOf(drawFolded(model, figures, { ...view, width: 1, height: 1, scale: 1 }));
  return [
    {
      across,
      up,
      draw: (scale) =>
        drawFolded(model, figures, { ...view, width: across * scale + 8, height: up * scale + 8, scale }),
    },
  ];
}

/** Of what is drawn at one unit a millimetre, also half folded. */
function extentOf({ shapes }: Drawing): { readonly across: number; readonly up: number } {
  const points = shapes.flatMap((shape) =>
    shape.type === 'path' ? [...shape.d.matchAll(/(-?[\d.]+)[ ,](-?[\d.]+)/gu)] : [],
  );
  const [xs, ys] = [points.map(([, x]) => Number(x)), points.map(([, , y]) => Number(y))];
  return { across: Math.max(...xs) - Math.min(...xs), up: Math.max(...ys) - Math.min(...ys) };
}

/** The table's edge: paper with ticks in the box's own units, at the scale of what stands on it. */
function rulerSvg({
  scene,
  scale,
  table,
  theme,
}: {
  scene: Scene;
  scale: number;
  table: number;
  theme: Theme;
}): string {
  const units = scene.things[0]?.figures.sizing.units ?? 'in';
  const ticks = rulerTicks({ from: 0, to: WIDTH / scale, units, width: WIDTH });
  const d = ticks.map(({ at, size }) => `M${n(at * WIDTH)} ${table}v${size}`).join('');
  const figures = ticks.flatMap(({ at, label }) =>
    label === undefined || at * WIDTH < 12 || at * WIDTH > WIDTH - 12
      ? []
      : [words(label, { x: at * WIDTH, y: table + 31, anchor: 'middle', size: 13 })],
  );
  return (
    `<rect y="${table}" width="${WIDTH}" height="${RULER}" fill="${theme.paper}"/>` +
    `<path d="M0 ${table + RULER}H${WIDTH}" stroke="${theme.line}"/>` +
    `<path d="${d}M0 ${table}H${WIDTH}" stroke="${theme.ink}" stroke-width="0.9"/>${figures.join('')}` +
    (scene.words === undefined ? '' : words(scene.words, { x: WIDTH - 24, y: table + RULER + 32, anchor: 'end' }))
  );
}

function words(
  text: string,
  { x, y, anchor, size = 16 }: { x: number; y: number; anchor: string; size?: number },
): string {
  return `<text x="${n(x)}" y="${n(y)}" text-anchor="${anchor}" font-family="Figtree" font-size="${size}" font-weight="600" fill="${LIGHT_THEME.ink}">${esc(text)}</text>`;
}

const n = (value: number): number => Math.round(value * 100) / 100;
