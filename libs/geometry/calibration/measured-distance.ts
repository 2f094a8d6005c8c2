import { type Outcome, ok } from '../outcome';
import { distance, type VideoPoint } from '../points/video-point';
import { combine, type UncertaintyPart, type UncertaintySource } from '../uncertainty/parts';
import type { Matrix3 } from './homography';
import { FIT_STEP, type FittedScale, type KnownLength } from './picture-scale';
import { planeVector, type PlaneReason, type PlaneVector } from './plane-vector';

/** A distance on the scale's plane, metres. */
export interface MeasuredDistance {
  readonly metres: number;
  /** Standard uncertainty: of the scale's points, of its known length, and of the two places themselves. */
  readonly uncertaintyM: number;
  /** What it is made of, largest first: `first-place`, `second-place`, `scale`. */
  readonly parts: readonly UncertaintyPart[];
}

/** Standard uncertainties of the two places, pixels per coordinate. */
export interface PlacingPx {
  readonly from: number;
  readonly to: number;
}

/**
 * A number read off the plane with its standard uncertainty, u² = Σ (∂f/∂x)² u²(x) over every coordinate and known length,
 * slopes by central differences (JCGM 100:2008, eq. (10)).
 */
export function readOff(
  scale: FittedScale,
  [from, to]: readonly [VideoPoint, VideoPoint],
  placing: PlacingPx,
  read: (vector: PlaneVector) => number,
  down?: { readonly x: number; readonly y: number },
): Outcome<MeasuredDistance, PlaneReason> {
  const value = planeVector(scale.toPlane, scale.known, [from, to], down);
  if (!value.ok) return value;
  const at = (matrix: Matrix3, a: VideoPoint, b: VideoPoint): number => {
    const moved = planeVector(matrix, scale.known, [a, b], down);
    return moved.ok ? read(moved.value) : NaN;
  };
  const contributions: { source: UncertaintySource; alone: number }[] = [];
  const add = (source: UncertaintySource, rise: number): void => {
    contributions.push({ source, alone: Number.isFinite(rise) ? Math.abs(rise) / (2 * FIT_STEP) : 0 });
  };
  const moved = (point: VideoPoint, axis: 'x' | 'y', by: number): VideoPoint => ({
    ...point,
    [axis]: point[axis] + FIT_STEP * by,
  });
  for (const axis of ['x', 'y'] as const) {
    const [a, b] = [placing.from, placing.to];
    add(
      'first-place',
      at(scale.toPlane, moved(from, axis, a), to) - at(scale.toPlane, moved(from, axis, -a), to),
    );
    add(
      'second-place',
      at(scale.toPlane, from, moved(to, axis, b)) - at(scale.toPlane, from, moved(to, axis, -b)),
    );
  }
  for (const { above, below } of scale.variants) add('scale', at(above, from, to) - at(below, from, to));
  const { standard, parts } = combine(contributions);
  return ok({ metres: read(value.value), uncertaintyM: standard, parts });
}

/** The distance between two places of the picture, on the scale's plane. */
export function measuredDistance(
  scale: FittedScale,
  from: VideoPoint,
  to: VideoPoint,
  placing: PlacingPx,
): Outcome<MeasuredDistance, PlaneReason> {
  return readOff(scale, [from, to], placing, ({ metres }) => metres);
}

/** How a second known length fits the scale. */
export interface ScaleCheck {
  /** Read off less known, metres. */
  readonly differenceM: number;
  /** The same where the length lies in the picture, pixels. */
  readonly differencePx: number;
  /** Standard uncertainty of the difference, metres. */
  readonly uncertaintyM: number;
  /** Whether the difference is one that placing may produce: within 1.96 standard uncertainties. */
  readonly agrees: boolean;
}

/** Holds a second known length against the scale: the only residual there is, since the scale itself fits exactly. */
export function scaleCheck(
  scale: FittedScale,
  known: KnownLength,
  placingPx: number,
): Outcome<ScaleCheck, PlaneReason> {
  const read = measuredDistance(scale, known.from, known.to, { from: placingPx, to: placingPx });
  if (!read.ok) return read;
  const { metres, uncertaintyM } = read.value;
  const differenceM = metres - known.metres;
  return ok({
    differenceM,
    differencePx: (differenceM * distance(known.from, known.to)) / metres,
    uncertaintyM,
    agrees: Math.abs(differenceM) <= 1.96 * uncertaintyM,
  });
}
