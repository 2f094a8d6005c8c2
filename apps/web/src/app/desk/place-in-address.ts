import { DestroyRef, effect, inject, Injectable, signal } from '@angular/core';
import { ActivatedRoute, Router } from '@angular/router';
import type { DeskState } from './state/desk-state';

export interface AskedPlace {
  readonly frame: number | undefined;
  readonly arm: string | undefined;
}

/** The address follows at most this often: while stepping and playing it would be written with each frame. */
const WRITE_EVERY_MS = 400;

/** Keeps frame and arm in the address, so that a reload or a shared link leads to the same place. */
@Injectable()
export class PlaceInAddress {
  private readonly router = inject(Router);
  private readonly route = inject(ActivatedRoute);
  private readonly desk = signal<DeskState | null>(null);
  private written: string | null = null;
  private waiting: ReturnType<typeof setTimeout> | undefined;

  constructor() {
    inject(DestroyRef).onDestroy(() => clearTimeout(this.waiting));
    effect(() => {
      const desk = this.desk();
      if (!desk) return;
      const place = placeOf(desk.frame(), desk.arm());
      if (place !== this.written) this.waiting ??= setTimeout(() => this.write(), WRITE_EVERY_MS);
    });
  }

  /** The address names a place: on opening, and when a link on the Desk itself leads elsewhere. */
  arrive(desk: DeskState, { frame, arm }: AskedPlace): void {
    const asked = placeOf(frame ?? desk.frame(), arm ?? desk.arm());
    const isOwn = this.desk() === desk && asked === this.written;
    this.desk.set(desk);
    if (isOwn) return;
    this.written = asked;
    if (arm === 'left' || arm === 'right') desk.chooseArm(arm);
    if (frame !== undefined) desk.goTo(frame);
    else if (arm === undefined) desk.goToFirstCatch();
  }

  private write(): void {
    this.waiting = undefined;
    const desk = this.desk();
    if (!desk) return;
    const [frame, arm] = [desk.frame(), desk.arm()];
    this.written = placeOf(frame, arm);
    void this.router.navigate([], {
      relativeTo: this.route,
      queryParams: { frame, arm },
      queryParamsHandling: 'merge',
      replaceUrl: true,
    });
  }
}

function placeOf(frame: number, arm: string): string {
  return `${arm} ${frame}`;
}
