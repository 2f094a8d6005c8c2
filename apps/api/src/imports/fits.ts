import type { ExportClip } from '@stillstroke/contract/export';
import type { Db } from '@stillstroke/db/open';
import type { ClipRow } from '../clips/clip-answer';
import { clipTimes } from '../measures/clip-reading';

/** Frame times of a film packed anew are rounded to its own clock; more than this apart, they are other frames. */
const SAME_TIME_US = 1000;

/**
 * Why a clip of a file cannot be put onto a clip of ours, as a sentence that says what to do; null when it fits. Frames
 * are counted and coordinates are pixels, so both clips need the same frames in the same size.
 */
export function misfit(db: Db, from: ExportClip, to: ClipRow): string | null {
  if (to.status !== 'ready')
    return `${to.name} is not ready yet. Wait until it is converted, then try again.`;
  if (from.timesUs.length !== from.frameCount)
    return `The file says ${from.frameCount} frames and lists the times of ${from.timesUs.length}. Export it again.`;
  if (from.width !== to.width || from.height !== to.height)
    return `The file’s clip is ${from.width} × ${from.height} pixels, ${to.name} ${to.width} × ${to.height}. Choose the clip that was marked, or upload that film.`;
  if (from.frameCount !== to.frameCount)
    return `The file’s clip has ${from.frameCount} frames, ${to.name} ${to.frameCount}. Choose the clip that was marked, or upload that film.`;
  const times = clipTimes(db, to.id);
  const apart = from.timesUs.findIndex((time, n) => Math.abs(time - (times[n] ?? Infinity)) > SAME_TIME_US);
  if (apart >= 0)
    return `Frame ${apart} has another time in the file than in ${to.name}. Choose the clip that was marked, or upload that film.`;
  return null;
}
