import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import { getTrend } from '@stillstroke/contract/trend';
import { apiResource } from '../core/api/api';
import { sayTrend } from '../trend/trend-sentence';
import { ArmBadge } from '../ui/arm-badge';
import { formatFigure, formatUncertainty } from '../ui/figure/format-figure';
import { LoadingLines } from '../ui/loading-lines';
import { ProblemMessage } from '../ui/problem-message';
import { sayDate } from '../ui/say-date';
import { GlanceChart } from './glance-chart';

/** The athlete's "vertical at" over the sessions in one sentence and one small picture, with the way to the Trend page. */
@Component({
  selector: 'st-trend-card',
  imports: [ArmBadge, GlanceChart, LoadingLines, ProblemMessage, RouterLink],
  templateUrl: './trend-card.html',
  styleUrl: './trend-card.scss',
  host: { class: 'st-card' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class TrendCard {
  readonly athleteId = input.required<string>();

  protected readonly read = apiResource(getTrend, () => ({
    params: { id: this.athleteId() },
    query: { measure: 'verticalAt' },
  }));
  protected readonly trend = computed(() => (this.read.hasValue() ? this.read.value() : null));
  protected readonly measured = computed(
    () => this.trend()?.arms.some(({ points }) => points.length > 0) ?? false,
  );
  protected readonly sentence = computed(() => {
    const trend = this.trend();
    return trend && this.measured() ? sayTrend(trend) : null;
  });
  /** The newest figure of each arm, with its frame on the Desk. */
  protected readonly latest = computed(() =>
    (this.trend()?.arms ?? []).flatMap(({ arm, points }) => {
      const point = points.at(-1);
      if (!point || arm === 'both') return [];
      const [place] = point.frames;
      return {
        arm,
        value: formatFigure(point.mean, 'share', point.uncertainty),
        spread: formatUncertainty(point.uncertainty, 'share'),
        date: sayDate(point.date),
        link: place ? ['/clips', place.clipId] : ['/sessions', point.sessionId],
        query: place ? { frame: place.frame, arm } : {},
      };
    }),
  );
}
