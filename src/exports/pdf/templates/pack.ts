/** Lengths in one unit throughout. */
export interface Size {
  readonly across: number;
  readonly along: number;
}
export interface Placed<T> {
  readonly item: T;
  readonly x: number;
  readonly y: number;
  /** Laid a quarter turn clockwise. */
  readonly turned: boolean;
}
interface Room {
  readonly x: number;
  readonly y: number;
  readonly w: number;
  readonly h: number;
}
/** How good a place is in free room: less is better. */
type Rank = (box: Room, free: Room, turned: boolean) => number;
interface Filling<T> {
  readonly placed: Placed<T>[];
  room: readonly Room[];
}

const HAIR = 1e-6;
const BY: readonly ((size: Size) => number)[] = [
  ({ across, along }) => Math.max(across, along),
  ({ across, along }) => across * along,
  ({ across, along }) => Math.min(across, along),
  ({ along }) => along,
];

export interface Packing<T> {
  readonly page: Size;
  /** The space that one takes lying so, its margin included. */
  taken(item: T, turned: boolean): Size;
  /** Whether a page may hold these; a page with one alone always may. */
  allowed(placed: readonly Placed<T>[]): boolean;
}

/** The least left on the shorter side; the same, turned only where it must be; as high up as can be. */
const LEFT: Rank = (box, free) => Math.min(free.w - box.w, free.h - box.h);
const RANKS: readonly Rank[] = [
  LEFT,
  (box, free, turned) => LEFT(box, free, turned) + (turned ? 1e5 : 0),
  (box) => box.y + box.h + box.x / 1e4,
];

/**
 * Rectangles on as few pages of one size as a handful of orders finds, upright or a quarter turn clockwise. All of them must fit
 * a page one way or the other. The same input gives the same pages.
 */
export function packPages<T extends Size>(items: readonly T[], packing: Packing<T>): readonly (readonly Placed<T>[])[] {
  let best: readonly Filling<T>[] | null = null;
  for (const [key, rank] of BY.flatMap((one) => RANKS.map((other) => [one, other] as const))) {
    const order = items
      .map((item, index) => ({ item, index }))
      .sort((a, b) => key(b.item) - key(a.item) || a.index - b.index)
      .map(({ item }) => item);
    const pages = fill(order, packing, rank);
    if (!best || pages.length < best.length) best = pages;
  }
  return (best ?? []).map(({ placed }) => placed);
}

function fill<T extends Size>(items: readonly T[], packing: Packing<T>, rank: Rank): readonly Filling<T>[] {
  const pages: Filling<T>[] = [];
  for (const item of items) {
    const held = pages.some((page) => {
      const spot = spots(item, page, packing, rank).find((one) => packing.allowed([...page.placed, one.placed]));
      if (spot) put(page, spot);
      return spot !== undefined;
    });
    if (held) continue;
    const page: Filling<T> = { placed: [], room: [{ x: 0, y: 0, w: packing.page.across, h: packing.page.along }] };
    const alone = spots(item, page, packing, rank);
    const first = alone.find((one) => packing.allowed([one.placed])) ?? alone[0];
    if (!first) throw new Error(`${item.across} × ${item.along} is larger than a page`);
    put(page, first);
    pages.push(page);
  }
  return pages;
}

interface Spot<T> {
  readonly placed: Placed<T>;
  readonly box: Room;
  readonly rank: number;
}

/** Every place in the corner of free room, the best by `rank` first; upright before turned where both are as good. */
function spots<T extends Size>(item: T, { room }: Filling<T>, packing: Packing<T>, rank: Rank): readonly Spot<T>[] {
  return [false, true]
    .flatMap((turned) => {
      const { across, along } = packing.taken(item, turned);
      return room
        .filter(({ w, h }) => across <= w + HAIR && along <= h + HAIR)
        .map((free): Spot<T> => {
          const box = { x: free.x, y: free.y, w: across, h: along };
          return { placed: { item, x: free.x, y: free.y, turned }, box, rank: rank(box, free, turned) };
        });
    })
    .sort((a, b) => a.rank - b.rank);
}

/** Keeps the largest free rectangles, which overlap one another (the MaxRects way of J. Jylänki, 2010). */
function put<T>(on: Filling<T>, { placed, box }: Spot<T>): void {
  on.placed.push(placed);
  const parts = on.room.flatMap((room): Room[] => {
    const apart =
      box.x >= room.x + room.w - HAIR ||
      box.x + box.w <= room.x + HAIR ||
      box.y >= room.y + room.h - HAIR ||
      box.y + box.h <= room.y + HAIR;
    if (apart) return [room];
    return [
      { ...room, w: box.x - room.x },
      { ...room, x: box.x + box.w, w: room.x + room.w - box.x - box.w },
      { ...room, h: box.y - room.y },
      { ...room, y: box.y + box.h, h: room.y + room.h - box.y - box.h },
    ].filter(({ w, h }) => w > HAIR && h > HAIR);
  });
  on.room = parts.filter(
    (one, i) => !parts.some((other, k) => k !== i && inside(one, other) && (!inside(other, one) || k < i)),
  );
}

const inside = (small: Room, large: Room): boolean =>
  small.x >= large.x - HAIR &&
  small.y >= large.y - HAIR &&
  small.x + small.w <= large.x + large.w + HAIR &&
  small.y + small.h <= large.y + large.h + HAIR;
