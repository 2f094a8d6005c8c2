import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { DropFilms } from '../session/drop-films';
import { OpenNewSession } from '../session/open-new-session';
import { PlumbSign } from '../ui/plumb-sign';

/** The way to a new session from the squad: press it, or drop the clips onto it. */
@Component({
  selector: 'st-new-session-card',
  imports: [DropFilms, PlumbSign],
  template: `
    <button type="button" class="st-card st-card-dark" (click)="open([])" (stDropFilms)="open($event)">
      <st-plumb-sign [size]="28" />
      <span
        ><strong>New session</strong><span class="how">Drop clips here, or press to choose whose</span></span
      >
    </button>
  `,
  styles: `
    button {
      display: flex;
      align-items: center;
      gap: 20px;
      width: 100%;
      height: 100%;
      min-height: 84px;
      font: inherit;
      text-align: left;
      cursor: pointer;
    }

    button:hover,
    button.over {
      background: #1a333f;
    }

    button.over {
      outline: 2px dashed var(--st-right-on-picture);
      outline-offset: -6px;
    }

    strong,
    .how {
      display: block;
    }

    strong {
      font-weight: 600;
    }

    .how {
      color: var(--st-quiet-on-ink);
      font-size: 0.875rem;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class NewSessionCard {
  private readonly newSession = inject(OpenNewSession);

  protected open(files: readonly File[]): void {
    void this.newSession.ask(null, files);
  }
}
