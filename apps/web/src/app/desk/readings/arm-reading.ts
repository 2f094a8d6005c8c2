import type { ArmAngles } from '@stillstroke/geometry/angles/arm-angles';
import type { ArmAngleUncertainty } from '@stillstroke/geometry/uncertainty/arm-uncertainty';

/** What one arm reads on one frame. */
export interface ArmReading {
  readonly angles: ArmAngles;
  readonly uncertainty: ArmAngleUncertainty;
}

/** Words for a forearm angle; degrees, + hand ahead of the elbow. */
export function sayForearm(deg: number, toleranceDeg: number): string {
  if (Math.abs(deg) <= toleranceDeg) return 'vertical, within the tolerance';
  return deg > 0 ? 'hand ahead of the elbow, not yet vertical' : 'hand behind the elbow, past vertical';
}

/** Words for an elbow drop; degrees, + below and behind the line from shoulder to hand. */
export function sayDrop(deg: number): string {
  if (Math.abs(deg) < 0.5) return 'on the line shoulder to hand';
  return deg > 0 ? 'behind the line: dropped' : 'in front of the line: high';
}
