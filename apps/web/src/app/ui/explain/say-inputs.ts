import type { Plumb, Point, Travel } from '@stillstroke/contract/clip-facts';
import { ASSUMED_ROLL_UNCERTAINTY_DEG } from '@stillstroke/geometry/calibration/plumb';
import { fixed } from '../figure/format-figure';
import type { ExplainedInput } from './explanation';

interface Joints {
  readonly frame: number;
  readonly shoulder: Point;
  readonly elbow: Point;
  readonly wrist: Point;
}

/** The joints as placed, a line a frame. */
export function sayMarks(marks: readonly Joints[]): ExplainedInput[] {
  return marks.map(({ frame, shoulder, elbow, wrist }) => ({
    name: `Joints on frame ${frame}, pixels`,
    value: `shoulder ${sayPoint(shoulder)}, elbow ${sayPoint(elbow)}, wrist ${sayPoint(wrist)}`,
  }));
}

/** What the clip gives to every angle: its plumb, the direction of travel, and how far a joint can be trusted. */
export function sayClip(clip: {
  readonly plumb: Plumb | null;
  readonly travel: Travel;
  readonly jointUncertaintyPx: { readonly shoulder: number; readonly elbow: number; readonly wrist: number };
  readonly jointUncertaintyOwn: boolean;
}): ExplainedInput[] {
  const { shoulder, elbow, wrist } = clip.jointUncertaintyPx;
  return [
    { name: 'Plumb', value: sayPlumb(clip.plumb) },
    { name: 'Travel in the picture', value: `to the ${clip.travel}` },
    {
      name: 'Spread of a placed joint, pixels',
      value: `shoulder ${fixed(shoulder, 1)}, elbow ${fixed(elbow, 1)}, wrist ${fixed(wrist, 1)}; ${
        clip.jointUncertaintyOwn
          ? 'found by marking again, by whoever placed most of the marks'
          : 'the default for a picture of this size'
      }`,
    },
  ];
}

function sayPlumb(plumb: Plumb | null): string {
  if (!plumb) return `not set: the picture’s own vertical is assumed, ± ${ASSUMED_ROLL_UNCERTAINTY_DEG}°`;
  const { top, bottom } = plumb;
  const length = Math.hypot(bottom.x - top.x, bottom.y - top.y);
  return `${sayPoint(top)} to ${sayPoint(bottom)}, ${fixed(length, 0)} pixels long`;
}

function sayPoint({ x, y }: Point): string {
  return `(${fixed(x, 1)}, ${fixed(y, 1)})`;
}
