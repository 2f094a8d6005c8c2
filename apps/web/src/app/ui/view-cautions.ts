import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import type { ViewCaution } from '@stillstroke/geometry/view/caution';
import { sayCaution, sayCautionShort } from './figure/caution-words';

/** What readings have to be read with: a few words each, which open to the whole sentence. Nothing where there is none. */
@Component({
  selector: 'st-view-cautions',
  template: `
    @for (caution of shown(); track caution.key) {
      <details>
        <summary><span class="sign" aria-hidden="true">!</span>{{ caution.short }}</summary>
        <p>{{ caution.sentence }}</p>
      </details>
    }
  `,
  styles: `
    :host {
      display: block;
    }

    summary {
      display: flex;
      align-items: center;
      gap: 8px;
      min-height: 30px;
      color: var(--mat-sys-on-surface-variant);
      font-size: 0.875rem;
      cursor: pointer;
      list-style: none;

      &::-webkit-details-marker {
        display: none;
      }

      &::after {
        margin-inline-start: auto;
        content: '+';
      }

      &:hover {
        color: var(--mat-sys-on-surface);
      }
    }

    details[open] > summary::after {
      content: '−';
    }

    .sign {
      flex: none;
      box-sizing: border-box;
      width: 18px;
      height: 18px;
      border: 1.5px solid currentcolor;
      border-radius: 50%;
      font-size: 0.75rem;
      font-weight: 600;
      line-height: 15px;
      text-align: center;
    }

    p {
      margin: 2px 0 8px;
      padding-inline-start: 26px;
      font-size: 0.875rem;
      line-height: 1.4;
    }

    @media (pointer: coarse), (max-width: 760px) {
      summary {
        min-height: 44px;
      }
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ViewCautions {
  readonly cautions = input.required<readonly ViewCaution[]>();

  protected readonly shown = computed(() =>
    this.cautions().map((caution) => ({
      key: `${caution.code} ${caution.arm ?? ''}`,
      short: sayCautionShort(caution),
      sentence: sayCaution(caution),
    })),
  );
}
