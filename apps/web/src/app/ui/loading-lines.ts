import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';

/** Grey lines where content will stand; they appear only when the answer takes a moment, so that quick ones do not flicker. */
@Component({
  selector: 'st-loading-lines',
  template: `
    <span class="st-visually-hidden">Loading…</span>
    @for (line of lines(); track line) {
      <span class="line" aria-hidden="true"></span>
    }
  `,
  styles: `
    :host {
      display: grid;
      gap: 14px;
      animation: appear 200ms 250ms both;
    }

    .line {
      height: 14px;
      border-radius: 7px;
      background: var(--mat-sys-surface-container-highest);
    }

    .line:nth-of-type(3n) {
      width: 72%;
    }

    .line:nth-of-type(3n + 1) {
      width: 88%;
    }

    @keyframes appear {
      from {
        opacity: 0;
      }
    }
  `,
  host: { role: 'status' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class LoadingLines {
  readonly count = input(4);
  protected readonly lines = computed(() => Array.from({ length: this.count() }, (_, index) => index));
}
