import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { scaleLinear } from 'd3-scale';

/** Value of one arm on a rail, on the screen's scale, with its 95 % interval where there is one. */
export interface RailValue {
  readonly value: number;
  readonly interval: { readonly low: number; readonly high: number } | null;
}

/** A band on the screen's scale; null = open on that side. */
export interface RailBand {
  readonly low: number | null;
  readonly high: number | null;
}

const width = 400;
const inset = 12;

/** Left and right of one measure on one line: squares and dashes for left, discs and solid lines for right. */
@Component({
  selector: 'st-arm-rail',
  template: `
    <svg viewBox="0 0 400 50" role="img" [attr.aria-label]="label()">
      @for (band of bands(); track band.y) {
        <rect
          class="band"
          [attr.x]="band.x"
          [attr.y]="band.y"
          [attr.width]="band.width"
          [attr.height]="band.height"
        />
      }
      <line class="rail" x1="12" x2="388" y1="20" y2="20" />
      @for (tick of ticks(); track tick.x) {
        <line class="rail" [attr.x1]="tick.x" [attr.x2]="tick.x" y1="15" y2="25" />
        <text [attr.x]="tick.x" y="45" text-anchor="middle">{{ tick.text }}</text>
      }
      @if (leftDrawn(); as drawn) {
        @if (drawn.line; as line) {
          <line class="interval left" [attr.x1]="line.from" [attr.x2]="line.to" y1="11" y2="11" />
        }
        <rect class="left" [attr.x]="drawn.x - 5.5" y="5.5" width="11" height="11" />
      }
      @if (rightDrawn(); as drawn) {
        @if (drawn.line; as line) {
          <line class="interval" [attr.x1]="line.from" [attr.x2]="line.to" y1="29" y2="29" />
        }
        <circle [attr.cx]="drawn.x" cy="29" r="6" />
      }
    </svg>
  `,
  styleUrl: './arm-rail.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ArmRail {
  readonly left = input.required<RailValue | null>();
  readonly right = input.required<RailValue | null>();
  /** Both ends of the rail, same scale as the values. */
  readonly domain = input.required<readonly [number, number]>();
  /** What follows a number at a tick: `°`, ` %`. */
  readonly suffix = input('');
  /** Bands behind the values, left's above right's, same scale; null ends reach the rail's own end. */
  readonly leftBand = input<RailBand | null>(null);
  readonly rightBand = input<RailBand | null>(null);
  /** The rail in words, for those who do not see it. */
  readonly label = input.required<string>();

  private readonly x = computed(() =>
    scaleLinear()
      .domain(this.domain())
      .range([inset, width - inset])
      .clamp(true),
  );
  protected readonly ticks = computed(() => {
    const [low, high] = this.domain();
    return [low, (low + high) / 2, high].map((value) => ({
      x: this.x()(value),
      text: `${Math.round(value * 100) / 100}${this.suffix()}`.replace('-', '−'),
    }));
  });
  protected readonly leftDrawn = computed(() => this.drawn(this.left()));
  protected readonly rightDrawn = computed(() => this.drawn(this.right()));
  protected readonly bands = computed(() => [
    ...this.drawnBand(this.leftBand(), 5),
    ...this.drawnBand(this.rightBand(), 20),
  ]);

  private drawnBand(band: RailBand | null, y: number) {
    if (!band) return [];
    const [first, last] = this.domain();
    const [from, to] = [this.x()(band.low ?? first), this.x()(band.high ?? last)];
    return [{ x: from, y, width: to - from, height: 15 }];
  }

  private drawn(value: RailValue | null) {
    if (!value) return null;
    const x = this.x();
    const line = value.interval && { from: x(value.interval.low), to: x(value.interval.high) };
    return { x: x(value.value), line };
  }
}
