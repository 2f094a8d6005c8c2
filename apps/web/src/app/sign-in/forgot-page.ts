import { ChangeDetectionStrategy, Component, inject, signal } from '@angular/core';
import { FormControl, FormGroup, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButtonModule } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInputModule } from '@angular/material/input';
import { RouterLink } from '@angular/router';
import { askForPassword } from '@stillstroke/contract/mail';
import { Api } from '../core/api/api';
import { problemOf } from '../core/api/problem-of';
import { PlumbSign } from '../ui/plumb-sign';

/** Asks for a mail with a link that sets a new password. Says the same whether there is such an account or not. */
@Component({
  selector: 'st-forgot-page',
  imports: [MatButtonModule, MatFormFieldModule, MatInputModule, PlumbSign, ReactiveFormsModule, RouterLink],
  templateUrl: './forgot-page.html',
  styleUrl: '../invitation/invitation-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ForgotPage {
  private readonly api = inject(Api);

  protected readonly form = new FormGroup({
    email: new FormControl('', { nonNullable: true, validators: [Validators.required, Validators.email] }),
  });
  protected readonly sending = signal(false);
  protected readonly refusal = signal<string | null>(null);
  /** The address asked for, once it has been. */
  protected readonly askedFor = signal<string | null>(null);

  protected ask(): void {
    this.form.markAllAsTouched();
    if (this.form.invalid || this.sending()) return;
    const { email } = this.form.getRawValue();
    this.sending.set(true);
    this.refusal.set(null);
    this.api.call(askForPassword, { body: { email } }).subscribe({
      next: () => {
        this.sending.set(false);
        this.askedFor.set(email.trim());
      },
      error: (error: unknown) => {
        const problem = problemOf(error);
        this.sending.set(false);
        this.refusal.set(problem.issues?.[0]?.message ?? problem.detail);
      },
    });
  }
}
