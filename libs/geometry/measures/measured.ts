import type { Interval } from '../uncertainty/elbow-interval';
import type { UncertaintyPart } from '../uncertainty/parts';

/** A measured number with how far it can be trusted and the frames it came from. */
export interface Measured {
  readonly value: number;
  /** Standard uncertainty, in the unit of the value. */
  readonly uncertainty: number;
  /** 95 % interval; not always symmetric about the value. */
  readonly interval: Interval;
  /** What the uncertainty is made of, largest first. */
  readonly parts: readonly UncertaintyPart[];
  /** The frame to show for it: 0-based, the nearest one by time when the number lies between frames. */
  readonly frame: number;
  /** Every frame whose mark or event went into it, ascending. */
  readonly frames: readonly number[];
}
