import type { Point } from '@stillstroke/contract/clip-facts';
import type { Arm } from '@stillstroke/contract/strokes';
import type { FrameMark, Joint } from '@stillstroke/geometry/arm';

/** Joints in the order in which they are placed. */
export const jointsInOrder: readonly Joint[] = ['shoulder', 'elbow', 'wrist'];

/** One arm on one frame as the Desk holds it: joints that are not placed yet are null. */
export interface DeskMark {
  readonly arm: Arm;
  readonly frame: number;
  /** Pixels of the picture as shown. */
  readonly shoulder: Point | null;
  readonly elbow: Point | null;
  readonly wrist: Point | null;
}

/** A mark with all its joints: the only kind that is read and saved. */
export interface CompleteMark extends FrameMark {
  readonly arm: Arm;
}

/** `left:168` */
export function markKey(arm: Arm, frame: number): string {
  return `${arm}:${frame}`;
}

export function isComplete(mark: DeskMark | null | undefined): mark is DeskMark & CompleteMark {
  return !!mark && mark.shoulder !== null && mark.elbow !== null && mark.wrist !== null;
}

/** The first joint, in the order of placing, that is missing; null when all are there. */
export function firstMissing(mark: DeskMark | null): Joint | null {
  return jointsInOrder.find((joint) => !mark?.[joint]) ?? null;
}

/** The mark with one joint placed or taken off; null when no joint is left. */
export function withJoint(
  mark: DeskMark | null,
  at: { readonly arm: Arm; readonly frame: number },
  joint: Joint,
  point: Point | null,
): DeskMark | null {
  const base: DeskMark = mark ?? { arm: at.arm, frame: at.frame, shoulder: null, elbow: null, wrist: null };
  const next = { ...base, [joint]: point };
  return jointsInOrder.some((name) => next[name]) ? next : null;
}

export function sameMark(a: DeskMark | null, b: DeskMark | null): boolean {
  if (a === null || b === null) return a === b;
  return jointsInOrder.every((joint) => a[joint]?.x === b[joint]?.x && a[joint]?.y === b[joint]?.y);
}
