import { type Outcome, ok, refused } from '../outcome';

interface PlanePoint {
  readonly x: number;
  readonly y: number;
}

/**
 * Interior angle at a corner between the directions to two points, 0–180 degrees: atan2(|a × b|, a · b), which keeps its
 * digits near 0 and 180 where the arc cosine loses them.
 */
export function angleAtCorner(
  corner: PlanePoint,
  from: PlanePoint,
  to: PlanePoint,
): Outcome<number, 'no-direction'> {
  const a = { x: from.x - corner.x, y: from.y - corner.y };
  const b = { x: to.x - corner.x, y: to.y - corner.y };
  if (Math.hypot(a.x, a.y) === 0 || Math.hypot(b.x, b.y) === 0) return refused('no-direction');
  const degrees = (Math.atan2(Math.abs(a.x * b.y - a.y * b.x), a.x * b.x + a.y * b.y) * 180) / Math.PI;
  return Number.isFinite(degrees) ? ok(degrees) : refused('no-direction');
}
