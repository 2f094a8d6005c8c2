import { ChangeDetectionStrategy, Component, inject, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import { getPasswordReset } from '@stillstroke/contract/mail';
import { apiResource } from '../core/api/api';
import { problemOf } from '../core/api/problem-of';
import { SetPasswordForm } from '../core/sign-in/set-password-form';
import { SignInState } from '../core/sign-in/sign-in-state';
import { LoadingLines } from '../ui/loading-lines';
import { PlumbSign } from '../ui/plumb-sign';
import { ProblemMessage } from '../ui/problem-message';

/** Public page behind the link in a mail: whoever has it sets a new password. */
@Component({
  selector: 'st-new-password-page',
  imports: [LoadingLines, PlumbSign, ProblemMessage, RouterLink, SetPasswordForm],
  templateUrl: './new-password-page.html',
  styleUrl: '../invitation/invitation-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class NewPasswordPage {
  private readonly state = inject(SignInState);

  readonly token = input.required<string>();

  protected readonly link = apiResource(getPasswordReset, () => ({ params: { token: this.token() } }));
  protected readonly setPassword = (password: string) => this.state.resetPassword(this.token(), password);

  protected isSpent(error: unknown): boolean {
    return ['not-found', 'password-link-spent', 'bad-request'].includes(problemOf(error).code);
  }
}
