import { ChangeDetectionStrategy, Component, computed, inject, input, output } from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import { RecentlyDeleted, type DeletedThing } from '../core/recently-deleted';
import { sayInstant } from './say-date';

/** What was deleted from this page a while ago and can still be brought back. */
@Component({
  selector: 'st-deleted-list',
  imports: [MatButtonModule],
  template: `
    @if (things().length > 0) {
      <h2>Recently deleted</h2>
      <ul>
        @for (thing of things(); track thing.id) {
          <li>
            <span
              >{{ thing.name }}
              <span class="st-small st-quiet"
                >can be brought back until {{ sayInstant(thing.undoUntil) }}</span
              ></span
            >
            <button
              matButton
              type="button"
              [attr.aria-label]="'Bring back ' + thing.name"
              (click)="restore(thing)"
            >
              Bring back
            </button>
          </li>
        }
      </ul>
    }
  `,
  styles: `
    ul {
      margin: 4px 0 0;
      padding: 0;
      list-style: none;
    }

    li {
      display: flex;
      flex-wrap: wrap;
      align-items: center;
      gap: 4px 16px;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class DeletedList {
  private readonly deleted = inject(RecentlyDeleted);

  /** The page whose things are listed. */
  readonly parentId = input.required<string>();
  readonly restored = output();

  protected readonly things = computed(() => this.deleted.of(this.parentId()));
  protected readonly sayInstant = sayInstant;

  protected restore(thing: DeletedThing): void {
    this.deleted.restore(thing, () => this.restored.emit());
  }
}
