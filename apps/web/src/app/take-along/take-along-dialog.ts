import { ChangeDetectionStrategy, Component, inject, signal } from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import { MatRadioModule } from '@angular/material/radio';
import { RouterLink } from '@angular/router';
import { exportAthlete, exportClip, exportSession, type ExportScope } from '@stillstroke/contract/export';
import { Download } from '../core/api/download';
import { problemOf } from '../core/api/problem-of';
import { Notices } from '../core/notices';

export interface TakeAlongWish {
  readonly kind: ExportScope;
  readonly id: string;
  /** What it is called on the page: “Ines Corrow”, “the session of 2 March”. */
  readonly name: string;
  /** Something to know before, e.g. that changes are not saved yet. */
  readonly caution?: string;
}

const calls = { clip: exportClip, session: exportSession, athlete: exportAthlete };

const insideOf: Readonly<Record<ExportScope, string>> = {
  clip: 'Marks, events, readings and measures of this clip, with its set-up and frame times. The film is not in it.',
  session:
    'Marks, events, readings and measures of every clip of this session, and left against right. The films are not in it.',
  athlete:
    'Every session with its marks, events, readings and measures, left against right, and the change over time. The films are not in it.',
};

/** Chooses the form in which figures are taken along, and fetches them. */
@Component({
  selector: 'st-take-along-dialog',
  imports: [MatButtonModule, MatDialogModule, MatRadioModule, RouterLink],
  templateUrl: './take-along-dialog.html',
  styleUrl: './take-along-dialog.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class TakeAlongDialog {
  private readonly download = inject(Download);
  private readonly notices = inject(Notices);
  private readonly ref = inject<MatDialogRef<TakeAlongDialog>>(MatDialogRef);

  protected readonly wish = inject<TakeAlongWish>(MAT_DIALOG_DATA);
  protected readonly inside = insideOf[this.wish.kind];
  protected readonly format = signal<'csv' | 'json'>('csv');
  protected readonly fetching = signal(false);
  protected readonly refusal = signal<string | null>(null);

  protected save(): void {
    this.fetching.set(true);
    this.refusal.set(null);
    const { kind, id } = this.wish;
    this.download.save(calls[kind], { params: { id }, query: { format: this.format() } }).subscribe({
      next: (name) => {
        this.notices.say(`${name} is saved with your downloads.`);
        this.ref.close();
      },
      error: (error: unknown) => {
        this.fetching.set(false);
        this.refusal.set(problemOf(error).detail);
      },
    });
  }
}
