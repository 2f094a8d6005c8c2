import type { ArmMark, FrameMark } from '../arm';
import type { Outcome } from '../outcome';

/** Test data: arms built from known angles, and outcomes taken apart. */

/** The value, or a failed test that names the reason. */
export function valueOf<T>(outcome: Outcome<T>): T {
  if (!outcome.ok) throw new Error(`refused: ${outcome.reason}`);
  return outcome.value;
}

export function reasonOf(outcome: Outcome<unknown>): string {
  if (outcome.ok) throw new Error('expected a refusal');
  return outcome.reason;
}

export function markOf(...coordinates: [number, number, number, number, number, number]): ArmMark {
  const [sx, sy, ex, ey, wx, wy] = coordinates;
  return { shoulder: { x: sx, y: sy }, elbow: { x: ex, y: ey }, wrist: { x: wx, y: wy } };
}

export interface ArmModel {
  readonly upperArmDeg: number;
  readonly forearmDeg: number;
  readonly upperPx?: number;
  readonly forePx?: number;
  readonly shoulder?: { readonly x: number; readonly y: number };
}

/** An arm with these angles, swimming to the right under a level camera. */
export function armOf(model: ArmModel): ArmMark {
  const { x, y } = model.shoulder ?? { x: 600, y: 300 };
  const upper = model.upperPx ?? 110;
  const fore = model.forePx ?? 100;
  const elbow = { x: x + upper * sin(model.upperArmDeg), y: y + upper * cos(model.upperArmDeg) };
  const wrist = { x: elbow.x + fore * sin(model.forearmDeg), y: elbow.y + fore * cos(model.forearmDeg) };
  return { shoulder: { x, y }, elbow, wrist };
}

export function onFrame(frame: number, model: ArmModel): FrameMark {
  return { frame, ...armOf(model) };
}

/** Frame times of a constant rate, whole microseconds. */
export function constantRate(frames: number, fps: number): number[] {
  return Array.from({ length: frames }, (_, i) => Math.round((i * 1e6) / fps));
}

function sin(deg: number): number {
  return Math.sin((deg * Math.PI) / 180);
}

function cos(deg: number): number {
  return Math.cos((deg * Math.PI) / 180);
}
