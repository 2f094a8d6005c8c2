import { ChangeDetectionStrategy, Component, computed, input, output } from '@angular/core';
import type { StrokeMeasures } from '@stillstroke/geometry/measures/stroke-measures';
import type { Measure } from '@stillstroke/contract/measures';
import type { ViewCaution } from '@stillstroke/geometry/view/caution';
import { PlumbDial } from '../../ui/dial/plumb-dial';
import type { Explain } from '../../ui/explain/explanation';
import { How } from '../../ui/explain/how';
import { fixed, formatFigure, formatUncertainty } from '../../ui/figure/format-figure';
import { sayReason } from '../../ui/figure/reason-words';
import { ViewCautions } from '../../ui/view-cautions';
import { sayDrop, sayForearm, type ArmReading } from './arm-reading';
import type { AngleName, DeskExplainer } from './desk-explainer';
import { PullBar } from './pull-bar';

/** The stroke that the current frame lies in, with what its marks give. */
export interface StrokeReading {
  /** `Second right stroke` */
  readonly name: string;
  readonly breath: boolean;
  readonly measures: StrokeMeasures;
}

/** Beside the stage: the current arm against the plumb, its four angles, and the stroke it belongs to. */
@Component({
  selector: 'st-readings',
  imports: [How, PlumbDial, PullBar, ViewCautions],
  templateUrl: './readings.html',
  styleUrl: './readings.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Readings {
  readonly arm = input.required<'left' | 'right'>();
  readonly reading = input.required<ArmReading | null>();
  /** Why there is no reading, as a reason code; null when the frame is simply not marked. */
  readonly reason = input<string | null>(null);
  readonly stroke = input.required<StrokeReading | null>();
  readonly plumbAssumed = input(false);
  /** What of the view the angles of the frame, and the measures of the stroke, have to be read with. */
  readonly cautions = input<readonly ViewCaution[]>([]);
  readonly strokeCautions = input<readonly ViewCaution[]>([]);
  readonly toleranceDeg = input(15);

  /** Opens the figures up; without it they stand alone. */
  readonly explainer = input<DeskExplainer | null>(null);

  readonly goTo = output<number>();

  protected readonly explainForearm = this.angle('forearm');
  protected readonly explainVertical = this.measure('verticalAt');
  protected readonly explainDrop = this.measure('peakDrop');
  protected readonly explainElbow = this.measure('elbowAtMidPull');
  protected readonly armName = computed(() => (this.arm() === 'left' ? 'Left' : 'Right'));
  protected readonly forearm = computed(() => {
    const reading = this.reading();
    if (!reading) return null;
    const { forearmDeg } = reading.angles;
    return {
      value: formatFigure(forearmDeg, 'deg', reading.uncertainty.forearmDeg),
      spread: formatUncertainty(reading.uncertainty.forearmDeg, 'deg'),
      says: sayForearm(forearmDeg, this.toleranceDeg()),
    };
  });
  protected readonly why = computed(() => {
    const reason = this.reason();
    return reason === null ? 'Not marked on this frame' : sayReason(reason);
  });
  protected readonly rows = computed(() => {
    const reading = this.reading();
    if (!reading) return [];
    const { angles, uncertainty } = reading;
    const elbow = uncertainty.elbowIntervalDeg;
    return [
      {
        name: 'Upper arm',
        explain: this.angle('upperArm'),
        value: formatFigure(angles.upperArmDeg, 'deg', uncertainty.upperArmDeg),
        spread: formatUncertainty(uncertainty.upperArmDeg, 'deg'),
        says: '',
      },
      {
        name: 'Elbow',
        explain: this.angle('elbow'),
        value: formatFigure(angles.elbowDeg, 'deg', uncertainty.elbowDeg),
        // Near straight the angle folds back, so that ± would promise more than 180°.
        spread: uncertainty.nearStraight
          ? `${fixed(elbow.low, 0)} to ${fixed(elbow.high, 0)}°`
          : formatUncertainty(uncertainty.elbowDeg, 'deg'),
        says: uncertainty.nearStraight ? 'cannot be told from straight' : '',
      },
      {
        name: 'Elbow drop',
        explain: this.angle('elbowDrop'),
        value: formatFigure(angles.elbowDropDeg, 'deg', uncertainty.elbowDropDeg, true),
        spread: formatUncertainty(uncertainty.elbowDropDeg, 'deg'),
        says: sayDrop(angles.elbowDropDeg),
      },
    ];
  });
  protected readonly verticalAt = computed(() => {
    const found = this.stroke()?.measures.verticalAt;
    if (!found) return null;
    if (!found.ok)
      return { share: null, uncertainty: 0, text: `Vertical: ${sayReason(found.reason)}`, frame: null };
    const { value, uncertainty, frame } = found.value;
    const text = `vertical at ${formatFigure(value, 'share', uncertainty)} ${formatUncertainty(uncertainty, 'share')}`;
    return { share: value, uncertainty, text: text.replace(' % ±', ' ±'), frame };
  });
  protected readonly peakDrop = computed(() => {
    const found = this.stroke()?.measures.peakDrop;
    if (!found?.ok) return null;
    const { value, uncertainty, frame } = found.value;
    return {
      text: formatFigure(value, 'deg', uncertainty, true),
      spread: formatUncertainty(uncertainty, 'deg'),
      frame,
    };
  });
  protected readonly midPullElbow = computed(() => {
    const found = this.stroke()?.measures.elbowAtMidPull;
    if (!found?.ok) return null;
    const { value, uncertainty, frame } = found.value;
    return {
      text: formatFigure(value, 'deg', uncertainty),
      spread: formatUncertainty(uncertainty, 'deg'),
      frame,
    };
  });
  protected readonly phases = computed(() => {
    const found = this.stroke()?.measures.phases;
    if (!found) return null;
    if (!found.ok) return { why: sayReason(found.reason), parts: [] };
    const { entryAndCatch, pull, push, propulsive, recovery } = found.value;
    const named =
      pull && push
        ? ([
            ['entry and catch', entryAndCatch, 'entryAndCatch'],
            ['pull', pull, 'pull'],
            ['push', push, 'push'],
            ['recovery', recovery, 'recovery'],
          ] as const)
        : ([
            ['entry and catch', entryAndCatch, 'entryAndCatch'],
            ['pull and push', propulsive, null],
            ['recovery', recovery, 'recovery'],
          ] as const);
    return {
      why: '',
      parts: named.map(([name, { share, uncertainty }, measure]) => ({
        name,
        explain: measure && this.measure(measure),
        share,
        text: `${formatFigure(share, 'share', uncertainty)} ${formatUncertainty(uncertainty, 'share')}`.replace(
          ' % ±',
          ' ±',
        ),
      })),
    };
  });

  private angle(name: AngleName): Explain {
    return () => this.explainer()?.angle(name) ?? null;
  }

  private measure(name: Measure): Explain {
    return () => this.explainer()?.measure(name) ?? null;
  }
}
