import type { StrokeExplanation } from '@stillstroke/contract/explanation';
import type { Measure } from '@stillstroke/contract/measures';
import { EVENT_ERROR_FRAMES } from '@stillstroke/geometry/events/frame-times';
import { VERTICAL_TOLERANCE_DEG } from '@stillstroke/geometry/events/vertical-at';
import { measuredByName } from '@stillstroke/geometry/measures/measured-by-name';
import { normalInterval } from '@stillstroke/geometry/uncertainty/elbow-interval';
import { unitOf, formatFigure, formatRange, formatUncertainty } from '../../ui/figure/format-figure';
import { sayMetres } from '../../ui/figure/say-metres';
import { explainMeasure } from '../../ui/explain/explain-measure';
import type { Explanation } from '../../ui/explain/explanation';
import { sayParts } from '../../ui/explain/part-words';
import { sayClip, sayMarks } from '../../ui/explain/say-inputs';
import { isComplete } from '../state/desk-mark';
import type { DeskState } from '../state/desk-state';
import { isWhole } from '../state/desk-stroke';

export type AngleName = 'forearm' | 'upperArm' | 'elbow' | 'elbowDrop';

const keys = {
  forearm: 'forearmDeg',
  upperArm: 'upperArmDeg',
  elbow: 'elbowDeg',
  elbowDrop: 'elbowDropDeg',
} as const;

const passageEvents = ['exit', 'catch of the other arm', 'exit of the other arm', 'next catch'] as const;

/** Opens the Desk's readings up, from the same results that the Desk shows. */
export class DeskExplainer {
  constructor(private readonly state: DeskState) {}

  /** An angle of the chosen arm on the shown frame; null where it is not read. */
  angle(name: AngleName): Explanation | null {
    const [arm, frame, clip] = [this.state.arm(), this.state.frame(), this.state.clip()];
    const reading = this.state.readingAtFrame()[arm];
    const mark = this.state.markAt(arm, frame);
    if (!reading.ok || !isComplete(mark)) return null;
    const { angles, uncertainty } = reading.value;
    const key = keys[name];
    const interval =
      name === 'elbow' ? uncertainty.elbowIntervalDeg : normalInterval(angles[key], uncertainty[key]);
    const context = this.state.readings.context();
    return {
      entry: name,
      of: `${arm === 'left' ? 'Left' : 'Right'} arm, frame ${frame}`,
      result: `${formatFigure(angles[key], 'deg', uncertainty[key], name !== 'elbow')} ${formatUncertainty(uncertainty[key], 'deg')}`,
      interval: formatRange(interval, 'deg'),
      inputs: [...sayMarks([mark]), ...sayClip({ ...clip, jointUncertaintyPx: context.jointUncertaintyPx })],
      frames: [{ clipId: clip.id, arm, frame, says: `Frame ${frame}` }],
      parts: sayParts(uncertainty.parts[key], 'deg'),
      partsOf: 'its ±',
      also: ['uncertainty', 'projected'],
    };
  }

  /** What both arms of the clip do together; null where it cannot be read. */
  coordination(): Explanation | null {
    const read = this.state.readings.coordination();
    if (!read.ok) return null;
    const { index, uncertainty, interval, mode, cycles, parts } = read.value;
    // On pages the index is a share like the phases.
    const share = (percent: number) => percent / 100;
    const passage = (value: number) => formatFigure(share(value), 'share', share(uncertainty), true);
    const clipId = this.state.clip().id;
    return {
      entry: 'idc',
      of: `Both arms, ${cycles.length === 1 ? 'one passage' : `${cycles.length} passages`} of this clip`,
      result: `${passage(index)} ${formatUncertainty(share(uncertainty), 'share')}, ${mode}`,
      interval: formatRange({ low: share(interval.low), high: share(interval.high) }, 'share'),
      inputs: cycles.map(({ lag1, lag2, frames }, at) => ({
        name: `Passage ${at + 1}, from frame ${frames[0]}`,
        value: `first lag ${passage(lag1)}, second lag ${passage(lag2)}`,
      })),
      frames: cycles.flatMap(({ frames }) =>
        frames.map((frame, at) => ({
          clipId,
          frame,
          arm: null,
          says: `Frame ${frame}, ${passageEvents[at] ?? 'event'}`,
        })),
      ),
      parts: sayParts(
        parts.map((part) => ({ ...part, alone: share(part.alone) })),
        'share',
      ),
      partsOf: 'its ±',
      also: ['uncertainty'],
    };
  }

  /** Reach or depth of the current stroke's hand; null without a scale that gives it. */
  hand(name: 'reachAtEntry' | 'handDepth'): Explanation | null {
    const [stroke, found] = [this.state.currentStroke(), this.state.view.handPath()?.[name]];
    if (!stroke || !found?.ok) return null;
    const { metres, uncertaintyM, parts, frame, frames } = found.value;
    const [clip, context] = [this.state.clip(), this.state.readings.context()];
    const mark = this.state.markAt(stroke.arm, frame);
    return {
      entry: name,
      of: `${stroke.arm === 'left' ? 'Left' : 'Right'} arm, one stroke`,
      result: sayMetres(metres, uncertaintyM),
      interval: formatRange(normalInterval(metres, uncertaintyM), 'm'),
      inputs: [
        ...(isComplete(mark) ? sayMarks([mark]) : []),
        ...sayClip({ ...clip, jointUncertaintyPx: context.jointUncertaintyPx }),
      ],
      frames: frames.map((each) => ({
        clipId: clip.id,
        arm: stroke.arm,
        frame: each,
        says: `Frame ${each}${each === frame && frames.length > 1 ? ', the deepest' : ''}`,
      })),
      parts: sayParts(parts, 'm'),
      partsOf: 'its ±',
      also: ['uncertainty', 'projected'],
    };
  }

  /** A measure of the stroke that the shown frame lies in; null without such a stroke. */
  measure(measure: Measure): Explanation | null {
    const stroke = this.state.currentStroke();
    const measures = stroke && this.state.readings.measures().get(stroke.id);
    if (!stroke || !isWhole(stroke) || !measures) return null;
    const [clip, times] = [this.state.clip(), this.state.frameTimesUs()];
    const context = this.state.readings.context();
    const measured = measuredByName(measure, measures);
    const frames = measured.ok ? measured.value.frames : [];
    const events = (['entry', 'catch', 'exit', 'nextEntry'] as const).flatMap((event) => {
      const frame = stroke[event];
      return frame === null ? [] : [{ event, frame, timeUs: times[frame] ?? null }];
    });
    const said: StrokeExplanation = {
      strokeId: stroke.id,
      clipId: clip.id,
      arm: stroke.arm,
      breath: stroke.breath,
      measure,
      unit: unitOf[measure],
      figure: {
        value: measured.ok ? measured.value.value : null,
        uncertainty: measured.ok ? measured.value.uncertainty : null,
        reason: measured.ok ? null : measured.reason,
        frame: measured.ok ? measured.value.frame : null,
        frames: [...frames],
      },
      interval: measured.ok ? measured.value.interval : null,
      parts: measured.ok ? [...measured.value.parts] : [],
      events,
      marks: this.state.readings
        .completeMarks()
        [stroke.arm].filter(({ frame }) => frames.includes(frame))
        .map(({ frame, shoulder, elbow, wrist }) => ({ frame, shoulder, elbow, wrist })),
      plumb: clip.plumb,
      travel: clip.travel,
      captureRateFactor: clip.captureRateFactor,
      verticalToleranceDeg: context.verticalToleranceDeg ?? VERTICAL_TOLERANCE_DEG,
      jointUncertaintyPx: context.jointUncertaintyPx,
      jointUncertaintyOwn: clip.jointUncertaintyOwn,
      eventErrorFrames: context.eventErrorFrames ?? EVENT_ERROR_FRAMES,
    };
    return explainMeasure(said);
  }
}
