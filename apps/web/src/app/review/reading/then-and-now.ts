import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import type { ReadingStand } from '@stillstroke/contract/review-readings';
import { formatFigure } from '../../ui/figure/format-figure';
import { sayThenAndNow } from '../finding-words';

/** Half of the rail's length each interval may reach beyond the values. */
const ROOM = 0.12;
/** Half-width of a 95 % interval in standard uncertainties. */
const Z95 = 1.96;

interface Spot {
  readonly at: number;
  readonly low: number;
  readonly high: number;
  readonly text: string;
}

/** One's own reading then and now: a sentence, and both with their 95 % intervals on one line. */
@Component({
  selector: 'st-then-and-now',
  template: `
    <p>{{ sentence() }}</p>
    @if (rail(); as rail) {
      <svg viewBox="0 0 320 64" aria-hidden="true">
        <line class="base" x1="0" y1="32" x2="320" y2="32" />
        <line class="then" [attr.x1]="rail.then.low" [attr.x2]="rail.then.high" y1="32" y2="32" />
        <line class="now" [attr.x1]="rail.now.low" [attr.x2]="rail.now.high" y1="32" y2="32" />
        <circle class="then" [attr.cx]="rail.then.at" cy="32" r="7" />
        <circle class="now" [attr.cx]="rail.now.at" cy="32" r="7" />
        <text [attr.x]="rail.then.at" y="14" text-anchor="middle">then {{ rail.then.text }}</text>
        <text class="strong" [attr.x]="rail.now.at" y="58" text-anchor="middle">now {{ rail.now.text }}</text>
      </svg>
    }
  `,
  styles: `
    p {
      margin: 4px 0;
    }

    svg {
      display: block;
      width: 100%;
      max-width: 420px;
      height: auto;
      font-size: 13px;
      font-variant-numeric: tabular-nums;
    }

    .base {
      stroke: var(--mat-sys-outline-variant);
      stroke-width: 2;
    }

    line.then {
      stroke: var(--mat-sys-outline);
      stroke-width: 3;
    }

    line.now {
      stroke: var(--st-deep-water);
      stroke-width: 3;
    }

    circle.then {
      fill: var(--st-card);
      stroke: var(--mat-sys-outline);
      stroke-width: 2.5;
    }

    circle.now {
      fill: var(--st-deep-water);
    }

    text {
      fill: var(--mat-sys-on-surface-variant);
    }

    .strong {
      fill: var(--st-ink);
      font-weight: 600;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ThenAndNow {
  readonly stand = input.required<ReadingStand>();

  protected readonly sentence = computed(() => sayThenAndNow(this.stand()));
  protected readonly rail = computed(() => railOf(this.stand()));
}

/** Places on a line 320 wide that holds both intervals. */
function railOf({ value, uncertainty, unit, earlier }: ReadingStand): { then: Spot; now: Spot } | null {
  if (value === null || uncertainty === null || !earlier) return null;
  const ends = [value, earlier.value].flatMap((one, at) => {
    const half = Z95 * (at === 0 ? uncertainty : earlier.uncertainty);
    return [one - half, one + half];
  });
  const [low, high] = [Math.min(...ends), Math.max(...ends)];
  const length = high - low || 1;
  const place = (one: number) => 320 * (ROOM + ((1 - 2 * ROOM) * (one - low)) / length);
  const spot = (one: number, u: number): Spot => ({
    at: place(one),
    low: place(one - Z95 * u),
    high: place(one + Z95 * u),
    text: formatFigure(one, unit, u),
  });
  return { then: spot(earlier.value, earlier.uncertainty), now: spot(value, uncertainty) };
}
