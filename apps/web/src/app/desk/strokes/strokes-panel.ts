import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { sourceOf } from '@stillstroke/geometry/events/event-moment';
import type { DeskState } from '../state/desk-state';
import { eventsInOrder, isWhole, nameStroke, type DeskStroke, type EventName } from '../state/desk-stroke';
import { capital } from '../state/marking';
import { eventWords } from '../state/desk-stroke';
import { needWords } from '../state/next-to-mark';

/** The strokes with their events: set on the shown frame, go there, breath, and what is still to be marked. */
@Component({
  selector: 'st-strokes-panel',
  templateUrl: './strokes-panel.html',
  styleUrl: './strokes-panel.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class StrokesPanel {
  readonly state = input.required<DeskState>();

  protected readonly events: readonly {
    readonly name: EventName;
    readonly label: string;
    readonly key: string;
  }[] = [
    { name: 'entry', label: 'Entry', key: 'E' },
    { name: 'catch', label: 'Catch', key: 'C' },
    { name: 'exit', label: 'Exit', key: 'X' },
    { name: 'nextEntry', label: 'Next entry', key: 'R' },
  ];

  protected readonly strokes = computed(() => {
    const state = this.state();
    return state.strokes().map((stroke) => ({
      stroke,
      name: nameStroke(state.strokes(), stroke),
      here: stroke.id === state.currentStroke()?.id,
      draft: !isWhole(stroke),
      events: eventsInOrder.map((event) => ({
        event,
        label: capital(eventWords[event]),
        frame: stroke[event],
        byWrist: sourceOf(stroke, event) === 'wrist-proxy',
        says: `${sourceOf(stroke, event) === 'wrist-proxy' ? 'Wrist' : 'Hand'} at the ${eventWords[event]}`,
      })),
      midPull: this.midPull(stroke),
      needed: state.stillToMark(stroke).map(({ need, frame }) => ({ frame, label: needWords[need] })),
    }));
  });

  protected goTo(frame: number, stroke: DeskStroke): void {
    this.state().chooseArm(stroke.arm);
    this.state().goTo(frame);
  }

  private midPull({ id }: DeskStroke): number | null {
    const midPull = this.state().readings.measures().get(id)?.midPull;
    return midPull?.ok ? midPull.value.frame : null;
  }
}
