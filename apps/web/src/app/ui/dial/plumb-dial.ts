import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';

const radius = 96;
const pivot = { x: 130, y: 26 };

/**
 * A forearm against the plumb: a vertical with its bob, the arm drawn at its angle, and the fan of its uncertainty.
 * Degrees; 0 hangs down, + swings to the side marked "ahead".
 */
@Component({
  selector: 'st-plumb-dial',
  template: `
    <svg viewBox="0 0 260 140" role="img" [attr.aria-label]="label()">
      <text x="22" y="14">behind</text>
      <text x="238" y="14" text-anchor="end">ahead</text>
      @for (tick of ticks; track tick.angle) {
        <line class="tick" [attr.x1]="tick.x1" [attr.y1]="tick.y1" [attr.x2]="tick.x2" [attr.y2]="tick.y2" />
      }
      <line
        class="plumb"
        [attr.x1]="pivot.x"
        [attr.y1]="pivot.y"
        [attr.x2]="pivot.x"
        [attr.y2]="pivot.y + 84"
      />
      <path class="bob" [attr.d]="bob" />
      @if (angle() !== null) {
        <path class="fan" [class.left]="arm() === 'left'" [attr.d]="fan()" />
        <line
          class="forearm"
          [class.left]="arm() === 'left'"
          [attr.x1]="pivot.x"
          [attr.y1]="pivot.y"
          [attr.x2]="tip().x"
          [attr.y2]="tip().y"
        />
        @if (arm() === 'left') {
          <rect class="joint left" [attr.x]="tip().x - 6" [attr.y]="tip().y - 6" width="12" height="12" />
          <rect class="elbow left" [attr.x]="pivot.x - 6" [attr.y]="pivot.y - 6" width="12" height="12" />
        } @else {
          <circle class="joint" [attr.cx]="tip().x" [attr.cy]="tip().y" r="6.5" />
          <circle class="elbow" [attr.cx]="pivot.x" [attr.cy]="pivot.y" r="6.5" />
        }
      }
    </svg>
  `,
  styleUrl: './plumb-dial.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PlumbDial {
  readonly arm = input.required<'left' | 'right'>();
  /** Forearm angle in degrees, or null where there is none. */
  readonly angle = input.required<number | null>();
  /** Standard uncertainty in degrees. */
  readonly uncertainty = input<number | null>(null);

  protected readonly pivot = pivot;
  protected readonly ticks = [-90, -75, -60, -45, -30, -15, 0, 15, 30, 45, 60, 75, 90].map((angle) => {
    const inner = at(angle, radius + 4);
    const outer = at(angle, angle % 45 === 0 ? radius + 16 : radius + 11);
    return { angle, x1: inner.x, y1: inner.y, x2: outer.x, y2: outer.y };
  });
  protected readonly bob = `M ${pivot.x - 5} ${pivot.y + 83} h 10 l -1.4 7 l -3.6 6 l -3.6 -6 z`;
  protected readonly tip = computed(() => at(this.angle() ?? 0, radius));
  /** The two-sided fan of one standard uncertainty each way. */
  protected readonly fan = computed(() => {
    const angle = this.angle() ?? 0;
    const spread = Math.min(45, this.uncertainty() ?? 0);
    const [from, to] = [at(angle - spread, radius), at(angle + spread, radius)];
    return `M ${pivot.x} ${pivot.y} L ${from.x} ${from.y} A ${radius} ${radius} 0 0 0 ${to.x} ${to.y} Z`;
  });
  protected readonly label = computed(() => {
    const angle = this.angle();
    if (angle === null) return `No ${this.arm()} forearm marked on this frame`;
    const side =
      Math.abs(angle) < 0.5 ? 'vertical' : angle > 0 ? 'hand ahead of the elbow' : 'hand behind the elbow';
    return `${this.arm()} forearm at ${Math.round(angle)} degrees from the plumb, ${side}`;
  });
}

/** Point at an angle from straight down, + to the right. */
function at(angleDeg: number, distance: number): { x: number; y: number } {
  const angle = (angleDeg * Math.PI) / 180;
  return { x: round(pivot.x + distance * Math.sin(angle)), y: round(pivot.y + distance * Math.cos(angle)) };
}

const round = (value: number) => Math.round(value * 100) / 100;
