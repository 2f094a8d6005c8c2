import { ChangeDetectionStrategy, Component, inject, signal } from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import type { Clip } from '@stillstroke/contract/clip-facts';
import { updateClip } from '@stillstroke/contract/clips';
import { Api } from '../core/api/api';
import { problemOf } from '../core/api/problem-of';
import { changedFields, type FilmFields } from './upload/film-fields';
import { FilmFieldsForm } from './upload/film-fields-form';

/** Changes what a clip that is already there shows. */
@Component({
  selector: 'st-clip-fields-dialog',
  imports: [FilmFieldsForm, MatButtonModule, MatDialogModule],
  template: `
    <h2 mat-dialog-title>What {{ clip.name }} shows</h2>
    <mat-dialog-content>
      <p>Its readings are worked out again from its marks; no mark changes.</p>
      <st-film-fields-form [fields]="fields()" [filmName]="clip.name" (said)="say($event)" />
      @if (refusal(); as words) {
        <p class="refusal" role="alert">{{ words }}</p>
      }
    </mat-dialog-content>
    <mat-dialog-actions align="end">
      <button matButton type="button" mat-dialog-close>Cancel</button>
      <button matButton="filled" type="button" [disabled]="sending()" (click)="save()">Save</button>
    </mat-dialog-actions>
  `,
  styles: `
    p {
      margin: 0 0 16px;
    }

    .refusal {
      margin: 12px 0 0;
      color: var(--mat-sys-error);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ClipFieldsDialog {
  private readonly api = inject(Api);
  private readonly ref = inject<MatDialogRef<ClipFieldsDialog, Clip>>(MatDialogRef);

  protected readonly clip = inject<Clip>(MAT_DIALOG_DATA);
  protected readonly fields = signal<FilmFields>({
    view: this.clip.view,
    travel: this.clip.travel,
    stroke: this.clip.stroke,
    captureRateFactor: this.clip.captureRateFactor,
  });
  protected readonly sending = signal(false);
  protected readonly refusal = signal<string | null>(null);

  protected say(what: Partial<FilmFields>): void {
    this.fields.update((fields) => ({ ...fields, ...what }));
  }

  protected save(): void {
    const changes = changedFields(this.clip, this.fields());
    if (Object.keys(changes).length === 0) {
      this.ref.close();
      return;
    }
    this.sending.set(true);
    this.api.call(updateClip, { params: { id: this.clip.id }, body: changes }).subscribe({
      next: (clip) => this.ref.close(clip),
      error: (error: unknown) => {
        this.sending.set(false);
        this.refusal.set(problemOf(error).detail);
      },
    });
  }
}
