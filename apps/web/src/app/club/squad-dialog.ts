import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { FormControl, FormGroup, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButtonModule } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInputModule } from '@angular/material/input';
import { MatSelectModule } from '@angular/material/select';
import { listPeople } from '@stillstroke/contract/people';
import { createSquad, updateSquad, type Squad } from '@stillstroke/contract/squads';
import { Api, apiResource } from '../core/api/api';
import { problemOf } from '../core/api/problem-of';

/** Makes a squad, or changes the name and the coaches of one. */
@Component({
  selector: 'st-squad-dialog',
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
      <h2 mat-dialog-title>{{ squad ? 'Change ' + squad.name : 'New squad' }}</h2>
      <mat-dialog-content>
        <mat-form-field appearance="outline">
          <mat-label>Name</mat-label>
          <input matInput formControlName="name" maxlength="120" autocomplete="off" />
          @if (form.controls.name.invalid) {
            <mat-error>Give a name.</mat-error>
          }
        </mat-form-field>
        <mat-form-field appearance="outline" subscriptSizing="dynamic">
          <mat-label>Coaches</mat-label>
          <mat-select formControlName="coachIds" multiple>
            @for (coach of coaches(); track coach.id) {
              <mat-option [value]="coach.id">{{ coach.name }}</mat-option>
            }
          </mat-select>
          <mat-hint>They see this squad’s athletes and work on their clips.</mat-hint>
        </mat-form-field>
        @if (refusal(); as words) {
          <p class="refusal" role="alert">{{ words }}</p>
        }
      </mat-dialog-content>
      <mat-dialog-actions align="end">
        <button matButton type="button" mat-dialog-close>Cancel</button>
        <button matButton="filled" type="submit" [disabled]="sending()">
          {{ squad ? 'Save' : 'Make the squad' }}
        </button>
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
export class SquadDialog {
  private readonly api = inject(Api);
  private readonly ref = inject<MatDialogRef<SquadDialog, Squad>>(MatDialogRef);

  protected readonly squad = inject<{ squad: Squad | null }>(MAT_DIALOG_DATA).squad;
  private readonly people = apiResource(listPeople, () => ({ query: { role: 'coach', limit: 200 } }));
  /** Coaches to choose from; those it has are there at once, also when deactivated since. */
  protected readonly coaches = computed(() => {
    const has = this.squad?.coaches ?? [];
    const open = (this.people.hasValue() ? this.people.value().items : []).filter(
      ({ id, status }) => status !== 'deactivated' && !has.some((coach) => coach.id === id),
    );
    return [...has, ...open].map(({ id, name }) => ({ id, name }));
  });
  protected readonly form = new FormGroup({
    name: new FormControl(this.squad?.name ?? '', {
      nonNullable: true,
      validators: [Validators.required, Validators.pattern(/\S/)],
    }),
    coachIds: new FormControl(
      (this.squad?.coaches ?? []).map(({ id }) => id),
      { nonNullable: true },
    ),
  });
  protected readonly sending = signal(false);
  protected readonly refusal = signal<string | null>(null);

  protected save(): void {
    this.form.markAllAsTouched();
    if (this.form.invalid || this.sending()) return;
    this.sending.set(true);
    const body = this.form.getRawValue();
    const request = this.squad
      ? this.api.call(updateSquad, { params: { id: this.squad.id }, body })
      : this.api.call(createSquad, { body });
    request.subscribe({
      next: (squad) => this.ref.close(squad),
      error: (error: unknown) => {
        const problem = problemOf(error);
        this.sending.set(false);
        this.refusal.set(problem.issues?.[0]?.message ?? problem.detail);
      },
    });
  }
}
