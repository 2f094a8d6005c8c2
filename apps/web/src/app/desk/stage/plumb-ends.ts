import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import type { PlumbLine } from '@stillstroke/geometry/calibration/plumb';
import type { PlumbEnd } from '../tools/tool-port';
import { asPicturePoint, picturePoint } from './spaces';
import { StageController } from './stage-controller';
import type { StageState } from './stage-state';
import { leanText } from './plumb-nodes';
import { insidePicture, toStage } from './view-transform';

/** Picture pixels of one arrow press, and of one with Shift. */
const STEP = 1;
const LEAP = 10;
const ARROWS: Readonly<Record<string, readonly [number, number]>> = {
  ArrowLeft: [-1, 0],
  ArrowRight: [1, 0],
  ArrowUp: [0, -1],
  ArrowDown: [0, 1],
};

/**
 * The two ends of the plumb for the keyboard, while it is drawn: arrows move an end, Enter saves. A clip without a plumb
 * begins with an upright one in the middle.
 */
@Component({
  selector: 'st-plumb-ends',
  template: `
    @for (end of ends(); track end.name) {
      <button
        type="button"
        [style.transform]="end.place"
        [attr.aria-label]="end.label"
        (keydown)="nudge(end.name, $event)"
      ></button>
    }
  `,
  styles: `
    button {
      position: absolute;
      top: -14px;
      left: -14px;
      width: 28px;
      height: 28px;
      padding: 0;
      border: 0;
      border-radius: 50%;
      background: none;
      pointer-events: none;
    }

    button:focus-visible {
      outline: 2px solid #fff;
      outline-offset: 3px;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PlumbEnds {
  private readonly controller = inject(StageController);

  readonly desk = input.required<StageState>();

  private readonly plumb = computed(() => this.desk().plumb() ?? uprightIn(this.desk().picture()));
  protected readonly ends = computed(() => {
    const plumb = this.plumb();
    const lean = leanText(plumb) ?? 'too short';
    return (['top', 'bottom'] as const).map((name) => {
      const { x, y } = toStage(this.controller.view(), asPicturePoint(plumb[name]));
      const which = name === 'top' ? 'Upper' : 'Lower';
      return {
        name,
        place: `translate(${x}px, ${y}px)`,
        label: `${which} end of the plumb, ${lean}. Arrow keys move it, Enter saves.`,
      };
    });
  });

  protected nudge(end: PlumbEnd, event: KeyboardEvent): void {
    const arrow = ARROWS[event.key];
    if (event.key === 'Enter') this.desk().savePlumb(this.plumb());
    else if (arrow && !event.altKey) this.move(end, arrow, event.shiftKey ? LEAP : STEP);
    else return;
    event.preventDefault();
    event.stopPropagation();
  }

  private move(end: PlumbEnd, [x, y]: readonly [number, number], by: number): void {
    const plumb = this.plumb();
    const moved = picturePoint(plumb[end].x + x * by, plumb[end].y + y * by);
    this.desk().previewPlumb({ ...plumb, [end]: insidePicture(moved, this.desk().picture()) });
  }
}

function uprightIn({ width, height }: { readonly width: number; readonly height: number }): PlumbLine {
  return { top: { x: width / 2, y: height * 0.2 }, bottom: { x: width / 2, y: height * 0.8 } };
}
