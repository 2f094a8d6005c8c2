import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { FormControl, FormGroup, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatAutocompleteModule } from '@angular/material/autocomplete';
import { MatButtonModule } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInputModule } from '@angular/material/input';
import { MatSelectModule } from '@angular/material/select';
import { listAthletes } from '@stillstroke/contract/athletes';
import { invitePerson } from '@stillstroke/contract/people';
import type { Role } from '@stillstroke/contract/roles';
import type { Squad } from '@stillstroke/contract/squads';
import { debounceTime, map } from 'rxjs';
import { Api, apiResource } from '../core/api/api';
import { lastValue } from '../core/api/last-value';
import { problemOf } from '../core/api/problem-of';
import { roles, roleWords } from './people-filter';
import type { Invited } from './show-link';

interface Chosen {
  readonly id: string;
  readonly name: string;
}

/** Makes an account without a password; the link that sets it is shown next. */
@Component({
  selector: 'st-invite-dialog',
  imports: [
    MatAutocompleteModule,
    MatButtonModule,
    MatDialogModule,
    MatFormFieldModule,
    MatInputModule,
    MatSelectModule,
    ReactiveFormsModule,
  ],
  templateUrl: './invite-dialog.html',
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
export class InviteDialog {
  private readonly api = inject(Api);
  private readonly ref = inject<MatDialogRef<InviteDialog, Invited>>(MatDialogRef);

  protected readonly data = inject<{ squads: readonly Squad[] }>(MAT_DIALOG_DATA);
  protected readonly roles = roles.map((value) => ({ value, words: roleWords[value] }));
  protected readonly form = new FormGroup({
    name: new FormControl('', {
      nonNullable: true,
      validators: [Validators.required, Validators.pattern(/\S/)],
    }),
    email: new FormControl('', { nonNullable: true, validators: [Validators.required, Validators.email] }),
    role: new FormControl<Role>('coach', { nonNullable: true }),
    squadIds: new FormControl<string[]>([], { nonNullable: true }),
    athlete: new FormControl<Chosen | string>('', { nonNullable: true }),
  });
  protected readonly role = toSignal(this.form.controls.role.valueChanges, { initialValue: 'coach' });
  private readonly typed = toSignal(
    this.form.controls.athlete.valueChanges.pipe(
      debounceTime(200),
      map((value) => (typeof value === 'string' ? value.trim() : '')),
    ),
    { initialValue: '' },
  );
  private readonly found = lastValue(
    apiResource(listAthletes, () =>
      this.role() === 'athlete' ? { query: { search: this.typed(), limit: 8 } } : undefined,
    ),
  );
  protected readonly offered = computed(() => this.found()?.items ?? []);
  protected readonly sending = signal(false);
  protected readonly refusal = signal<string | null>(null);
  protected readonly nameOf = (value: Chosen | string) => (typeof value === 'string' ? value : value.name);

  protected invite(): void {
    this.form.markAllAsTouched();
    const { name, email, role, squadIds, athlete } = this.form.getRawValue();
    if (role === 'athlete' && typeof athlete === 'string') {
      this.form.controls.athlete.setErrors({ notChosen: true });
    }
    if (this.form.invalid || this.sending()) return;
    this.sending.set(true);
    this.refusal.set(null);
    const body = {
      name,
      email,
      role,
      squadIds: role === 'coach' ? squadIds : [],
      ...(role === 'athlete' && typeof athlete === 'object' && { athleteId: athlete.id }),
    };
    this.api.call(invitePerson, { body }).subscribe({
      next: (invited) => this.ref.close(invited),
      error: (error: unknown) => {
        const problem = problemOf(error);
        this.sending.set(false);
        this.refusal.set(problem.issues?.[0]?.message ?? problem.detail);
      },
    });
  }
}
