import { ChangeDetectionStrategy, Component, computed, input, signal } from '@angular/core';
import { RouterLink } from '@angular/router';
import type { Joint } from '@stillstroke/geometry/arm';
import { formatFigure } from '../../ui/figure/format-figure';
import { jointsInOrder, markKey, type DeskMark } from '../state/desk-mark';
import type { DeskState } from '../state/desk-state';
import { capital } from '../state/marking';

/** Every mark as a table: what the canvas draws, to be read, corrected, gone to and removed without it. */
@Component({
  selector: 'st-marks-list',
  imports: [RouterLink],
  templateUrl: './marks-list.html',
  styleUrl: './marks-list.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class MarksList {
  readonly state = input.required<DeskState>();
  /** Marks of which somebody else has another version, by `markKey`. */
  readonly disputed = input<ReadonlySet<string>>(new Set());

  protected readonly joints = jointsInOrder;
  protected readonly editing = signal<string | null>(null);

  protected readonly rows = computed(() => {
    const marks = [...this.state().marks().values()];
    return marks
      .sort((a, b) => a.frame - b.frame || a.arm.localeCompare(b.arm))
      .map((mark) => ({ mark, key: markKey(mark.arm, mark.frame), figures: this.figures(mark) }));
  });
  /**
   * The mark whose coordinates are open, there or yet to be. The fields stand in one place whichever it is, so that the
   * focus stays in them when the first coordinate makes the mark.
   */
  protected readonly edited = computed<DeskMark | null>(() => {
    const key = this.editing();
    if (key === null) return null;
    const known = this.state().marks().get(key);
    if (known) return known;
    const [arm, frame] = [this.state().arm(), this.state().frame()];
    if (markKey(arm, frame) !== key) return null;
    return { arm, frame, shoulder: null, elbow: null, wrist: null };
  });

  protected goTo({ arm, frame }: DeskMark): void {
    this.state().chooseArm(arm);
    this.state().goTo(frame);
  }

  protected edit(mark: Pick<DeskMark, 'arm' | 'frame'>): void {
    const key = markKey(mark.arm, mark.frame);
    this.editing.update((open) => (open === key ? null : key));
    if (this.editing() === null) return;
    this.state().chooseArm(mark.arm);
    this.state().goTo(mark.frame);
  }

  protected editShown(): void {
    this.edit({ arm: this.state().arm(), frame: this.state().frame() });
  }

  /** A coordinate typed; one that is typed first takes its partner from where the crosshair stands. */
  protected setCoordinate(mark: DeskMark, joint: Joint, axis: 'x' | 'y', event: Event): void {
    const field = event.target as HTMLInputElement;
    const value = field.valueAsNumber;
    if (!Number.isFinite(value)) return;
    // As it is now: the partner may have been typed since the fields were last drawn.
    const known = this.state().marks().get(markKey(mark.arm, mark.frame));
    const point = known?.[joint] ?? this.state().marking.crosshairOrMiddle();
    this.state().marking.moveJoint(mark.arm, mark.frame, joint, { ...point, [axis]: value }, 'type-joint');
  }

  protected coordinate(mark: DeskMark, joint: Joint, axis: 'x' | 'y'): string {
    const point = mark[joint];
    return point ? String(Math.round(point[axis] * 100) / 100) : '';
  }

  protected isMarked({ arm, frame }: DeskMark): boolean {
    return this.state().marks().has(markKey(arm, frame));
  }

  protected armName(mark: DeskMark): string {
    return capital(mark.arm);
  }

  private figures(mark: DeskMark): readonly string[] | null {
    const reading = this.state().readings.read(mark);
    if (!reading.ok) return null;
    const { angles, uncertainty } = reading.value;
    return [
      formatFigure(angles.forearmDeg, 'deg', uncertainty.forearmDeg),
      formatFigure(angles.upperArmDeg, 'deg', uncertainty.upperArmDeg),
      formatFigure(angles.elbowDeg, 'deg', uncertainty.elbowDeg),
      formatFigure(angles.elbowDropDeg, 'deg', uncertainty.elbowDropDeg, true),
    ];
  }
}
