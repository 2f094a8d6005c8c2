import { createNoopScrollStrategy } from '@angular/cdk/overlay';
import { ChangeDetectionStrategy, Component, inject, input } from '@angular/core';
import { MatDialog } from '@angular/material/dialog';
import type { Explain } from './explanation';

/** Beside a figure: opens how it was computed. What it opens is loaded when first wanted. */
@Component({
  selector: 'st-how',
  template: `
    <button type="button" [attr.aria-label]="'How? ' + about()" aria-haspopup="dialog" (click)="open()">
      How?
    </button>
  `,
  styleUrl: './how.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class How {
  private readonly dialog = inject(MatDialog);

  /** The figure's name, for those who do not see what the button stands beside. */
  readonly about = input.required<string>();
  readonly explain = input.required<Explain>();

  protected async open(): Promise<void> {
    const data = this.explain()();
    if (!data) return;
    // What the server refuses is said in the dialog.
    if (data instanceof Promise) data.catch(() => undefined);
    const { ExplainDialog } = await import('./explain-dialog');
    this.dialog.open(ExplainDialog, {
      data,
      width: '36rem',
      maxWidth: '96vw',
      autoFocus: 'first-heading',
      // The page stays free to scroll: a link in the dialog leads to a place on the next page while this one closes.
      scrollStrategy: createNoopScrollStrategy(),
    });
  }
}
