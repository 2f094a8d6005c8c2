import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { MatTabsModule } from '@angular/material/tabs';
import { RouterLink, RouterLinkActive, RouterOutlet } from '@angular/router';
import { SignInState } from '../core/sign-in/sign-in-state';

/** What an admin looks after: who has an account, and the squads. */
@Component({
  selector: 'st-club-page',
  imports: [MatTabsModule, RouterLink, RouterLinkActive, RouterOutlet],
  template: `
    <div class="st-page">
      <h1>{{ user()?.clubName ?? 'Club' }}</h1>
      <nav mat-tab-nav-bar mat-stretch-tabs="false" aria-label="Parts of the club" [tabPanel]="panel">
        @for (tab of tabs; track tab.address) {
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
  protected readonly tabs = [
    { label: 'People', address: '/club/people' },
    { label: 'Squads', address: '/club/squads' },
  ];
}
