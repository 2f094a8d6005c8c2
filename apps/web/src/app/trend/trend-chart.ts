import {
  afterRenderEffect,
  ChangeDetectionStrategy,
  Component,
  computed,
  ElementRef,
  inject,
  input,
} from '@angular/core';
import { RouterLink } from '@angular/router';
import type { Target } from '@stillstroke/contract/targets';
import type { Trend, TrendPoint } from '@stillstroke/contract/trend';
import { scaleLinear, scaleUtc } from 'd3-scale';
import { line } from 'd3-shape';
import { formatFigure, formatUncertainty, onScreen, signOf, type Unit } from '../ui/figure/format-figure';
import { trendBands } from './trend-bands';
import { sayDay } from './say-day';

const frame = { left: 56, right: 900, top: 20, bottom: 330 };
/** From this many sessions on the points are joined; fewer are points only. */
const sessionsForLine = 4;
const normal95 = 1.96;

/** One measure over the sessions: both arms with their 95 % whiskers; every point leads to its session's frame on the Desk. */
@Component({
  selector: 'st-trend-chart',
  imports: [RouterLink],
  templateUrl: './trend-chart.html',
  styleUrl: './trend-chart.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class TrendChart {
  private readonly host = inject<ElementRef<HTMLElement>>(ElementRef).nativeElement;

  readonly trend = input.required<Trend>();

  /** The coach's bands for this athlete; those of this measure are drawn behind the points. */
  readonly targets = input<readonly Target[]>([]);

  protected readonly frame = frame;
  protected readonly bands = computed(() => trendBands(this.targets(), this.trend()));
  private readonly points = computed(() => this.trend().arms.flatMap(({ points }) => points));
  private readonly x = computed(() => {
    const times = this.points().map(timeOf);
    const [first, last] = [Math.min(...times), Math.max(...times)];
    // A single date sits in the middle.
    const pad = first === last ? 86_400_000 : 0;
    return scaleUtc()
      .domain([first - pad, last + pad])
      .range([frame.left + 24, frame.right - 70]);
  });
  private readonly y = computed(() => {
    const unit = this.trend().unit;
    const ends = this.points().flatMap(({ mean, uncertainty }) =>
      [mean - normal95 * uncertainty, mean + normal95 * uncertainty].map((end) => onScreen(end, unit)),
    );
    ends.push(...this.bands().flatMap(({ low, high }) => [low ?? [], high ?? []].flat()));
    return scaleLinear()
      .domain([Math.min(...ends), Math.max(...ends)])
      .nice(5)
      .range([frame.bottom, frame.top]);
  });

  protected readonly strips = computed(() =>
    this.bands().map(({ id, low, high }) => {
      const top = high === null ? frame.top : this.y()(high);
      const bottom = low === null ? frame.bottom : this.y()(low);
      return {
        id,
        top,
        height: bottom - top,
        edges: [low, high].flatMap((end) => (end === null ? [] : this.y()(end))),
      };
    }),
  );
  protected readonly grid = computed(() =>
    this.y()
      .ticks(5)
      .map((value) => ({ y: this.y()(value), text: formatTick(value, this.trend().unit) })),
  );
  /** Dates below the axis, as many as fit without touching. */
  protected readonly dates = computed(() => {
    const shown: { x: number; text: string }[] = [];
    for (const date of [...new Set(this.points().map((point) => point.date))].sort()) {
      const x = this.x()(Date.parse(date));
      const last = shown.at(-1);
      if (!last || x - last.x > 62) shown.push({ x, text: sayDay(date) });
    }
    return shown;
  });
  protected readonly arms = computed(() =>
    this.trend().arms.map(({ arm, points }) => {
      const drawn = points.map((point) => this.drawn(point));
      const path = line<{ x: number; y: number }>()
        .x(({ x }) => x)
        .y(({ y }) => y);
      return { arm, drawn, path: points.length >= sessionsForLine ? path(drawn) : null, last: drawn.at(-1) };
    }),
  );
  protected readonly label = computed(
    () =>
      `${this.points().length} points over the sessions; the table below lists them${this.bands()
        .map(({ text }) => `. ${text}`)
        .join('')}`,
  );

  private drawn(point: TrendPoint) {
    const unit = this.trend().unit;
    const y = (value: number) => this.y()(onScreen(value, unit));
    const spread = normal95 * point.uncertainty;
    const [place] = point.frames;
    return {
      x: this.x()(timeOf(point)),
      y: y(point.mean),
      high: y(point.mean + spread),
      low: y(point.mean - spread),
      link: place ? ['/clips', place.clipId] : ['/sessions', point.sessionId],
      query: place ? { frame: place.frame, ...(point.arm !== 'both' && { arm: point.arm }) } : {},
      label:
        `${sayDay(point.date)}, ${point.arm === 'both' ? 'both arms' : `${point.arm} arm`}: ${formatFigure(point.mean, unit, point.uncertainty)} ` +
        `${formatUncertainty(point.uncertainty, unit)} over ${point.count} ${point.arm === 'both' ? 'passages' : 'strokes'}`,
    };
  }

  constructor() {
    // On a narrow screen the chart is wider than its place; the newest sessions are what people come for.
    afterRenderEffect({
      write: () => {
        this.trend();
        this.host.scrollLeft = this.host.scrollWidth;
      },
    });
  }
}

const timeOf = ({ date }: { date: string }) => Date.parse(date);

function formatTick(value: number, unit: Unit): string {
  return `${String(value).replace('-', '−')}${unit === 'perMinute' ? '' : signOf[unit]}`;
}
