import {
  ChangeDetectionStrategy,
  Component,
  computed,
  DestroyRef,
  inject,
  input,
  signal,
} from '@angular/core';
import { MatSliderModule } from '@angular/material/slider';
import { MatTabsModule } from '@angular/material/tabs';
import { DatePipe } from '@angular/common';
import { RouterLink } from '@angular/router';
import { getComparison } from '@stillstroke/contract/comparison';
import { getSession } from '@stillstroke/contract/sessions';
import { listTargets } from '@stillstroke/contract/targets';
import { apiResource } from '../core/api/api';
import { CautionLine } from '../ui/caution-line';
import { ProblemMessage } from '../ui/problem-message';
import { BreathRows } from './breath-rows';
import { sayComparison } from './comparison-sentence';
import { BothArms } from './both-arms';
import { MeasureRows } from './measure-rows';
import { PullCurves } from './pull-curves';
import { PullStill } from './pull-still';
import { typicalStroke } from './pull-stroke';
import { StillSource } from './still-source';

const leftOutWords = {
  'other-view': 'another view than the one compared',
  drill: 'a drill',
  'no-strokes': 'no strokes set',
} as const;

/** Left against right in one session: the sentence, the stills at the same share of the pull, then every measure. */
@Component({
  selector: 'st-compare-page',
  imports: [
    CautionLine,
    BreathRows,
    BothArms,
    DatePipe,
    MatSliderModule,
    MatTabsModule,
    MeasureRows,
    ProblemMessage,
    PullCurves,
    PullStill,
    RouterLink,
  ],
  templateUrl: './compare-page.html',
  styleUrl: './compare-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ComparePage {
  readonly sessionId = input.required<string>();

  protected readonly session = apiResource(getSession, () => ({ params: { id: this.sessionId() } }));
  protected readonly comparison = apiResource(getComparison, () => ({ params: { id: this.sessionId() } }));
  private readonly athleteId = computed(() =>
    this.session.hasValue() ? this.session.value().athleteId : undefined,
  );
  private readonly readTargets = apiResource(listTargets, () => {
    const id = this.athleteId();
    return id === undefined ? undefined : { params: { id } };
  });
  /** None while they are being read and where that fails: the comparison stands without them. */
  protected readonly targets = computed(() =>
    this.readTargets.hasValue() ? this.readTargets.value().items : [],
  );
  protected readonly source = new StillSource();
  /** Share of the pull that both stills show, percent. */
  protected readonly sharePercent = signal(40);

  protected readonly sentence = computed(() => {
    const compared = this.comparison.hasValue() ? this.comparison.value() : undefined;
    return compared && sayComparison(compared.splits);
  });
  protected readonly stills = computed(() => {
    const strokes = this.comparison.hasValue() ? this.comparison.value().strokes : [];
    return [typicalStroke(strokes, 'left'), typicalStroke(strokes, 'right')] as const;
  });
  protected readonly view = computed(() =>
    this.comparison.hasValue() && this.comparison.value().view === 'side-above'
      ? 'side above water'
      : 'side under water',
  );
  protected readonly leftOut = computed(() => {
    const left = this.comparison.hasValue() ? this.comparison.value().leftOut : [];
    const clips = this.session.hasValue() ? this.session.value().clips : [];
    return left.map(({ clipId, reason }) => ({
      clipId,
      name: clips.find(({ id }) => id === clipId)?.name ?? 'a clip',
      why: leftOutWords[reason],
    }));
  });

  constructor() {
    inject(DestroyRef).onDestroy(() => this.source.close());
  }

  protected reload(): void {
    this.session.reload();
    this.comparison.reload();
  }
}
