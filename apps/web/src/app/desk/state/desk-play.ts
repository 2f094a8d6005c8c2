import { signal } from '@angular/core';

/** Share of the world's speed: 1 is as fast as the swimmer was, whatever the file plays like. */
export type Speed = 1 | 0.5 | 0.25 | 0.125;
export const speeds: readonly { readonly value: Speed; readonly name: string }[] = [
  { value: 1, name: '1' },
  { value: 0.5, name: '½' },
  { value: 0.25, name: '¼' },
  { value: 0.125, name: '⅛' },
];

/**
 * Whether the clip is to play, which way and how fast. The stage plays while `playing` is true, moves the frame with
 * `DeskState.showFrame`, says `behind`, and calls `stop` at the end or on a fault.
 */
export class DeskPlay {
  private readonly running = signal(false);
  private readonly way = signal<1 | -1>(1);
  private readonly rate = signal<Speed>(1);
  private readonly late = signal(false);

  readonly playing = this.running.asReadonly();
  readonly direction = this.way.asReadonly();
  readonly speed = this.rate.asReadonly();
  /** True while frames come later than they are due. */
  readonly behind = this.late.asReadonly();

  start(direction: 1 | -1 = 1): void {
    this.way.set(direction);
    this.running.set(true);
  }

  stop(): void {
    this.running.set(false);
    this.late.set(false);
  }

  toggle(): void {
    if (this.running()) this.stop();
    else this.start(1);
  }

  setSpeed(speed: Speed): void {
    this.rate.set(speed);
  }

  /** The fastest of the speeds at which the file need not play faster than its own: where a slow-motion clip begins. */
  static suiting(captureRateFactor: number): Speed {
    return speeds.find(({ value }) => value <= Math.max(captureRateFactor, 0.125))?.value ?? 0.125;
  }

  setBehind(behind: boolean): void {
    this.late.set(behind);
  }
}
