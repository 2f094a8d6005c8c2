import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import { listAthletes } from '@stillstroke/contract/athletes';
import { apiResource } from '../core/api/api';
import { lastValue } from '../core/api/last-value';

const shownAtMost = 4;

/** What waits for the coach: clips without a mark, the athletes with most of them first. */
@Component({
  selector: 'st-waiting-card',
  imports: [RouterLink],
  template: `
    <h2 class="st-small st-quiet">Waiting for you</h2>
    @if (list(); as list) {
      @for (athlete of waiting(); track athlete.id) {
        <p>
          <a [routerLink]="['/athletes', athlete.id]">{{ athlete.name }}</a>
          {{ athlete.clipsToMark === 1 ? 'has one clip' : 'has ' + athlete.clipsToMark + ' clips' }} to mark
        </p>
      } @empty {
        <p>Nothing: every clip has been marked.</p>
      }
      @if (more()) {
        <p class="st-small st-quiet">and others; sort the list by clips to mark</p>
      }
    } @else if (athletes.error()) {
      <p>This could not be read just now.</p>
    }
  `,
  styles: `
    h2 {
      margin: 0;
      font-weight: 400;
    }

    p {
      margin: 2px 0;
    }

    a {
      color: var(--st-ink);
      font-weight: 600;
      text-decoration: none;
    }

    a:hover {
      text-decoration: underline;
    }
  `,
  host: { class: 'st-card' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class WaitingCard {
  readonly squadId = input<string | null>(null);

  protected readonly athletes = apiResource(listAthletes, () => ({
    query: { squadId: this.squadId(), sort: 'clipsToMark', direction: 'desc', limit: shownAtMost + 1 },
  }));
  protected readonly list = lastValue(this.athletes);
  private readonly all = computed(() =>
    (this.list()?.items ?? []).filter(({ clipsToMark }) => clipsToMark > 0),
  );
  protected readonly waiting = computed(() => this.all().slice(0, shownAtMost));
  protected readonly more = computed(() => this.all().length > shownAtMost);
}
