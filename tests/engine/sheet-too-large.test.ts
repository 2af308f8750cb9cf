import { describe, expect, it } from 'vitest';
import {
  boundsOf,
  helpWithTooLarge,
  joinAt,
  joiningInWords,
  partings,
  planSheets,
  pointsOf,
  say,
  type Net,
  type PieceFigure,
} from '@/engine';
// Folding is the engine's own affair; the door does not offer it.
import { foldNet, vector, type FoldedPanel } from '../../src/engine/space';
import { figuresOf, inch, modelOf } from './patterns';
import { expectCuttable } from './trimmer';

const blank = (name: string, across: number, along: number) => ({ name, across, along, count: 1 });

describe('a piece that is too large', () => {
  it('is named before anything is cut, with the sheets that would hold it, the smallest first', () => {
    const plan = planSheets({ pieces: [blank('Wall', 290, 290), blank('Floor', 100, 100)] }, { stock: 'a4' });
    expect(plan.tooLarge).toMatchObject([{ name: 'Wall', room: { across: 210, along: 297 } }]);
    expect(plan.tooLarge[0]?.fits.map(({ id }) => id)).toEqual(['30x30cm', '12x12in', 'a3']);
    expect(plan.used).toBe(1);
  });
  it('is told what the sheet has room for within its margin', () => {
    const plan = planSheets({ pieces: [blank('Wall', 410, 290)] }, { stock: 'a4', margin: 5 });
    const [wall] = plan.tooLarge;
    expect(wall && say(helpWithTooLarge(wall), { units: 'mm', grid: '1mm' })).toBe(
      'The sheet has room for 200 × 287 mm. No sheet known here would hold it. Make the box smaller.',
    );
  });
});

const distance = (a: readonly number[], b: readonly number[]) =>
  Math.hypot(...a.map((value, index) => value - (b[index] ?? 0)));
const coordinates = ({ points }: FoldedPanel) => points.map(({ x, y, z }) => [x, y, z]);
const fold = (net: Net, root: string) => foldNet(net, { root, at: vector(0, 0, 0), across: '+x', along: '+y' });
/** Distances between all corners of the named panels, in order: what stays the same however a shape lies in space. */
function shapeOf(panels: readonly FoldedPanel[], names: readonly string[]): number[] {
  const corners = names.flatMap((name) => {
    const panel = panels.find((one) => one.name === name);
    return panel ? coordinates(panel) : [];
  });
  return corners.flatMap((a, index) => corners.slice(index + 1).map((b) => distance(a, b)));
}

describe('a piece joined from two', () => {
  const pieces = ['tray', 'lidded-box', 'tuck-carton', 'book-box'].flatMap((slug) => figuresOf(modelOf(slug)).pieces);
  const joined = pieces.flatMap((piece) =>
    partings(piece).flatMap((parting) => {
      const made = joinAt(piece, parting, '1/16in');
      return made ? [{ piece, made }] : [];
    }),
  );
  it('can be made of pieces of several patterns', () => {
    expect(joined.length).toBeGreaterThan(3);
  });
  it('has all panels of the one piece once, and a tab at every fold that was parted', () => {
    for (const { piece, made } of joined) {
      const names = made.parts.flatMap(({ net }) => net.panels.map(({ name }) => name));
      const own = names.filter((name) => !name.startsWith('joining tab'));
      expect(own.sort()).toEqual(piece.net.panels.map(({ name }) => name).sort());
      const parted = piece.net.folds.filter(({ panels: [a, b] }) => {
        const holds = (part: PieceFigure, name: string) => part.net.panels.some((panel) => panel.name === name);
        return holds(made.parts[0], a) !== holds(made.parts[0], b);
      });
      expect(names.length - own.length).toBe(parted.length);
    }
  });
  it('cuts the same card but for the tabs: trapezoids of half the sum of their sides by their depth', () => {
    for (const { piece, made } of joined) {
      const tabs = made.parts[0].net.panels
        .filter(({ name }) => name.startsWith('joining tab'))
        .reduce((sum, { loop }) => {
          const box = boundsOf(loop);
          const long = Math.max(box.right - box.left, box.bottom - box.top, ...[]);
          const root = made.parting.runs === 'along' ? box.bottom - box.top : box.right - box.left;
          const taper = Math.min(made.tab, root / 4);
          expect(long).toBeGreaterThan(0);
          return sum + ((root + (root - 2 * taper)) / 2) * made.tab;
        }, 0);
      expect(made.parts[0].area + made.parts[1].area - tabs).toBeCloseTo(piece.area, 4);
    }
  });
  it('folds to the same box', () => {
    for (const { piece, made } of joined) {
      const root = made.parts[0].net.panels[0]?.name ?? '';
      const whole = fold(piece.net, root);
      for (const part of made.parts) {
        const names = part.net.panels.map(({ name }) => name).filter((name) => !name.startsWith('joining tab'));
        const folded = fold(part.net, names[0] as string);
        const [asOne, asTwo] = [shapeOf(whole, names), shapeOf(folded, names)];
        expect(asTwo).toHaveLength(asOne.length);
        asTwo.forEach((value, index) => expect(Math.abs(value - (asOne[index] as number))).toBeLessThan(1e-4));
      }
    }
  });
  it('lays its tab flat on the panel that it is glued behind', () => {
    for (const { piece, made } of joined) {
      const [first, second] = made.parts;
      const root = first.net.panels[0]?.name ?? '';
      const whole = fold(piece.net, root);
      for (const tab of fold(first.net, root).filter(({ name }) => name.startsWith('joining tab'))) {
        // The panel beyond whose every corner lies in the plane of the tab.
        const [a, b, c] = coordinates(tab) as [number[], number[], number[]];
        const normal = cross(minus(b, a), minus(c, a));
        const flat = whole.filter(
          (panel) =>
            second.net.panels.some(({ name }) => name === panel.name) &&
            coordinates(panel).every((point) => Math.abs(dot(normal, minus(point, a))) < 1e-3 * Math.hypot(...normal)),
        );
        expect(flat.length, `${piece.name} at ${made.parting.at}`).toBeGreaterThan(0);
      }
    }
  });
  it('starts each half at the corner of its own blank', () => {
    for (const { made } of joined)
      for (const { net } of made.parts)
        for (const { loop } of net.panels)
          for (const { x, y } of pointsOf(loop)) {
            expect(x).toBeGreaterThan(-1e-6);
            expect(y).toBeGreaterThan(-1e-6);
            expect(x).toBeLessThan(net.across + 1e-6);
            expect(y).toBeLessThan(net.along + 1e-6);
          }
  });
  it('is planned when it is asked for, and offered when it is not', () => {
    const figures = figuresOf(modelOf('tray'));
    const [tray] = figures.pieces as readonly [PieceFigure];
    // A sheet as tall as the tray's blank and an inch less wide holds it only in two.
    const stock = { id: 'own', name: 'own', across: tray.across - inch(1), along: tray.along };
    const offered = planSheets(figures, { stock });
    expect(offered.tooLarge[0]?.joined).not.toBeNull();
    const plan = planSheets(figures, { stock, join: [tray.name] });
    expect(plan.tooLarge).toEqual([]);
    expect(plan.sheets.flatMap(({ parts }) => parts.map(({ piece }) => piece)).sort()).toEqual([
      `${tray.name}, first part`,
      `${tray.name}, second part`,
    ]);
    expectCuttable(plan);
    const [made] = plan.joined;
    expect(made && say(joiningInWords(made), { units: 'in', grid: '1/16in' })).toMatch(
      /^The Tray is made of two parts\. The tray, first part has an extra tab of [\d/ ]+ in: fold it/,
    );
  });
});

const minus = (a: readonly number[], b: readonly number[]) => a.map((value, index) => value - (b[index] ?? 0));
const dot = (a: readonly number[], b: readonly number[]) =>
  a.reduce((sum, value, index) => sum + value * (b[index] ?? 0), 0);
const cross = ([a, b, c]: readonly number[], [d, e, f]: readonly number[]): number[] => [
  (b ?? 0) * (f ?? 0) - (c ?? 0) * (e ?? 0),
  (c ?? 0) * (d ?? 0) - (a ?? 0) * (f ?? 0),
  (a ?? 0) * (e ?? 0) - (b ?? 0) * (d ?? 0),
];
