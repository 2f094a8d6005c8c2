import { type Outcome, ok, refused } from '../outcome';

/**
 * Point in pixels of the picture as shown (after rotation and pixel-aspect correction, before any zoom): continuous,
 * origin at the outer top-left corner, x right, y down. The first pixel's centre is (0.5, 0.5).
 */
export interface VideoPoint {
  readonly x: number;
  readonly y: number;
}

export type PointReason = 'missing-point' | 'not-finite' | 'far-outside-picture';

/** Coordinates beyond this (pixels) belong to no picture; products of several of them would overflow. */
const FARTHEST_PX = 1e6;

export function videoPoint(x: number, y: number): Outcome<VideoPoint, PointReason> {
  return checkPoint({ x, y });
}

/** The point itself when it is there, finite and in the reach of a picture; also takes what arrived untyped. */
export function checkPoint(point: VideoPoint | null | undefined): Outcome<VideoPoint, PointReason> {
  if (typeof point !== 'object' || point === null) return refused('missing-point');
  if (!Number.isFinite(point.x) || !Number.isFinite(point.y)) return refused('not-finite');
  const farthest = Math.max(Math.abs(point.x), Math.abs(point.y));
  return farthest > FARTHEST_PX ? refused('far-outside-picture') : ok(point);
}

/** Distance in pixels. */
export function distance(a: VideoPoint, b: VideoPoint): number {
  return Math.hypot(b.x - a.x, b.y - a.y);
}
