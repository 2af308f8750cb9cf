import { same } from '../measure';
import { isInUse } from '../model/values';
import { valuesBehind, type Model } from '../model';
import { areaOf } from '../net';
import { keyOf } from '../pattern/names';
import { layOn } from '../piece';
import {
  backToFront,
  dot,
  foldNet,
  plus,
  times,
  unit,
  vector,
  type Face,
  type FoldedPanel,
  type Sheet,
  type Vector,
} from '../space';
import type { Drawing, Figures, Look, Net, PieceFigure, Shape } from '../types';
import { n } from './path';

export interface FoldedDrawingOptions {
  readonly width: number;
  readonly height: number;
  /** Degrees about the upright axis; usual: the pattern's own. */
  readonly turn?: number;
  /** Degrees looked down from above. */
  readonly tilt?: number;
  /** Share of every fold, 0 flat to 1 closed. */
  readonly share?: number;
  /** Drawing units for a millimetre; usual: as large as it fits. */
  readonly scale?: number;
}
interface Seen {
  readonly look: Look;
  readonly inside: Vector;
}
const LIGHT = unit(vector(-0.5, -0.55, 1.1));
const TONES = 7;
const TONE: Readonly<Record<Look, string>> = { card: 'tone', pages: 'pages', paper: 'paper' };
/** How far a tab is drawn inside what it is glued to: more than cutting to a grid can push it out. */
const TAB_INSET = 1;
/** How far a face that is folded back stands off. */
const DOUBLED_LIFT = 0.5;
/** How far a layer is drawn outside the card that it is glued to. */
const LAYER_LIFT = 0.3;

/** The folded box in parallel projection, hidden faces behind others. Faces carry a tone by how the light falls on them. */
export function drawFolded(model: Model, figures: Figures, options: FoldedDrawingOptions): Drawing {
  const view = viewOf(options.turn ?? model.pattern.turn ?? -35, options.tilt ?? 26);
  const faces = facesOf(model, figures, options.share ?? 1);
  const flat = faces.flatMap((face) => face.points.map(view.project));
  const [xs, ys] = [flat.map((point) => point.x), flat.map((point) => point.y)];
  const [left, right, top, bottom] =
    flat.length === 0 ? [0, 1, 0, 1] : [Math.min(...xs), Math.max(...xs), Math.min(...ys), Math.max(...ys)];
  const pad = 4;
  const scale =
    options.scale ??
    Math.min(
      (options.width - 2 * pad) / Math.max(right - left, 1e-6),
      (options.height - 2 * pad) / Math.max(bottom - top, 1e-6),
    );
  // Stands on the lower edge, in the middle.
  const shiftX = (options.width - (right - left) * scale) / 2 - left * scale;
  const shiftY = options.height - pad - bottom * scale;
  const at = (point: Vector) => {
    const { x, y } = view.project(point);
    return `${n(x * scale + shiftX)} ${n(y * scale + shiftY)}`;
  };
  const shapes = backToFront(faces, view.towards).flatMap((face): Shape[] => {
    const outward = dot(face.data.inside, view.towards) > 0 ? face.data.inside : times(face.data.inside, -1);
    const light = Math.max(0, dot(view.lit(outward), LIGHT));
    const tone = `${TONE[face.data.look]}-${Math.round((1 - light) * TONES)}`;
    const edges = face.points.flatMap((point, index) =>
      face.edges[index] ? [`M${at(point)}L${at(face.points[(index + 1) % face.points.length] as Vector)}`] : [],
    );
    return [
      { type: 'path', role: 'face', d: `M${face.points.map(at).join('L')}Z`, tone },
      ...(edges.length > 0 ? [{ type: 'path', role: 'face edge', d: edges.join('') } satisfies Shape] : []),
    ];
  });
  return {
    width: options.width,
    height: options.height,
    title: model.pattern.name,
    alt: `${model.pattern.name}, folded.`,
    shapes,
  };
}

/** Height and width of the folded box in the drawing's projection, millimetres: for drawing several at one scale. */
export function foldedExtent(
  model: Model,
  figures: Figures,
  options: { readonly turn?: number; readonly tilt?: number } = {},
): { readonly across: number; readonly up: number } {
  const view = viewOf(options.turn ?? model.pattern.turn ?? -35, options.tilt ?? 26);
  const flat = facesOf(model, figures, 1).flatMap((face) => face.points.map(view.project));
  if (flat.length === 0) return { across: 1, up: 1 };
  const [xs, ys] = [flat.map((point) => point.x), flat.map((point) => point.y)];
  return { across: Math.max(...xs) - Math.min(...xs), up: Math.max(...ys) - Math.min(...ys) };
}

function viewOf(turn: number, tilt: number) {
  const [t, d] = [(turn * Math.PI) / 180, (tilt * Math.PI) / 180];
  const spin = (p: Vector): Vector =>
    vector(p.x * Math.cos(t) - p.y * Math.sin(t), p.x * Math.sin(t) + p.y * Math.cos(t), p.z);
  return {
    /** Drawing axes: x right, y down. */
    project: (p: Vector) => {
      const s = spin(p);
      return { x: s.x, y: -(s.z * Math.cos(d) + s.y * Math.sin(d)) };
    },
    /** To the viewer, in the box's own axes. */
    towards: vector(-Math.sin(t) * Math.cos(d), -Math.cos(t) * Math.cos(d), Math.sin(d)),
    lit: spin,
  };
}

/** Every placed piece folded; tabs are moved a hair inwards, so that what they are glued to hides them or is hidden. */
function facesOf(model: Model, figures: Figures, share: number): Face<Seen>[] {
  const values = valuesBehind(figures)?.cut;
  if (!values) return [];
  return model.placements.flatMap(({ def, at, when }) => {
    if (!isInUse(when ? { when } : {}, values)) return [];
    const piece = figures.pieces.find((one) => keyOf(one.name) === keyOf(def.piece));
    if (!piece) return [];
    const made = model.pattern.pieces.find((one) => one.name === piece.name);
    const look = def.look ?? made?.look ?? 'card';
    // Walls that meet in a point hide their tabs, and leave them no room at the point.
    const pointed = share === 1 && made?.builder === 'fan' && made.flap.shape === 'triangle';
    const [x, y, z] = at.map((formula) => formula.work(values)) as [number, number, number];
    const sheets = sheetsOn(piece, model, figures);
    const folded = foldNet(piece.net, {
      root: keyOf(def.root),
      at: vector(x, y, z),
      across: def.across,
      along: def.along,
      share,
      asShown: true,
      anchor: made?.builder === 'fan' || made?.builder === 'disc' ? 'middle' : 'corner',
      sheets,
    });
    const lifts = doubled(piece.net, folded, share);
    return folded.flatMap((panel) => {
      // Teeth are glued out of sight, where narrow faces would only fight with the curve they stand on.
      if (panel.tooth || (pointed && panel.role === 'tab')) return [];
      const sheet = panel.sheet === undefined ? undefined : sheets[panel.sheet];
      const lift = lifts.get(panel.name) ?? times(panel.inside, panel.role === 'tab' ? TAB_INSET : 0);
      const shift = sheet ? plus(lift, times(panel.inside, def.over ? LAYER_LIFT : -LAYER_LIFT)) : lift;
      return {
        points: panel.points.map((point) => plus(point, shift)),
        edges: panel.edges,
        data: { look: sheet?.look ?? look, inside: panel.inside },
      };
    });
  });
}

/** The layers in use, where they lie on a flat piece. */
function sheetsOn(
  { name, net }: PieceFigure,
  { pattern }: Model,
  { pieces }: Figures,
): readonly (Sheet & { readonly look: Look })[] {
  return pieces.flatMap(({ name: own, layer }) => {
    if (!layer || layer.of !== name) return [];
    const look = pattern.pieces.find((piece) => piece.name === own)?.look ?? 'paper';
    return layer.faces.flatMap((face) => {
      const laid = layOn(net, face, layer.margin);
      return 'reason' in laid ? [] : [{ face, look, ...laid }];
    });
  });
}

/** Where card is folded back on itself, the smaller of the two faces lies a hair above the larger, on the side it is folded to. */
function doubled(net: Net, folded: readonly FoldedPanel[], share: number): ReadonlyMap<string, Vector> {
  const lifts = new Map<string, Vector>();
  for (const { panels, angle, shown, kind } of share === 1 ? net.folds : []) {
    // A fold that says how it is shown stands as it says.
    if (!same(angle, 180) || shown !== undefined) continue;
    const [small, large] = net.panels
      .filter(({ name }) => panels.includes(name))
      .sort((a, b) => areaOf(a.loop) - areaOf(b.loop));
    const under = folded.find((panel) => panel.name === large?.name);
    if (!small || !under || (kind === 'mountain' && lifts.has(small.name))) continue;
    lifts.set(small.name, times(under.inside, kind === 'valley' ? DOUBLED_LIFT : -DOUBLED_LIFT));
  }
  return lifts;
}
