import { ChangeDetectionStrategy, Component, inject, signal } from '@angular/core';
import { FormControl, FormGroup, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButtonModule } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInputModule } from '@angular/material/input';
import { MatSelectModule } from '@angular/material/select';
import { updatePerson, type Person } from '@stillstroke/contract/people';
import type { Squad } from '@stillstroke/contract/squads';
import { Api } from '../core/api/api';
import { problemOf } from '../core/api/problem-of';

@Component({
  selector: 'st-edit-person-dialog',
  imports: [
    MatButtonModule,
    MatDialogModule,
    MatFormFieldModule,
    MatInputModule,
    MatSelectModule,
    ReactiveFormsModule,
  ],
  template: `
    <form [formGroup]="form" (ngSubmit)="save()">
      <h2 mat-dialog-title>Change {{ data.person.name }}</h2>
      <mat-dialog-content>
        <mat-form-field appearance="outline">
          <mat-label>Name</mat-label>
          <input matInput formControlName="name" maxlength="120" autocomplete="off" />
          @if (form.controls.name.invalid) {
            <mat-error>Give a name.</mat-error>
          }
        </mat-form-field>
        @if (coaches) {
          <mat-form-field appearance="outline">
            <mat-label>Squads to coach</mat-label>
            <mat-select formControlName="squadIds" multiple>
              @for (squad of data.squads; track squad.id) {
                <mat-option [value]="squad.id">{{ squad.name }}</mat-option>
              }
            </mat-select>
          </mat-form-field>
        }
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
export class EditPersonDialog {
  private readonly api = inject(Api);
  private readonly ref = inject<MatDialogRef<EditPersonDialog, Person>>(MatDialogRef);

  protected readonly data = inject<{ person: Person; squads: readonly Squad[] }>(MAT_DIALOG_DATA);
  protected readonly coaches = this.data.person.role === 'coach';
  protected readonly form = new FormGroup({
    name: new FormControl(this.data.person.name, {
      nonNullable: true,
      validators: [Validators.required, Validators.pattern(/\S/)],
    }),
    squadIds: new FormControl([...this.data.person.squadIds], { nonNullable: true }),
  });
  protected readonly sending = signal(false);
  protected readonly refusal = signal<string | null>(null);

  protected save(): void {
    this.form.markAllAsTouched();
    if (this.form.invalid || this.sending()) return;
    const { name, squadIds } = this.form.getRawValue();
    this.sending.set(true);
    const body = { name, ...(this.coaches && { squadIds }) };
    this.api.call(updatePerson, { params: { id: this.data.person.id }, body }).subscribe({
      next: (person) => this.ref.close(person),
      error: (error: unknown) => {
        const problem = problemOf(error);
        this.sending.set(false);
        this.refusal.set(problem.issues?.[0]?.message ?? problem.detail);
      },
    });
  }
}
