import { ChangeDetectionStrategy, Component, inject, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import { getInvitation } from '@stillstroke/contract/auth';
import { apiResource } from '../core/api/api';
import { problemOf } from '../core/api/problem-of';
import { SetPasswordForm } from '../core/sign-in/set-password-form';
import { SignInState } from '../core/sign-in/sign-in-state';
import { LoadingLines } from '../ui/loading-lines';
import { PlumbSign } from '../ui/plumb-sign';
import { ProblemMessage } from '../ui/problem-message';

/** Public page behind an invitation link: says whom it is for and lets that person set the own password. */
@Component({
  selector: 'st-invitation-page',
  imports: [LoadingLines, PlumbSign, ProblemMessage, RouterLink, SetPasswordForm],
  templateUrl: './invitation-page.html',
  styleUrl: './invitation-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class InvitationPage {
  private readonly state = inject(SignInState);

  readonly token = input.required<string>();

  protected readonly invitation = apiResource(getInvitation, () => ({ params: { token: this.token() } }));
  protected readonly setPassword = (password: string) => this.state.acceptInvitation(this.token(), password);

  protected isSpent(error: unknown): boolean {
    return ['not-found', 'invitation-spent', 'bad-request'].includes(problemOf(error).code);
  }
}
