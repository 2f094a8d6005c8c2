import type { BodyOf } from '@stillstroke/contract/endpoint';
import type { putMark as putCall } from '@stillstroke/contract/marks';
import { armAngles } from '@stillstroke/geometry/angles/arm-angles';
import { checkArmMark } from '@stillstroke/geometry/arm';
import type { ClipRow } from '../clips/clip-answer';
import { HttpProblem } from '../platform/problem';

/** Refuses a frame that the clip does not have. */
export function checkFrame({ frameCount }: ClipRow, frame: number): void {
  if (frame < frameCount) return;
  throw new HttpProblem(
    422,
    'frame-out-of-range',
    `The clip has frames 0 to ${frameCount - 1}; there is no frame ${frame}.`,
  );
}

export type Joints = Omit<BodyOf<typeof putCall>, 'version'>;

/** Refuses a mark of which no angle can be read, now or with another plumb. */
export function checkJoints(joints: Joints, { travel }: ClipRow): void {
  const readable = checkArmMark(joints).ok && armAngles(joints, { travel, plumb: null }).ok;
  if (readable) return;
  throw new HttpProblem(
    422,
    'joints-coincide',
    'Two of the three joints lie on one point, so the arm has no direction. Move them apart.',
  );
}

/** Joints as a mark's row keeps them. */
export function markColumns({ shoulder, elbow, wrist }: Joints) {
  return {
    shoulderX: shoulder.x,
    shoulderY: shoulder.y,
    elbowX: elbow.x,
    elbowY: elbow.y,
    wristX: wrist.x,
    wristY: wrist.y,
  };
}
