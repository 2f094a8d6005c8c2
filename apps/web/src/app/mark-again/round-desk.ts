import { computed, signal } from '@angular/core';
import type { Clip } from '@stillstroke/contract/clip-facts';
import type { Joints, MarkingRoundWithMarks } from '@stillstroke/contract/repeatability';
import type { KeyCommand } from '../desk/keyboard/desk-keys';
import type { DeskChange } from '../desk/state/desk-change';
import { isComplete } from '../desk/state/desk-mark';
import { DeskState } from '../desk/state/desk-state';

/** Keys of the Desk that mean the same while frames are marked again; all others do nothing. */
const sameAsOnDesk: ReadonlySet<KeyCommand> = new Set<KeyCommand>([
  'place-joint',
  'joint-after',
  'joint-before',
  'nudge-left',
  'nudge-right',
  'nudge-up',
  'nudge-down',
  'nudge-left-ten',
  'nudge-right-ten',
  'nudge-up-ten',
  'nudge-down-ten',
  'undo',
  'redo',
  'fit',
  'zoom-in',
  'zoom-out',
  'hold-picture',
  'toggle-loupe',
  'leave-stage',
]);

/**
 * The frames of a round, one after the other, on a Desk of its own that knows of one mark at a time: the one that is made
 * again. Which frame is shown decides where in the round one is, so that undo leads back by itself.
 */
export class RoundDesk {
  readonly state: DeskState;
  private readonly kept = signal<ReadonlyMap<number, Joints>>(new Map());

  readonly position = computed(() => {
    const [frame, arm] = [this.state.frame(), this.state.arm()];
    return Math.max(
      0,
      this.places.findIndex((place) => place.frame === frame && place.arm === arm),
    );
  });
  readonly arm = computed(() => this.state.arm());
  readonly complete = computed(() => isComplete(this.state.markAt(this.state.arm(), this.state.frame())));
  readonly done = computed(() => this.places.filter((_, position) => this.isDone(position)).length);
  readonly isFirst = computed(() => this.position() === 0);
  readonly isLast = computed(() => this.position() === this.places.length - 1);
  readonly allDone = computed(() => this.done() === this.places.length);

  constructor(
    private readonly round: MarkingRoundWithMarks,
    clip: Clip,
    frameTimesUs: readonly number[],
  ) {
    this.state = new DeskState({
      clip,
      frameTimesUs,
      strokes: [],
      marks: [],
      canEdit: true,
    });
    this.kept.set(
      new Map(round.marks.flatMap(({ position, again }) => (again ? [[position, again] as const] : []))),
    );
    this.onMarked((position, joints) => {
      this.kept.update((kept) => new Map(kept).set(position, joints));
    });
    const firstOpen = this.places.findIndex((_, position) => !this.isDone(position));
    this.show(Math.max(0, firstOpen));
  }

  get places() {
    return this.round.marks;
  }

  /** To the frame after this one, once its three joints are placed. */
  next(): boolean {
    if (!this.complete()) {
      this.state.say('Place shoulder, elbow and wrist on this frame first.');
      return false;
    }
    if (!this.isLast()) this.show(this.position() + 1);
    return true;
  }

  back(): void {
    if (!this.isFirst()) this.show(this.position() - 1);
  }

  /** Calls with every frame whose three joints have been placed or moved. */
  onMarked(listener: (position: number, joints: Joints) => void): () => void {
    return this.state.onChange((changes) => {
      for (const change of changes) {
        if (change.kind !== 'mark' || !isComplete(change.after)) continue;
        const { arm, frame, shoulder, elbow, wrist } = change.after;
        const position = this.places.findIndex((place) => place.arm === arm && place.frame === frame);
        if (position >= 0) listener(position, { shoulder, elbow, wrist });
      }
    });
  }

  /** True when the round deals with a key of the Desk itself. */
  takes(command: KeyCommand): boolean {
    if (command === 'next-to-mark') this.next();
    return !sameAsOnDesk.has(command);
  }

  private isDone(position: number): boolean {
    return this.kept().has(position);
  }

  private show(position: number): void {
    const place = this.places[position];
    if (!place) return;
    this.state.takeIn(this.onlyThe(position));
    this.state.goTo(place.frame);
    this.state.chooseArm(place.arm);
    const which = `Frame ${position + 1} of ${this.places.length}`;
    this.state.say(`${which}: the ${place.arm} arm.`);
  }

  /** Another arm's joints on the same frame would catch presses that are to place this one's. */
  private onlyThe(position: number): DeskChange[] {
    const others = [...this.state.marks().values()].map((mark): DeskChange => ({
      kind: 'mark',
      arm: mark.arm,
      frame: mark.frame,
      before: mark,
      after: null,
    }));
    const [place, joints] = [this.places[position], this.kept().get(position)];
    if (!place || !joints) return others;
    const { arm, frame } = place;
    return [...others, { kind: 'mark', arm, frame, before: null, after: { arm, frame, ...joints } }];
  }
}
