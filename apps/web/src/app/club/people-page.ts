import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { takeUntilDestroyed, toObservable } from '@angular/core/rxjs-interop';
import { FormControl, ReactiveFormsModule } from '@angular/forms';
import { MatButtonModule } from '@angular/material/button';
import { MatDialog } from '@angular/material/dialog';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInputModule } from '@angular/material/input';
import { MatMenuModule } from '@angular/material/menu';
import { MatSelectModule } from '@angular/material/select';
import { MatSortModule, type Sort } from '@angular/material/sort';
import { MatTableModule } from '@angular/material/table';
import { Router } from '@angular/router';
import { listPeople, reinvitePerson, updatePerson, type Person } from '@stillstroke/contract/people';
import { listSquads, type Squad } from '@stillstroke/contract/squads';
import { debounceTime, filter } from 'rxjs';
import { Api, apiResource } from '../core/api/api';
import { lastValue } from '../core/api/last-value';
import { problemOf } from '../core/api/problem-of';
import { injectNarrow } from '../core/narrow';
import { Notices } from '../core/notices';
import { SignInState } from '../core/sign-in/sign-in-state';
import { Ask } from '../ui/ask/ask';
import { EmptyState } from '../ui/empty-state';
import { LoadingLines } from '../ui/loading-lines';
import { ProblemMessage } from '../ui/problem-message';
import {
  peopleOnPage,
  readPeopleFilter,
  roles,
  roleWords,
  saySquads,
  statusWords,
  toPeopleAddress,
  type PeopleFilter,
  type PeopleSort,
} from './people-filter';
import { ShowLink, type Invited } from './show-link';

/** Who has an account in the club: invite, change squads, deactivate and take back in. */
@Component({
  selector: 'st-people-page',
  imports: [
    EmptyState,
    LoadingLines,
    MatButtonModule,
    MatFormFieldModule,
    MatInputModule,
    MatMenuModule,
    MatSelectModule,
    MatSortModule,
    MatTableModule,
    ProblemMessage,
    ReactiveFormsModule,
  ],
  templateUrl: './people-page.html',
  styleUrl: './club-lists.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PeoplePage {
  private readonly api = inject(Api);
  private readonly ask = inject(Ask);
  private readonly dialog = inject(MatDialog);
  private readonly links = inject(ShowLink);
  private readonly notices = inject(Notices);
  private readonly router = inject(Router);

  /** All from the address. */
  readonly search = input<string>();
  readonly role = input<string>();
  readonly sort = input<string>();
  readonly direction = input<string>();
  readonly after = input<string>();

  protected readonly me = inject(SignInState).user;
  protected readonly narrow = injectNarrow();
  protected readonly filter = computed(() =>
    readPeopleFilter({
      search: this.search(),
      role: this.role(),
      sort: this.sort(),
      direction: this.direction(),
      after: this.after(),
    }),
  );
  protected readonly squadsRead = apiResource(listSquads, () => ({}));
  private readonly squads = computed(() => (this.squadsRead.hasValue() ? this.squadsRead.value().items : []));
  protected readonly people = apiResource(listPeople, () => {
    const { search, role, sort, direction, after } = this.filter();
    return { query: { search, role, sort, direction, cursor: after, limit: peopleOnPage } };
  });
  protected readonly page = lastValue(this.people);
  protected readonly rows = computed(() =>
    (this.page()?.items ?? []).map((person) => ({
      person,
      role: roleWords[person.role],
      status: statusWords[person.status],
      squads: saySquads(person, this.squads()),
    })),
  );
  protected readonly columns = ['name', 'role', 'squads', 'status', 'more'];
  protected readonly roles = roles.map((value) => ({ value, words: roleWords[value] }));
  protected readonly searchField = new FormControl('', { nonNullable: true });

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

  protected list(what: Partial<PeopleFilter>): void {
    void this.router.navigate([], {
      queryParams: toPeopleAddress({ ...this.filter(), after: null, ...what }),
      replaceUrl: !('after' in what),
    });
  }

  protected askForOrder({ active, direction }: Sort): void {
    this.list({ sort: active as PeopleSort, direction: direction || 'asc' });
  }

  protected async invite(): Promise<void> {
    const { InviteDialog } = await import('./invite-dialog');
    const open = this.squads().filter(({ deactivated }) => !deactivated);
    this.dialog
      .open<unknown, { squads: readonly Squad[] }, Invited>(InviteDialog, {
        data: { squads: open },
        width: '32rem',
      })
      .afterClosed()
      .subscribe((invited) => {
        if (!invited) return;
        this.people.reload();
        this.links.show(invited);
      });
  }

  protected inviteAgain(person: Person): void {
    this.api.call(reinvitePerson, { params: { id: person.id } }).subscribe({
      next: (invited) => {
        this.people.reload();
        this.links.show(invited);
      },
      error: (error: unknown) => this.notices.warn(problemOf(error).detail),
    });
  }

  protected async edit(person: Person): Promise<void> {
    const { EditPersonDialog } = await import('./edit-person-dialog');
    const open = this.squads().filter(({ id, deactivated }) => !deactivated || person.squadIds.includes(id));
    this.dialog
      .open(EditPersonDialog, { data: { person, squads: open }, width: '30rem' })
      .afterClosed()
      .subscribe((changed) => {
        if (changed) this.people.reload();
      });
  }

  protected async deactivate(person: Person): Promise<void> {
    const sure = await this.ask.confirm({
      title: `Deactivate ${person.name}?`,
      words: `${person.name} is signed out everywhere and cannot sign in. Nothing is deleted, and you can take them back in.`,
      action: 'Deactivate',
      typeName: person.name,
    });
    if (sure) this.setDeactivated(person, true);
  }

  protected setDeactivated(person: Person, deactivated: boolean): void {
    this.api.call(updatePerson, { params: { id: person.id }, body: { deactivated } }).subscribe({
      next: () => {
        this.people.reload();
        this.notices.say(
          deactivated ? `${person.name} is deactivated.` : `${person.name} can sign in again.`,
        );
      },
      error: (error: unknown) => this.notices.warn(problemOf(error).detail),
    });
  }
}
