import { type Outcome, ok, refused } from '../outcome';
import { distance, type VideoPoint } from '../points/video-point';

/** Four corners in the order in which one walks round. */
export type Quad = readonly [VideoPoint, VideoPoint, VideoPoint, VideoPoint];

export type QuadReason = 'corners-too-close' | 'corners-cross' | 'corners-not-convex' | 'corners-in-line';

/** Sides shorter than this (pixels) fix no plane. */
const SHORTEST_SIDE_PX = 10;
/** A corner flatter than this (degrees off straight) counts as lying in line with its neighbours. */
const FLATTEST_DEG = 3;

/** The corners themselves when they can be the picture of a rectangle: apart, walked round once, every corner pointing out. */
export function checkQuad(corners: Quad): Outcome<Quad, QuadReason> {
  const [a, b, c, d] = corners;
  const shortest = Math.min(
    distance(a, b),
    distance(b, c),
    distance(c, d),
    distance(d, a),
    distance(a, c),
    distance(b, d),
  );
  if (shortest < SHORTEST_SIDE_PX) return refused('corners-too-close');
  if (crosses(a, b, c, d) || crosses(b, c, d, a)) return refused('corners-cross');
  const turns = [turnAt(d, a, b), turnAt(a, b, c), turnAt(b, c, d), turnAt(c, d, a)];
  if (turns.some((deg) => Math.abs(deg) < FLATTEST_DEG)) return refused('corners-in-line');
  const oneWay = turns.every((deg) => deg > 0) || turns.every((deg) => deg < 0);
  return oneWay ? ok(corners) : refused('corners-not-convex');
}

/** Whether the side p–q and the one opposite, r–s, cross each other. */
function crosses(p: VideoPoint, q: VideoPoint, r: VideoPoint, s: VideoPoint): boolean {
  return side(p, q, r) * side(p, q, s) < 0 && side(r, s, p) * side(r, s, q) < 0;
}

function side(from: VideoPoint, to: VideoPoint, at: VideoPoint): number {
  return (to.x - from.x) * (at.y - from.y) - (to.y - from.y) * (at.x - from.x);
}

/** How far the way turns at a corner, degrees, −180 to 180. */
function turnAt(before: VideoPoint, at: VideoPoint, after: VideoPoint): number {
  const [ux, uy, vx, vy] = [at.x - before.x, at.y - before.y, after.x - at.x, after.y - at.y];
  return (Math.atan2(ux * vy - uy * vx, ux * vx + uy * vy) * 180) / Math.PI;
}
