import type { Mark } from '@stillstroke/contract/marks';
import { armAngles } from '@stillstroke/geometry/angles/arm-angles';
import { armAngleUncertainty } from '@stillstroke/geometry/uncertainty/arm-uncertainty';
import type { ClipRow } from '../clips/clip-answer';
import { frameMark, type MarkRow, readingContext } from '../measures/clip-reading';

/** A mark with its angles as read with the clip's plumb and travel. */
export function markAnswer(row: MarkRow, clip: ClipRow): Mark {
  const context = readingContext(clip);
  const joints = frameMark(row);
  const angles = armAngles(joints, context);
  const uncertainty = armAngleUncertainty(joints, context);
  // Marks and plumbs are checked when they are made, so that each has its angles.
  if (!angles.ok) throw new Error(`a kept mark cannot be read: ${angles.reason}`);
  if (!uncertainty.ok) throw new Error(`a kept mark has no uncertainty: ${uncertainty.reason}`);
  const { forearmDeg, upperArmDeg, elbowDeg, elbowDropDeg } = uncertainty.value;
  return {
    arm: row.arm,
    ...joints,
    angles: angles.value,
    uncertaintyDeg: { forearmDeg, upperArmDeg, elbowDeg, elbowDropDeg },
    plumbAssumed: context.plumb === null,
    version: row.version,
    updatedAt: row.updatedAt,
  };
}
