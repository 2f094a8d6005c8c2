import { ChangeDetectionStrategy, Component, inject, signal } from '@angular/core';
import { FormControl, FormGroup, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButtonModule } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInputModule } from '@angular/material/input';
import { MatSelectModule } from '@angular/material/select';
import { createAthlete, type Athlete } from '@stillstroke/contract/athletes';
import type { Squad } from '@stillstroke/contract/squads';
import { Api } from '../core/api/api';
import { problemOf } from '../core/api/problem-of';
import { Notices } from '../core/notices';

export interface AddAthleteData {
  readonly squads: readonly Squad[];
  readonly squadId: string | null;
}

@Component({
  selector: 'st-add-athlete-dialog',
  imports: [
    MatButtonModule,
    MatDialogModule,
    MatFormFieldModule,
    MatInputModule,
    MatSelectModule,
    ReactiveFormsModule,
  ],
  template: `
    <form [formGroup]="form" (ngSubmit)="add()">
      <h2 mat-dialog-title>Add an athlete</h2>
      <mat-dialog-content>
        @if (data.squads.length === 0) {
          <p>There is no squad to add to yet. An admin creates squads on the Club page.</p>
        }
        <mat-form-field appearance="outline">
          <mat-label>Name</mat-label>
          <input matInput formControlName="name" maxlength="120" autocomplete="off" cdkFocusInitial />
          @if (form.controls.name.invalid) {
            <mat-error>Give a name.</mat-error>
          }
        </mat-form-field>
        <mat-form-field appearance="outline">
          <mat-label>Squad</mat-label>
          <mat-select formControlName="squadId">
            @for (squad of data.squads; track squad.id) {
              <mat-option [value]="squad.id">{{ squad.name }}</mat-option>
            }
          </mat-select>
          @if (form.controls.squadId.invalid) {
            <mat-error>Choose the squad.</mat-error>
          }
        </mat-form-field>
        @if (refusal(); as words) {
          <p class="refusal" role="alert">{{ words }}</p>
        }
      </mat-dialog-content>
      <mat-dialog-actions align="end">
        <button matButton type="button" mat-dialog-close>Cancel</button>
        <button matButton="filled" type="submit" [disabled]="sending()">Add athlete</button>
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
export class AddAthleteDialog {
  private readonly api = inject(Api);
  private readonly notices = inject(Notices);
  private readonly ref = inject<MatDialogRef<AddAthleteDialog, Athlete>>(MatDialogRef);

  protected readonly data = inject<AddAthleteData>(MAT_DIALOG_DATA);
  protected readonly form = new FormGroup({
    name: new FormControl('', {
      nonNullable: true,
      validators: [Validators.required, Validators.pattern(/\S/)],
    }),
    squadId: new FormControl(this.data.squadId ?? this.data.squads[0]?.id ?? '', {
      nonNullable: true,
      validators: [Validators.required],
    }),
  });
  protected readonly sending = signal(false);
  protected readonly refusal = signal<string | null>(null);

  protected add(): void {
    this.form.markAllAsTouched();
    if (this.form.invalid || this.sending()) return;
    this.sending.set(true);
    this.api.call(createAthlete, { body: this.form.getRawValue() }).subscribe({
      next: (athlete) => {
        this.notices.say(`${athlete.name} is in ${athlete.squadName} now.`);
        this.ref.close(athlete);
      },
      error: (error: unknown) => {
        const problem = problemOf(error);
        this.sending.set(false);
        this.refusal.set(problem.issues?.[0]?.message ?? problem.detail);
      },
    });
  }
}
