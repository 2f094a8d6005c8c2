import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { FormControl, FormGroup, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButtonModule } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInputModule } from '@angular/material/input';
import { MatSelectModule } from '@angular/material/select';
import type { Measure } from '@stillstroke/contract/measures';
import type { Problem } from '@stillstroke/contract/problem';
import {
  createTarget,
  targetArmSchema,
  targetSchema,
  updateTarget,
  type Target,
  type TargetArm,
} from '@stillstroke/contract/targets';
import { Api } from '../core/api/api';
import { Sending } from '../core/api/sending';
import { onScreen, unitOf } from '../ui/figure/format-figure';
import { measuresInOrder, measureWords } from '../ui/figure/measure-words';
import { sayBand, targetArmWords } from '../ui/target/target-words';

export interface TargetDialogData {
  readonly athleteId: string;
  /** The target to change; null = a new one. */
  readonly target: Target | null;
}

const unitLabels: Readonly<Record<string, string>> = {
  share: 'percent',
  deg: 'degrees',
  perMinute: 'a minute',
  m: 'metres',
  m2PerS: 'm²/s',
};
/** Where coaches often want the forearm vertical; no published source is known. */
const firstThird = {
  to: 33.3,
  words: 'Within the first third of the pull (common practice, no published source)',
};

/** Sets a band for a measure, or changes its ends and words. */
@Component({
  selector: 'st-target-dialog',
  imports: [
    MatButtonModule,
    MatDialogModule,
    MatFormFieldModule,
    MatInputModule,
    MatSelectModule,
    ReactiveFormsModule,
  ],
  templateUrl: './target-dialog.html',
  styleUrl: './target-dialog.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class TargetDialog {
  private readonly api = inject(Api);
  private readonly ref = inject<MatDialogRef<TargetDialog, Target>>(MatDialogRef);
  private readonly data = inject<TargetDialogData>(MAT_DIALOG_DATA);

  protected readonly target = this.data.target;
  protected readonly measures = measuresInOrder.map((measure) => ({
    measure,
    name: measureWords[measure].name,
  }));
  protected readonly arms = targetArmSchema.options.map((arm) => ({ arm, name: targetArmWords[arm] }));
  protected readonly form = new FormGroup({
    measure: new FormControl<Measure>(this.target?.measure ?? 'verticalAt', { nonNullable: true }),
    arm: new FormControl<TargetArm>(this.target?.arm ?? 'both', { nonNullable: true }),
    from: new FormControl(this.shown(this.target?.low)),
    to: new FormControl(this.shown(this.target?.high)),
    words: new FormControl(this.target?.words ?? '', {
      nonNullable: true,
      validators: [Validators.required, Validators.pattern(/\S/)],
    }),
  });
  private readonly measure = toSignal(this.form.controls.measure.valueChanges, {
    initialValue: this.form.controls.measure.value,
  });
  protected readonly unit = computed(() => unitLabels[unitOf[this.measure()]] ?? '');
  protected readonly explains = computed(() => measureWords[this.measure()].explains);
  protected readonly offersThird = computed(() => this.measure() === 'verticalAt');
  protected readonly title = this.target
    ? `${measureWords[this.target.measure].name}, ${targetArmWords[this.target.arm]}`
    : 'Set a target';
  protected readonly change = new Sending();
  /** What somebody else saved meanwhile; saving again replaces it. */
  protected readonly meanwhile = signal<Target | null>(null);
  protected readonly meanwhileWords = computed(() => {
    const there = this.meanwhile();
    return there && `Now there: ${sayBand(there)}, “${there.words}”. Save again to put yours in its place.`;
  });

  protected takeThird(): void {
    this.form.patchValue({ from: null, to: firstThird.to, words: firstThird.words });
  }

  protected save(): void {
    this.form.markAllAsTouched();
    if (this.form.invalid) return;
    const { measure, arm, from, to, words } = this.form.getRawValue();
    const band = { low: this.inUnit(from), high: this.inUnit(to), words };
    const call = this.target
      ? this.api.call(updateTarget, {
          params: { id: this.target.id },
          body: { ...band, version: this.meanwhile()?.version ?? this.target.version },
        })
      : this.api.call(createTarget, {
          params: { id: this.data.athleteId },
          body: { ...band, measure, arm },
        });
    this.change.send(
      call,
      (saved) => this.ref.close(saved),
      (problem) => this.lookAt(problem),
    );
  }

  private lookAt({ code, current }: Problem): void {
    const there = targetSchema.safeParse(current);
    if (code === 'changed-meanwhile' && there.success) this.meanwhile.set(there.data);
  }

  private shown(end: number | null | undefined): number | null {
    if (end === null || end === undefined || !this.target) return null;
    return rounded(onScreen(end, unitOf[this.target.measure]));
  }

  private inUnit(typed: number | null): number | null {
    if (typed === null) return null;
    return rounded(typed / onScreen(1, unitOf[this.form.controls.measure.value]));
  }
}

/** Without what halving and hundredths leave behind in floating point. */
const rounded = (value: number) => Number(value.toFixed(6));
