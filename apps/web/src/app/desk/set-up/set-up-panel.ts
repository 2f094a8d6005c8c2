import { ChangeDetectionStrategy, Component, computed, input, output } from '@angular/core';
import type { Travel, View } from '@stillstroke/contract/clip-facts';
import { cameraRoll, type PlumbLine } from '@stillstroke/geometry/calibration/plumb';
import { travelWords, viewWords } from '../clip-words';
import type { DeskState } from '../state/desk-state';
import { KnownDistancePart } from './known-distance';

type Coordinate = readonly [end: 'top' | 'bottom', axis: 'x' | 'y'];

/** View, travel, plumb and capture rate of the clip. Each is saved as it is set; all can be skipped. */
@Component({
  selector: 'st-set-up-panel',
  imports: [KnownDistancePart],
  templateUrl: './set-up-panel.html',
  styleUrl: './set-up-panel.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SetUpPanel {
  readonly state = input.required<DeskState>();
  /** Shown on the first visit: the way past it. */
  readonly canSkip = input(false);

  readonly skip = output();

  protected readonly views = Object.entries(viewWords) as [View, string][];
  protected readonly travels = Object.entries(travelWords) as [Travel, string][];
  protected readonly coordinates: readonly { readonly at: Coordinate; readonly name: string }[] = [
    { at: ['top', 'x'], name: 'Top, from the left' },
    { at: ['top', 'y'], name: 'Top, from above' },
    { at: ['bottom', 'x'], name: 'Foot, from the left' },
    { at: ['bottom', 'y'], name: 'Foot, from above' },
  ];
  protected readonly rates = [
    { value: 1, name: 'As filmed' },
    { value: 0.5, name: 'Half speed' },
    { value: 0.25, name: 'Quarter speed' },
    { value: 0.125, name: 'Eighth speed' },
  ];

  protected readonly facts = computed(() => this.state().setUp.facts());
  protected readonly lean = computed(() => {
    const roll = cameraRoll(this.state().plumb());
    if (!roll.ok || roll.value.assumed) return null;
    const deg = roll.value.rollDeg;
    if (Math.abs(deg) < 0.05) return 'The picture stands upright.';
    return `The plumb leans ${Math.abs(deg).toFixed(1)}° to the ${deg > 0 ? 'right' : 'left'} in the picture, from top to foot.`;
  });

  protected setView(event: Event): void {
    this.state().setUp.setClipFacts({ view: valueOf(event) as View });
  }

  protected setTravel(travel: Travel): void {
    this.state().setUp.setClipFacts({ travel });
  }

  protected setRate(event: Event): void {
    this.state().setUp.setClipFacts({ captureRateFactor: Number(valueOf(event)) });
  }

  protected chooseRate(captureRateFactor: number): void {
    this.state().setUp.setClipFacts({ captureRateFactor });
  }

  protected coordinate([end, axis]: Coordinate): string {
    const plumb = this.state().plumb();
    return plumb ? String(Math.round(plumb[end][axis] * 10) / 10) : '';
  }

  /** By keyboard: a line down the middle of the picture to begin with, one end moved at a time. */
  protected setCoordinate([end, axis]: Coordinate, event: Event): void {
    const value = Number(valueOf(event));
    if (!Number.isFinite(value)) return;
    const plumb = this.state().plumb() ?? this.middle();
    this.state().setUp.setPlumb({ ...plumb, [end]: { ...plumb[end], [axis]: value } });
  }

  private middle(): PlumbLine {
    const { width, height } = this.state().clip();
    return { top: { x: width / 2, y: height * 0.1 }, bottom: { x: width / 2, y: height * 0.9 } };
  }
}

function valueOf(event: Event): string {
  return (event.target as HTMLInputElement | HTMLSelectElement).value;
}
