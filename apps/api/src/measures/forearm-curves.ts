import type { CurvePoint } from '@stillstroke/contract/measures';
import { pullMarks, shareOfPull } from '@stillstroke/geometry/events/pull-marks';
import type { ClipRow } from '../clips/clip-answer';
import { readStrokes, strokeEvents, type Reader, type StrokeRow } from './clip-reading';

export interface PullCurves {
  readonly stroke: StrokeRow;
  readonly forearmCurve: CurvePoint[];
  readonly dropCurve: CurvePoint[];
}

/** Forearm and elbow drop over the pull of every stroke of a clip, without the measures that take longer to compute. */
export function forearmCurves(db: Reader, clip: ClipRow): PullCurves[] {
  const { strokes, marks, times, context } = readStrokes(db, clip);
  return strokes.map((stroke) => {
    const pull = pullMarks(strokeEvents(stroke), marks[stroke.arm], times, context);
    if (!pull.ok) return { stroke, forearmCurve: [], dropCurve: [] };
    const { marks: read, span } = pull.value;
    const curve = (angle: 'forearmDeg' | 'elbowDropDeg') =>
      read.map(({ mark, timeUs, angles, uncertainty }) => ({
        frame: mark.frame,
        share: shareOfPull(span, timeUs),
        deg: angles[angle],
        uncertaintyDeg: uncertainty[angle],
      }));
    return { stroke, forearmCurve: curve('forearmDeg'), dropCurve: curve('elbowDropDeg') };
  });
}
