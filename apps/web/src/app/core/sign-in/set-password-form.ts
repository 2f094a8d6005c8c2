import { ChangeDetectionStrategy, Component, inject, input, signal } from '@angular/core';
import { FormControl, FormGroup, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButtonModule } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInputModule } from '@angular/material/input';
import { Router } from '@angular/router';
import { passwordMinimum, type SignedInUser } from '@stillstroke/contract/auth';
import type { Observable } from 'rxjs';
import { problemOf } from '../api/problem-of';
import { homeOf } from './home-of';

/** A new password of one's own behind a link; once it is set the person is signed in and goes to their start page. */
@Component({
  selector: 'st-set-password-form',
  imports: [MatButtonModule, MatFormFieldModule, MatInputModule, ReactiveFormsModule],
  templateUrl: './set-password-form.html',
  styleUrl: './set-password-form.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SetPasswordForm {
  private readonly router = inject(Router);

  readonly email = input.required<string>();
  /** Sets it on the server; answers who is signed in by it. */
  readonly set = input.required<(password: string) => Observable<SignedInUser>>();

  protected readonly minimum = passwordMinimum;
  protected readonly form = new FormGroup({
    password: new FormControl('', {
      nonNullable: true,
      validators: [Validators.required, Validators.minLength(passwordMinimum), Validators.maxLength(256)],
    }),
  });
  protected readonly passwordShown = signal(false);
  protected readonly sending = signal(false);
  protected readonly refusal = signal<string | null>(null);

  protected setPassword(): void {
    this.form.markAllAsTouched();
    if (this.form.invalid || this.sending()) return;
    this.sending.set(true);
    this.refusal.set(null);
    this.set()(this.form.getRawValue().password).subscribe({
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
