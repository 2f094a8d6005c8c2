import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import { scaleLinear } from 'd3-scale';
import { line } from 'd3-shape';
import type { ComparedStroke } from './pull-stroke';

const frame = { left: 44, right: 388, top: 24, bottom: 240 };

/** The forearm over the pull of every stroke of both arms, marked points as links to their frames, and a plumb as playhead. */
@Component({
  selector: 'st-pull-curve',
  imports: [RouterLink],
  templateUrl: './pull-curve.html',
  styleUrl: './pull-curve.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PullCurve {
  readonly strokes = input.required<readonly ComparedStroke[]>();
  /** The two strokes shown as stills; drawn strong, the others faint. */
  readonly shown = input.required<readonly (ComparedStroke | null)[]>();
  /** Where the stills are, share of the pull 0–1. */
  readonly share = input.required<number>();
  readonly toleranceDeg = input.required<number>();

  protected readonly frame = frame;
  protected readonly x = scaleLinear().domain([0, 1]).range([frame.left, frame.right]);
  private readonly domain = computed(() => {
    const degrees = this.strokes().flatMap(({ forearmCurve }) => forearmCurve.map(({ deg }) => deg));
    const round = (value: number, to: (quotient: number) => number) => to(value / 45) * 45;
    return [
      round(Math.min(-45, ...degrees), Math.floor),
      round(Math.max(90, ...degrees), Math.ceil),
    ] as const;
  });
  private readonly y = computed(() => scaleLinear().domain(this.domain()).range([frame.bottom, frame.top]));

  protected readonly grid = computed(() => {
    const [low, high] = this.domain();
    const lines = [];
    for (let deg = low; deg <= high; deg += 45)
      lines.push({ deg, y: this.y()(deg), text: `${deg}°`.replace('-', '−') });
    return lines;
  });
  protected readonly band = computed(() => {
    const tolerance = this.toleranceDeg();
    const top = this.y()(tolerance);
    return { top, height: this.y()(-tolerance) - top };
  });
  protected readonly playhead = computed(() => this.x(this.share()));
  protected readonly curves = computed(() => {
    const path = line<{ share: number; deg: number }>()
      .x(({ share }) => this.x(share))
      .y(({ deg }) => this.y()(deg));
    const shown = this.shown().map((stroke) => stroke?.strokeId);
    return this.strokes().map((stroke) => ({
      stroke,
      strong: shown.includes(stroke.strokeId),
      path: path([...stroke.forearmCurve]) ?? '',
      points: stroke.forearmCurve.map((point) => ({
        ...point,
        x: this.x(point.share),
        y: this.y()(point.deg),
      })),
    }));
  });
  protected readonly label = computed(
    () => `Forearm angle over the pull for ${this.strokes().length} strokes; 0 degrees is vertical`,
  );
}
