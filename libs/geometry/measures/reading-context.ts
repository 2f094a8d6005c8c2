import type { KnownDistance } from '../events/known-distance';
import type { MarkingContext } from '../uncertainty/arm-uncertainty';

/** What a stroke's measures depend on beside its events, marks and frame times. */
export interface ReadingContext extends MarkingContext {
  /** World seconds per file second; 1 for film played at the speed it was taken. */
  readonly captureRateFactor?: number;
  /** The forearm counts as vertical within this many degrees; 15 when left out. */
  readonly verticalToleranceDeg?: number;
  /** Half-width in frames of the spread of a chosen event frame; see `EVENT_ERROR_FRAMES`. */
  readonly eventErrorFrames?: number;
  /** How far the swimmer travelled over two frames of the clip, where that is known. */
  readonly distance?: KnownDistance | null;
}
