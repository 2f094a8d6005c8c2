import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { PlumbSign } from './plumb-sign';

/** Says that there is nothing yet, and (projected) what to do about it. */
@Component({
  selector: 'st-empty-state',
  imports: [PlumbSign],
  template: `
    <st-plumb-sign [size]="44" />
    <p class="title">{{ heading() }}</p>
    <div class="more"><ng-content /></div>
  `,
  styles: `
    :host {
      display: grid;
      justify-items: center;
      padding: 40px 24px;
      color: var(--mat-sys-on-surface-variant);
      text-align: center;
    }

    st-plumb-sign {
      color: var(--st-deep-water);
    }

    .title {
      margin: 12px 0 0;
      color: var(--st-ink);
      font-size: 1.125rem;
      font-weight: 600;
    }

    .more {
      max-width: 46ch;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class EmptyState {
  readonly heading = input.required<string>();
}
