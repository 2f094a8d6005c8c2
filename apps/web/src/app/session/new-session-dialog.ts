import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { FormControl, FormGroup, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatAutocompleteModule } from '@angular/material/autocomplete';
import { MatButtonModule } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInputModule } from '@angular/material/input';
import { listAthletes, type Athlete } from '@stillstroke/contract/athletes';
import { createSession, type Session } from '@stillstroke/contract/sessions';
import { debounceTime, map } from 'rxjs';
import { Api, apiResource } from '../core/api/api';
import { lastValue } from '../core/api/last-value';
import { problemOf } from '../core/api/problem-of';
import { todayHere } from '../ui/say-date';

export interface NewSessionData {
  /** Whose session; null lets the coach choose. */
  readonly athlete: { readonly id: string; readonly name: string } | null;
  /** Files that go into it once it is open. */
  readonly fileCount: number;
  /** What the note is for: an athlete asks, a coach remembers. */
  readonly noteLabel: string;
}

@Component({
  selector: 'st-new-session-dialog',
  imports: [
    MatAutocompleteModule,
    MatButtonModule,
    MatDialogModule,
    MatFormFieldModule,
    MatInputModule,
    ReactiveFormsModule,
  ],
  templateUrl: './new-session-dialog.html',
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
export class NewSessionDialog {
  private readonly api = inject(Api);
  private readonly ref = inject<MatDialogRef<NewSessionDialog, Session>>(MatDialogRef);

  protected readonly data = inject<NewSessionData>(MAT_DIALOG_DATA);
  protected readonly today = todayHere();
  protected readonly form = new FormGroup({
    athlete: new FormControl<Pick<Athlete, 'id' | 'name'> | string>(this.data.athlete ?? '', {
      nonNullable: true,
      validators: [(control) => (typeof control.value === 'object' ? null : { notChosen: true })],
    }),
    date: new FormControl(this.today, { nonNullable: true, validators: [Validators.required] }),
    place: new FormControl('', { nonNullable: true }),
    note: new FormControl('', { nonNullable: true }),
  });
  private readonly typed = toSignal(
    this.form.controls.athlete.valueChanges.pipe(
      debounceTime(200),
      map((value) => (typeof value === 'string' ? value.trim() : '')),
    ),
    { initialValue: '' },
  );
  private readonly found = apiResource(listAthletes, () =>
    this.data.athlete ? undefined : { query: { search: this.typed(), limit: 8 } },
  );
  private readonly lastFound = lastValue(this.found);
  protected readonly offered = computed(() => this.lastFound()?.items ?? []);
  protected readonly sending = signal(false);
  protected readonly refusal = signal<string | null>(null);

  protected readonly nameOf = (value: { name: string } | string) =>
    typeof value === 'string' ? value : value.name;

  protected openSession(): void {
    this.form.markAllAsTouched();
    const { athlete, date, place, note } = this.form.getRawValue();
    if (this.form.invalid || typeof athlete === 'string' || this.sending()) return;
    this.sending.set(true);
    const body = {
      date,
      ...(place.trim() && { place: place.trim() }),
      ...(note.trim() && { note: note.trim() }),
    };
    this.api.call(createSession, { params: { id: athlete.id }, body }).subscribe({
      next: (session) => this.ref.close(session),
      error: (error: unknown) => {
        const problem = problemOf(error);
        this.sending.set(false);
        this.refusal.set(problem.issues?.[0]?.message ?? problem.detail);
      },
    });
  }
}
