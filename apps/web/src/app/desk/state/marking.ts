import { computed } from '@angular/core';
import type { Clip, Point } from '@stillstroke/contract/clip-facts';
import type { Arm } from '@stillstroke/contract/strokes';
import type { Joint } from '@stillstroke/geometry/arm';
import type { DeskAction } from './desk-history';
import type { DeskCore } from './desk-core';
import { firstMissing, jointsInOrder, markKey, sameMark, withJoint, type DeskMark } from './desk-mark';

/** Placing, moving and taking away joints of the chosen arm on the shown frame. */
export class Marking {
  /** The chosen arm's mark on the shown frame, as it looks now. */
  readonly mark;
  /** The joint that a press on the picture (or Enter) puts down; null when the mark is whole. */
  readonly missing;

  constructor(private readonly core: DeskCore) {
    const { film, place } = core;
    this.mark = computed(() => film.marks().get(markKey(place.arm(), place.frame())) ?? null);
    this.missing = computed<Joint | null>(() => {
      const [mark, joint] = [this.mark(), place.joint()];
      return mark?.[joint] ? firstMissing(mark) : joint;
    });
  }

  /** Puts the missing joint down and chooses the next one. One undo step. */
  placeJoint(point: Point): boolean {
    const { film, place } = this.core;
    const joint = this.missing();
    if (joint === null) return false;
    const [arm, frame] = [place.arm(), place.frame()];
    const next = withJoint(film.storedMark(arm, frame), { arm, frame }, joint, this.inside(point));
    this.commitMark(arm, frame, next, 'place-joint', joint);
    const follows = firstMissing(next);
    place.setJoint(follows ?? joint);
    const what = `${arm} ${joint} placed on frame ${frame}.`;
    return this.core.say(
      follows ? `${capital(what)} Next: ${follows}.` : `${capital(what)} The mark is complete.`,
    );
  }

  /** Enter: puts the missing joint down at the keyboard's crosshair. */
  placeAtCrosshair(): boolean {
    if (this.missing() === null) return this.core.refuse('All three joints are placed on this frame.');
    return this.placeJoint(this.crosshairOrMiddle());
  }

  /** Shows a mark as it would be, without history and without saving; null mark: as if there were none. */
  previewMark(arm: Arm, frame: number, mark: DeskMark | null): void {
    if (this.core.canEdit) this.core.film.show({ kind: 'mark', arm, frame, mark });
  }

  dropPreview(): void {
    this.core.film.show(null);
  }

  /** Shows one joint elsewhere while it is dragged. */
  previewJoint(arm: Arm, frame: number, joint: Joint, point: Point): void {
    const stored = this.core.film.storedMark(arm, frame);
    this.previewMark(arm, frame, withJoint(stored, { arm, frame }, joint, this.inside(point)));
  }

  /** Makes the shown preview (or the mark given) one undo step, and saves it. */
  commitMark(
    arm: Arm,
    frame: number,
    mark: DeskMark | null = this.core.film.marks().get(markKey(arm, frame)) ?? null,
    action: DeskAction = 'move-joint',
    joint: Joint | null = null,
  ): void {
    const before = this.core.film.storedMark(arm, frame);
    this.core.film.show(null);
    if (sameMark(before, mark)) return;
    const words = `the ${arm} ${joint ?? 'mark'} on frame ${frame}`;
    this.core.commit(action, words, [{ kind: 'mark', arm, frame, before, after: mark }]);
  }

  /** Moves one joint to a point: one undo step. */
  moveJoint(arm: Arm, frame: number, joint: Joint, point: Point, action: DeskAction = 'move-joint'): void {
    const next = withJoint(this.core.film.storedMark(arm, frame), { arm, frame }, joint, this.inside(point));
    this.commitMark(arm, frame, next, action, joint);
  }

  /** Picture pixels. Moves the chosen joint, or the crosshair while that joint is not placed yet. */
  nudgeJoint(dx: number, dy: number): void {
    const { place } = this.core;
    const joint = place.joint();
    const point = this.mark()?.[joint];
    if (point) {
      this.moveJoint(place.arm(), place.frame(), joint, { x: point.x + dx, y: point.y + dy }, 'nudge-joint');
    } else {
      const from = this.crosshairOrMiddle();
      place.setCrosshair(this.inside({ x: from.x + dx, y: from.y + dy }));
    }
  }

  /** On another frame or arm: keeps the chosen joint where it is placed, else begins with the first that is missing. */
  startAtMissing(): void {
    const mark = this.mark();
    if (!mark?.[this.core.place.joint()]) this.core.place.setJoint(firstMissing(mark) ?? 'shoulder');
  }

  /** The joint after or before the chosen one; null past the last, so that Tab can leave the picture. */
  neighbour(by: 1 | -1): Joint | null {
    return jointsInOrder[jointsInOrder.indexOf(this.core.place.joint()) + by] ?? null;
  }

  removeMark(arm: Arm = this.core.place.arm(), frame: number = this.core.place.frame()): boolean {
    const before = this.core.film.storedMark(arm, frame);
    if (!before) return this.core.refuse(`The ${arm} arm is not marked on frame ${frame}.`);
    const words = `the ${arm} mark on frame ${frame}`;
    this.core.commit('remove-mark', words, [{ kind: 'mark', arm, frame, before, after: null }]);
    if (frame === this.core.place.frame()) this.core.place.setJoint('shoulder');
    return this.core.say(`Removed ${words}. Undo brings it back.`);
  }

  /** Where the crosshair stands: moved by hand, else near this joint on the nearest marked frame, else the middle. */
  crosshairOrMiddle(): Point {
    const { place } = this.core;
    return place.crosshair() ?? this.nearestKnown(place.arm(), place.frame()) ?? this.middle();
  }

  private nearestKnown(arm: Arm, frame: number): Point | null {
    const joint = this.missing() ?? this.core.place.joint();
    const known = [...this.core.film.marks().values()].filter((mark) => mark.arm === arm && mark[joint]);
    const distance = (mark: DeskMark): number => Math.abs(mark.frame - frame);
    return known.sort((a, b) => distance(a) - distance(b))[0]?.[joint] ?? null;
  }

  private middle(): Point {
    const { width, height } = this.clip();
    return { x: width / 2, y: height / 2 };
  }

  private inside({ x, y }: Point): Point {
    const { width, height } = this.clip();
    return { x: Math.min(width, Math.max(0, x)), y: Math.min(height, Math.max(0, y)) };
  }

  private clip(): Clip {
    return this.core.film.clip();
  }
}

export function capital(words: string): string {
  return words.charAt(0).toUpperCase() + words.slice(1);
}
