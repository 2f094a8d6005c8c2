import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { DropFilms } from './drop-films';
import { OpenNewSession } from './open-new-session';
import { PlumbSign } from '../ui/plumb-sign';

/** The way to a new session: press it, or drop the clips onto it. */
@Component({
  selector: 'st-new-session-card',
  imports: [DropFilms, PlumbSign],
  template: `
    <button type="button" class="st-card st-card-dark" (click)="open([])" (stDropFilms)="open($event)">
      <st-plumb-sign [size]="28" />
      <span
        ><strong>{{ heading() }}</strong
        ><span class="how">{{ how() }}</span></span
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

  /** Whose session; null asks. */
  readonly athlete = input<{ readonly id: string; readonly name: string } | null>(null);
  readonly heading = input('New session');

  protected readonly how = computed(() =>
    this.athlete() ? 'Drop clips here, or press' : 'Drop clips here, or press to choose whose',
  );

  protected open(files: readonly File[]): void {
    void this.newSession.ask(this.athlete(), files);
  }
}
