import type { Arm } from '@stillstroke/contract/strokes';
import {
  framesStillToMark,
  framesToMark,
  type MarkNeed,
  type NeededFrame,
} from '@stillstroke/geometry/events/stroke';
import { isWhole, strokeAt, strokesOf, type DeskStroke } from './desk-stroke';

export const needWords: Readonly<Record<MarkNeed, string>> = {
  entry: 'entry',
  catch: 'catch',
  'one-third': 'one third of the pull',
  'mid-pull': 'mid-pull',
  'two-thirds': 'two thirds of the pull',
  exit: 'exit',
};

/** What is known of the clip for finding the next frame. */
export interface Progress {
  readonly strokes: readonly DeskStroke[];
  readonly timesUs: readonly number[];
  /** Frames with a whole mark. */
  readonly marked: Readonly<Record<Arm, readonly number[]>>;
  /** File time of mid-pull where it is known. */
  readonly midPullUs: (strokeId: string) => number | null;
}

export interface NextFrame {
  readonly stroke: DeskStroke;
  readonly need: MarkNeed;
  readonly frame: number;
}

/** Frames that a stroke still needs marked, along the clip; none for a draft. */
export function stillToMark(stroke: DeskStroke, progress: Progress): readonly NeededFrame[] {
  if (!isWhole(stroke)) return [];
  const needed = framesToMark(stroke, progress.timesUs, progress.midPullUs(stroke.id));
  return needed.ok ? framesStillToMark(needed.value, progress.marked[stroke.arm]) : [];
}

/**
 * The next frame to mark: in the stroke the frame lies in, from the frame on and round to its beginning; then in the
 * arm's later strokes and its earlier ones; then in the other arm's. null when nothing is left.
 */
export function nextToMark(progress: Progress, arm: Arm, frame: number): NextFrame | null {
  const current = strokeAt(progress.strokes, arm, frame);
  const own = strokesOf(progress.strokes, arm);
  const turn = current
    ? own.findIndex(({ id }) => id === current.id)
    : own.filter((s) => s.entry < frame).length;
  const others = strokesOf(progress.strokes, arm === 'left' ? 'right' : 'left');
  for (const stroke of [...own.slice(turn), ...own.slice(0, turn), ...others]) {
    const left = stillToMark(stroke, progress);
    const next = stroke.id === current?.id ? (left.find((one) => one.frame > frame) ?? left[0]) : left[0];
    if (next && !(next.frame === frame && stroke.arm === arm)) return { stroke, ...next };
  }
  return null;
}
