import { computed, type Signal } from '@angular/core';
import type { Clip } from '@stillstroke/contract/clip-facts';
import type { Arm } from '@stillstroke/contract/strokes';
import type { FittedScale } from '@stillstroke/geometry/calibration/picture-scale';
import { handPath, type HandPath } from '@stillstroke/geometry/measures/hand-path';
import type { ViewCaution } from '@stillstroke/geometry/view/caution';
import { clipCautions, frameCautions, strokeCautions } from '@stillstroke/geometry/view/view-cautions';
import type { ViewContext } from '@stillstroke/geometry/view/view-context';
import type { DeskReadings } from './desk-readings';
import { isWhole, lastFrameOf, type CompleteStroke, type DeskStroke } from './desk-stroke';

interface Source {
  readonly clip: Signal<Clip>;
  readonly readings: DeskReadings;
  readonly frame: Signal<number>;
  readonly arm: Signal<Arm>;
  /** The chosen arm's stroke that the frame lies in. */
  readonly stroke: Signal<DeskStroke | null>;
  readonly scale: Signal<FittedScale | null>;
}

/** What the readings of the shown frame and stroke have to be read with, and what a scale adds to the stroke. */
export class DeskView {
  /** Of the chosen arm on the shown frame, and of the clip as a whole; none where the frame is not marked. */
  readonly frameCautions: Signal<readonly ViewCaution[]>;
  readonly strokeCautions: Signal<readonly ViewCaution[]>;
  /** Reach and depth of the current stroke in metres; null without a scale or a stroke with its events. */
  readonly handPath: Signal<HandPath | null>;

  constructor({ clip, readings, frame, arm, stroke, scale }: Source) {
    const context = computed<ViewContext>(() => {
      const { view, width, height, fieldOfView } = clip();
      return { ...readings.context(), view, picture: { width, height }, fieldOfView };
    });
    const current = computed<CompleteStroke | null>(() => {
      const found = stroke();
      return found && isWhole(found) ? found : null;
    });
    const marks = computed(() => readings.completeMarks()[arm()]);
    this.frameCautions = computed(() => {
      const shown = marks().filter((mark) => mark.frame === frame());
      if (shown.length === 0) return [];
      const own = current();
      // Other strokes were swum at another distance from a camera that stands still.
      const seen = own
        ? marks().filter((mark) => mark.frame >= own.entry && mark.frame <= lastFrameOf(own))
        : marks();
      return [...frameCautions(context(), arm(), seen, shown), ...clipCautions(context())];
    });
    this.strokeCautions = computed(() => {
      const own = current();
      const measures = own && readings.measures().get(own.id);
      return own && measures ? strokeCautions(context(), own, marks(), measures) : [];
    });
    this.handPath = computed(() => {
      const [own, fitted] = [current(), scale()];
      return own && fitted ? handPath(fitted, own, marks(), context()) : null;
    });
  }
}
