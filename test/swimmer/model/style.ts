import type { ArmSide } from './stroke-times';

/** How one arm pulls. Angles in degrees with the product's signs: + hand ahead, + elbow dropped. */
export interface PullShape {
  /** Share of the pull (catch 0, exit 1) at which the forearm comes within 15° of vertical. */
  readonly verticalAt: number;
  /** Forearm at the catch; 90 is level, hand ahead. */
  readonly catchForearmDeg: number;
  /** Elbow drop at the shares {@link DROP_SHARES} of the pull. */
  readonly dropDeg: readonly [number, number, number, number, number, number];
}

export const DROP_SHARES = [0, 0.22, 0.42, 0.62, 0.84, 1] as const;

export interface ArmStyle {
  readonly plain: PullShape;
  readonly breathing: PullShape;
}

export interface BreathingPattern {
  /** The head turns to this side while that side's arm leaves the water. */
  readonly side: ArmSide;
  /** One breath in so many cycles, counted from `first`; 0 never. */
  readonly every: number;
  readonly first: number;
}

/** How strokes of one swimmer differ from each other: standard deviations. */
export interface StrokeSpread {
  /** Of the cycle's duration, as a share of it. */
  readonly period: number;
  /** Of catch and exit within the cycle, as a share of it. */
  readonly events: number;
  /** Of `verticalAt`. */
  readonly verticalAt: number;
  /** Of the elbow drop, degrees. */
  readonly dropDeg: number;
}

export interface SwimmerStyle {
  readonly seed: number;
  /** Seconds from entry to next entry of the same hand. */
  readonly periodS: number;
  /** Shares of the cycle at which the hand begins to move backward and leaves the water. */
  readonly catchShare: number;
  readonly exitShare: number;
  readonly arms: Readonly<Record<ArmSide, ArmStyle>>;
  readonly breathing: BreathingPattern;
  readonly spread: StrokeSpread;
}
