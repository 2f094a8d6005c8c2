import { ChangeDetectionStrategy, Component, computed, input, output } from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import { MatProgressBarModule } from '@angular/material/progress-bar';
import { RouterLink } from '@angular/router';
import { idSchema } from '@stillstroke/contract/fields';
import * as z from 'zod';
import { saySize } from '../../ui/clip-words';
import { sayDate } from '../../ui/say-date';
import type { FilmFields } from './film-fields';
import { FilmFieldsForm } from './film-fields-form';
import type { FilmUpload } from './upload-queue';

/** Where a file that is already there can be found, as the server says it. */
const placeSchema = z.object({ clipId: idSchema, sessionId: idSchema, sessionDate: z.string() });

/** One file on its way: how far it is, what it shows, and what can be done about it. */
@Component({
  selector: 'st-upload-row',
  imports: [FilmFieldsForm, MatButtonModule, MatProgressBarModule, RouterLink],
  templateUrl: './upload-row.html',
  styleUrl: './upload-row.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class UploadRow {
  readonly upload = input.required<FilmUpload>();
  /** Whether what is said after the start can still be saved; an athlete may say it before only. */
  readonly canSayLater = input(true);

  readonly said = output<Partial<FilmFields>>();
  readonly cancelled = output();
  readonly retried = output();
  readonly putAway = output();

  protected readonly state = computed(() => this.upload().state());
  protected readonly percent = computed(() => {
    const { file, sentBytes } = this.upload();
    return file.size > 0 ? Math.floor((sentBytes() / file.size) * 100) : 100;
  });
  protected readonly words = computed(() => {
    const size = saySize(this.upload().file.size);
    switch (this.state()) {
      case 'held':
        return `${size}, ready to send`;
      case 'waiting':
        return `${size}, waits for its turn`;
      case 'sending':
        return `${this.percent()} % of ${size}`;
      case 'reading':
        return 'All of it is there; reading its frames';
      case 'saving':
        return 'Uploaded; saving what it shows';
      case 'done':
        return 'Uploaded';
      case 'cancelled':
        return 'Cancelled; nothing of it was kept';
      case 'refused':
        return 'Not taken';
    }
  });
  protected readonly underWay = computed(() =>
    ['held', 'waiting', 'sending', 'reading'].includes(this.state()),
  );
  protected readonly locked = computed(
    () =>
      this.state() === 'refused' ||
      this.state() === 'cancelled' ||
      (!this.canSayLater() && this.state() !== 'held' && this.state() !== 'waiting'),
  );
  protected readonly elsewhere = computed(() => {
    const problem = this.upload().problem();
    const place = problem?.code === 'duplicate-clip' ? placeSchema.safeParse(problem.current) : null;
    return place?.success ? { ...place.data, date: sayDate(place.data.sessionDate) } : null;
  });
}
