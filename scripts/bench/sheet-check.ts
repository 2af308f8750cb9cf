/** A part on a sheet. */
export interface Placed {
  readonly x: number;
  readonly y: number;
  readonly across: number;
  readonly along: number;
}

/**
 * Cuts a sheet from edge to edge wherever that harms no part, until every part is alone in what is left round it. Gives the area
 * of the largest rectangle that can be freed so; null when the parts cannot all be cut free. Knows nothing of how the plan was made.
 */
export function cutFree(parts: readonly Placed[], sheet: Placed): number | null {
  const known = new Map<string, number | null>();
  const within = (region: Placed, held: readonly Placed[]): number | null => {
    if (held.length === 0) return region.across * region.along;
    const key = `${region.x} ${region.y} ${region.across} ${region.along}`;
    const before = known.get(key);
    if (before !== undefined) return before;
    let best: number | null = held.length === 1 ? 0 : null;
    for (const upright of [true, false]) {
      const start = (box: Placed) => (upright ? box.x : box.y);
      const end = (box: Placed) => (upright ? box.x + box.across : box.y + box.along);
      const places = new Set(held.flatMap((box) => [start(box), end(box)]));
      for (const at of places) {
        if (at <= start(region) || at >= end(region) || held.some((box) => start(box) < at && end(box) > at)) continue;
        const before = held.filter((box) => end(box) <= at);
        const after = held.filter((box) => start(box) >= at);
        const one = within(
          upright ? { ...region, across: at - region.x } : { ...region, along: at - region.y },
          before,
        );
        if (one === null) break;
        const other = within(
          upright
            ? { ...region, x: at, across: region.x + region.across - at }
            : { ...region, y: at, along: region.y + region.along - at },
          after,
        );
        if (other === null) break;
        best = Math.max(best ?? 0, one, other);
      }
    }
    known.set(key, best);
    return best;
  };
  return within(sheet, parts);
}

/** Whether all parts lie on the sheet and none over another. */
export function apart(parts: readonly Placed[], sheet: Placed): boolean {
  return parts.every(
    (a, index) =>
      a.x >= sheet.x &&
      a.y >= sheet.y &&
      a.x + a.across <= sheet.x + sheet.across &&
      a.y + a.along <= sheet.y + sheet.along &&
      parts
        .slice(index + 1)
        .every((b) => a.x + a.across <= b.x || b.x + b.across <= a.x || a.y + a.along <= b.y || b.y + b.along <= a.y),
  );
}
