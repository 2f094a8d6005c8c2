import type { VideoPoint } from '@stillstroke/geometry/points/video-point';

declare const space: unique symbol;

/** Point in pixels of the picture as shown, before any zoom; see `VideoPoint`. */
export type PicturePoint = VideoPoint & { readonly [space]: 'picture' };

/** Point in CSS pixels of the stage, from its top-left corner, x right, y down. */
export interface StagePoint {
  readonly x: number;
  readonly y: number;
  readonly [space]: 'stage';
}

/** Width and height; which pixels is said where it is used. */
export interface Size {
  readonly width: number;
  readonly height: number;
}

/** Marks coordinates as belonging to the picture. */
export function picturePoint(x: number, y: number): PicturePoint {
  return { x, y } as PicturePoint;
}

/** A point of a mark or plumb, which is of the picture by definition. */
export function asPicturePoint(point: VideoPoint): PicturePoint {
  return picturePoint(point.x, point.y);
}

/** Marks coordinates as belonging to the stage. */
export function stagePoint(x: number, y: number): StagePoint {
  return { x, y } as StagePoint;
}

/** Distance in CSS pixels. */
export function stageDistance(a: StagePoint, b: StagePoint): number {
  return Math.hypot(b.x - a.x, b.y - a.y);
}
