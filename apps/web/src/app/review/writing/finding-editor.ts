import { TextFieldModule } from '@angular/cdk/text-field';
import {
  ChangeDetectionStrategy,
  Component,
  computed,
  inject,
  input,
  output,
  viewChild,
  type ElementRef,
} from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import { MatDialog } from '@angular/material/dialog';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInputModule } from '@angular/material/input';
import { MatMenuModule } from '@angular/material/menu';
import { MatSelectModule } from '@angular/material/select';
import type { Observation, Snippet } from '@stillstroke/contract/review-lists';
import type { ReadingSource } from '@stillstroke/contract/review-readings';
import type { Review } from '@stillstroke/contract/reviews';
import type { HeldEdit } from '../draft/draft-edits';
import type { DraftFinding } from '../draft/draft-review';
import type { FindingFields } from '../draft/finding-fields';
import { armWords, kindWords, phaseWords, sayPlusMinus, sayValue } from '../finding-words';
import { HeldFinding } from './held-finding';
import type { ReadingsWish } from './readings-dialog';
import { StillList } from './still-list';

/** One finding of a draft, to be written. Everything that is typed or chosen is told at once; nothing is kept here. */
@Component({
  selector: 'st-finding-editor',
  imports: [
    HeldFinding,
    MatButtonModule,
    MatFormFieldModule,
    MatInputModule,
    MatMenuModule,
    MatSelectModule,
    StillList,
    TextFieldModule,
  ],
  templateUrl: './finding-editor.html',
  styleUrl: './finding-editor.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class FindingEditor {
  private readonly dialog = inject(MatDialog);

  readonly finding = input.required<DraftFinding>();
  readonly review = input.required<Review>();
  /** 1-based. */
  readonly number = input.required<number>();
  readonly observations = input.required<readonly Observation[]>();
  readonly snippets = input.required<readonly Snippet[]>();
  readonly held = input<HeldEdit | null>(null);

  readonly edited = output<Partial<FindingFields>>();
  readonly keepText = output<string>();
  readonly openTexts = output();
  readonly openObservations = output();
  readonly keepMine = output();
  readonly takeTheirs = output();
  readonly stillsChanged = output();

  private readonly words = viewChild.required<ElementRef<HTMLTextAreaElement>>('words');

  protected readonly kinds = Object.entries(kindWords).map(([value, words]) => ({ value, words }));
  protected readonly arms = Object.entries(armWords).map(([value, words]) => ({ value, words }));
  protected readonly phases = Object.entries(phaseWords).map(([value, words]) => ({ value, words }));
  /** What can be chosen: what is offered, and what is chosen already though it was retired. */
  protected readonly offered = computed(() => {
    const chosen = this.finding().fields.observationId;
    return this.observations().filter(({ id, retired }) => !retired || id === chosen);
  });
  protected readonly readings = computed(() => {
    const { known, fields } = this.finding();
    return fields.readings.map((source) => {
      const key = JSON.stringify(source);
      const stand = known.readings.find((reading) => JSON.stringify(reading.source) === key)?.stand ?? null;
      return {
        key,
        words: stand?.words ?? 'Being read…',
        value: stand ? sayValue(stand) : '',
        plusMinus: stand ? sayPlusMinus(stand) : '',
        missing: stand?.value === null,
      };
    });
  });

  protected insert(text: string): void {
    const field = this.words().nativeElement;
    const { value, selectionStart } = field;
    const before = value.slice(0, selectionStart);
    const room = before === '' || /\s$/.test(before) ? '' : ' ';
    this.edited.emit({ words: `${before}${room}${text}${value.slice(selectionStart)}` });
    field.focus();
  }

  protected drop(key: string): void {
    const left = this.finding().fields.readings.filter((source) => JSON.stringify(source) !== key);
    this.edited.emit({ readings: left });
  }

  protected async chooseReading(): Promise<void> {
    const { athleteId, sessionId } = this.review();
    if (!sessionId) return;
    const { ReadingsDialog } = await import('./readings-dialog');
    this.dialog
      .open<unknown, ReadingsWish, ReadingSource>(ReadingsDialog, {
        data: { athleteId, sessionId },
        width: '36rem',
      })
      .afterClosed()
      .subscribe((source) => {
        const there = this.finding().fields.readings;
        const known = source && there.some((one) => JSON.stringify(one) === JSON.stringify(source));
        if (source && !known) this.edited.emit({ readings: [...there, source] });
      });
  }
}
