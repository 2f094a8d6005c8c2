import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { FormControl, FormGroup, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButtonModule } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInputModule } from '@angular/material/input';
import { MatSelectModule } from '@angular/material/select';
import { updateAthlete, type Athlete } from '@stillstroke/contract/athletes';
import { listSquads } from '@stillstroke/contract/squads';
import { Api, apiResource } from '../core/api/api';
import { problemOf } from '../core/api/problem-of';

/** Renames an athlete or moves them to another squad. */
@Component({
  selector: 'st-edit-athlete-dialog',
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
      <h2 mat-dialog-title>Change {{ athlete.name }}</h2>
      <mat-dialog-content>
        <mat-form-field appearance="outline">
          <mat-label>Name</mat-label>
          <input matInput formControlName="name" maxlength="120" autocomplete="off" />
          @if (form.controls.name.invalid) {
            <mat-error>Give a name.</mat-error>
          }
        </mat-form-field>
        <mat-form-field appearance="outline">
          <mat-label>Squad</mat-label>
          <mat-select formControlName="squadId">
            @for (squad of squads(); track squad.id) {
              <mat-option [value]="squad.id">{{ squad.name }}</mat-option>
            }
          </mat-select>
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
export class EditAthleteDialog {
  private readonly api = inject(Api);
  private readonly ref = inject<MatDialogRef<EditAthleteDialog, Athlete>>(MatDialogRef);

  protected readonly athlete = inject<Athlete>(MAT_DIALOG_DATA);
  private readonly read = apiResource(listSquads, () => ({}));
  /** Squads to choose from; the athlete's own at once, the others when they have been read. */
  protected readonly squads = computed(() => {
    const open = this.read.hasValue() ? this.read.value().items.filter((each) => !each.deactivated) : [];
    const own = { id: this.athlete.squadId, name: this.athlete.squadName };
    return open.some(({ id }) => id === own.id) ? open : [own, ...open];
  });
  protected readonly form = new FormGroup({
    name: new FormControl(this.athlete.name, {
      nonNullable: true,
      validators: [Validators.required, Validators.pattern(/\S/)],
    }),
    squadId: new FormControl(this.athlete.squadId, { nonNullable: true }),
  });
  protected readonly sending = signal(false);
  protected readonly refusal = signal<string | null>(null);

  protected save(): void {
    this.form.markAllAsTouched();
    if (this.form.invalid || this.sending()) return;
    this.sending.set(true);
    this.api
      .call(updateAthlete, { params: { id: this.athlete.id }, body: this.form.getRawValue() })
      .subscribe({
        next: (athlete) => this.ref.close(athlete),
        error: (error: unknown) => {
          const problem = problemOf(error);
          this.sending.set(false);
          this.refusal.set(problem.issues?.[0]?.message ?? problem.detail);
        },
      });
  }
}
