import { ChangeDetectionStrategy, Component } from '@angular/core';
import { RouterLink } from '@angular/router';
import { PlumbSign } from '../../ui/plumb-sign';

@Component({
  selector: 'st-not-found-page',
  imports: [PlumbSign, RouterLink],
  template: `
    <div class="st-page">
      <st-plumb-sign [size]="56" />
      <h1>There is no such page</h1>
      <p class="st-lead">The address may be mistyped, or what it showed has been deleted.</p>
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
export class NotFoundPage {}
