import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import type { Arm } from '@stillstroke/contract/strokes';

/** An arm's name with its shape: a square for the left, a round for the right. */
@Component({
  selector: 'st-arm-badge',
  template: `<span class="shape" aria-hidden="true"></span>{{ text() }}`,
  styles: `
    :host {
      display: inline-flex;
      align-items: center;
      gap: 6px;
      font-weight: 600;
      color: var(--st-right-text);
    }

    :host(.left) {
      color: var(--st-left-text);
    }

    .shape {
      width: 9px;
      height: 9px;
      border-radius: 50%;
      background: var(--st-right);
    }

    :host(.left) .shape {
      border-radius: 0;
      background: var(--st-left);
    }
  `,
  host: { '[class.left]': "arm() === 'left'" },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ArmBadge {
  readonly arm = input.required<Arm>();
  /** Words instead of the arm's plain name. */
  readonly label = input<string>();

  protected readonly text = computed(() => this.label() ?? (this.arm() === 'left' ? 'Left' : 'Right'));
}
