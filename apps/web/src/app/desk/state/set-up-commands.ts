import { signal } from '@angular/core';
import {
  captureRateFactorSchema,
  knownDistanceSchema,
  type KnownDistance,
  type Plumb,
} from '@stillstroke/contract/clip-facts';
import { swimSpeed } from '@stillstroke/geometry/events/known-distance';
import { cameraRoll } from '@stillstroke/geometry/calibration/plumb';
import { formatFigure } from '../../ui/figure/format-figure';
import { sayReason } from '../../ui/figure/reason-words';
import type { ClipFacts } from './desk-change';
import type { DeskCore } from './desk-core';
import { capital } from './marking';

/** What is said of the clip as a whole: its vertical, view, travel direction and capture rate. */
export class SetUpCommands {
  private readonly draws = signal(false);

  /** True while a press on the picture draws the plumb. */
  readonly drawingPlumb = this.draws.asReadonly();

  /** View, travel, stroke kind and capture rate as they are now. */
  readonly facts: DeskCore['film']['facts'];
  /** How far the swimmer travelled between two frames; null while nobody has said. */
  readonly distance: DeskCore['film']['distance'];

  constructor(private readonly core: DeskCore) {
    this.facts = core.film.facts;
    this.distance = core.film.distance;
  }

  startPlumb(): void {
    if (!this.core.canEdit) return;
    this.draws.set(true);
    this.core.say('Draw the plumb: press at the top of something upright and drag to its foot.');
  }

  stopPlumb(): void {
    this.draws.set(false);
    this.core.film.show(null);
  }

  previewPlumb(plumb: Plumb | null): void {
    if (plumb === null) this.core.film.show(null);
    else this.core.film.show({ kind: 'plumb', plumb });
  }

  /** null takes the plumb away: the picture's own vertical is assumed again. Ends drawing. */
  setPlumb(plumb: Plumb | null): boolean {
    const before = this.core.film.stored().plumb;
    const roll = cameraRoll(plumb);
    if (!roll.ok) return this.core.refuse(`${capital(sayReason(roll.reason))}.`);
    this.stopPlumb();
    if (before === null && plumb === null) return true;
    this.core.commit('set-plumb', 'the plumb', [{ kind: 'plumb', before, after: plumb }]);
    return this.core.say(
      plumb
        ? `Plumb set: the picture leans ${Math.abs(roll.value.rollDeg).toFixed(1)}°.`
        : 'Plumb taken away: the vertical of the picture is assumed.',
    );
  }

  /** null takes the distance away. */
  setDistance(distance: KnownDistance | null): boolean {
    const { film, place } = this.core;
    const before = film.distance();
    const checked = knownDistanceSchema.nullable().safeParse(distance);
    if (!checked.success) {
      return this.core.refuse(checked.error.issues[0]?.message ?? 'This distance cannot be used.');
    }
    const { captureRateFactor } = film.facts();
    const speed = swimSpeed(distance, place.timesUs(), { captureRateFactor });
    if (distance !== null && !speed.ok) return this.core.refuse(`${capital(sayReason(speed.reason))}.`);
    if (JSON.stringify(before) === JSON.stringify(distance)) return true;
    this.core.commit('set-distance', 'the known distance', [{ kind: 'distance', before, after: distance }]);
    return this.core.say(
      speed.ok
        ? `Distance set: ${formatFigure(speed.value.metresPerSecond, 'mPerS', speed.value.standard)}.`
        : 'Distance taken away: no stroke length without it.',
    );
  }

  setClipFacts(facts: Partial<ClipFacts>): boolean {
    const before = this.core.film.facts();
    const after = { ...before, ...facts };
    const rate = captureRateFactorSchema.safeParse(after.captureRateFactor);
    if (!rate.success) return this.core.refuse('Give a capture rate factor between 0.01 and 10.');
    const keys = Object.keys(after) as (keyof ClipFacts)[];
    if (keys.every((key) => before[key] === after[key])) return true;
    this.core.commit('set-facts', 'the set-up', [{ kind: 'facts', before, after }]);
    return true;
  }
}
