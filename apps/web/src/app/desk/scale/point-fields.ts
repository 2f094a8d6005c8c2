import { ChangeDetectionStrategy, Component, input, output } from '@angular/core';
import type { Point } from '@stillstroke/contract/clip-facts';
import type { ScalePoint, ScalePointName } from '../state/scale-points';

/** Points of the picture by numbers: what can be dragged can also be typed. */
@Component({
  selector: 'st-point-fields',
  template: `
    @for (one of points(); track one.name) {
      <div class="point">
        <span>{{ one.label }}</span>
        @for (axis of axes; track axis.key) {
          <label>
            {{ axis.key }}
            <input
              type="number"
              step="0.5"
              [attr.aria-label]="one.label + ', ' + axis.from"
              [value]="rounded(one.point[axis.key])"
              (change)="change(one, axis.key, $event)"
            />
          </label>
        }
      </div>
    }
  `,
  styleUrl: './point-fields.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PointFields {
  readonly points = input.required<readonly ScalePoint[]>();

  readonly moved = output<{ readonly name: ScalePointName; readonly point: Point }>();

  protected readonly axes = [
    { key: 'x', from: 'from the left' },
    { key: 'y', from: 'from above' },
  ] as const;

  protected rounded(value: number): string {
    return String(Math.round(value * 100) / 100);
  }

  protected change({ name, point }: ScalePoint, axis: 'x' | 'y', event: Event): void {
    const value = (event.target as HTMLInputElement).valueAsNumber;
    if (Number.isFinite(value)) this.moved.emit({ name, point: { ...point, [axis]: value } });
  }
}
