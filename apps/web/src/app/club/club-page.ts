import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { MatTabsModule } from '@angular/material/tabs';
import { RouterLink, RouterLinkActive, RouterOutlet } from '@angular/router';
import { listOutbox } from '@stillstroke/contract/mail';
import { apiResource } from '../core/api/api';
import { SignInState } from '../core/sign-in/sign-in-state';

/** What an admin looks after: who has an account, the squads, and the mails that go out. */
@Component({
  selector: 'st-club-page',
  imports: [MatTabsModule, RouterLink, RouterLinkActive, RouterOutlet],
  template: `
    <div class="st-page">
      <h1>{{ user()?.clubName ?? 'Club' }}</h1>
      <nav mat-tab-nav-bar mat-stretch-tabs="false" aria-label="Parts of the club" [tabPanel]="panel">
        @for (tab of tabs(); track tab.address) {
          <a
            mat-tab-link
            [routerLink]="tab.address"
            routerLinkActive
            #link="routerLinkActive"
            [active]="link.isActive"
            >{{ tab.label }}</a
          >
        }
      </nav>
      <mat-tab-nav-panel #panel><router-outlet /></mat-tab-nav-panel>
    </div>
  `,
  styles: `
    nav {
      margin: 10px 0 18px;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ClubPage {
  protected readonly user = inject(SignInState).user;
  /** Mails that could not be sent are said on the tab, so that nobody has to go and look. */
  private readonly givenUp = apiResource(listOutbox, () => ({ query: { status: 'given-up', limit: 1 } }));
  protected readonly tabs = computed(() => {
    const failed = this.givenUp.hasValue() ? this.givenUp.value().total : 0;
    return [
      { label: 'People', address: '/club/people' },
      { label: 'Squads', address: '/club/squads' },
      { label: failed > 0 ? `Outbox, ${failed} given up` : 'Outbox', address: '/club/outbox' },
    ];
  });
}
