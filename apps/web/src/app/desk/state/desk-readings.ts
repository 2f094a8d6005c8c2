import { computed, type Signal } from '@angular/core';
import type { Clip } from '@stillstroke/contract/clip-facts';
import type { Arm } from '@stillstroke/contract/strokes';
import { armAngles } from '@stillstroke/geometry/angles/arm-angles';
import type { FrameMark } from '@stillstroke/geometry/arm';
import { indexOfCoordination, type Coordination } from '@stillstroke/geometry/events/coordination';
import type { ReadingContext } from '@stillstroke/geometry/measures/reading-context';
import { strokeMeasures, type StrokeMeasures } from '@stillstroke/geometry/measures/stroke-measures';
import { ok, refused, type Outcome } from '@stillstroke/geometry/outcome';
import { armAngleUncertainty } from '@stillstroke/geometry/uncertainty/arm-uncertainty';
import type { ArmReading } from '../readings/arm-reading';
import { isComplete, type CompleteMark, type DeskMark } from './desk-mark';
import { isWhole, lastFrameOf, type CompleteStroke, type DeskStroke } from './desk-stroke';

/** What one arm reads on one frame, or why not: `not-marked`, `missing-joint`, or a reason of the geometry library. */
export type FrameReading = Outcome<ArmReading>;

interface Source {
  readonly clip: Signal<Clip>;
  readonly timesUs: Signal<readonly number[]>;
  readonly marks: Signal<ReadonlyMap<string, DeskMark>>;
  readonly strokes: Signal<readonly DeskStroke[]>;
}

/** Angles and measures of everything marked; follows a joint while it is dragged. */
export class DeskReadings {
  private readonly known = new Map<string, Remembered>();

  /** Plumb, travel, spreads and tolerance that every reading of the clip is made with. */
  readonly context: Signal<ReadingContext>;
  /** Marks that can be read, by arm, along the clip. */
  readonly completeMarks: Signal<Readonly<Record<Arm, readonly CompleteMark[]>>>;
  /** Measures of every stroke that has its events, by id. */
  readonly measures: Signal<ReadonlyMap<string, StrokeMeasures>>;
  /** Index of coordination over the clip, percent of the cycle, or why there is none. */
  readonly coordination: Signal<Outcome<Coordination<CompleteStroke>>>;

  constructor(private readonly source: Source) {
    this.context = computed(() => readingContext(source.clip()), { equal: sameContext });
    this.completeMarks = computed(() => sortOut(source.marks()));
    this.measures = computed(() => this.measureAll());
    this.coordination = computed(() => this.coordinate());
  }

  read(mark: DeskMark | null): FrameReading {
    if (!mark) return refused('not-marked');
    if (!isComplete(mark)) return refused('missing-joint');
    const context = this.context();
    const angles = armAngles(mark, context);
    if (!angles.ok) return angles;
    const uncertainty = armAngleUncertainty(mark, context);
    return uncertainty.ok ? ok({ angles: angles.value, uncertainty: uncertainty.value }) : uncertainty;
  }

  private coordinate(): Outcome<Coordination<CompleteStroke>> {
    const whole = this.source.strokes().filter(isWhole);
    const of = (side: Arm) => whole.filter(({ arm }) => arm === side);
    return indexOfCoordination(
      { left: of('left'), right: of('right') },
      this.source.timesUs(),
      this.context(),
    );
  }

  /** Only strokes whose events, marks or context changed are measured again: a drag touches one of many. */
  private measureAll(): ReadonlyMap<string, StrokeMeasures> {
    const [context, times, marks] = [this.context(), this.source.timesUs(), this.completeMarks()];
    const all = new Map<string, StrokeMeasures>();
    for (const stroke of this.source.strokes().filter(isWhole)) {
      const own = marksIn(stroke, marks[stroke.arm]);
      const last = this.known.get(stroke.id);
      const fresh = last && last.stroke === stroke && last.context === context && sameList(last.marks, own);
      const measures = fresh ? last.measures : strokeMeasures(stroke, own, times, context);
      this.known.set(stroke.id, { stroke, context, marks: own, measures });
      all.set(stroke.id, measures);
    }
    return all;
  }
}

interface Remembered {
  readonly stroke: DeskStroke;
  readonly context: ReadingContext;
  readonly marks: readonly FrameMark[];
  readonly measures: StrokeMeasures;
}

function readingContext({
  travel,
  plumb,
  distance,
  captureRateFactor,
  jointUncertaintyPx,
}: Clip): ReadingContext {
  return {
    travel,
    plumb,
    captureRateFactor,
    distance,
    // As the server has them: whose marks they are decides, and both must read alike.
    jointUncertaintyPx,
  };
}

function sameContext(a: ReadingContext, b: ReadingContext): boolean {
  const [was, is] = [a.jointUncertaintyPx, b.jointUncertaintyPx];
  const sameSpread = was.shoulder === is.shoulder && was.elbow === is.elbow && was.wrist === is.wrist;
  return (
    a.travel === b.travel &&
    a.plumb === b.plumb &&
    a.distance === b.distance &&
    a.captureRateFactor === b.captureRateFactor &&
    sameSpread
  );
}

function sortOut(marks: ReadonlyMap<string, DeskMark>): Record<Arm, readonly CompleteMark[]> {
  const sorted: Record<Arm, CompleteMark[]> = { left: [], right: [] };
  for (const mark of marks.values()) if (isComplete(mark)) sorted[mark.arm].push(mark);
  for (const own of [sorted.left, sorted.right]) own.sort((a, b) => a.frame - b.frame);
  return sorted;
}

function marksIn(stroke: CompleteStroke, marks: readonly CompleteMark[]): readonly CompleteMark[] {
  return marks.filter(({ frame }) => frame >= stroke.entry && frame <= lastFrameOf(stroke));
}

function sameList(a: readonly unknown[], b: readonly unknown[]): boolean {
  return a.length === b.length && a.every((one, at) => one === b[at]);
}
