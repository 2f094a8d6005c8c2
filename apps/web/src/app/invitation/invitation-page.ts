import { ChangeDetectionStrategy, Component, inject, input, signal } from '@angular/core';
import { FormControl, FormGroup, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButtonModule } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInputModule } from '@angular/material/input';
import { Router, RouterLink } from '@angular/router';
import { getInvitation, passwordMinimum } from '@stillstroke/contract/auth';
import { apiResource } from '../core/api/api';
import { problemOf } from '../core/api/problem-of';
import { homeOf } from '../core/sign-in/home-of';
import { SignInState } from '../core/sign-in/sign-in-state';
import { LoadingLines } from '../ui/loading-lines';
import { PlumbSign } from '../ui/plumb-sign';
import { ProblemMessage } from '../ui/problem-message';

/** Public page behind an invitation link: says whom it is for and lets that person set the own password. */
@Component({
  selector: 'st-invitation-page',
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
  templateUrl: './invitation-page.html',
  styleUrl: './invitation-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class InvitationPage {
  private readonly state = inject(SignInState);
  private readonly router = inject(Router);

  readonly token = input.required<string>();

  protected readonly minimum = passwordMinimum;
  protected readonly invitation = apiResource(getInvitation, () => ({ params: { token: this.token() } }));
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
    return ['not-found', 'invitation-spent', 'bad-request'].includes(problemOf(error).code);
  }

  protected setPassword(): void {
    this.form.markAllAsTouched();
    if (this.form.invalid || this.sending()) return;
    this.sending.set(true);
    this.refusal.set(null);
    this.state.acceptInvitation(this.token(), this.form.getRawValue().password).subscribe({
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
