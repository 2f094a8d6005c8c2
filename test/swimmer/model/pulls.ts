import type { ArmStyle, PullShape, StrokeSpread, SwimmerStyle } from './style';

/** A pull that comes to vertical early over a high elbow. */
export function earlyPull(verticalAt: number, catchForearmDeg = 77): PullShape {
  return { verticalAt, catchForearmDeg, dropDeg: [-6, -17, -25, -25, -14, -5] };
}

/** A pull that stays long in front, with the elbow up to `peakDropDeg` behind the line from shoulder to hand. */
export function latePull(verticalAt: number, peakDropDeg: number, catchForearmDeg = 80): PullShape {
  return {
    verticalAt,
    catchForearmDeg,
    dropDeg: [-4, peakDropDeg * 0.55 - 1, peakDropDeg, peakDropDeg - 7, -11, -5],
  };
}

export function sameAlways(shape: PullShape): ArmStyle {
  return { plain: shape, breathing: shape };
}

export const STEADY: StrokeSpread = { period: 0.012, events: 0.006, verticalAt: 0.016, dropDeg: 0.9 };

type StyleParts = Pick<SwimmerStyle, 'seed' | 'arms'> & Partial<SwimmerStyle>;

export function swimmerStyle(parts: StyleParts): SwimmerStyle {
  return {
    periodS: 1.36,
    catchShare: 0.27,
    exitShare: 0.69,
    breathing: { side: 'left', every: 2, first: 0 },
    spread: STEADY,
    ...parts,
  };
}
