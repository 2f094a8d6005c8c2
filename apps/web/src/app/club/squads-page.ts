import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import { MatDialog } from '@angular/material/dialog';
import { MatMenuModule } from '@angular/material/menu';
import { RouterLink } from '@angular/router';
import { listSquads, updateSquad, type Squad } from '@stillstroke/contract/squads';
import { Api, apiResource } from '../core/api/api';
import { lastValue } from '../core/api/last-value';
import { problemOf } from '../core/api/problem-of';
import { Notices } from '../core/notices';
import { Ask } from '../ui/ask/ask';
import { EmptyState } from '../ui/empty-state';
import { LoadingLines } from '../ui/loading-lines';
import { ProblemMessage } from '../ui/problem-message';

/** The squads of the club and who coaches them. */
@Component({
  selector: 'st-squads-page',
  imports: [EmptyState, LoadingLines, MatButtonModule, MatMenuModule, ProblemMessage, RouterLink],
  templateUrl: './squads-page.html',
  styleUrl: './squads-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SquadsPage {
  private readonly api = inject(Api);
  private readonly ask = inject(Ask);
  private readonly dialog = inject(MatDialog);
  private readonly notices = inject(Notices);

  protected readonly read = apiResource(listSquads, () => ({}));
  protected readonly list = lastValue(this.read);
  protected readonly squads = computed(() =>
    (this.list()?.items ?? []).map((squad) => ({
      squad,
      coaches: squad.coaches.map(({ name }) => name).join(', ') || 'no coach yet',
      athletes: squad.athleteCount === 1 ? '1 athlete' : `${squad.athleteCount} athletes`,
    })),
  );

  protected async edit(squad: Squad | null): Promise<void> {
    const { SquadDialog } = await import('./squad-dialog');
    this.dialog
      .open(SquadDialog, { data: { squad }, width: '30rem' })
      .afterClosed()
      .subscribe((changed) => {
        if (changed) this.read.reload();
      });
  }

  protected async deactivate(squad: Squad): Promise<void> {
    const sure = await this.ask.confirm({
      title: `Deactivate ${squad.name}?`,
      words: 'It leaves the lists. Its athletes, sessions and clips stay, and you can take it back in.',
      action: 'Deactivate',
      typeName: squad.name,
    });
    if (sure) this.setDeactivated(squad, true);
  }

  protected setDeactivated(squad: Squad, deactivated: boolean): void {
    this.api.call(updateSquad, { params: { id: squad.id }, body: { deactivated } }).subscribe({
      next: () => {
        this.read.reload();
        this.notices.say(deactivated ? `${squad.name} is deactivated.` : `${squad.name} is back.`);
      },
      error: (error: unknown) => this.notices.warn(problemOf(error).detail),
    });
  }
}
