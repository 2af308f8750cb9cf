import type { Model } from '../model';
import { backToFront, dot, times, unit, vector, type Vector } from '../space';
import type { Drawing, Figures, Look, Point, Shape } from '../types';
import { labelsOn, type Placing } from './face-labels';
import { facesOf } from './folded-faces';
import { n, segment } from './path';
import { edgesOf, seeFaces, viewOf, withOutlines, type View } from './seen';

export interface FoldedDrawingOptions {
  readonly width: number;
  readonly height: number;
  /** Degrees about the upright axis; usual: the pattern's own, see `usualTurn`. */
  readonly turn?: number;
  /** Degrees looked down from above; usual: USUAL_TILT. */
  readonly tilt?: number;
  /** Share of every fold, 0 flat to 1 closed. Pieces of a box fold apart from one another and go together at last. */
  readonly share?: number;
  /** Drawing units for a millimetre; usual: as large as it fits. */
  readonly scale?: number;
  /** Keeps its size and its place while it is turned: as large as fits from every side, in the middle. */
  readonly steady?: boolean;
  /** Faces are glass, and edges behind them are drawn as hidden ones. */
  readonly seeThrough?: boolean;
  /** Names on faces that are in view and have room. */
  readonly labels?: boolean;
}
export const USUAL_TILT = 26;
/** The turn that shows a box of this pattern best, degrees. */
export const usualTurn = ({ pattern }: Model): number => pattern.turn ?? -35;

/** Marked as free of effects, so that a page that draws no folded box need not load how that is done. */
const LIGHT = /* @__PURE__ */ unit(/* @__PURE__ */ vector(-0.5, -0.55, 1.1));
const TONES = 7;
const TONE: Readonly<Record<Look, string>> = { card: 'tone', pages: 'pages', paper: 'paper' };
const PAD = 4;

/** The folded box in parallel projection, hidden faces behind others. Faces carry a tone by how the light falls on them. */
export function drawFolded(model: Model, figures: Figures, options: FoldedDrawingOptions): Drawing {
  const view = viewOf(options.turn ?? usualTurn(model), options.tilt ?? USUAL_TILT);
  const faces = withOutlines(facesOf(model, figures, options.share ?? 1), view);
  const points = faces.flatMap((face) => face.points);
  const place = (options.steady ? steadyPlace : closePlace)(points, view, options);
  const at = (point: Point) => `${n(place.x(point.x))} ${n(place.y(point.y))}`;
  const outline = (corners: readonly Point[]) => `M${corners.map(at).join('L')}Z`;
  const seen = options.seeThrough || options.labels ? seeFaces(faces, view) : [];

  const solid = () =>
    backToFront(faces, view.towards).flatMap((face): Shape[] => {
      const outward = dot(face.data.inside, view.towards) > 0 ? face.data.inside : times(face.data.inside, -1);
      const light = Math.max(0, dot(view.lit(outward), LIGHT));
      const tone = `${TONE[face.data.look]}-${Math.round((1 - light) * TONES)}`;
      const corners = face.points.map(view.project);
      const edges = corners.flatMap((corner, index) =>
        face.edges[index] ? [`M${at(corner)}L${at(corners[(index + 1) % corners.length] as Point)}`] : [],
      );
      return [
        { type: 'path', role: 'face', d: outline(corners), tone },
        ...(edges.length > 0 ? [{ type: 'path', role: 'face edge', d: edges.join('') } satisfies Shape] : []),
      ];
    });
  const glass = (): Shape[] => {
    const edges = edgesOf(seen, view);
    const path = (behind: boolean) =>
      edges
        .filter(({ hidden }) => hidden === behind)
        .map(({ from, to }) => segment(place.x(from.x), place.y(from.y), place.x(to.x), place.y(to.y)))
        .join('');
    return [
      ...seen.map(({ corners }): Shape => ({ type: 'path', role: 'glass', d: outline(corners) })),
      { type: 'path', role: 'hidden', d: path(true) },
      { type: 'path', role: 'face edge', d: path(false) },
    ];
  };
  return {
    width: options.width,
    height: options.height,
    title: model.pattern.name,
    alt: `${model.pattern.name}, ${foldedWords(options.share ?? 1)}.`,
    shapes: [
      ...(options.seeThrough ? glass() : solid()),
      ...(options.labels ? labelsOn(seen, place, { seeThrough: options.seeThrough ?? false }) : []),
    ],
  };
}

const foldedWords = (share: number): string =>
  share >= 1 ? 'folded' : share <= 0 ? 'flat, before folding' : 'partly folded';

/** Height and width of the folded box in the drawing's projection, millimetres: for drawing several at one scale. */
export function foldedExtent(
  model: Model,
  figures: Figures,
  options: { readonly turn?: number; readonly tilt?: number } = {},
): { readonly across: number; readonly up: number } {
  const view = viewOf(options.turn ?? usualTurn(model), options.tilt ?? USUAL_TILT);
  const flat = facesOf(model, figures, 1).flatMap((face) => face.points.map(view.project));
  if (flat.length === 0) return { across: 1, up: 1 };
  const { left, right, top, bottom } = boundsOf(flat);
  return { across: right - left, up: bottom - top };
}

function boundsOf(points: readonly Point[]) {
  if (points.length === 0) return { left: 0, right: 1, top: 0, bottom: 1 };
  const [xs, ys] = [points.map(({ x }) => x), points.map(({ y }) => y)];
  return { left: Math.min(...xs), right: Math.max(...xs), top: Math.min(...ys), bottom: Math.max(...ys) };
}

/** As large as it fits; stands on the lower edge, in the middle. */
function closePlace(points: readonly Vector[], view: View, options: FoldedDrawingOptions): Placing {
  const { left, right, top, bottom } = boundsOf(points.map(view.project));
  const scale =
    options.scale ??
    Math.min(
      (options.width - 2 * PAD) / Math.max(right - left, 1e-6),
      (options.height - 2 * PAD) / Math.max(bottom - top, 1e-6),
    );
  const shiftX = (options.width - (right - left) * scale) / 2 - left * scale;
  const shiftY = options.height - PAD - bottom * scale;
  return { x: (x) => x * scale + shiftX, y: (y) => y * scale + shiftY, scale };
}

/**
 * The box in an upright cylinder, which looks the same from every side and turns about its axis. From a tilt its projection
 * is as wide as the cylinder, and as tall as its height and its round top together.
 */
function steadyPlace(points: readonly Vector[], view: View, options: FoldedDrawingOptions): Placing {
  const flat = boundsOf(points);
  const upright = boundsOf(points.map(({ z }) => ({ x: 0, y: z })));
  const middle = vector((flat.left + flat.right) / 2, (flat.top + flat.bottom) / 2, (upright.top + upright.bottom) / 2);
  const radius = Math.max(1e-6, ...points.map(({ x, y }) => Math.hypot(x - middle.x, y - middle.y)));
  const rise = Math.abs(view.towards.z);
  const up = (upright.bottom - upright.top) * Math.hypot(view.towards.x, view.towards.y) + 2 * radius * rise;
  const scale = options.scale ?? Math.min((options.width - 2 * PAD) / (2 * radius), (options.height - 2 * PAD) / up);
  const centre = view.project(middle);
  return {
    x: (x) => (x - centre.x) * scale + options.width / 2,
    y: (y) => (y - centre.y) * scale + options.height / 2,
    scale,
  };
}
