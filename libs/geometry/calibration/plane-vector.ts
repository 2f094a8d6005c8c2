import { type Outcome, ok, refused } from '../outcome';
import { checkPoint, type VideoPoint } from '../points/video-point';
import { localScale, type Matrix3, mapPoint } from './homography';

/** From one place of a plane to another, metres, along and across a direction of the picture. */
export interface PlaneVector {
  readonly metres: number;
  /** Along the direction given. */
  readonly along: number;
  /** To the side of it, + to the right in the picture for a direction that points down in it. */
  readonly across: number;
}

export type PlaneReason = 'beyond-the-plane' | 'not-finite';

/**
 * From one place of the picture to another on the plane of a mapping. `down` is a direction of the picture (pixels) such as
 * the plumb's; what it becomes on the plane is taken half-way between the two. Refused where the plane, seen at a slant,
 * does not reach.
 *
 * @param known a place of the picture that lies on the plane
 */
export function planeVector(
  toPlane: Matrix3,
  known: VideoPoint,
  [from, to]: readonly [VideoPoint, VideoPoint],
  down: { readonly x: number; readonly y: number } = { x: 0, y: 1 },
): Outcome<PlaneVector, PlaneReason> {
  if (!checkPoint(from).ok || !checkPoint(to).ok) return refused('not-finite');
  const side = Math.sign(depthAt(toPlane, known));
  if ([from, to].some((point) => depthAt(toPlane, point) * side <= 0)) return refused('beyond-the-plane');
  const [a, b] = [mapPoint(toPlane, from), mapPoint(toPlane, to)];
  if (!a || !b) return refused('beyond-the-plane');
  const [dx, dy] = [b.x - a.x, b.y - a.y];
  const [xx, xy, yx, yy] = localScale(toPlane, { x: (from.x + to.x) / 2, y: (from.y + to.y) / 2 });
  const [gx, gy] = [xx * down.x + xy * down.y, yx * down.x + yy * down.y];
  const length = Math.hypot(gx, gy);
  if (!(length > 0) || !Number.isFinite(dx + dy)) return refused('not-finite');
  // Corners walked round the other way give a mirrored plane.
  const handed = Math.sign(xx * yy - xy * yx) || 1;
  return ok({
    metres: Math.hypot(dx, dy),
    along: (dx * gx + dy * gy) / length,
    across: (handed * (dx * gy - dy * gx)) / length,
  });
}

function depthAt(matrix: Matrix3, { x, y }: VideoPoint): number {
  return matrix[6] * x + matrix[7] * y + matrix[8];
}
