import type { ArmSide } from '../arm';

/** Why what the camera shows may differ from what the arm did. Codes for programs; the words are the interface's job. */
export const cautionCodes = [
  'foreshortened',
  'far-arm',
  'plumb-assumed',
  'plumb-short',
  'camera-leans',
  'flat-port',
] as const;
export type CautionCode = (typeof cautionCodes)[number];

/** Angles of one frame, and measures of one stroke, that a caution can be about. */
export const frameReadingNames = ['forearm', 'upperArm', 'elbow', 'elbowDrop'] as const;
export type FrameReadingName = (typeof frameReadingNames)[number];
export const strokeReadingNames = ['verticalAt', 'peakDrop', 'elbowAtMidPull'] as const;
export type StrokeReadingName = (typeof strokeReadingNames)[number];
export type AffectedReading = FrameReadingName | StrokeReadingName;

/** The angle behind a measure of a stroke: what a caution's size means for it. */
export const angleBehind: Readonly<Record<StrokeReadingName, FrameReadingName>> = {
  verticalAt: 'forearm',
  peakDrop: 'elbowDrop',
  elbowAtMidPull: 'elbow',
};

/** By how much a reading may be off, degrees of the angle that it is or rests on, 0 to 180. */
export interface Affected {
  readonly reading: AffectedReading;
  readonly sizeDeg: number;
}

/** One plain caution. Not part of any ±: it does not shrink with more marks or strokes. */
export interface ViewCaution {
  readonly code: CautionCode;
  /** Null where it is about the whole clip. */
  readonly arm: ArmSide | null;
  /** The largest of the sizes below, degrees. */
  readonly sizeDeg: number;
  /** What it comes from, degrees: out of plane, lean of the camera, off the camera's axis; null for the far arm. */
  readonly causeDeg: number | null;
  /** True when the size rests on something that nobody has said of this clip. */
  readonly assumed: boolean;
  /** 0-based, ascending; empty for the whole clip. */
  readonly frames: readonly number[];
  readonly affects: readonly Affected[];
}

export type SizeByReading = Partial<Record<AffectedReading, number>>;

/** A caution from the sizes of what it affects; null when none of them reaches `least` degrees. */
export function cautionOf(
  facts: Pick<ViewCaution, 'code' | 'arm' | 'causeDeg' | 'assumed' | 'frames'>,
  sizes: SizeByReading,
  least: number,
): ViewCaution | null {
  const affects = (Object.entries(sizes) as [AffectedReading, number][])
    .filter(([, sizeDeg]) => Number.isFinite(sizeDeg) && sizeDeg >= least)
    .map(([reading, sizeDeg]): Affected => ({ reading, sizeDeg }));
  if (affects.length === 0) return null;
  return { ...facts, sizeDeg: Math.max(...affects.map(({ sizeDeg }) => sizeDeg)), affects };
}
