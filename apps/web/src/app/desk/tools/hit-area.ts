import { asPicturePoint, stageDistance, type StagePoint } from '../stage/spaces';
import { toStage, type ViewTransform } from '../stage/view-transform';
import type { JointHandle, PlumbEnd, PointerKind, ToolPort } from './tool-port';

/** Radius, CSS pixels, within which a press takes hold: 24 px across for a mouse or pen, 44 px for a finger. */
export const HIT_RADIUS: Readonly<Record<PointerKind, number>> = { mouse: 12, pen: 12, touch: 22 };

/** The nearest joint within reach; of two equally near ones the first listed. */
export function jointAt(
  joints: readonly JointHandle[],
  view: ViewTransform,
  at: StagePoint,
  kind: PointerKind,
): JointHandle | null {
  return nearest(
    joints.map((handle) => ({ what: handle, away: stageDistance(toStage(view, handle.point), at) })),
    HIT_RADIUS[kind],
  );
}

/** The end of the plumb within reach. */
export function plumbEndAt(port: ToolPort, at: StagePoint, kind: PointerKind): PlumbEnd | null {
  const plumb = port.plumb();
  if (!plumb) return null;
  const ends: readonly PlumbEnd[] = ['top', 'bottom'];
  return nearest(
    ends.map((end) => ({
      what: end,
      away: stageDistance(toStage(port.view(), asPicturePoint(plumb[end])), at),
    })),
    HIT_RADIUS[kind],
  );
}

function nearest<T>(found: readonly { what: T; away: number }[], within: number): T | null {
  let best: { what: T; away: number } | null = null;
  for (const candidate of found) {
    if (candidate.away <= within && (!best || candidate.away < best.away)) best = candidate;
  }
  return best?.what ?? null;
}
