import { ChangeDetectionStrategy, Component, computed, input, output } from '@angular/core';
import { RouterLink } from '@angular/router';
import { problemOf } from '../core/api/problem-of';

/** What stands in place of something that could not be read: the reason in words, and a way on. */
@Component({
  selector: 'st-problem-message',
  imports: [RouterLink],
  template: `
    <p class="words">{{ words() }}</p>
    @if (canRetry()) {
      <button type="button" (click)="retry.emit()">Try again</button>
    } @else {
      <p class="words"><a class="st-link" routerLink="/">Go to your start page</a></p>
    }
    <ng-content />
  `,
  styles: `
    :host {
      display: block;
      padding: 14px 18px;
      border-left: 4px solid var(--mat-sys-error);
      border-radius: 4px;
      background: var(--st-card);
    }

    .words {
      margin: 0;
      max-width: 62ch;
    }

    button {
      min-height: 36px;
      margin-top: 10px;
      padding: 0 16px;
      border: 1px solid var(--mat-sys-outline);
      border-radius: 18px;
      background: transparent;
      color: var(--st-deep-water);
      font: inherit;
      font-weight: 600;
      cursor: pointer;
    }
  `,
  host: { role: 'alert' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ProblemMessage {
  /** The failed request's error, or a sentence. */
  readonly error = input.required<unknown>();
  readonly retry = output();

  private readonly problem = computed(() => {
    const error = this.error();
    return typeof error === 'string' ? null : problemOf(error);
  });
  protected readonly words = computed(() => this.problem()?.detail ?? String(this.error()));
  /** Asking again cannot help where the answer was that there is no such thing, or that it may not be seen. */
  protected readonly canRetry = computed(() => ![403, 404].includes(this.problem()?.status ?? 0));
}
