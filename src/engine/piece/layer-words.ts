import { coincident, same } from '../measure';
import { boundsOf } from '../net';
import type { Arc, Curve, Loop, Net, PieceFigure, Sentence } from '../types';
import { cuttingOut } from './cut-words';
import { holes } from './line-words';
import type { WordsOptions } from './words';

type Figure = WordsOptions['figure'];

/** The making of a layer after its blank is cut: its edge, its holes, and where it is glued. Nothing for other pieces. */
export function layerWords(options: WordsOptions): Sentence[] {
  const { layer } = options;
  if (!layer) return [];
  return [...edgeWords(options), ...holes(options), glueWords(layer, options.count ?? 1, options.figure)];
}

const isSquare = (curve: Curve): boolean =>
  curve.type === 'line' && (coincident(curve.from.x, curve.to.x) || coincident(curve.from.y, curve.to.y));
const isOneCircle = (loop: Loop): loop is readonly Arc[] =>
  loop.every(
    (curve, _, [first]) =>
      curve.type === 'arc' &&
      first?.type === 'arc' &&
      coincident(curve.centre.x, first.centre.x) &&
      coincident(curve.centre.y, first.centre.y),
  );

function edgeWords(options: WordsOptions): Sentence[] {
  const { net, figure } = options;
  const { outline } = net;
  if (outline.length === 4 && outline.every(isSquare)) return [];
  if (isOneCircle(outline))
    return [['Draw a circle of ', figure(2 * (outline[0]?.radius ?? 0)), ' diameter and cut it out.']];
  const rounded = roundedCorners(net);
  if (rounded) {
    const radii = rounded
      .map(({ radius }) => radius)
      .filter((radius, index, all) => all.findIndex((one) => same(one, radius)) === index);
    return radii.map((radius) => {
      const names = rounded.filter((corner) => same(corner.radius, radius)).map(({ name }) => name);
      const which =
        names.length === 4 ? 'four corners' : `${names.join(' and ')} corner${names.length === 1 ? '' : 's'}`;
      return [`Round the ${which} to a radius of `, figure(radius), '.'];
    });
  }
  return cuttingOut(options);
}

/** The rounded corners of an upright rectangle that has no other; null for any other shape. */
function roundedCorners({ outline }: Net): readonly { readonly name: string; readonly radius: number }[] | null {
  const { left, top, right, bottom } = boundsOf(outline);
  const arcs = outline.filter((curve): curve is Arc => curve.type === 'arc');
  if (outline.length !== 4 + arcs.length || !outline.every((curve) => curve.type === 'arc' || isSquare(curve)))
    return null;
  const corners = arcs.map(({ from, to, centre, radius, clockwise }) => {
    // A quarter circle that leaves one side of the rectangle square and meets the next.
    const x = coincident(centre.x, left + radius) ? 'left' : coincident(centre.x, right - radius) ? 'right' : null;
    const y = coincident(centre.y, top + radius) ? 'top' : coincident(centre.y, bottom - radius) ? 'bottom' : null;
    const quarter =
      coincident(Math.abs(from.x - to.x), radius) && coincident(Math.abs(from.y - to.y), radius) && clockwise;
    return x && y && quarter ? { name: `${y} ${x}`, radius } : null;
  });
  return corners.some((corner) => corner === null) ? null : (corners as { name: string; radius: number }[]);
}

function glueWords({ of, faces, margin }: NonNullable<PieceFigure['layer']>, count: number, figure: Figure): Sentence {
  const host = of.toLowerCase();
  const named = (face: readonly string[]) => face.map((name) => `“${name}”`).join(' with ');
  const [first = []] = faces;
  const numbered = faces.length > 2 && faces.every(([name = ''], index) => name === `${stemOf(first)} ${index + 1}`);
  const what = numbered
    ? `every “${stemOf(first)}”`
    : faces.length > 1
      ? faces.map(named).join(' and of ')
      : `${count > 1 ? 'each ' : ''}${named(first)}`;
  const ofHost = first.length === 1 && first[0] === host ? '' : ` of the ${host}`;
  return [
    `Glue ${faces.length > 1 || count > 1 ? 'one' : 'it'} to the outside of ${what}${ofHost}, `,
    figure(margin),
    ' from every edge.',
  ];
}
const stemOf = ([name = '']: readonly string[]): string => name.replace(/ 1$/, '');
