import { type Outcome, ok, refused } from '../outcome';
import { checkPoint, distance, type VideoPoint } from '../points/video-point';

/** A scale from one known length; holds in the plane at the depth of that length only. */
export interface LengthScale {
  readonly metresPerPixel: number;
  /** Standard uncertainty of the scale. */
  readonly uncertainty: number;
}

/** Scale of a known length drawn between two points, each placed with the given standard uncertainty (pixels). */
export function lengthScale(
  from: VideoPoint,
  to: VideoPoint,
  known: { readonly metres: number; readonly uncertaintyM?: number },
  pointUncertaintyPx: number,
): Outcome<LengthScale, 'not-finite' | 'not-positive' | 'too-short'> {
  if (!checkPoint(from).ok || !checkPoint(to).ok) return refused('not-finite');
  const { metres, uncertaintyM = 0 } = known;
  if (!Number.isFinite(metres + uncertaintyM + pointUncertaintyPx)) return refused('not-finite');
  if (metres <= 0 || uncertaintyM < 0 || pointUncertaintyPx < 0) return refused('not-positive');
  const px = distance(from, to);
  if (px < 10 * Math.max(1, pointUncertaintyPx)) return refused('too-short');
  const relative = Math.hypot(uncertaintyM / metres, (Math.SQRT2 * pointUncertaintyPx) / px);
  return ok({ metresPerPixel: metres / px, uncertainty: (metres / px) * relative });
}
