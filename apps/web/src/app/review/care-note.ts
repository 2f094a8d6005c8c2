import { ChangeDetectionStrategy, Component } from '@angular/core';

/** What everybody who works on their stroke from a review should know, in a few words. */
@Component({
  selector: 'st-care-note',
  template: `
    <p>
      <strong>Change one thing at a time.</strong> Stop when you feel pain, numbness or weakness, and see a
      licensed practitioner. The angles are those of a picture, seen from one side: they show how you moved in
      it and are no diagnosis.
    </p>
  `,
  styles: `
    :host {
      display: block;
      margin: 18px 0;
      padding: 12px 16px;
      border-left: 4px solid var(--st-ochre);
      border-radius: 4px;
      background: var(--st-ochre-wash);
    }

    p {
      max-width: 62ch;
      margin: 0;
    }
  `,
  host: { role: 'note' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class CareNote {}
