import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';

const width = 124;
const inset = 6;

/**
 * Where in the pull (catch to exit, 0–1) each forearm comes to vertical, on one small line: a square for left above it,
 * a disc for right below it, and a dotted tick at one third, which coaches want by common practice (no source).
 */
@Component({
  selector: 'st-rail-glance',
  template: `
    @if (measured()) {
      <svg viewBox="0 0 124 26" width="124" height="26" role="img" [attr.aria-label]="words()">
        <title>{{ words() }}. Dotted: one third of the pull, common practice, no source.</title>
        <line class="rail" x1="2" x2="122" y1="13" y2="13" />
        <line class="third" [attr.x1]="third" [attr.x2]="third" y1="1" y2="25" />
        @if (left() !== null) {
          <rect [attr.x]="place(left()) - 4" y="4.5" width="8" height="8" />
        }
        @if (right() !== null) {
          <circle [attr.cx]="place(right())" cy="17.5" r="4.4" />
        }
      </svg>
    } @else {
      <span class="none">not measured</span>
    }
  `,
  styles: `
    :host {
      display: inline-flex;
      align-items: center;
      min-height: 26px;
    }

    .rail {
      stroke: var(--mat-sys-outline-variant);
      stroke-width: 1.5;
    }

    .third {
      stroke: var(--mat-sys-outline);
      stroke-dasharray: 1.5 2.5;
      stroke-width: 1.5;
    }

    rect {
      fill: var(--st-left);
    }

    circle {
      fill: var(--st-right);
    }

    .none {
      color: var(--mat-sys-on-surface-variant);
      font-size: 0.875rem;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class RailGlance {
  readonly left = input.required<number | null>();
  readonly right = input.required<number | null>();

  protected readonly measured = computed(() => this.left() !== null || this.right() !== null);
  protected readonly third = this.place(1 / 3);
  protected readonly words = computed(() => {
    const say = (arm: string, share: number | null) =>
      share === null ? `${arm} not measured` : `${arm} ${Math.round(share * 100)} %`;
    return `Vertical at: ${say('left', this.left())}, ${say('right', this.right())} of the pull`;
  });

  /** x of a share; clamped, since a mark just outside the pull still belongs at its end. */
  protected place(share: number | null): number {
    const held = Math.min(1, Math.max(0, share ?? 0));
    return inset + held * (width - 2 * inset);
  }
}
