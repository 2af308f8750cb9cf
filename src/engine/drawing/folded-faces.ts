import { same } from '../measure';
import { isInUse } from '../model/values';
import { valuesBehind, type Model } from '../model';
import { areaOf } from '../net';
import { keyOf } from '../pattern/names';
import { layOn } from '../piece';
import { foldNet, plus, times, vector, type Face, type FoldedPanel, type Sheet, type Vector } from '../space';
import type { Figures, Look, Net, PieceFigure } from '../types';
import { shiftsApart, waysOut, type Way } from './apart';

/** What a face of the folded box belongs to. */
export interface Seen {
  readonly look: Look;
  readonly inside: Vector;
  readonly panel: string;
  /** Number of the placed piece, from 0, in the pattern's order. */
  readonly placed: number;
  /** The panel's words, on one facet of it alone; absent on tabs and on layers. */
  readonly words?: string;
}
type Faces = readonly Face<Seen>[];

/** How far a tab is drawn inside what it is glued to: more than cutting to a grid can push it out. */
const TAB_INSET = 1;
/** How far a face that is folded back stands off. */
const DOUBLED_LIFT = 0.5;
/** How far a layer is drawn outside the card that it is glued to. */
const LAYER_LIFT = 0.3;
/** Pieces are folded when this share is reached; from there they only go together. */
const FOLDED_AT = 0.8;

/**
 * Every placed piece with a share of its folds made, 0 flat to 1 closed. A box of several pieces folds them apart from one
 * another and puts them together at last, so that no piece goes through another.
 */
export function facesOf(model: Model, figures: Figures, share: number): Faces {
  if (share >= 1) return placedPieces(model, figures, 1).flat();
  const ways = waysOf(model, figures);
  const folding = ways.length > 1 ? Math.min(1, share / FOLDED_AT) : share;
  const apart = ways.length > 1 ? Math.min(1, (1 - share) / (1 - FOLDED_AT)) : 0;
  const placed = placedPieces(model, figures, folding);
  const shifts = shiftsApart(placed, ways);
  return placed.flatMap((faces, index) => {
    const shift = times(shifts[index] as Vector, apart);
    return faces.map((face) => ({ ...face, points: face.points.map((point) => plus(point, shift)) }));
  });
}

/** How the pieces of a box come out of one another is asked for every picture of it, and stays the same. */
const known = new WeakMap<Figures, readonly Way[]>();
function waysOf(model: Model, figures: Figures): readonly Way[] {
  const ways = known.get(figures) ?? waysOut(placedPieces(model, figures, 1));
  known.set(figures, ways);
  return ways;
}

/** Each placed piece folded; tabs are moved a hair inwards, so that what they are glued to hides them or is hidden. */
function placedPieces(model: Model, figures: Figures, share: number): readonly Faces[] {
  const values = valuesBehind(figures)?.cut;
  if (!values) return [];
  const placed: Faces[] = [];
  for (const { def, at, when } of model.placements) {
    if (!isInUse(when ? { when } : {}, values)) continue;
    const piece = figures.pieces.find((one) => keyOf(one.name) === keyOf(def.piece));
    if (!piece) continue;
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
    const middles = middleFacets(folded);
    placed.push(
      folded.flatMap((panel, index) => {
        // Teeth are glued out of sight, where narrow faces would only fight with the curve they stand on.
        if (panel.tooth || (pointed && panel.role === 'tab')) return [];
        const sheet = panel.sheet === undefined ? undefined : sheets[panel.sheet];
        const lift = lifts.get(panel.name) ?? times(panel.inside, panel.role === 'tab' ? TAB_INSET * share : 0);
        const shift = sheet ? plus(lift, times(panel.inside, def.over ? LAYER_LIFT : -LAYER_LIFT)) : lift;
        const words = wordsFor(piece, panel.name);
        return {
          points: panel.points.map((point) => plus(point, shift)),
          edges: panel.edges,
          data: {
            look: sheet?.look ?? look,
            inside: panel.inside,
            panel: panel.name,
            placed: placed.length,
            ...(middles.has(index) ? { words } : {}),
          },
        };
      }),
    );
  }
  return placed;
}

/** A piece of one panel, tabs aside, goes by its own name. */
function wordsFor({ name, net }: PieceFigure, panel: string): string {
  return net.panels.filter(({ role }) => role === 'panel').length === 1 ? name : panel;
}

/** The facets that a name stands on: a flat panel, or the middle strip of a rolled one. */
function middleFacets(folded: readonly FoldedPanel[]): ReadonlySet<number> {
  const facets = new Map<string, number[]>();
  folded.forEach(({ name, role, sheet }, index) => {
    if (role === 'tab' || sheet !== undefined) return;
    facets.set(name, [...(facets.get(name) ?? []), index]);
  });
  return new Set([...facets.values()].map((all) => all[Math.floor(all.length / 2)] as number));
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
