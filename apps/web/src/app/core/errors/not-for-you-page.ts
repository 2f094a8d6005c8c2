import { ChangeDetectionStrategy, Component } from '@angular/core';
import { RouterLink } from '@angular/router';
import { PlumbSign } from '../../ui/plumb-sign';

@Component({
  selector: 'st-not-for-you-page',
  imports: [PlumbSign, RouterLink],
  template: `
    <div class="st-page">
      <st-plumb-sign [size]="56" />
      <h1>This page is not for you</h1>
      <p class="st-lead">Your account does not reach it. If you need it, ask the admin of your club.</p>
      <p><a routerLink="/">Go to your start page</a></p>
    </div>
  `,
  styles: `
    st-plumb-sign {
      margin-bottom: 16px;
      color: var(--st-deep-water);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class NotForYouPage {}
