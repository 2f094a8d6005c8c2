import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatProgressBarModule } from '@angular/material/progress-bar';
import { MatRadioModule } from '@angular/material/radio';
import { MatSelectModule } from '@angular/material/select';
import type { ExportFile } from '@stillstroke/contract/export';
import {
  importFile,
  previewImport,
  type ImportChoice,
  type ImportClip,
  type ImportPreview,
} from '@stillstroke/contract/import';
import type { Session } from '@stillstroke/contract/sessions';
import { firstValueFrom } from 'rxjs';
import { Api } from '../core/api/api';
import { problemOf } from '../core/api/problem-of';
import { sayDate } from '../ui/say-date';
import { BringInUndo } from './bring-in-undo';
import { hasChange, hasConflict, sayBroughtIn, sayCounts, sayFigures, saySetUp } from './bring-in-words';
import { readExportFile } from './read-export-file';

export interface BringInWish {
  readonly session: Session;
  /** Something was brought in, or taken back again. */
  readonly changed: () => void;
}

/** Brings an exported JSON file back onto the clips of a session: choose, look at what would change, decide, undo. */
@Component({
  selector: 'st-bring-in-dialog',
  imports: [
    MatButtonModule,
    MatDialogModule,
    MatFormFieldModule,
    MatProgressBarModule,
    MatRadioModule,
    MatSelectModule,
  ],
  templateUrl: './bring-in-dialog.html',
  styleUrl: './bring-in-dialog.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class BringInDialog {
  private readonly api = inject(Api);
  private readonly undo = inject(BringInUndo);
  private readonly ref = inject<MatDialogRef<BringInDialog>>(MatDialogRef);
  private readonly wish = inject<BringInWish>(MAT_DIALOG_DATA);
  private readonly session = this.wish.session;
  private readonly params = { id: this.session.id };

  private readonly file = signal<ExportFile | null>(null);
  /** Which clip goes where, as far as the person has said so; null leaves it out. */
  private readonly chosen = signal<ReadonlyMap<string, string | null>>(new Map());
  protected readonly fileName = signal<string | null>(null);
  protected readonly preview = signal<ImportPreview | null>(null);
  protected readonly choice = signal<ImportChoice | null>(null);
  protected readonly busy = signal<'looking' | 'writing' | null>(null);
  protected readonly refusal = signal<string | null>(null);

  protected readonly when = sayDate(this.session.date);
  protected readonly going = computed(() => this.preview()?.clips.filter(({ to }) => to) ?? []);
  protected readonly conflict = computed(() => this.going().some(hasConflict));
  private readonly changes = computed(() => this.going().some(hasChange));
  protected readonly ready = computed(
    () =>
      this.busy() === null &&
      this.changes() &&
      this.going().every(({ refusal }) => refusal === null) &&
      (!this.conflict() || this.choice() !== null),
  );
  /** Why nothing can be brought in yet, where that is not plain from the page. */
  protected readonly hint = computed(() => {
    const preview = this.preview();
    if (!preview) return null;
    if (preview.clips.length === 0) return 'The file holds no clip.';
    if (this.going().length === 0)
      return preview.ours.length === 0
        ? 'There is no clip in this session yet. Upload the film first, then bring the file in.'
        : 'No clip of the file is of a film in this session. Upload the film, or choose the clip it goes onto.';
    return this.changes() ? null : 'Everything in the file is here already.';
  });

  /** An option has to have a value, or its words are not shown when it is the chosen one. */
  protected readonly nowhere = 'nowhere';
  protected readonly sayCounts = sayCounts;
  protected readonly saySetUp = saySetUp;
  protected readonly sayFigures = sayFigures;
  protected readonly sayDate = sayDate;

  protected async choose(field: HTMLInputElement): Promise<void> {
    const [file] = field.files ?? [];
    // So that choosing the same file again counts as a choice.
    field.value = '';
    if (!file) return;
    this.preview.set(null);
    this.choice.set(null);
    this.chosen.set(new Map());
    this.refusal.set(null);
    this.fileName.set(file.name);
    try {
      this.file.set(await readExportFile(file));
    } catch (error) {
      this.refusal.set(error instanceof Error ? error.message : 'The file cannot be read.');
      return;
    }
    await this.look();
  }

  protected async putOnto(clip: ImportClip, to: string): Promise<void> {
    const onto = to === this.nowhere ? null : to;
    this.chosen.update((chosen) => new Map(chosen).set(clip.from.id, onto));
    await this.look();
  }

  protected async bringIn(): Promise<void> {
    const file = this.file();
    const preview = this.preview();
    if (!file || !preview || !this.ready()) return;
    this.busy.set('writing');
    this.ref.disableClose = true;
    this.refusal.set(null);
    try {
      const before = await this.undo.before(this.session.id);
      const body = {
        file,
        pairs: this.pairs(),
        choice: this.choice() ?? ('add' as const),
        basis: preview.basis,
      };
      const done = await firstValueFrom(this.api.call(importFile, { params: this.params, body }));
      this.wish.changed();
      this.undo.offer(
        sayBroughtIn(done.clips),
        { session: this.session.id, before, basis: done.basis },
        this.wish.changed,
      );
      this.ref.close();
    } catch (error) {
      await this.refused(error);
    }
  }

  private async look(): Promise<void> {
    const file = this.file();
    if (!file) return;
    this.busy.set('looking');
    this.refusal.set(null);
    try {
      const body = { file, pairs: this.pairs() };
      this.preview.set(await firstValueFrom(this.api.call(previewImport, { params: this.params, body })));
      this.busy.set(null);
    } catch (error) {
      this.busy.set(null);
      this.refusal.set(problemOf(error).detail);
    }
  }

  /** Somebody was quicker: what would change is looked at again before anything is written. */
  private async refused(error: unknown): Promise<void> {
    const { code, detail } = problemOf(error);
    this.busy.set(null);
    this.ref.disableClose = false;
    if (code === 'changed-meanwhile') {
      await this.look();
      this.refusal.set(
        'Somebody changed this session meanwhile. Look at what would change now, then decide.',
      );
      return;
    }
    this.refusal.set(detail);
  }

  private pairs(): { from: string; to: string | null }[] {
    return [...this.chosen()].map(([from, to]) => ({ from, to }));
  }
}
