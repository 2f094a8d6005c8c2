import type { StepDirection } from './frame-source';

/** Where the person is, and which frames are at hand. */
export interface PrefetchView {
  /** Frame last asked for. */
  readonly focus: number;
  readonly direction: StepDirection;
  /** Frames in the clip. */
  readonly count: number;
  /** How many decoded frames fit the budget. */
  readonly capacity: number;
  /** The frame is in the cache or known to be damaged. */
  readonly settled: (frame: number) => boolean;
}

/** Decode up to `goal` and keep what comes by from `keepFrom` on. */
export interface PrefetchGoal {
  readonly goal: number;
  readonly keepFrom: number;
}

/** Ahead of a person who may go anywhere; enough for a first step to be at hand. */
const NEARBY = 6;
/** Longest stretches to decode in advance, in frames. */
const MOST_AHEAD = 60;
const MOST_BEHIND = 150;

/**
 * The next stretch worth decoding while nobody waits, or null when enough is at hand.
 *
 * Forward, one frame after another is enough, since the decoder runs that way. Backward each stretch costs decoding from
 * its key frame, so it is fetched by the chunk, and early: as soon as less than half a chunk is left.
 */
export function nextPrefetch(view: PrefetchView): PrefetchGoal | null {
  return view.direction < 0 ? chunkBehind(view) : frameAhead(view);
}

function frameAhead({ focus, direction, count, capacity, settled }: PrefetchView): PrefetchGoal | null {
  const reach = direction === 0 ? NEARBY : MOST_AHEAD;
  const end = Math.min(count - 1, focus + Math.min(reach, Math.floor(capacity / 2)));
  for (let frame = focus + 1; frame <= end; frame += 1) {
    if (!settled(frame)) return { goal: frame, keepFrom: frame };
  }
  return null;
}

function chunkBehind({ focus, capacity, settled }: PrefetchView): PrefetchGoal | null {
  const chunk = Math.max(1, Math.min(MOST_BEHIND, Math.floor(capacity * 0.6)));
  let frame = focus - 1;
  while (frame >= 0 && settled(frame)) {
    if (focus - frame >= Math.ceil(chunk / 2)) return null;
    frame -= 1;
  }
  return frame < 0 ? null : { goal: frame, keepFrom: Math.max(0, frame - chunk + 1) };
}
