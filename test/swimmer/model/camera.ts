import type { BodyPoint } from './arm-motion';

export type View = 'side-underwater' | 'front-underwater';
export type Travel = 'left' | 'right';

/** A camera that keeps pace with the swimmer: the swimmer is drawn in parallel projection, the pool in perspective. */
export interface Camera {
  readonly view: View;
  /** The way the swimmer travels in the picture; a front view keeps it for the sign of the angles only. */
  readonly travel: Travel;
  readonly width: number;
  readonly height: number;
  /** Pixels per metre in the swimmer's plane. */
  readonly pixelsPerM: number;
  /** Degrees; + the lower end of a plumb leans to the right in the picture. */
  readonly rollDeg: number;
  /** Depth of the lens below the still surface, metres. */
  readonly depthM: number;
  /** Where the middle between the shoulders sits across the picture, share of its width in the travel direction. */
  readonly aheadShare: number;
}

export interface PicturePoint {
  readonly x: number;
  readonly y: number;
}

/**
 * Picture point (pixels, origin at the outer top-left corner, x right, y down) of a point beside the swimmer. `drift` is
 * how far the camera has fallen behind, metres.
 */
export function project(camera: Camera, point: BodyPoint, drift = 0): PicturePoint {
  const level = levelPoint(camera, point, drift);
  return rolled(camera, level);
}

/** The same before the camera's roll: pixels from the middle of the picture, x right, y down the plumb. */
export function levelPoint(camera: Camera, point: BodyPoint, drift = 0): PicturePoint {
  const y = (point.d - camera.depthM) * camera.pixelsPerM;
  if (camera.view === 'front-underwater') return { x: -point.r * camera.pixelsPerM, y };
  const x = (point.f + drift) * camera.pixelsPerM + (camera.aheadShare - 0.5) * camera.width;
  return { x: camera.travel === 'right' ? x : -x, y };
}

export function rolled(camera: Camera, level: PicturePoint): PicturePoint {
  const roll = (camera.rollDeg * Math.PI) / 180;
  return {
    x: camera.width / 2 + level.x * Math.cos(roll) + level.y * Math.sin(roll),
    y: camera.height / 2 - level.x * Math.sin(roll) + level.y * Math.cos(roll),
  };
}

/** How far the swimmer moves in the picture around the camera's pace, metres at a time in seconds. */
export function cameraDrift(timeS: number): number {
  return 0.05 * Math.sin(0.9 * timeS + 0.4) + 0.018 * Math.sin(2.3 * timeS);
}
