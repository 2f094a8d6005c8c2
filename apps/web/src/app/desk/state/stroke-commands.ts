import { computed } from '@angular/core';
import type { DeskCore } from './desk-core';
import { sourceOf } from '@stillstroke/geometry/events/event-moment';
import {
  eventsInOrder,
  eventWords,
  nameStroke,
  strokeAt,
  strokesOf,
  type DeskStroke,
  type EventName,
} from './desk-stroke';
import { capital } from './marking';
import { eventOfStroke, eventOnFrame, type EventOutcome } from './set-event';

/** Setting and taking away the events of strokes. */
export class StrokeCommands {
  /** The chosen arm's stroke that the shown frame lies in. */
  readonly current;

  constructor(
    private readonly core: DeskCore,
    private readonly newId: () => string,
  ) {
    const { film, place } = core;
    this.current = computed(() => strokeAt(film.strokes(), place.arm(), place.frame()));
  }

  /** Sets an event of the chosen arm on the shown frame; see `eventOnFrame` for which stroke it is meant for. */
  setEvent(event: EventName): boolean {
    const { film, place } = this.core;
    const [arm, frame] = [place.arm(), place.frame()];
    const found = eventOnFrame(film.strokes(), { arm, event, frame, newId: this.newId() });
    return this.finish(event, frame, found);
  }

  /** Sets one event of one stroke; null takes the next entry away. */
  setEventOf(stroke: DeskStroke, event: EventName, frame: number | null = this.core.place.frame()): boolean {
    return this.finish(event, frame, eventOfStroke(this.core.film.strokes(), stroke, event, frame));
  }

  /**
   * Turns an event over between the hand that was seen and the wrist that stands in for it. A next entry that is the entry
   * of the following stroke is one event of the water: both turn.
   */
  toggleSource(stroke: DeskStroke, event: EventName): boolean {
    const source = sourceOf(stroke, event) === 'hand-seen' ? 'wrist-proxy' : 'hand-seen';
    const turned = (one: DeskStroke, which: EventName) => ({
      kind: 'stroke' as const,
      id: one.id,
      before: one,
      after: { ...one, [`${which}Source`]: source },
    });
    const others = strokesOf(this.core.film.strokes(), stroke.arm).filter(({ id }) => id !== stroke.id);
    const twin =
      event === 'entry'
        ? others.find(({ nextEntry }) => nextEntry === stroke.entry)
        : event === 'nextEntry'
          ? others.find(({ entry }) => entry === stroke.nextEntry)
          : undefined;
    const changes = [turned(stroke, event)];
    if (twin) changes.push(turned(twin, event === 'entry' ? 'nextEntry' : 'entry'));
    const words = `${eventWords[event]} of the ${this.name(stroke)}`;
    this.core.commit('set-event-source', `what the ${words} was chosen by`, changes);
    return this.core.say(
      source === 'hand-seen'
        ? `${capital(words)}: the hand was seen.`
        : `${capital(words)}: the wrist stands in for the hand, with a wider ±.`,
    );
  }

  /** The same of the event on the shown frame. */
  toggleSourceHere(): boolean {
    const { film, place } = this.core;
    const [frame, arm] = [place.frame(), place.arm()];
    for (const stroke of strokesOf(film.strokes(), arm)) {
      const event = eventsInOrder.find((one) => stroke[one] === frame);
      if (event) return this.toggleSource(stroke, event);
    }
    return this.core.refuse(`No event of the ${arm} arm on this frame.`);
  }

  setBreath(breath: boolean, stroke: DeskStroke | null = this.current()): boolean {
    if (!stroke)
      return this.core.refuse('No stroke of this arm here yet, so there is nothing to breathe on.');
    const words = `breath on the ${this.name(stroke)}`;
    this.core.commit('set-breath', words, [
      { kind: 'stroke', id: stroke.id, before: stroke, after: { ...stroke, breath } },
    ]);
    return this.core.say(`${capital(this.name(stroke))}: ${breath ? 'with a breath' : 'without a breath'}.`);
  }

  toggleBreath(): boolean {
    const stroke = this.current();
    return this.setBreath(!stroke?.breath, stroke);
  }

  /** The marks on its frames stay. */
  removeStroke(stroke: DeskStroke): void {
    const name = this.name(stroke);
    this.core.commit('remove-stroke', `the ${name}`, [
      { kind: 'stroke', id: stroke.id, before: stroke, after: null },
    ]);
    this.core.say(`Removed the ${name}; its marks stay. Undo brings it back.`);
  }

  private finish(event: EventName, frame: number | null, found: EventOutcome): boolean {
    if (!found.ok) return this.core.refuse(found.reason);
    const arm = found.value[0]?.after.arm ?? this.core.place.arm();
    const changes = found.value.map(({ before, after }) => ({
      kind: 'stroke' as const,
      id: after.id,
      before,
      after,
    }));
    this.core.commit('set-event', `the ${arm} ${eventWords[event]}`, changes);
    const words = frame === null ? 'taken away' : `set on frame ${frame}`;
    return this.core.say(`${capital(arm)} ${eventWords[event]} ${words}.`);
  }

  private name(stroke: DeskStroke): string {
    const name = nameStroke(this.core.film.strokes(), stroke);
    return name.charAt(0).toLowerCase() + name.slice(1);
  }
}
