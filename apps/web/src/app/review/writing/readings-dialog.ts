import { ChangeDetectionStrategy, Component, computed, inject, linkedSignal, signal } from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import { MatButtonToggleModule } from '@angular/material/button-toggle';
import { MAT_DIALOG_DATA, MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatSelectModule } from '@angular/material/select';
import { getComparison, type BreathSplit, type MeasureComparison } from '@stillstroke/contract/comparison';
import { listMarks } from '@stillstroke/contract/marks';
import { angleNames } from '@stillstroke/contract/measure-names';
import { getMeasures, type Figure, type Measure, type StrokeMeasures } from '@stillstroke/contract/measures';
import type { MarkAngle, ReadingSource } from '@stillstroke/contract/review-readings';
import { getSession } from '@stillstroke/contract/sessions';
import { apiResource } from '../../core/api/api';
import { formatFigure, formatUncertainty, unitOf } from '../../ui/figure/format-figure';
import { measureWords, measuresInOrder } from '../../ui/figure/measure-words';
import { LoadingLines } from '../../ui/loading-lines';
import { ProblemMessage } from '../../ui/problem-message';

export interface ReadingsWish {
  readonly athleteId: string;
  readonly sessionId: string;
}

type Kind = ReadingSource['kind'];

interface Offer {
  readonly key: string;
  readonly name: string;
  readonly value: string;
  readonly source: ReadingSource;
}

const splitKeys = { all: 'all', breathing: 'breathing', 'not-breathing': 'notBreathing' } as const;

/** Everything of a session that a finding can rest on: means of an arm, one stroke, or an angle of one frame. */
@Component({
  selector: 'st-readings-dialog',
  imports: [
    LoadingLines,
    MatButtonModule,
    MatButtonToggleModule,
    MatDialogModule,
    MatFormFieldModule,
    MatSelectModule,
    ProblemMessage,
  ],
  templateUrl: './readings-dialog.html',
  styleUrl: './readings-dialog.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ReadingsDialog {
  private readonly ref = inject<MatDialogRef<ReadingsDialog, ReadingSource>>(MatDialogRef);
  private readonly wish = inject<ReadingsWish>(MAT_DIALOG_DATA);

  private readonly params = { params: { id: this.wish.sessionId } };
  protected readonly session = apiResource(getSession, () => this.params);
  protected readonly comparison = apiResource(getComparison, () => this.params);

  protected readonly kind = signal<Kind>('session');
  protected readonly split = signal<BreathSplit>('all');
  protected readonly clips = computed(() => (this.session.hasValue() ? this.session.value().clips : []));
  protected readonly clipId = linkedSignal(
    () => this.clips().find((clip) => clip.strokeCount > 0)?.id ?? null,
  );
  protected readonly measures = apiResource(getMeasures, () => this.ofClip('stroke'));
  protected readonly marks = apiResource(listMarks, () => this.ofClip('frame'));
  protected readonly strokes = computed(() => (this.measures.hasValue() ? this.measures.value().items : []));
  protected readonly strokeId = linkedSignal(() => this.strokes()[0]?.strokeId ?? null);
  protected readonly marked = computed(() =>
    (this.marks.hasValue() ? this.marks.value().items : []).map((mark) => ({
      key: `${mark.arm} ${mark.frame}`,
      name: `Frame ${mark.frame}, ${mark.arm} arm`,
      mark,
    })),
  );
  protected readonly markKey = linkedSignal(() => this.marked()[0]?.key ?? null);

  protected readonly waiting = computed(
    () => this.comparison.isLoading() || this.measures.isLoading() || this.marks.isLoading(),
  );
  protected readonly fault = computed(
    () => this.comparison.error() ?? this.session.error() ?? this.measures.error() ?? this.marks.error(),
  );
  protected readonly offers = computed<readonly Offer[]>(() => {
    switch (this.kind()) {
      case 'session':
        return this.ofSession();
      case 'stroke':
        return this.ofStroke();
      case 'frame':
        return this.ofFrame();
    }
  });

  protected sayStroke({ arm, breath, forearmCurve, strokeRate }: StrokeMeasures, number: number): string {
    const from = strokeRate.frame ?? forearmCurve[0]?.frame;
    return `Stroke ${number}, ${arm} arm${from === undefined ? '' : `, from frame ${from}`}${breath ? ', with a breath' : ''}`;
  }

  protected take(source: ReadingSource): void {
    this.ref.close(source);
  }

  private ofClip(kind: Kind) {
    const id = this.clipId();
    return this.kind() === kind && id !== null ? { params: { id } } : undefined;
  }

  private ofSession(): Offer[] {
    if (!this.comparison.hasValue()) return [];
    const [split, { sessionId }] = [this.split(), this.wish];
    const all = this.comparison.value().splits[splitKeys[split]];
    return all.flatMap((compared) =>
      (['left', 'right'] as const).flatMap((arm) => {
        const { measure } = compared;
        const value = sayMean(compared, arm);
        if (value === null) return [];
        return [
          {
            key: `${measure} ${arm}`,
            name: `${measureWords[measure].name}, ${arm} arm`,
            value,
            source: { kind: 'session', sessionId, arm, measure, split } as const,
          },
        ];
      }),
    );
  }

  private ofStroke(): Offer[] {
    const stroke = this.strokes().find((one) => one.strokeId === this.strokeId());
    const clipId = this.clipId();
    if (!stroke || clipId === null) return [];
    return measuresInOrder.flatMap((measure) => {
      const figure = figureOf(stroke, measure);
      if (figure?.value == null) return [];
      const value = sayFigure(figure.value, figure.uncertainty, measure);
      const source = { kind: 'stroke', clipId, strokeId: stroke.strokeId, measure } as const;
      return [{ key: measure, name: measureWords[measure].name, value, source }];
    });
  }

  private ofFrame(): Offer[] {
    const mark = this.marked().find(({ key }) => key === this.markKey())?.mark;
    const clipId = this.clipId();
    if (!mark || clipId === null) return [];
    return (Object.keys(angleNames) as MarkAngle[]).map((angle) => {
      const [value, uncertainty] = [mark.angles[angle], mark.uncertaintyDeg[angle]];
      const { arm, frame } = mark;
      return {
        key: angle,
        name: angleNames[angle],
        value: `${formatFigure(value, 'deg', uncertainty, angle !== 'elbowDeg')} ${formatUncertainty(uncertainty, 'deg')}`,
        source: { kind: 'frame', clipId, arm, frame, angle } as const,
      };
    });
  }
}

function sayMean({ measure, ...sides }: MeasureComparison, arm: 'left' | 'right'): string | null {
  const { mean, count, interval } = sides[arm];
  if (mean === null) return null;
  const unit = unitOf[measure];
  const strokes = count === 1 ? 'one stroke' : `${count} strokes`;
  const between = interval
    ? `, 95 % from ${formatFigure(interval.low, unit)} to ${formatFigure(interval.high, unit)}`
    : '';
  return `${formatFigure(mean, unit, null, measure === 'peakDrop')} (${strokes}${between})`;
}

function sayFigure(value: number, uncertainty: number | null, measure: Measure): string {
  const unit = unitOf[measure];
  const shown = formatFigure(value, unit, uncertainty, measure === 'peakDrop');
  return uncertainty === null ? shown : `${shown} ${formatUncertainty(uncertainty, unit)}`;
}

function figureOf(stroke: StrokeMeasures, measure: Measure): Figure | null {
  switch (measure) {
    case 'verticalAt':
      return stroke.verticalAtShare;
    case 'peakDrop':
      return stroke.peakElbowDrop;
    case 'elbowAtMidPull':
      return stroke.elbowAtMidPull;
    case 'strokeRate':
      return stroke.strokeRate;
    case 'entryAndCatch':
    case 'pull':
    case 'push':
    case 'recovery':
      return stroke.phases[measure];
    default:
      return null;
  }
}
