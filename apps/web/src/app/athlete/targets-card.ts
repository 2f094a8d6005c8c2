import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import { MatDialog } from '@angular/material/dialog';
import { deleteTarget, listTargets, type Target } from '@stillstroke/contract/targets';
import { Api, apiResource } from '../core/api/api';
import { problemOf } from '../core/api/problem-of';
import { Notices } from '../core/notices';
import { RecentlyDeleted } from '../core/recently-deleted';
import { measureWords } from '../ui/figure/measure-words';
import { LoadingLines } from '../ui/loading-lines';
import { ProblemMessage } from '../ui/problem-message';
import { sayDate } from '../ui/say-date';
import { sayBand, targetArmWords } from '../ui/target/target-words';
import type { TargetDialogData } from './target-dialog';

/** The bands that a coach set for this athlete; coaches add, change and take away, the athlete reads. */
@Component({
  selector: 'st-targets-card',
  imports: [LoadingLines, MatButtonModule, ProblemMessage],
  template: `
    <div class="head">
      <h2>Targets</h2>
      @if (canChange() && read.hasValue()) {
        <button matButton="outlined" type="button" (click)="edit(null)">Set a target</button>
      }
    </div>
    @if (targets(); as targets) {
      <ul>
        @for (target of targets; track target.id) {
          <li>
            <div>
              <p>
                <strong>{{ target.name }}</strong> {{ target.band }}
                <span class="st-quiet">{{ target.arm }}</span>
              </p>
              <p>“{{ target.words }}”</p>
              <p class="st-small st-quiet">{{ target.set }}</p>
            </div>
            @if (canChange()) {
              <div class="acts">
                <button
                  matButton
                  type="button"
                  [attr.aria-label]="'Change the target: ' + target.label"
                  (click)="edit(target.target)"
                >
                  Change
                </button>
                <button
                  matButton
                  type="button"
                  [attr.aria-label]="'Delete the target: ' + target.label"
                  (click)="remove(target.target, target.label)"
                >
                  Delete
                </button>
              </div>
            }
          </li>
        } @empty {
          <li class="st-quiet">
            {{
              canChange()
                ? 'None set. A target is a band of your own for one measure; it is then shown on the Desk, Compare and Trend.'
                : 'Your coach has set none.'
            }}
          </li>
        }
      </ul>
    } @else if (read.error()) {
      <st-problem-message [error]="read.error()" (retry)="read.reload()" />
    } @else {
      <st-loading-lines [count]="2" />
    }
  `,
  styleUrl: './targets-card.scss',
  host: { class: 'st-card' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class TargetsCard {
  private readonly api = inject(Api);
  private readonly dialog = inject(MatDialog);
  private readonly deleted = inject(RecentlyDeleted);
  private readonly notices = inject(Notices);

  readonly athleteId = input.required<string>();
  readonly canChange = input.required<boolean>();

  protected readonly read = apiResource(listTargets, () => ({ params: { id: this.athleteId() } }));
  protected readonly targets = computed(() =>
    this.read.hasValue()
      ? this.read.value().items.map((target) => {
          const { name } = measureWords[target.measure];
          const arm = targetArmWords[target.arm];
          const band = sayBand(target);
          const set = `Set by ${target.setBy ?? 'a former coach'}, ${sayDate(target.setAt.slice(0, 10))}`;
          return {
            id: target.id,
            name,
            arm,
            band,
            words: target.words,
            set,
            target,
            label: `${name}, ${arm}`,
          };
        })
      : null,
  );

  reload(): void {
    this.read.reload();
  }

  protected async edit(target: Target | null): Promise<void> {
    const { TargetDialog } = await import('./target-dialog');
    this.dialog
      .open<unknown, TargetDialogData, Target>(TargetDialog, {
        data: { athleteId: this.athleteId(), target },
        width: '32rem',
      })
      .afterClosed()
      .subscribe((saved) => {
        if (saved) this.read.reload();
      });
  }

  protected remove({ id }: Target, label: string): void {
    this.api.call(deleteTarget, { params: { id } }).subscribe({
      next: ({ undoUntil }) => {
        this.read.reload();
        const name = `the target for ${label}`;
        this.deleted.note({ kind: 'target', id, name, parentId: this.athleteId(), undoUntil }, () =>
          this.read.reload(),
        );
      },
      error: (error: unknown) => this.notices.warn(problemOf(error).detail),
    });
  }
}
