import { ChangeDetectionStrategy, Component, computed, inject, input, signal } from '@angular/core';
import { FormControl, FormGroup, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButtonModule } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInputModule } from '@angular/material/input';
import { Router, RouterLink } from '@angular/router';
import { getSignInPage } from '@stillstroke/contract/auth';
import { apiResource } from '../core/api/api';
import { problemOf } from '../core/api/problem-of';
import { addressAfterSignIn } from '../core/sign-in/home-of';
import { SignInState } from '../core/sign-in/sign-in-state';
import { PlumbSign } from '../ui/plumb-sign';
import { ProblemMessage } from '../ui/problem-message';
import { signInWords } from './sign-in-words';

@Component({
  selector: 'st-sign-in-page',
  imports: [
    MatButtonModule,
    MatFormFieldModule,
    MatInputModule,
    PlumbSign,
    ProblemMessage,
    ReactiveFormsModule,
    RouterLink,
  ],
  templateUrl: './sign-in-page.html',
  styleUrl: './sign-in-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SignInPage {
  private readonly state = inject(SignInState);
  private readonly router = inject(Router);

  /** Address to go to afterwards (query). */
  readonly back = input<string>();
  /** Set when a sign-in ran out in the middle of work (query). */
  readonly ended = input<string>();

  /** Read before anything is sent: it also sets the cookie that the sign-in must answer with. */
  protected readonly page = apiResource(getSignInPage, () => ({}));
  protected readonly demo = computed(() => (this.page.hasValue() ? this.page.value().demo : null));
  protected readonly form = new FormGroup({
    email: new FormControl('', { nonNullable: true, validators: [Validators.required, Validators.email] }),
    password: new FormControl('', { nonNullable: true, validators: [Validators.required] }),
  });
  protected readonly passwordShown = signal(false);
  protected readonly sending = signal(false);
  protected readonly refusal = signal<string | null>(null);

  protected signIn(): void {
    this.form.markAllAsTouched();
    if (this.form.invalid || this.sending()) return;
    const { email, password } = this.form.getRawValue();
    this.sending.set(true);
    this.refusal.set(null);
    this.state.signIn(email, password).subscribe({
      next: (user) => void this.router.navigateByUrl(addressAfterSignIn(this.back(), user)),
      error: (error: unknown) => {
        this.sending.set(false);
        this.refusal.set(signInWords(problemOf(error)));
      },
    });
  }

  protected signInAs(email: string, password: string): void {
    this.form.setValue({ email, password });
    this.signIn();
  }

  protected togglePassword(): void {
    this.passwordShown.update((shown) => !shown);
  }
}
