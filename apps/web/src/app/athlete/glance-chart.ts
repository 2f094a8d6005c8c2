import {
  afterNextRender,
  ChangeDetectionStrategy,
  Component,
  computed,
  DestroyRef,
  inject,
  input,
  signal,
  viewChild,
  type ElementRef,
} from '@angular/core';
import type { Trend, TrendPoint } from '@stillstroke/contract/trend';
import { scaleLinear, scaleUtc } from 'd3-scale';
import { line } from 'd3-shape';
import { sayDate } from '../ui/say-date';

/** Until the page has been laid out once. */
const usualWidth = 640;
const leastWidth = 160;
const height = 150;
const normal95 = 1.96;
/** As on the Trend page: fewer sessions are points only. */
const sessionsForLine = 4;
const oneThird = 1 / 3;

/** "Vertical at" of both arms over the sessions, small: squares and dashes left, discs and a solid line right, 95 % whiskers. */
@Component({
  selector: 'st-glance-chart',
  templateUrl: './glance-chart.html',
  styleUrl: './glance-chart.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class GlanceChart {
  readonly trend = input.required<Trend>();

  private readonly plot = viewChild.required<ElementRef<HTMLElement>>('plot');

  /** The picture is drawn at the width it has, so that its shapes keep their size on a phone. */
  protected readonly width = signal(usualWidth);
  private readonly points = computed(() => this.trend().arms.flatMap(({ points }) => points));
  private readonly x = computed(() => {
    const times = this.points().map(({ date }) => Date.parse(date));
    const [first, last] = [Math.min(...times), Math.max(...times)];
    const pad = first === last ? 86_400_000 : 0;
    return scaleUtc()
      .domain([first - pad, last + pad])
      .range([14, this.width() - 14]);
  });
  private readonly y = computed(() => {
    const ends = this.points().flatMap(({ mean, uncertainty }) => [
      mean - normal95 * uncertainty,
      mean + normal95 * uncertainty,
    ]);
    return scaleLinear()
      .domain([Math.max(0, Math.min(...ends)), Math.min(1, Math.max(...ends))])
      .nice(4)
      .range([height - 12, 12]);
  });

  /** Lines across, with their place from the top in percent for the words beside them. */
  protected readonly grid = computed(() =>
    this.y()
      .ticks(4)
      .filter((_, index, all) => index % Math.ceil(all.length / 4) === 0)
      .map((share) => ({
        y: this.y()(share),
        top: (this.y()(share) / height) * 100,
        text: `${Math.round(share * 100)} %`,
      })),
  );
  protected readonly third = computed(() => {
    const [low = 0, high = 1] = this.y().domain();
    return oneThird >= low && oneThird <= high ? this.y()(oneThird) : null;
  });
  protected readonly arms = computed(() =>
    this.trend().arms.map(({ arm, points }) => {
      const drawn = points.map((point) => this.drawn(point));
      const path = line<{ x: number; y: number }>()
        .x(({ x }) => x)
        .y(({ y }) => y);
      return { arm, drawn, path: points.length >= sessionsForLine ? path(drawn) : null };
    }),
  );
  protected readonly ends = computed(() => {
    const dates = this.points()
      .map(({ date }) => date)
      .sort();
    const [first, last] = [dates[0], dates.at(-1)];
    return first === undefined || last === undefined || first === last
      ? [first].flatMap((date) => (date ? sayDate(date) : []))
      : [sayDate(first), sayDate(last)];
  });

  constructor() {
    const destroyed = inject(DestroyRef);
    afterNextRender(() => {
      const observer = new ResizeObserver(([entry]) => {
        if (entry) this.width.set(Math.max(leastWidth, Math.round(entry.contentRect.width)));
      });
      observer.observe(this.plot().nativeElement);
      destroyed.onDestroy(() => observer.disconnect());
    });
  }

  private drawn({ date, mean, uncertainty, sessionId }: TrendPoint) {
    const spread = normal95 * uncertainty;
    return {
      key: sessionId,
      x: this.x()(Date.parse(date)),
      y: this.y()(mean),
      high: this.y()(mean + spread),
      low: this.y()(mean - spread),
    };
  }
}
