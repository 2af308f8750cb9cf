import fc from 'fast-check';
import { expect, test } from 'vitest';
import { packPages, type Placed, type Size } from '@/exports/pdf/templates/pack';
import { splitArcs } from '@/exports/pdf/templates/arcs';
import { squareSpots } from '@/exports/pdf/templates/spots';
import { tile, withoutEmpty } from '@/exports/pdf/templates/tiles';

const PAGE = { across: 190, along: 260 };
const lying = ({ across, along }: Size, turned: boolean) =>
  turned ? { across: along, along: across } : { across, along };
const pack = (items: readonly Size[], allowed = (_: readonly Placed<Size>[]) => true) =>
  packPages(items, { page: PAGE, taken: lying, allowed });
const sizes = fc.array(
  fc.record({ across: fc.integer({ min: 5, max: 190 }), along: fc.integer({ min: 5, max: 260 }) }),
  {
    minLength: 1,
    maxLength: 12,
  },
);

test('everything is packed once, inside the page, and nothing overlaps', () => {
  fc.assert(
    fc.property(sizes, (items) => {
      const pages = pack(items);
      expect(pages.flat().map(({ item }) => item)).toHaveLength(items.length);
      expect(new Set(pages.flat().map(({ item }) => item)).size).toBe(items.length);
      for (const page of pages) {
        const boxes = page.map(({ item, x, y, turned }) => ({ x, y, ...lying(item, turned) }));
        boxes.forEach((a, i) => {
          expect(Math.min(a.x, a.y, PAGE.across - a.x - a.across, PAGE.along - a.y - a.along)).toBeGreaterThan(-1e-6);
          for (const b of boxes.slice(i + 1)) {
            const apart =
              a.x + a.across <= b.x + 1e-6 ||
              b.x + b.across <= a.x + 1e-6 ||
              a.y + a.along <= b.y + 1e-6 ||
              b.y + b.along <= a.y + 1e-6;
            expect(apart).toBe(true);
          }
        });
      }
    }),
    { seed: 14, numRuns: 60 },
  );
});

test('four quarters of a page fill one page', () => {
  const quarter = { across: 95, along: 130 };
  expect(pack([quarter, quarter, quarter, quarter].map((one) => ({ ...one })))).toHaveLength(1);
});

test('a page takes no more than it is allowed to', () => {
  const small = Array.from({ length: 4 }, () => ({ across: 20, along: 20 }));
  expect(pack(small, (placed) => placed.length <= 2).map((page) => page.length)).toEqual([2, 2]);
});

test('tiles overlap by what they should and reach the far edges', () => {
  // (390 − 10) / (200 − 10) = 2 columns exactly; (500 − 10) / (250 − 10) = 2.04, so 3 rows. Turned: 490 / 190 = 2.6 and 380 / 240 = 1.6, 3 × 2.
  const tiling = tile({ across: 390, along: 500 }, { across: 200, along: 250 }, 10);
  expect([tiling.columns, tiling.rows, tiling.turned]).toEqual([2, 3, false]);
  expect(tiling.tiles.map(({ name, x, y }) => [name, x, y])).toEqual([
    ['A1', 0, 0],
    ['B1', 190, 0],
    ['A2', 0, 240],
    ['B2', 190, 240],
    ['A3', 0, 480],
    ['B3', 190, 480],
  ]);
});

test('a page that nothing of the piece is on is left away, one inside the piece is not', () => {
  // An L of 380 × 380 with arms 60 wide: pages of 200 that share 20 make 2 × 2, of which the upper right has nothing on it.
  const page = { across: 200, along: 200 };
  // Every side in ten parts.
  const outline = (...corners: readonly (readonly [number, number])[]) =>
    corners.flatMap(([x, y], i) => {
      const [toX, toY] = corners[(i + 1) % corners.length] ?? [x, y];
      return Array.from({ length: 10 }, (_, k) => ({ x: x + ((toX - x) * k) / 10, y: y + ((toY - y) * k) / 10 }));
    });
  const tiling = tile({ across: 380, along: 380 }, page, 20);
  const arm = outline([0, 0], [60, 0], [60, 320], [380, 320], [380, 380], [0, 380]);
  expect(withoutEmpty(tiling, page, arm).tiles.map(({ name }) => name)).toEqual(['A1', 'A2', 'B2']);
  // A square so large that the middle one of 3 × 3 pages has none of its edges.
  const large = tile({ across: 560, along: 560 }, page, 20);
  expect(withoutEmpty(large, page, outline([0, 0], [560, 0], [560, 560], [0, 560])).tiles).toHaveLength(9);
});

test('squares keep clear of what stands there, or are not placed at all', () => {
  const [first, second] = squareSpots([50, 50], { across: 110, along: 60 }, []) ?? [];
  expect(second && first && second.x - first.x).toBeGreaterThanOrEqual(52.5);
  expect(squareSpots([50], { across: 60, along: 60 }, [{ x: 30, y: 30, across: 0, along: 0 }])).toBeNull();
});

test('an arc in parts of at most 30° ends where it ended and stays on its circle', () => {
  // A half circle of radius 50 about (50, 0), through (50, 50) when it runs against the clock on screen.
  const parts = [...splitArcs('M0 0A50 50 0 0 0 100 0').matchAll(/A50 50 0 0 0 (\S+) (\S+?)(?=A|$)/g)];
  expect(parts).toHaveLength(6);
  for (const [, x, y] of parts) {
    expect(Math.hypot(Number(x) - 50, Number(y))).toBeCloseTo(50, 9);
    expect(Number(y)).toBeGreaterThanOrEqual(-1e-9);
  }
  expect(parts.at(-1)?.slice(1)).toEqual(['100', '0']);
});
