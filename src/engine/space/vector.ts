/** A place or a direction in space, millimetres. */
export interface Vector {
  readonly x: number;
  readonly y: number;
  readonly z: number;
}
export const vector = (x: number, y: number, z: number): Vector => ({ x, y, z });
export const plus = (a: Vector, b: Vector): Vector => vector(a.x + b.x, a.y + b.y, a.z + b.z);
export const minus = (a: Vector, b: Vector): Vector => vector(a.x - b.x, a.y - b.y, a.z - b.z);
export const times = (a: Vector, k: number): Vector => vector(a.x * k, a.y * k, a.z * k);
export const dot = (a: Vector, b: Vector): number => a.x * b.x + a.y * b.y + a.z * b.z;
export const cross = (a: Vector, b: Vector): Vector =>
  vector(a.y * b.z - a.z * b.y, a.z * b.x - a.x * b.z, a.x * b.y - a.y * b.x);
export const size = (a: Vector): number => Math.hypot(a.x, a.y, a.z);
/** The direction of `a`; nothing stays nothing. */
export const unit = (a: Vector): Vector => (size(a) === 0 ? a : times(a, 1 / size(a)));
/** `a` turned about the direction `axis` (of length 1) by `angle` radians, right-handed (Rodrigues' rotation formula). */
export function turned(a: Vector, axis: Vector, angle: number): Vector {
  const [c, s] = [Math.cos(angle), Math.sin(angle)];
  return plus(plus(times(a, c), times(cross(axis, a), s)), times(axis, dot(axis, a) * (1 - c)));
}
