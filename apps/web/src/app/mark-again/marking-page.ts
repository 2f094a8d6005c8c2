import { DatePipe } from '@angular/common';
import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { forgetMarking, getMarking } from '@stillstroke/contract/repeatability';
import { Api, apiResource } from '../core/api/api';
import { lastValue } from '../core/api/last-value';
import { problemOf } from '../core/api/problem-of';
import { Notices } from '../core/notices';
import { Ask } from '../ui/ask/ask';
import { EmptyState } from '../ui/empty-state';
import { fixed } from '../ui/figure/format-figure';
import { LoadingLines } from '../ui/loading-lines';
import { ProblemMessage } from '../ui/problem-message';
import { angleNames, anglesInOrder, degrees, sayFrames, sayRepeatability } from './marking-words';
import { RoundsList } from './rounds-list';

/** How closely the coach repeats their own marks, what that does to readings, and the rounds it comes from. */
@Component({
  selector: 'st-marking-page',
  imports: [DatePipe, EmptyState, LoadingLines, MatButtonModule, ProblemMessage, RouterLink, RoundsList],
  templateUrl: './marking-page.html',
  styleUrl: './marking-page.scss',
  host: { class: 'st-page' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class MarkingPage {
  private readonly api = inject(Api);
  private readonly ask = inject(Ask);
  private readonly notices = inject(Notices);

  protected readonly read = apiResource(getMarking, () => ({}));
  protected readonly marking = lastValue(this.read);
  protected readonly sentence = computed(() => {
    const marking = this.marking();
    return marking ? sayRepeatability(marking) : '';
  });
  protected readonly joints = computed(() => {
    const marking = this.marking();
    if (!marking?.figures) return [];
    const { figures, defaultAt1080 } = marking;
    return (['shoulder', 'elbow', 'wrist'] as const).map((joint) => ({
      name: joint,
      own: `${fixed(figures.spreadAt1080[joint], 1)} px`,
      usual: `${fixed(defaultAt1080[joint], 1)} px`,
    }));
  });
  protected readonly angles = computed(() => {
    const errors = this.marking()?.figures?.typicalErrors;
    if (!errors) return [];
    return anglesInOrder.map((id) => ({
      name: angleNames[id],
      typical: degrees(errors[id].typicalErrorDeg),
      change: degrees(errors[id].minimalChangeDeg),
      shift: degrees(errors[id].biasDeg),
    }));
  });
  protected readonly frames = computed(() => sayFrames(this.marking()?.figures?.frames ?? 0));

  protected async forget(): Promise<void> {
    const sure = await this.ask.confirm({
      title: 'Forget how closely you mark?',
      words:
        'All your rounds go, and the default stands again in the uncertainties of your clips. The marks on the clips stay.',
      action: 'Forget them',
    });
    if (!sure) return;
    this.api.call(forgetMarking).subscribe({
      next: () => {
        this.read.reload();
        this.notices.say('Forgotten. The default stands again.');
      },
      error: (error: unknown) => this.notices.warn(problemOf(error).detail),
    });
  }
}
