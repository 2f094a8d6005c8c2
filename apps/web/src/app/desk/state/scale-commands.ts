import { computed, signal, type Signal } from '@angular/core';
import type { Point } from '@stillstroke/contract/clip-facts';
import { scaleSchema, type Scale, type ScalePlane } from '@stillstroke/contract/scale';
import {
  measuredDistance,
  type MeasuredDistance,
  scaleCheck,
  type ScaleCheck,
} from '@stillstroke/geometry/calibration/measured-distance';
import {
  checkKnown,
  checkScale,
  fitScale,
  type FittedScale,
} from '@stillstroke/geometry/calibration/picture-scale';
import type { ReadingContext } from '@stillstroke/geometry/measures/reading-context';
import type { Outcome } from '@stillstroke/geometry/outcome';
import { sayReason } from '../../ui/figure/reason-words';
import type { DeskCore } from './desk-core';
import { capital } from './marking';
import {
  checkIn,
  lengthIn,
  lineIn,
  linePoints,
  rectangleIn,
  scalePoints,
  withPoint,
  type MeasuringLine,
  type ScalePoint,
  type ScalePointName,
} from './scale-points';

/** What metres of the clip are taken from, and the line that measures with them. The line is not kept. */
export class ScaleCommands {
  private readonly places = signal(false);
  private readonly lineNow = signal<MeasuringLine | null>(null);

  /** With what is being dragged as it looks now. */
  readonly scale: Signal<Scale | null>;
  /** True while the points of the scale can be taken hold of. */
  readonly placing = this.places.asReadonly();
  readonly line = this.lineNow.asReadonly();
  /** Null without a scale, and while a drag makes one that fixes no plane. */
  readonly fitted: Signal<FittedScale | null>;
  /** How the second known length fits; null without one. */
  readonly check: Signal<Outcome<ScaleCheck> | null>;
  /** What the line measures; null without scale or line. */
  readonly measured: Signal<Outcome<MeasuredDistance> | null>;
  /** One of the scale's own lengths with its uncertainty, to say how sure the scale is. */
  readonly ownLength: Signal<Outcome<MeasuredDistance> | null>;
  /** The points that can be moved now: those of the scale while it is placed, and the line's. */
  readonly points: Signal<readonly ScalePoint[]>;

  constructor(
    private readonly core: DeskCore,
    context: Signal<ReadingContext>,
  ) {
    this.scale = core.film.scale;
    const placingPx = computed(() => context().jointUncertaintyPx.elbow);
    this.fitted = computed(() => {
      const scale = this.scale();
      const checked = scale && checkScale(scale, this.size());
      const fitted = scale && checked?.ok ? fitScale(scale, placingPx()) : null;
      return fitted?.ok ? fitted.value : null;
    });
    this.check = computed(() => {
      const [fitted, known] = [this.fitted(), this.scale()?.check];
      return fitted && known ? scaleCheck(fitted, known, placingPx()) : null;
    });
    const between = (ends: MeasuringLine | null, px: number): Outcome<MeasuredDistance> | null => {
      const fitted = this.fitted();
      return fitted && ends ? measuredDistance(fitted, ends.from, ends.to, { from: px, to: px }) : null;
    };
    this.measured = computed(() => between(this.line(), placingPx()));
    this.ownLength = computed(() => {
      const scale = this.scale();
      if (!scale) return null;
      const ends = scale.kind === 'length' ? scale : { from: scale.corners[0], to: scale.corners[1] };
      return between(ends, 0);
    });
    this.points = computed(() => [
      ...(this.placing() ? scalePoints(this.scale()) : []),
      ...linePoints(this.line()),
    ]);
  }

  /** As kept, without what is being dragged. */
  stored(): Scale | null {
    return this.core.film.stored().scale;
  }

  /** Begins with a length across the picture, or a rectangle in its middle, to be put where it belongs. */
  begin(kind: Scale['kind']): void {
    if (this.set(kind === 'length' ? lengthIn(this.size()) : rectangleIn(this.size()))) this.startPlacing();
  }

  startPlacing(): void {
    if (!this.core.canEdit) return;
    this.places.set(true);
    this.core.say('Drag each point to its place on the picture, or move it with the arrow keys.');
  }

  stopPlacing(): void {
    this.places.set(false);
    this.core.film.show(null);
  }

  /** null takes the scale away. */
  set(scale: Scale | null, action: 'set-scale' | 'nudge-scale' = 'set-scale'): boolean {
    this.core.film.show(null);
    const before = this.stored();
    if (scale) {
      const parsed = scaleSchema.safeParse(scale);
      const checked = parsed.success ? checkScale(scale, this.size()) : null;
      const known = scale.check && checkKnown(scale.check, this.size());
      if (!checked) return this.core.refuse('Give lengths above 0 and at most 200 metres.');
      if (!checked.ok) return this.core.refuse(`${capital(sayReason(checked.reason))}.`);
      if (known && !known.ok) return this.core.refuse(`${capital(sayReason(known.reason))}.`);
    } else {
      this.places.set(false);
    }
    if (JSON.stringify(before) === JSON.stringify(scale)) return true;
    this.core.commit(action, 'the scale', [{ kind: 'scale', before, after: scale }]);
    return this.core.say(scale ? 'Scale set.' : 'Scale taken away.');
  }

  setPlane(plane: ScalePlane): void {
    this.change((scale) => ({ ...scale, plane }));
  }

  /** A typed length, metres: of the known length, or of a side of the rectangle. */
  setMetres(which: 'metres' | 'widthM' | 'heightM' | 'uncertaintyM' | 'check', metres: number): void {
    this.change((scale) => {
      if (which === 'check') return scale.check ? { ...scale, check: { ...scale.check, metres } } : scale;
      return which in scale ? { ...scale, [which]: metres } : scale;
    });
  }

  setCheck(wanted: boolean): void {
    this.change((scale) => ({ ...scale, check: wanted ? checkIn(this.size()) : null }));
    if (wanted) this.startPlacing();
  }

  showLine(shown: boolean): void {
    this.lineNow.set(shown ? lineIn(this.size()) : null);
  }

  /** Shows a point elsewhere without saving. */
  previewPoint(name: ScalePointName, point: Point): void {
    if (name === 'line-from' || name === 'line-to') {
      this.moveLine(name, point);
      return;
    }
    const scale = this.scale();
    if (scale && this.core.canEdit) {
      this.core.film.show({ kind: 'scale', scale: withPoint(scale, name, point) });
    }
  }

  /** Makes what is previewed one undo step. */
  commitPreview(): void {
    const scale = this.scale();
    if (scale) this.set(scale);
  }

  dropPreview(): void {
    this.core.film.show(null);
  }

  movePoint(name: ScalePointName, point: Point, action: 'set-scale' | 'nudge-scale' = 'set-scale'): void {
    if (name === 'line-from' || name === 'line-to') this.moveLine(name, point);
    else this.change((scale) => withPoint(scale, name, point), action);
  }

  private moveLine(name: 'line-from' | 'line-to', point: Point): void {
    this.lineNow.update((line) => line && { ...line, [name === 'line-from' ? 'from' : 'to']: point });
  }

  private change(become: (scale: Scale) => Scale, action: 'set-scale' | 'nudge-scale' = 'set-scale'): void {
    const scale = this.stored();
    if (scale) this.set(become(scale), action);
  }

  private size(): { readonly width: number; readonly height: number } {
    return this.core.film.clip();
  }
}
