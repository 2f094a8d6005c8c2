import { ChangeDetectionStrategy, Component, inject, input, signal } from '@angular/core';
import { FormControl, FormGroup, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButtonModule } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInputModule } from '@angular/material/input';
import { Router, RouterLink } from '@angular/router';
import { passwordMinimum } from '@stillstroke/contract/auth';
import { getPasswordReset } from '@stillstroke/contract/mail';
import { apiResource } from '../core/api/api';
import { problemOf } from '../core/api/problem-of';
import { homeOf } from '../core/sign-in/home-of';
import { SignInState } from '../core/sign-in/sign-in-state';
import { LoadingLines } from '../ui/loading-lines';
import { PlumbSign } from '../ui/plumb-sign';
import { ProblemMessage } from '../ui/problem-message';

/** Public page behind the link in a mail: whoever has it sets a new password. */
@Component({
  selector: 'st-new-password-page',
  imports: [
    LoadingLines,
    MatButtonModule,
    MatFormFieldModule,
    MatInputModule,
    PlumbSign,
    ProblemMessage,
    ReactiveFormsModule,
    RouterLink,
  ],
  templateUrl: './new-password-page.html',
  styleUrl: '../invitation/invitation-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class NewPasswordPage {
  private readonly state = inject(SignInState);
  private readonly router = inject(Router);

  readonly token = input.required<string>();

  protected readonly minimum = passwordMinimum;
  protected readonly link = apiResource(getPasswordReset, () => ({ params: { token: this.token() } }));
  protected readonly form = new FormGroup({
    password: new FormControl('', {
      nonNullable: true,
      validators: [Validators.required, Validators.minLength(passwordMinimum), Validators.maxLength(256)],
    }),
  });
  protected readonly passwordShown = signal(false);
  protected readonly sending = signal(false);
  protected readonly refusal = signal<string | null>(null);

  protected isSpent(error: unknown): boolean {
    return ['not-found', 'password-link-spent', 'bad-request'].includes(problemOf(error).code);
  }

  protected setPassword(): void {
    this.form.markAllAsTouched();
    if (this.form.invalid || this.sending()) return;
    this.sending.set(true);
    this.refusal.set(null);
    this.state.resetPassword(this.token(), this.form.getRawValue().password).subscribe({
      next: (user) => void this.router.navigateByUrl(homeOf(user)),
      error: (error: unknown) => {
        const problem = problemOf(error);
        this.sending.set(false);
        this.refusal.set(problem.issues?.[0]?.message ?? problem.detail);
      },
    });
  }

  protected togglePassword(): void {
    this.passwordShown.update((shown) => !shown);
  }
}
