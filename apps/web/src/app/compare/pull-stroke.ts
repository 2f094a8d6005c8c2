import type { Comparison } from '@stillstroke/contract/comparison';
import { resample } from '@stillstroke/geometry/curves/resample';

export type ComparedStroke = Comparison['strokes'][number];

/**
 * The stroke to show for one arm: among the best marked ones the one whose curve lies nearest the middle of all of
 * that arm, so that the still is typical and not the extreme. Null when the arm has no stroke.
 */
export function typicalStroke(
  strokes: readonly ComparedStroke[],
  arm: 'left' | 'right',
): ComparedStroke | null {
  const own = strokes.filter((stroke) => stroke.arm === arm);
  const most = Math.max(0, ...own.map(({ forearmCurve }) => forearmCurve.length));
  const best = own.filter(({ forearmCurve }) => forearmCurve.length >= Math.min(most, 4));
  const middles = best.map((stroke) => ({ stroke, middle: forearmAt(stroke, 0.4) ?? Infinity }));
  middles.sort((a, b) => a.middle - b.middle);
  return middles[Math.floor((middles.length - 1) / 2)]?.stroke ?? null;
}

/** Forearm in degrees at a whole percent of the pull (share 0–1), by the rule of the curves; null where marks do not carry it. */
export function forearmAt({ forearmCurve }: ComparedStroke, share: number): number | null {
  return resample(forearmCurve)[Math.round(share * 100)] ?? null;
}

/** The frame nearest by time to a share of the pull, given the times of the clip's frames. */
export function frameAtShare(stroke: ComparedStroke, share: number, timestampsUs: readonly number[]): number {
  const from = timestampsUs[stroke.catch];
  const to = timestampsUs[stroke.exit];
  if (from === undefined || to === undefined) return stroke.catch;
  const target = from + share * (to - from);
  let nearest = stroke.catch;
  for (let frame = stroke.catch; frame <= stroke.exit; frame++) {
    if (distance(timestampsUs[frame], target) < distance(timestampsUs[nearest], target)) nearest = frame;
  }
  return nearest;
}

const distance = (time: number | undefined, target: number) => Math.abs((time ?? Infinity) - target);
