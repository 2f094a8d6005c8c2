import type { ArmSide, FrameMark } from '../arm';
import { flatPort, WATER_INDEX, waterAngle } from '../calibration/refraction';
import { type Outcome, ok, refused } from '../outcome';
import { distance, type VideoPoint } from '../points/video-point';
import { cautionOf, type ViewCaution } from './caution';
import { type FieldOfView, isUnderwater, type ViewContext } from './view-context';

/** Taken while nobody has said it: about what a telephone's main camera sees in air. Common practice, no source. */
export const ASSUMED_FIELD_OF_VIEW: FieldOfView = { deg: 70, medium: 'air' };
/** Narrowest and widest that are taken, degrees. In water a flat port shows less than twice its critical angle. */
export const NARROWEST_VIEW_DEG = 5;
export const WIDEST_VIEW_DEG: Readonly<Record<FieldOfView['medium'], number>> = { air: 170, water: 96 };
/** Below this the bending is not worth a word. */
const LEAST_DEG = 1;

/**
 * Distance from the picture's middle to its side edge over the focal length: tan of half the angle in air; behind a flat
 * port in water n·t/√(1 − (n² − 1)t²).
 */
export function edgeRadius({ deg, medium }: FieldOfView): Outcome<number, 'outside-view'> {
  if (!(deg >= NARROWEST_VIEW_DEG && deg <= WIDEST_VIEW_DEG[medium])) return refused('outside-view');
  if (medium === 'air') return ok(Math.tan((deg * Math.PI) / 360));
  const edge = flatPort(deg / 2);
  return edge.ok ? ok(edge.value.radius) : edge;
}

export interface PortBending {
  /** How far off the camera's axis the place lies, in water. */
  readonly offAxisDeg: number;
  /** Largest error of a direction there. */
  readonly directionErrorDeg: number;
}

/** What a flat port does at a place of the picture. */
export function portBending(
  at: VideoPoint,
  picture: ViewContext['picture'],
  fieldOfView: FieldOfView,
): Outcome<PortBending, 'outside-view'> {
  const edge = edgeRadius(fieldOfView);
  if (!edge.ok) return edge;
  const middle = { x: picture.width / 2, y: picture.height / 2 };
  const water = waterAngle((distance(at, middle) / middle.x) * edge.value);
  if (!water.ok) return water;
  const port = flatPort(water.value, WATER_INDEX);
  if (!port.ok) return port;
  return ok({ offAxisDeg: water.value, directionErrorDeg: port.value.directionErrorDeg });
}

/**
 * How much a flat port may turn the arm's segments where they lie in the picture. A direction may be off by asin((q − 1)/
 * (q + 1)); an angle between two directions by twice that, at the joint where it is read. A dome or a corrected picture
 * has none of it.
 */
export function portCaution(context: ViewContext, arm: ArmSide, mark: FrameMark): ViewCaution | null {
  if (!isUnderwater(context.view)) return null;
  const fieldOfView = context.fieldOfView ?? ASSUMED_FIELD_OF_VIEW;
  const [shoulder, elbow, wrist] = [mark.shoulder, mark.elbow, mark.wrist].map((joint) =>
    portBending(joint, context.picture, fieldOfView),
  );
  if (!shoulder?.ok || !elbow?.ok || !wrist?.ok) return null;
  const [s, e, w] = [shoulder.value, elbow.value, wrist.value].map((bent) => bent.directionErrorDeg) as [
    number,
    number,
    number,
  ];
  const causeDeg = Math.max(shoulder.value.offAxisDeg, elbow.value.offAxisDeg, wrist.value.offAxisDeg);
  return cautionOf(
    { code: 'flat-port', arm, causeDeg, assumed: context.fieldOfView === null, frames: [mark.frame] },
    { forearm: Math.max(e, w), upperArm: Math.max(s, e), elbow: 2 * e, elbowDrop: 2 * s },
    LEAST_DEG,
  );
}
