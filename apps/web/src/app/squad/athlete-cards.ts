import { ChangeDetectionStrategy, Component, input, output } from '@angular/core';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatSelectModule } from '@angular/material/select';
import { RouterLink } from '@angular/router';
import type { Athlete } from '@stillstroke/contract/athletes';
import { RailGlance } from '../ui/rail-glance';
import { sayDate } from '../ui/say-date';
import type { SortChoice } from './athlete-table';
import type { SquadSort } from './squad-filter';

const orders = [
  { key: 'name asc', words: 'Name' },
  { key: 'lastSession desc', words: 'Last session, newest first' },
  { key: 'clipsToMark desc', words: 'Clips to mark, most first' },
] as const;

/** Athletes as cards, for windows too narrow for the table. */
@Component({
  selector: 'st-athlete-cards',
  imports: [MatFormFieldModule, MatSelectModule, RailGlance, RouterLink],
  templateUrl: './athlete-cards.html',
  styleUrl: './athlete-cards.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class AthleteCards {
  readonly athletes = input.required<readonly Athlete[]>();
  readonly showsSquad = input(false);
  readonly sort = input.required<SquadSort>();
  readonly direction = input.required<'asc' | 'desc'>();

  readonly sorted = output<SortChoice>();

  protected readonly orders = orders;
  protected readonly sayDate = sayDate;

  protected askForOrder(key: string): void {
    const [sort, direction] = key.split(' ') as [SquadSort, 'asc' | 'desc'];
    this.sorted.emit({ sort, direction });
  }
}
