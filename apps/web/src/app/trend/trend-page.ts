import { DatePipe } from '@angular/common';
import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatSelectModule } from '@angular/material/select';
import { Router, RouterLink } from '@angular/router';
import { getAthlete } from '@stillstroke/contract/athletes';
import { strokeKindSchema } from '@stillstroke/contract/clip-facts';
import { getTrend, sideViewSchema, trendMeasureSchema, type TrendMeasure } from '@stillstroke/contract/trend';
import { listTargets } from '@stillstroke/contract/targets';
import { apiResource } from '../core/api/api';
import {
  fixed,
  formatDifference,
  formatFigure,
  formatInterval,
  formatUncertainty,
  onScreen,
} from '../ui/figure/format-figure';
import { How } from '../ui/explain/how';
import { measuresInOrder, nameOf, sayMoved } from '../ui/figure/measure-words';
import { CautionLine } from '../ui/caution-line';
import { ProblemMessage } from '../ui/problem-message';
import { changeWords, explainChange, explainPoint, explainSlope } from './explain-trend';
import { sayDay } from './say-day';
import { saySeries } from './series-words';
import { TrendChart } from './trend-chart';
import { sayTrend } from './trend-sentence';

const leftOutWords = {
  'other-view': 'another view',
  drill: 'drill only',
  'full-stroke': 'full strokes only',
  'not-measured': 'not measured',
} as const;

/** One measure of one athlete over the sessions. */
@Component({
  selector: 'st-trend-page',
  imports: [
    CautionLine,
    DatePipe,
    How,
    MatFormFieldModule,
    MatSelectModule,
    ProblemMessage,
    RouterLink,
    TrendChart,
  ],
  templateUrl: './trend-page.html',
  styleUrl: './trend-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class TrendPage {
  private readonly router = inject(Router);

  readonly athleteId = input.required<string>();
  /** From the address; anything that is no measure falls back to the first. */
  readonly measure = input<string>();
  /** View and stroke kind, from the address; the server chooses a view where none is named. */
  readonly view = input<string>();
  readonly stroke = input<string>();

  protected readonly chosen = computed<TrendMeasure>(
    () => trendMeasureSchema.safeParse(this.measure()).data ?? 'verticalAt',
  );
  protected readonly armWords = { left: 'Left', right: 'Right', both: 'Both arms' } as const;
  protected readonly athlete = apiResource(getAthlete, () => ({ params: { id: this.athleteId() } }));
  protected readonly trend = apiResource(getTrend, () => ({
    params: { id: this.athleteId() },
    query: {
      measure: this.chosen(),
      view: sideViewSchema.safeParse(this.view()).data,
      stroke: strokeKindSchema.safeParse(this.stroke()).data,
    },
  }));
  private readonly readTargets = apiResource(listTargets, () => ({ params: { id: this.athleteId() } }));
  protected readonly targets = computed(() =>
    this.readTargets.hasValue() ? this.readTargets.value().items : [],
  );
  /** Those that some session has; the chosen one always, so that it is named. */
  protected readonly measures = computed(() => {
    const listed = new Set(this.shown()?.measured ?? measuresInOrder).add(this.chosen());
    return [...measuresInOrder, 'coordination' as const]
      .filter((measure) => listed.has(measure))
      .map((measure) => ({ measure, name: nameOf(measure) }));
  });
  protected readonly words = computed(() => ({ name: nameOf(this.chosen()) }));
  protected readonly shown = computed(() => (this.trend.hasValue() ? this.trend.value() : null));
  protected readonly series = computed(() => {
    const trend = this.shown();
    return trend ? saySeries(trend) : 'side view';
  });
  protected readonly choices = computed(() =>
    (this.shown()?.series ?? []).map((one) => ({
      value: `${one.view} ${one.stroke}`,
      name: `${saySeries(one)}, ${one.sessions} ${one.sessions === 1 ? 'session' : 'sessions'}`,
    })),
  );
  protected readonly chosenSeries = computed(() => {
    const trend = this.shown();
    return trend && `${trend.view} ${trend.stroke}`;
  });
  protected readonly changes = computed(() => {
    const trend = this.shown();
    return (trend?.arms ?? []).flatMap((arm) => {
      if (!trend || arm.change === null) return [];
      const amount = sayMoved(trend.measure, arm.change);
      const range = arm.interval ? ` (95 %: ${formatInterval(arm.interval, trend.unit)})` : '';
      const least =
        arm.detectable === null
          ? ''
          : `; marking could produce ${formatDifference(arm.detectable, trend.unit)}`;
      return [
        {
          arm: arm.arm,
          verdict: changeWords[arm.verdict],
          detail: `${amount}${range}${least}`,
          explain: () => explainChange(trend, arm),
        },
      ];
    });
  });
  protected readonly sentence = computed(() => {
    const trend = this.shown();
    return trend && sayTrend(trend);
  });
  protected readonly measured = computed(
    () => this.shown()?.arms.some(({ points }) => points.length > 0) ?? false,
  );
  protected readonly slopes = computed(() => {
    const trend = this.shown();
    return (trend?.arms ?? []).flatMap((of) => {
      const { arm, slope } = of;
      return slope && trend
        ? [
            {
              arm,
              explain: () => explainSlope(trend, of),
              value: `${this.signed(slope.value)} ${unitWords[trend.unit]} a month`,
              detail: `95 %: ${this.signed(slope.low)} to ${this.signed(slope.high)}; robust slope ${this.signed(slope.robust)}`,
            },
          ]
        : [];
    });
  });
  protected readonly detectable = computed(() => {
    const trend = this.shown();
    return (trend?.arms ?? []).flatMap((arm) =>
      arm.detectable === null || !trend
        ? []
        : [
            {
              arm: arm.arm,
              text: formatDifference(arm.detectable, trend.unit),
              explain: () => explainChange(trend, arm),
            },
          ],
    );
  });
  protected readonly leftOut = computed(() => {
    const left = this.shown()?.leftOut ?? [];
    return {
      count: left.length,
      why: [...new Set(left.map(({ reason }) => leftOutWords[reason]))].join('; '),
      left,
    };
  });
  protected readonly rows = computed(() => {
    const trend = this.shown();
    return (trend?.arms ?? [])
      .flatMap(({ points }) => points)
      .sort((a, b) => b.date.localeCompare(a.date) || a.arm.localeCompare(b.arm))
      .map((point) => ({
        ...point,
        value: formatFigure(point.mean, trend?.unit ?? 'deg', point.uncertainty),
        spread: formatUncertainty(point.uncertainty, trend?.unit ?? 'deg'),
        about: `${point.arm} arm, ${sayDay(point.date)}`,
        explain: () => (trend ? explainPoint(trend, point) : null),
      }));
  });

  protected chooseMeasure(measure: TrendMeasure): void {
    void this.router.navigate([], {
      queryParams: { measure },
      queryParamsHandling: 'merge',
      replaceUrl: true,
    });
  }

  protected chooseSeries(value: string): void {
    const [view, stroke] = value.split(' ');
    void this.router.navigate([], {
      queryParams: { view, stroke },
      queryParamsHandling: 'merge',
      replaceUrl: true,
    });
  }

  protected reload(): void {
    this.trend.reload();
    this.athlete.reload();
  }

  private signed(value: number): string {
    const shown = onScreen(value, this.shown()?.unit ?? 'deg');
    const places = this.shown()?.unit.startsWith('m') ? 2 : 1;
    return `${shown > 0.05 ? '+' : ''}${fixed(shown, places)}`;
  }
}

const unitWords = {
  share: 'points',
  deg: 'degrees',
  perMinute: 'a minute',
  m: 'm',
  m2PerS: 'm²/s',
} as const;
