import { ChangeDetectionStrategy, Component, computed, input, output } from '@angular/core';
import { MatSortModule, type Sort } from '@angular/material/sort';
import { MatTableModule } from '@angular/material/table';
import { RouterLink } from '@angular/router';
import type { Athlete } from '@stillstroke/contract/athletes';
import { RailGlance } from '../ui/rail-glance';
import { sayDate } from '../ui/say-date';
import type { SquadSort } from './squad-filter';

export interface SortChoice {
  readonly sort: SquadSort;
  readonly direction: 'asc' | 'desc';
}

/** Athletes as a table; a row leads to its athlete's page. Sorting is asked for, never done here. */
@Component({
  selector: 'st-athlete-table',
  imports: [MatSortModule, MatTableModule, RailGlance, RouterLink],
  templateUrl: './athlete-table.html',
  styleUrl: './athlete-table.scss',
  host: { '[attr.aria-busy]': 'busy()' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class AthleteTable {
  readonly athletes = input.required<readonly Athlete[]>();
  readonly showsSquad = input(false);
  readonly sort = input.required<SquadSort>();
  readonly direction = input.required<'asc' | 'desc'>();
  readonly busy = input(false);

  readonly sorted = output<SortChoice>();

  protected readonly rows = computed(() => [...this.athletes()]);
  protected readonly columns = computed(() =>
    ['name', 'squad', 'lastSession', 'verticalAt', 'clipsToMark'].filter(
      (column) => column !== 'squad' || this.showsSquad(),
    ),
  );
  protected readonly sayDate = sayDate;

  protected askForOrder({ active, direction }: Sort): void {
    this.sorted.emit({ sort: active as SquadSort, direction: direction || 'asc' });
  }
}
