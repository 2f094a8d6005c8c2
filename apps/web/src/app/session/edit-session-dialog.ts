import { ChangeDetectionStrategy, Component, inject, signal } from '@angular/core';
import { FormControl, FormGroup, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButtonModule } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInputModule } from '@angular/material/input';
import { updateSession, type Session } from '@stillstroke/contract/sessions';
import { Api } from '../core/api/api';
import { problemOf } from '../core/api/problem-of';
import { todayHere } from '../ui/say-date';

@Component({
  selector: 'st-edit-session-dialog',
  imports: [MatButtonModule, MatDialogModule, MatFormFieldModule, MatInputModule, ReactiveFormsModule],
  template: `
    <form [formGroup]="form" (ngSubmit)="save()">
      <h2 mat-dialog-title>Change the session</h2>
      <mat-dialog-content>
        <mat-form-field appearance="outline">
          <mat-label>Date at the pool</mat-label>
          <input matInput type="date" formControlName="date" [max]="today" />
          @if (form.controls.date.invalid) {
            <mat-error>Give the date.</mat-error>
          }
        </mat-form-field>
        <mat-form-field appearance="outline">
          <mat-label>Place</mat-label>
          <input matInput formControlName="place" maxlength="200" />
        </mat-form-field>
        <mat-form-field appearance="outline">
          <mat-label>Note</mat-label>
          <textarea matInput formControlName="note" maxlength="2000" rows="3"></textarea>
        </mat-form-field>
        @if (refusal(); as words) {
          <p class="refusal" role="alert">{{ words }}</p>
        }
      </mat-dialog-content>
      <mat-dialog-actions align="end">
        <button matButton type="button" mat-dialog-close>Cancel</button>
        <button matButton="filled" type="submit" [disabled]="sending()">Save</button>
      </mat-dialog-actions>
    </form>
  `,
  styles: `
    mat-form-field {
      width: 100%;
      margin-top: 6px;
    }

    .refusal {
      color: var(--mat-sys-error);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class EditSessionDialog {
  private readonly api = inject(Api);
  private readonly ref = inject<MatDialogRef<EditSessionDialog, Session>>(MatDialogRef);
  private readonly session = inject<Session>(MAT_DIALOG_DATA);

  protected readonly today = todayHere();
  protected readonly form = new FormGroup({
    date: new FormControl(this.session.date, { nonNullable: true, validators: [Validators.required] }),
    place: new FormControl(this.session.place ?? '', { nonNullable: true }),
    note: new FormControl(this.session.note ?? '', { nonNullable: true }),
  });
  protected readonly sending = signal(false);
  protected readonly refusal = signal<string | null>(null);

  protected save(): void {
    this.form.markAllAsTouched();
    if (this.form.invalid || this.sending()) return;
    const { date, place, note } = this.form.getRawValue();
    this.sending.set(true);
    const body = { date, place: place.trim() || null, note: note.trim() || null };
    this.api.call(updateSession, { params: { id: this.session.id }, body }).subscribe({
      next: (session) => this.ref.close(session),
      error: (error: unknown) => {
        const problem = problemOf(error);
        this.sending.set(false);
        this.refusal.set(problem.issues?.[0]?.message ?? problem.detail);
      },
    });
  }
}
