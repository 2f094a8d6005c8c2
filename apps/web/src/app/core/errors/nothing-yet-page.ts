import { ChangeDetectionStrategy, Component } from '@angular/core';
import { PlumbSign } from '../../ui/plumb-sign';

/** Where a person lands whose account reaches no athlete yet. */
@Component({
  selector: 'st-nothing-yet-page',
  imports: [PlumbSign],
  template: `
    <div class="st-page">
      <st-plumb-sign [size]="56" />
      <h1>Nothing to read yet</h1>
      <p class="st-lead">
        You are signed in, but no athlete has been opened to your account. The admin of your club can do that.
      </p>
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
export class NothingYetPage {}
