/** Reads files for cutting machines back as lines with lengths, without the engine: by the formats' own rules. */
import DxfParser, { type IArcEntity, type ILineEntity, type ILwpolylineEntity } from 'dxf-parser';
import { readXml, type XmlElement } from '../editions/read-xml';

export interface ReadLine {
  /** `cut`, `valley`, `mountain` or `draw`. */
  readonly work: string;
  readonly length: number;
  readonly closed: boolean;
  /** Length of its arcs, those that run clockwise as seen on screen less those that run the other way. */
  readonly clockwise: number;
  readonly points: readonly (readonly [number, number])[];
}
export interface Bounds {
  readonly left: number;
  readonly right: number;
  /** The smaller y. */
  readonly low: number;
  readonly high: number;
}
export function boundsOfRead(lines: readonly ReadLine[]): Bounds {
  const points = lines.flatMap((line) => line.points);
  const [xs, ys] = [points.map(([x]) => x), points.map(([, y]) => y)];
  return { left: Math.min(...xs), right: Math.max(...xs), low: Math.min(...ys), high: Math.max(...ys) };
}
export const lengthOfRead = (lines: readonly ReadLine[], work: string): number =>
  lines.filter((line) => line.work === work).reduce((sum, { length }) => sum + length, 0);

type Place = readonly [number, number];
interface Circular {
  readonly centre: Place;
  readonly radius: number;
  readonly begin: number;
  /** Signed, positive with growing angle. */
  readonly turn: number;
}
/** Points at the quarters of the circle that the arc passes. */
function quarters({ centre: [x, y], radius, begin, turn }: Circular): Place[] {
  const [low, high] = turn > 0 ? [begin, begin + turn] : [begin + turn, begin];
  const first = Math.ceil(low / (Math.PI / 2) - 1e-12);
  const last = Math.floor(high / (Math.PI / 2) + 1e-12);
  return Array.from({ length: Math.max(0, last - first + 1) }, (_, k): Place => {
    const angle = ((first + k) * Math.PI) / 2;
    return [x + radius * Math.cos(angle), y + radius * Math.sin(angle)];
  });
}

export interface ReadSvg {
  readonly root: XmlElement;
  readonly lines: readonly ReadLine[];
  readonly elements: readonly XmlElement[];
}
export function readSvg(svg: string): ReadSvg {
  const root = readXml(svg);
  const elements: XmlElement[] = [];
  const lines: ReadLine[] = [];
  const visit = (element: XmlElement, work: string): void => {
    elements.push(element);
    const own = element.name === 'g' ? (element.attributes.id ?? '') : work;
    if (element.name === 'path') lines.push(readPath(element.attributes.d ?? '', own));
    element.children.forEach((child) => visit(child, own));
  };
  visit(root, '');
  return { root, lines, elements };
}

function readPath(d: string, work: string): ReadLine {
  const commands = [...d.matchAll(/([MLAZ])([^MLAZ]*)/g)];
  if (commands.map(([whole]) => whole).join('') !== d) throw new Error(`Not all of it is known here: ${d}`);
  let at: Place = [NaN, NaN];
  let from = at;
  let length = 0;
  let clockwise = 0;
  let closed = false;
  const points: Place[] = [];
  for (const [, command, rest = ''] of commands) {
    if (closed) throw new Error(`It goes on after it was closed: ${d}`);
    const n = rest.trim() === '' ? [] : rest.trim().split(/\s+/).map(Number);
    const to = (command === 'Z' ? from : n.slice(-2)) as Place;
    if (command === 'M') {
      if (points.length > 0) throw new Error(`More than one line: ${d}`);
      from = to;
    } else if (command === 'A') {
      const arc = svgArc(at, to, n);
      length += arc.radius * Math.abs(arc.turn);
      // y runs down: a growing angle is clockwise.
      clockwise += arc.radius * arc.turn;
      points.push(...quarters(arc));
    } else length += Math.hypot(to[0] - at[0], to[1] - at[1]);
    if (command === 'Z') closed = true;
    at = to;
    points.push(to);
  }
  return { work, length, closed, clockwise, points };
}

/** From end points to centre: SVG 2, appendix B.2.4, for circles that are not rotated. */
function svgArc([x1, y1]: Place, [x2, y2]: Place, n: readonly number[]): Circular {
  const [rx, ry, rotation, large, sweep] = n as [number, number, number, number, number];
  if (n.length !== 7 || rx !== ry || rotation !== 0) throw new Error(`No circular arc: ${n.join(' ')}`);
  const [px, py] = [(x1 - x2) / 2, (y1 - y2) / 2];
  const radius = Math.max(rx, Math.hypot(px, py));
  const factor = Math.sqrt(Math.max(0, radius ** 2 / (px ** 2 + py ** 2) - 1)) * (large === sweep ? -1 : 1);
  const [cx, cy] = [factor * py + (x1 + x2) / 2, -factor * px + (y1 + y2) / 2];
  const begin = Math.atan2(y1 - cy, x1 - cx);
  let turn = Math.atan2(y2 - cy, x2 - cx) - begin;
  if (sweep === 1 && turn < 0) turn += 2 * Math.PI;
  if (sweep === 0 && turn > 0) turn -= 2 * Math.PI;
  return { centre: [cx, cy], radius, begin, turn };
}

export interface ReadDxf {
  readonly header: Readonly<Record<string, unknown>>;
  readonly layers: Readonly<Record<string, number>>;
  readonly lines: readonly ReadLine[];
  readonly types: readonly string[];
}
export function readDxf(dxf: string): ReadDxf {
  const read = new DxfParser().parseSync(dxf);
  if (!read) throw new Error('The file does not read.');
  const layers = Object.fromEntries(
    Object.values(read.tables.layer.layers).map(({ name, colorIndex }) => [name, colorIndex]),
  );
  const lines = read.entities.map((entity): ReadLine => {
    const colour = entity.colorIndex ?? layers[entity.layer];
    const score = colour === 6 ? 'mountain' : 'valley';
    const work = { CUT: 'cut', SCORE: score, DRAW: 'draw' }[entity.layer] ?? entity.layer;
    if (entity.type === 'LINE') {
      const [a, b] = (entity as ILineEntity).vertices.map(({ x, y }): Place => [x, y]) as [Place, Place];
      return { work, length: Math.hypot(b[0] - a[0], b[1] - a[1]), closed: false, clockwise: 0, points: [a, b] };
    }
    if (entity.type === 'ARC') {
      const { center, radius, startAngle, endAngle } = entity as IArcEntity;
      const turn = endAngle > startAngle ? endAngle - startAngle : endAngle - startAngle + 2 * Math.PI;
      const arc: Circular = { centre: [center.x, center.y], radius, begin: startAngle, turn };
      const end = (angle: number): Place => [center.x + radius * Math.cos(angle), center.y + radius * Math.sin(angle)];
      const points = [end(startAngle), end(endAngle), ...quarters(arc)];
      return { work, length: radius * turn, closed: false, clockwise: -radius * turn, points };
    }
    if (entity.type === 'LWPOLYLINE') return readPolyline(entity as ILwpolylineEntity, work);
    throw new Error(`No line: ${entity.type}`);
  });
  return { header: read.header, layers, lines, types: read.entities.map(({ type }) => type) };
}

/** Bulge: the tangent of a quarter of the turn, positive anticlockwise (DXF Reference, LWPOLYLINE, group 42). */
function readPolyline({ vertices, shape }: ILwpolylineEntity, work: string): ReadLine {
  const points: Place[] = [];
  let length = 0;
  let clockwise = 0;
  vertices.forEach(({ x, y, bulge }, k) => {
    const next = vertices[k + 1] ?? (shape ? vertices[0] : undefined);
    points.push([x, y]);
    if (!next) return;
    const chord = Math.hypot(next.x - x, next.y - y);
    if (!bulge) {
      length += chord;
      return;
    }
    const turn = 4 * Math.atan(bulge);
    const radius = chord / 2 / Math.sin(Math.abs(turn) / 2);
    const apothem = radius * Math.cos(turn / 2) * Math.sign(bulge);
    const centre: Place = [
      (x + next.x) / 2 - (apothem * (next.y - y)) / chord,
      (y + next.y) / 2 + (apothem * (next.x - x)) / chord,
    ];
    length += radius * Math.abs(turn);
    // y runs up: a growing angle is anticlockwise.
    clockwise -= radius * turn;
    points.push(...quarters({ centre, radius, begin: Math.atan2(y - centre[1], x - centre[0]), turn }));
  });
  return { work, length, closed: shape, clockwise, points };
}
