import {
  ChangeDetectionStrategy,
  Component,
  computed,
  ElementRef,
  inject,
  input,
  output,
} from '@angular/core';
import type { DeskState } from '../state/desk-state';
import type { ScalePoint, ScalePointName } from '../state/scale-points';
import { sayMetres } from '../../ui/figure/say-metres';
import { asPicturePoint, picturePoint, stagePoint, type PicturePoint, type StagePoint } from './spaces';
import { StageController } from './stage-controller';
import { toPicture, toStage } from './view-transform';
import type { ToolPointer } from '../tools/tool-port';

/** Picture pixels of one arrow press, and of one with Shift. */
const STEP = 1;
const LEAP = 10;
const ARROWS: Readonly<Record<string, readonly [number, number]>> = {
  ArrowLeft: [-1, 0],
  ArrowRight: [1, 0],
  ArrowUp: [0, -1],
  ArrowDown: [0, 1],
};

/** A point that a pointer holds: where it was taken, so that it does not jump under a finger. */
interface Held {
  readonly name: ScalePointName;
  readonly pointer: number;
  readonly offset: { readonly x: number; readonly y: number };
}

/** The scale and the measuring line over the picture, and the points of both to drag or to move with the arrow keys. */
@Component({
  selector: 'st-scale-overlay',
  template: `
    <svg aria-hidden="true" focusable="false">
      @for (shape of shapes(); track shape.name) {
        <polyline class="casing" [attr.points]="shape.points" />
        <polyline [class]="'line ' + shape.name" [attr.points]="shape.points" />
        @if (shape.label) {
          <text class="halo" [attr.x]="shape.at.x" [attr.y]="shape.at.y">{{ shape.label }}</text>
          <text [attr.x]="shape.at.x" [attr.y]="shape.at.y">{{ shape.label }}</text>
        }
      }
    </svg>
    @for (handle of handles(); track handle.name) {
      <button
        type="button"
        [class]="handle.name"
        [style.transform]="handle.place"
        [attr.aria-label]="handle.label"
        (pointerdown)="take(handle, $event)"
        (pointermove)="drag($event)"
        (pointerup)="drop($event)"
        (pointercancel)="letGo()"
        (keydown)="nudge(handle, $event)"
      ></button>
    }
  `,
  styleUrl: './scale-overlay.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ScaleOverlay {
  private readonly controller = inject(StageController);
  private readonly host = inject<ElementRef<HTMLElement>>(ElementRef).nativeElement;
  private held: Held | null = null;

  readonly state = input.required<DeskState>();
  /** The place that the loupe is to show; null puts it away. */
  readonly inspect = output<{ readonly point: PicturePoint; readonly pointer: ToolPointer } | null>();

  protected readonly shapes = computed(() => {
    const { scale, line, measured } = this.state().scale;
    const shapes = [];
    const known = scale();
    if (known?.kind === 'length') {
      shapes.push(this.shape('known', [known.from, known.to], `${known.metres} m`));
    } else if (known) {
      const [a, b, c, d] = known.corners;
      shapes.push(this.shape('known', [a, b, c, d, a], `${known.widthM} × ${known.heightM} m`));
    }
    if (known?.check) {
      shapes.push(this.shape('check', [known.check.from, known.check.to], `${known.check.metres} m`));
    }
    const ends = line();
    const read = measured();
    if (ends) {
      const label = read?.ok ? sayMetres(read.value.metres, read.value.uncertaintyM) : '';
      shapes.push(this.shape('measuring', [ends.from, ends.to], label));
    }
    return shapes;
  });
  protected readonly handles = computed(() =>
    this.state()
      .scale.points()
      .map((point) => {
        const { x, y } = toStage(this.controller.view(), asPicturePoint(point.point));
        return {
          ...point,
          label: `${point.label}, ${Math.round(point.point.x)} from the left, ${Math.round(point.point.y)} from above. Arrow keys move it.`,
          place: `translate(${x}px, ${y}px)`,
        };
      }),
  );

  protected take({ name, point }: ScalePoint, event: PointerEvent): void {
    if (this.held || event.button !== 0) return;
    const at = toStage(this.controller.view(), asPicturePoint(point));
    const pressed = this.onStage(event);
    this.held = {
      name,
      pointer: event.pointerId,
      offset: { x: at.x - pressed.x, y: at.y - pressed.y },
    };
    (event.target as HTMLElement).setPointerCapture(event.pointerId);
  }

  protected drag(event: PointerEvent): void {
    const held = this.held;
    if (held?.pointer !== event.pointerId) return;
    const pressed = this.onStage(event);
    const at = stagePoint(pressed.x + held.offset.x, pressed.y + held.offset.y);
    const point = this.near(toPicture(this.controller.view(), at));
    this.state().scale.previewPoint(held.name, plain(point));
    const kind = event.pointerType === 'touch' || event.pointerType === 'pen' ? event.pointerType : 'mouse';
    this.inspect.emit({ point, pointer: { id: event.pointerId, kind, at: pressed, pans: false } });
  }

  protected drop(event: PointerEvent): void {
    if (this.held?.pointer !== event.pointerId) return;
    const { name } = this.held;
    this.held = null;
    this.inspect.emit(null);
    if (!name.startsWith('line')) this.state().scale.commitPreview();
  }

  protected letGo(): void {
    this.held = null;
    this.inspect.emit(null);
    this.state().scale.dropPreview();
  }

  protected nudge({ name, point }: ScalePoint, event: KeyboardEvent): void {
    const arrow = ARROWS[event.key];
    if (event.key === 'Escape' || event.key === 'Enter') {
      if (this.held) this.letGo();
      this.state().scale.stopPlacing();
    } else if (arrow && !event.altKey) {
      const by = event.shiftKey ? LEAP : STEP;
      const moved = this.near(picturePoint(point.x + arrow[0] * by, point.y + arrow[1] * by));
      this.state().scale.movePoint(name, plain(moved), 'nudge-scale');
    } else return;
    event.preventDefault();
    event.stopPropagation();
  }

  private shape(name: string, points: readonly { readonly x: number; readonly y: number }[], label: string) {
    const placed = points.map((point) => toStage(this.controller.view(), asPicturePoint(point)));
    const [first, second] = placed;
    const at = {
      x: ((first?.x ?? 0) + (second?.x ?? 0)) / 2,
      y: ((first?.y ?? 0) + (second?.y ?? 0)) / 2 - 8,
    };
    return { name, label, at, points: placed.map(({ x, y }) => `${x},${y}`).join(' ') };
  }

  /** A known thing may be cut off by the picture's edge: points may lie a little outside. */
  private near({ x, y }: PicturePoint): PicturePoint {
    const { width, height } = this.state().clip();
    const within = (value: number, side: number) => Math.min(1.4 * side, Math.max(-0.4 * side, value));
    return picturePoint(within(x, width), within(y, height));
  }

  private onStage(event: PointerEvent): StagePoint {
    const box = this.host.getBoundingClientRect();
    return stagePoint(event.clientX - box.left, event.clientY - box.top);
  }
}

/** What goes to the server: coordinates to a hundredth of a pixel, and nothing else. */
function plain({ x, y }: PicturePoint): { x: number; y: number } {
  return { x: Math.round(x * 100) / 100, y: Math.round(y * 100) / 100 };
}
