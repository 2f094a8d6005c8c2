import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import type { CautionSummary } from '@stillstroke/contract/view-cautions';
import { inShort, sayCautionSummary } from './figure/caution-words';

/** One quiet line under a page's sentence: what of the camera's view the strokes have to be read with. */
@Component({
  selector: 'st-caution-line',
  template: `
    @if (lines(); as said) {
      <details>
        <summary><span class="sign" aria-hidden="true">!</span>{{ said.first }}</summary>
        <ul>
          @for (line of said.all; track line) {
            <li>{{ line }}</li>
          }
        </ul>
        <p>
          Sizes are of the angle itself, at most, and are no part of any ±: more strokes do not lessen them.
          The Desk says of each frame what it comes from.
        </p>
      </details>
    }
  `,
  styles: `
    :host {
      display: block;
      max-width: 62ch;
      margin-block: 6px 14px;
      color: var(--mat-sys-on-surface-variant);
      font-size: 0.9375rem;
    }

    summary {
      display: inline-flex;
      align-items: center;
      gap: 8px;
      min-height: 32px;
      cursor: pointer;
      list-style: none;
      text-decoration: underline dotted color-mix(in srgb, currentcolor 60%, transparent);
      text-underline-offset: 4px;

      &::-webkit-details-marker {
        display: none;
      }
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

    ul,
    p {
      margin: 4px 0;
      padding-inline-start: 26px;
    }

    @media (pointer: coarse), (max-width: 640px) {
      summary {
        min-height: 44px;
      }
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class CautionLine {
  readonly cautions = input.required<readonly CautionSummary[]>();

  protected readonly lines = computed(() => {
    const all = inShort(this.cautions()).map(sayCautionSummary);
    const [first] = all;
    if (first === undefined) return null;
    const more = all.length === 1 ? '' : ` and ${all.length - 1} more`;
    return { first: `About the view: ${first}${more}`, all };
  });
}
