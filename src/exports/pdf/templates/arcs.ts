/**
 * The same path with every arc in parts of at most 30°. Writers of PDF make one Bézier curve of up to a quarter circle, which is off
 * by 0.027 % of the radius; a twelfth of a circle is off by less than a millionth.
 * Reads the commands that drawings of pieces use: absolute M, L, H, V, A, Z with circular arcs.
 */
export function splitArcs(path: string): string {
  let [x, y] = [0, 0];
  let from: readonly [number, number] = [0, 0];
  return path.replace(/([MLHVAZmlhvz])([^A-Za-z]*)/g, (whole, command: string, rest: string) => {
    const n = (rest.match(/-?\d*\.?\d+/g) ?? []).map(Number);
    if (command === 'A') {
      const [radius, , , large, clockwise, toX, toY] = n as [number, number, number, number, number, number, number];
      const parts = arcParts([x, y], [toX, toY], { radius, large: large === 1, clockwise: clockwise === 1 });
      [x, y] = [toX, toY];
      return parts.map(([px, py]) => `A${radius} ${radius} 0 0 ${clockwise} ${px} ${py}`).join('');
    }
    if (command === 'H') x = n[0] as number;
    else if (command === 'V') y = n[0] as number;
    else if (command === 'Z' || command === 'z') [x, y] = from;
    else if (command === 'h') x += n[0] as number;
    else if (command === 'v') y += n[0] as number;
    else
      [x, y] =
        command === 'm' || command === 'l' ? [x + (n[0] as number), y + (n[1] as number)] : (n as [number, number]);
    if (command === 'M' || command === 'm') from = [x, y];
    return whole;
  });
}

const PART = Math.PI / 6;

/** Ends of the parts, the last being `to` itself. */
function arcParts(
  [x1, y1]: readonly [number, number],
  [x2, y2]: readonly [number, number],
  { radius, large, clockwise }: { readonly radius: number; readonly large: boolean; readonly clockwise: boolean },
): readonly (readonly [number, number])[] {
  const half = Math.hypot(x2 - x1, y2 - y1) / 2;
  // Rounded ends may lie a hair further apart than twice the radius.
  const rise = Math.sqrt(Math.max(0, radius ** 2 - half ** 2));
  const side = large === clockwise ? -1 : 1;
  const [ux, uy] = half === 0 ? [0, 0] : [(x2 - x1) / (2 * half), (y2 - y1) / (2 * half)];
  const [cx, cy] = [(x1 + x2) / 2 - side * rise * uy, (y1 + y2) / 2 + side * rise * ux];
  const begin = Math.atan2(y1 - cy, x1 - cx);
  let sweep = Math.atan2(y2 - cy, x2 - cx) - begin;
  if (clockwise && sweep < 0) sweep += 2 * Math.PI;
  if (!clockwise && sweep > 0) sweep -= 2 * Math.PI;
  const count = Math.max(1, Math.ceil(Math.abs(sweep) / PART));
  return Array.from({ length: count }, (_, k) => {
    if (k === count - 1) return [x2, y2];
    const angle = begin + (sweep * (k + 1)) / count;
    return [cx + radius * Math.cos(angle), cy + radius * Math.sin(angle)];
  });
}
