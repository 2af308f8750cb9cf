import {
  Arc as FlattenArc,
  Circle,
  Polygon,
  arc as flattenArc,
  point as flattenPoint,
  segment as flattenSegment,
} from '@flatten-js/core';
import polygonClipping, { type MultiPolygon } from 'polygon-clipping';
import { describe, expect, it } from 'vitest';
import {
  areaOf,
  evaluate,
  lengthOf,
  perimeterOf,
  pointsOf,
  type Curve,
  type Loop,
  type Net,
  type PieceFigure,
} from '@/engine';
import { isInUse, workOut } from '@/engine/model/values';
import { expectClose } from '../setup/expect-close';
import { SLUGS, modelOf, patternOf, sizingsOf } from './patterns';

// Two independent geometry libraries: flatten-js with true arcs, polygon-clipping with many short chords.

const flat = (curve: Curve) =>
  curve.type === 'line'
    ? flattenSegment(flattenPoint(curve.from.x, curve.from.y), flattenPoint(curve.to.x, curve.to.y))
    : flattenArc(
        flattenPoint(curve.centre.x, curve.centre.y),
        curve.radius,
        Math.atan2(curve.from.y - curve.centre.y, curve.from.x - curve.centre.x),
        Math.atan2(curve.to.y - curve.centre.y, curve.to.x - curve.centre.x),
        curve.clockwise,
      );
function polygonOf(loops: readonly Loop[]): Polygon {
  const polygon = new Polygon();
  for (const loop of loops) {
    const [only] = loop;
    if (loop.length === 1 && only?.type === 'arc')
      polygon.addFace(new Circle(flattenPoint(only.centre.x, only.centre.y), only.radius));
    else polygon.addFace(loop.map(flat));
  }
  return polygon;
}
const perimeter = (polygon: Polygon): number =>
  [...polygon.edges].reduce((sum: number, edge: { length: number }) => sum + edge.length, 0);

const CHORD = 0.02;
const ring = (loop: Loop): [number, number][] => pointsOf(loop, CHORD).map(({ x, y }) => [x, y]);
const areaOfRings = (rings: MultiPolygon): number =>
  rings.flat().reduce((sum, points) => {
    const twice = points.reduce((all, [x, y], index) => {
      const [u, v] = points[(index + 1) % points.length] as [number, number];
      return all + x * v - u * y;
    }, 0);
    return sum + Math.abs(twice) / 2;
  }, 0);
interface Bounds {
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
}
const bounds = (points: readonly [number, number][]): Bounds => ({
  left: Math.min(...points.map(([x]) => x)),
  right: Math.max(...points.map(([x]) => x)),
  top: Math.min(...points.map(([, y]) => y)),
  bottom: Math.max(...points.map(([, y]) => y)),
});
const apart = (a: Bounds, b: Bounds): boolean =>
  a.right <= b.left || b.right <= a.left || a.bottom <= b.top || b.bottom <= a.top;
const rectangle = (x: number, y: number, across: number, along: number): [number, number][] => [
  [x, y],
  [x + across, y],
  [x + across, y + along],
  [x, y + along],
];

/** What of one shape lies over another, in mm². */
const over = (a: [number, number][], b: [number, number][]): number =>
  apart(bounds(a), bounds(b)) ? 0 : areaOfRings(polygonClipping.intersection([a], [b]));

function expectAsInFlatten({ name, net, area, perimeter: length }: PieceFigure): void {
  const outline = polygonOf([net.outline]);
  expectClose(areaOf(net.outline), Math.abs(outline.area()), 1e-3, `${name} outline`);
  expectClose(perimeterOf(net.outline), perimeter(outline), 1e-6 * length + 1e-6, `${name} perimeter`);
  const holes = net.holes.map((hole) => polygonOf([hole]));
  expectClose(area, Math.abs(outline.area()) - holes.reduce((sum, hole) => sum + Math.abs(hole.area()), 0), 1e-3, name);
  expectClose(
    length,
    [outline, ...holes].reduce((sum, one) => sum + perimeter(one), 0),
    1e-6 * length,
    name,
  );
  for (const curve of [...net.outline, ...net.holes.flat(), ...net.folds.map((fold) => fold.curve)]) {
    const same = flat(curve);
    if (same instanceof FlattenArc && Math.abs(same.sweep) > 6.28) continue;
    expectClose(lengthOf(curve), same.length, 1e-6, `${name}: a ${curve.type}`);
  }
  for (const hole of net.holes)
    for (const { from } of hole) expect(outline.contains(flattenPoint(from.x, from.y)), `${name}: a hole`).toBe(true);
}
/** No two stretches of the outline cross or lie on one another (flatten-js). */
function expectSimple(name: string, net: Net): void {
  const polygon = polygonOf([net.outline]);
  for (const face of polygon.faces) expect(face.isSimple(polygon.edges), `${name} crosses itself`).toBe(true);
}
function expectApart(name: string, { panels }: Net): void {
  const rings = panels.map((panel) => ({ panel, points: ring(panel.loop) }));
  const boxed = rings.map((one) => ({ ...one, box: bounds(one.points) }));
  boxed.forEach((a, index) => {
    for (const b of boxed.slice(index + 1)) {
      if (apart(a.box, b.box)) continue;
      // Chords of an arc leave it by up to CHORD, on the same side for both.
      const common = areaOfRings(polygonClipping.intersection([a.points], [b.points]));
      expect(common, `${name}: ${a.panel.name} and ${b.panel.name}`).toBeLessThan(0.3);
    }
  });
}

describe.each(SLUGS)('%s flat, at ten sizes', (slug) => {
  const model = modelOf(slug);
  const made = [...sizingsOf(model, 10, 41)].map((sizing) => ({ sizing, figures: evaluate(model, sizing) }));

  it('has the areas, perimeters, arcs and holes that flatten-js finds', () => {
    for (const { figures } of made) for (const piece of figures.pieces) expectAsInFlatten(piece);
  });
  it('has outlines that do not cross themselves (flatten-js)', () => {
    for (const { figures } of made) for (const { name, net } of figures.pieces) expectSimple(name, net);
  });
  it('has no panels that lie over one another (polygon-clipping)', () => {
    for (const { figures } of made) for (const { name, net } of figures.pieces) expectApart(name, net);
  });
  it('cuts a grid’s blank into panels and what falls away, and nothing twice (polygon-clipping)', () => {
    for (const { sizing, figures } of made) {
      const { cut } = workOut(model, sizing);
      for (const { def, shape } of model.pieces) {
        const piece = figures.pieces.find(({ name }) => name === def.name);
        const written = patternOf(slug).pieces.find(({ name }) => name === def.name);
        if (shape.builder !== 'grid' || written?.builder !== 'grid' || !piece) continue;
        const { net } = piece;
        const [wide, tall] = [shape.columns, shape.rows].map((list) =>
          list.map((track) => (isInUse(track, cut) ? track.size.work(cut) : 0)),
        ) as [number[], number[]];
        const cells = (keep: (cell: string) => boolean): number =>
          written.cells.reduce(
            (sum, row, y) => sum + row.reduce((all, cell, x) => all + (keep(cell) ? wide[x]! * tall[y]! : 0), 0),
            0,
          );
        // A tab with a shape of its own, or a tooth on an arc, may stand out of its cell over the one beside it.
        const shaped = new Set(written.tabs?.flatMap((tab) => (tab.shape ? tab.cells : [])));
        const blank = net.across * net.along;
        const away = net.away.reduce((sum, one) => sum + one.across * one.along, 0);
        expectClose(
          away,
          cells((cell) => cell === 'away'),
          1e-3,
          `${def.name} away`,
        );
        expectClose(
          cells(() => true),
          blank,
          1e-3,
          `${def.name} blank`,
        );
        const panels = net.panels.reduce((sum, panel) => sum + areaOf(panel.loop), 0);
        expect(panels + away, `${def.name}: panels and what falls away`).toBeLessThanOrEqual(blank + 1e-3);
        const plain = cells((cell) => cell.startsWith('panel '));
        expect(panels, `${def.name}: panels`).toBeGreaterThan(plain * 0.9);
        for (const { x, y, across, along } of net.away)
          for (const panel of net.panels.filter(({ name, tooth }) => !tooth && !shaped.has(name)))
            expect(over(rectangle(x, y, across, along), ring(panel.loop)), `${def.name}: ${panel.name}`).toBeLessThan(
              1e-3,
            );
        const box = bounds(net.panels.flatMap((panel) => ring(panel.loop)));
        const blankBox = { left: 0, top: 0, right: net.across, bottom: net.along };
        expect(
          Math.min(box.left, box.top, blankBox.right - box.right, blankBox.bottom - box.bottom),
          `${def.name}: inside its blank`,
        ).toBeGreaterThan(-0.1); // the outermost teeth of an arc splay by less than a blade
      }
    }
  });
});
