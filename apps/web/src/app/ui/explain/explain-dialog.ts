import { ChangeDetectionStrategy, Component, computed, inject, resource } from '@angular/core';
import { MatButton } from '@angular/material/button';
import {
  MAT_DIALOG_DATA,
  MatDialogActions,
  MatDialogClose,
  MatDialogContent,
  MatDialogRef,
  MatDialogTitle,
} from '@angular/material/dialog';
import { RouterLink } from '@angular/router';
import { problemOf } from '../../core/api/problem-of';
import { entryOf } from '../../method/catalogue';
import { SourceLine } from '../../method/source-line';
import { LoadingLines } from '../loading-lines';
import type { Explanation } from './explanation';

/** How one figure was computed: its formula in words, what went in, its frames, its uncertainty's parts, the sources. */
@Component({
  selector: 'st-explain-dialog',
  imports: [
    LoadingLines,
    MatButton,
    MatDialogActions,
    MatDialogClose,
    MatDialogContent,
    MatDialogTitle,
    RouterLink,
    SourceLine,
  ],
  templateUrl: './explain-dialog.html',
  styleUrl: './explain-dialog.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ExplainDialog {
  private readonly data = inject<Explanation | Promise<Explanation>>(MAT_DIALOG_DATA);
  private readonly self = inject(MatDialogRef);

  protected readonly asked = resource({ loader: () => Promise.resolve(this.data) });
  protected readonly said = computed(() => (this.asked.hasValue() ? this.asked.value() : null));
  protected readonly entry = computed(() => entryOf(this.said()?.entry ?? ''));
  protected readonly also = computed(() =>
    (this.said()?.also ?? []).flatMap((id) => {
      const entry = entryOf(id);
      return entry ? [{ id, entry }] : [];
    }),
  );
  protected readonly problem = computed(() => {
    const error = this.asked.error();
    return error ? problemOf(error.cause ?? error).detail : null;
  });

  /** Links lead away from under the dialog. */
  protected close(): void {
    this.self.close();
  }

  protected percent(share: number): string {
    const shown = Math.round(share * 100);
    return shown === 0 && share > 0 ? 'under 1 %' : `${shown} %`;
  }
}
