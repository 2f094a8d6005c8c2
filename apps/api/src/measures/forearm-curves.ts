import type { CurvePoint } from '@stillstroke/contract/measures';
import { pullMarks, readMark, shareOfPull } from '@stillstroke/geometry/events/pull-marks';
import { armAngleUncertainty } from '@stillstroke/geometry/uncertainty/arm-uncertainty';
import type { ClipRow } from '../clips/clip-answer';
import { readStrokes, strokeEvents, type Reader, type StrokeRow } from './clip-reading';

/** The forearm over the pull of every stroke of a clip, without the measures that take longer to compute. */
export function forearmCurves(
  db: Reader,
  clip: ClipRow,
): { stroke: StrokeRow; forearmCurve: CurvePoint[] }[] {
  const { strokes, marks, times, context } = readStrokes(db, clip);
  return strokes.map((stroke) => {
    const pull = pullMarks(strokeEvents(stroke), marks[stroke.arm], times, context);
    if (!pull.ok) return { stroke, forearmCurve: [] };
    const { axes, span } = pull.value;
    const forearmCurve = pull.value.marks.flatMap(({ mark, timeUs }) => {
      const u = armAngleUncertainty(mark, context);
      if (!u.ok) return [];
      return [
        {
          frame: mark.frame,
          share: shareOfPull(span, timeUs),
          deg: readMark(mark, axes).forearmDeg,
          uncertaintyDeg: u.value.forearmDeg,
        },
      ];
    });
    return { stroke, forearmCurve };
  });
}
