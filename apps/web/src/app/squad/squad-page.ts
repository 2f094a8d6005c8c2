import { ChangeDetectionStrategy, Component, computed, inject, input, signal } from '@angular/core';
import { takeUntilDestroyed, toObservable } from '@angular/core/rxjs-interop';
import { FormControl, ReactiveFormsModule } from '@angular/forms';
import { MatButtonModule } from '@angular/material/button';
import { MatDialog } from '@angular/material/dialog';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInputModule } from '@angular/material/input';
import { MatSelectModule } from '@angular/material/select';
import { MatSlideToggleModule } from '@angular/material/slide-toggle';
import { Router } from '@angular/router';
import { listAthletes } from '@stillstroke/contract/athletes';
import { listSquads } from '@stillstroke/contract/squads';
import { debounceTime, filter } from 'rxjs';
import { apiResource } from '../core/api/api';
import { lastValue } from '../core/api/last-value';
import { injectNarrow } from '../core/narrow';
import { SignInState } from '../core/sign-in/sign-in-state';
import { NewSessionCard } from '../session/new-session-card';
import { EmptyState } from '../ui/empty-state';
import { LoadingLines } from '../ui/loading-lines';
import { ProblemMessage } from '../ui/problem-message';
import { AthleteCards } from './athlete-cards';
import { AthleteTable, type SortChoice } from './athlete-table';
import { change, readFilter, sayRange, toAddress, toQuery, type SquadFilter } from './squad-filter';
import { WaitingCard } from './waiting-card';

/** The athletes a coach or admin may see. What is listed stands in the address; the server sorts, filters and pages. */
@Component({
  selector: 'st-squad-page',
  imports: [
    AthleteCards,
    AthleteTable,
    EmptyState,
    LoadingLines,
    MatButtonModule,
    MatFormFieldModule,
    MatInputModule,
    MatSelectModule,
    MatSlideToggleModule,
    NewSessionCard,
    ProblemMessage,
    ReactiveFormsModule,
    WaitingCard,
  ],
  templateUrl: './squad-page.html',
  styleUrl: './squad-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SquadPage {
  private readonly router = inject(Router);
  private readonly dialog = inject(MatDialog);

  /** All from the address. */
  readonly squad = input<string>();
  readonly search = input<string>();
  readonly sort = input<string>();
  readonly direction = input<string>();
  readonly deactivated = input<string>();
  readonly after = input<string>();
  readonly from = input<string>();

  protected readonly user = inject(SignInState).user;
  protected readonly narrow = injectNarrow();
  protected readonly filter = computed(() =>
    readFilter({
      squad: this.squad(),
      search: this.search(),
      sort: this.sort(),
      direction: this.direction(),
      deactivated: this.deactivated(),
      after: this.after(),
      from: this.from(),
    }),
  );
  protected readonly squads = apiResource(listSquads, () => ({}));
  protected readonly athletes = apiResource(listAthletes, () => ({ query: toQuery(this.filter()) }));
  protected readonly page = lastValue(this.athletes);

  protected readonly openSquads = computed(() =>
    (this.squads.hasValue() ? this.squads.value().items : []).filter((each) => !each.deactivated),
  );
  protected readonly heading = computed(() => {
    const squads = this.openSquads();
    const chosen = squads.find(({ id }) => id === this.filter().squadId);
    if (chosen) return chosen.name;
    return squads.length === 1 ? (squads[0]?.name ?? 'Squad') : 'All squads';
  });
  protected readonly severalSquads = computed(() => this.openSquads().length > 1);
  protected readonly showsSquad = computed(() => this.severalSquads() && !this.filter().squadId);
  protected readonly range = computed(() => {
    const page = this.page();
    return page ? sayRange(this.filter().from, page.items.length, page.total) : '';
  });
  protected readonly filtered = computed(() => this.filter().search !== '' || this.filter().squadId !== null);
  protected readonly searchField = new FormControl('', { nonNullable: true });

  /** Cursors of the pages before this one, as far as this visit knows them; the address alone knows only its own. */
  private readonly trail = signal<readonly (string | null)[]>([]);

  constructor() {
    toObservable(this.filter)
      .pipe(
        filter(({ search }) => search !== this.searchField.value.trim()),
        takeUntilDestroyed(),
      )
      .subscribe(({ search }) => this.searchField.setValue(search, { emitEvent: false }));
    this.searchField.valueChanges
      .pipe(debounceTime(250), takeUntilDestroyed())
      .subscribe((text) => this.list({ search: text.trim() }));
  }

  /** Lists something else: the change goes to the address, and the list follows the address. */
  protected list(what: Partial<SquadFilter>): void {
    if (!('after' in what)) this.trail.set([]);
    void this.router.navigate([], {
      queryParams: toAddress(change(this.filter(), what)),
      queryParamsHandling: 'merge',
      replaceUrl: true,
    });
  }

  protected sortBy({ sort, direction }: SortChoice): void {
    this.list({ sort, direction });
  }

  protected showNext(): void {
    const next = this.page()?.nextCursor;
    if (!next) return;
    this.trail.update((trail) => [...trail, this.filter().after]);
    this.list({ after: next, from: this.filter().from + (this.page()?.items.length ?? 0) });
  }

  protected showPrevious(): void {
    const before = this.trail().at(-1) ?? null;
    this.trail.update((trail) => trail.slice(0, -1));
    this.list({ after: before, from: before ? Math.max(0, this.filter().from - 25) : 0 });
  }

  protected async addAthlete(): Promise<void> {
    const { AddAthleteDialog } = await import('./add-athlete-dialog');
    this.dialog
      .open(AddAthleteDialog, { data: { squads: this.openSquads(), squadId: this.filter().squadId } })
      .afterClosed()
      .subscribe((added) => {
        if (added) this.athletes.reload();
      });
  }

  protected reload(): void {
    this.squads.reload();
    this.athletes.reload();
  }
}
