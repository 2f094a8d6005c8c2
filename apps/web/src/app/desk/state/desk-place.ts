import { signal, type Signal } from '@angular/core';
import type { Point } from '@stillstroke/contract/clip-facts';
import type { Arm } from '@stillstroke/contract/strokes';
import type { Joint } from '@stillstroke/geometry/arm';

/** Where the coach is: the frame shown, the arm worked on, the joint chosen, and the keyboard's crosshair. */
export class DeskPlace {
  private readonly shown = signal(0);
  private readonly chosenArm = signal<Arm>('right');
  private readonly chosenJoint = signal<Joint>('shoulder');
  private readonly cross = signal<Point | null>(null);

  readonly frame = this.shown.asReadonly();
  readonly arm = this.chosenArm.asReadonly();
  readonly joint = this.chosenJoint.asReadonly();
  /** Where Enter would put the joint down, picture pixels; null until it was moved once. */
  readonly crosshair = this.cross.asReadonly();

  constructor(readonly timesUs: Signal<readonly number[]>) {}

  /** To a frame; frames outside the clip lead to its first or last one. */
  setFrame(frame: number): void {
    const last = Math.max(0, this.timesUs().length - 1);
    this.shown.set(Math.min(last, Math.max(0, Math.round(frame) || 0)));
  }

  setArm(arm: Arm): void {
    this.chosenArm.set(arm);
  }

  setJoint(joint: Joint): void {
    this.chosenJoint.set(joint);
  }

  setCrosshair(point: Point | null): void {
    this.cross.set(point);
  }
}
