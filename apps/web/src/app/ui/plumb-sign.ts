import { ChangeDetectionStrategy, Component, input } from '@angular/core';

/** The sign of the house: a plumb line hanging from the water's surface. Drawn in the colour of the text around it. */
@Component({
  selector: 'st-plumb-sign',
  template: `
    <svg viewBox="0 0 20 30" [attr.height]="size()" aria-hidden="true" focusable="false">
      <path
        d="M2 5c2.7-2.9 5.3-2.9 8 0s5.3 2.9 8 0"
        fill="none"
        stroke="currentColor"
        stroke-width="1.8"
        stroke-linecap="round"
      />
      <path d="M10 5v12" stroke="currentColor" stroke-width="1.6" />
      <path d="M6 16h8l-1.1 6L10 27.5 7.1 22z" fill="currentColor" />
    </svg>
  `,
  styles: `
    :host {
      display: inline-flex;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PlumbSign {
  /** Height in CSS pixels. */
  readonly size = input(26);
}
