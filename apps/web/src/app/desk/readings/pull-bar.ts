import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';

/** The pull from catch to exit as a bar, with the place where the forearm comes to vertical as a plumb bob. */
@Component({
  selector: 'st-pull-bar',
  template: `
    <svg viewBox="0 0 280 56" aria-hidden="true">
      <text x="93" y="10" text-anchor="middle">one third (common practice)</text>
      <rect class="whole" x="0" y="20" width="280" height="9" rx="1" />
      @if (x() !== null) {
        <rect
          class="done"
          [class.left]="arm() === 'left'"
          x="0"
          y="20"
          [attr.width]="x()"
          height="9"
          rx="1"
        />
        <rect class="spread" [attr.x]="from()" y="17" [attr.width]="to() - from()" height="15" rx="2" />
      }
      <line class="third" x1="93.3" x2="93.3" y1="14" y2="34" />
      @if (x(); as place) {
        <line class="plumb" [attr.x1]="place" [attr.x2]="place" y1="14" y2="34" />
        <path
          class="bob"
          [attr.transform]="'translate(' + place + ' 33)'"
          d="M -4.5 0 h 9 l -1.3 6 l -3.2 5 l -3.2 -5 z"
        />
      }
      <text x="0" y="50">catch</text>
      <text x="280" y="50" text-anchor="end">exit</text>
    </svg>
  `,
  styleUrl: './pull-bar.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PullBar {
  readonly arm = input.required<'left' | 'right'>();
  /** Share of the pull, 0–1; null when vertical is not reached. */
  readonly share = input.required<number | null>();
  /** Standard uncertainty of the share. */
  readonly uncertainty = input.required<number>();

  protected readonly x = computed(() => {
    const share = this.share();
    return share === null ? null : place(share);
  });
  protected readonly from = computed(() => place((this.share() ?? 0) - this.uncertainty()));
  protected readonly to = computed(() => place((this.share() ?? 0) + this.uncertainty()));
}

const place = (share: number) => Math.max(0, Math.min(1, share)) * 280;
