import {
  afterRenderEffect,
  ChangeDetectionStrategy,
  Component,
  computed,
  DestroyRef,
  type ElementRef,
  inject,
  input,
  signal,
  viewChild,
} from '@angular/core';
import { Circle, Group, KonvaStage, Layer } from '../../desk/stage/konva-core';
import { drawingNodes } from './drawing-nodes';
import { type DrawingKind, type DrawingList, pointsOf, withPoint } from './drawing-list';

/** CSS pixels within which a handle is taken hold of. */
const REACH = 18;
/** A press that moved less than this (CSS pixels) drew nothing. */
const LEAST = 6;

interface Place {
  readonly x: number;
  readonly y: number;
}

/** The still as it will be, to draw on with a pointer. Everything on it is also in the list beside it, for the keyboard. */
@Component({
  selector: 'st-still-board',
  template: `
    <canvas #picture></canvas>
    <div
      #sheet
      class="sheet"
      [class.draws]="tool() !== null"
      (pointerdown)="press($event)"
      (pointermove)="drag($event)"
      (pointerup)="lift($event)"
      (pointercancel)="lift($event)"
    ></div>
  `,
  styles: `
    :host {
      position: relative;
      display: block;
      background: var(--st-ink);
    }

    canvas {
      display: block;
      width: 100%;
      height: auto;
    }

    .sheet {
      position: absolute;
      inset: 0;
      touch-action: pan-y;

      &.draws {
        cursor: crosshair;
        touch-action: none;
      }
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class StillBoard {
  /** Frames and overlays, in full size. */
  readonly frames = input.required<HTMLCanvasElement>();
  readonly list = input.required<DrawingList>();
  /** What a drag on the picture draws; null: nothing. */
  readonly tool = input<DrawingKind | null>(null);

  private readonly picture = viewChild.required<ElementRef<HTMLCanvasElement>>('picture');
  private readonly sheet = viewChild.required<ElementRef<HTMLDivElement>>('sheet');
  private readonly width = signal(0);
  private readonly scale = computed(() => (this.width() || 1) / this.frames().width);
  private konva: { stage: KonvaStage; layer: Layer } | null = null;
  private held: { point: number } | { from: Place; drawing: boolean } | null = null;

  constructor() {
    const destroyed = inject(DestroyRef);
    afterRenderEffect({ write: () => this.drawPicture() });
    afterRenderEffect({ write: () => this.drawSheet() });
    afterRenderEffect({
      write: (onCleanup) => {
        const element = this.sheet().nativeElement;
        const observer = new ResizeObserver(([entry]) => this.width.set(entry?.contentRect.width ?? 0));
        observer.observe(element);
        onCleanup(() => observer.disconnect());
      },
    });
    destroyed.onDestroy(() => this.konva?.stage.destroy());
  }

  protected press(event: PointerEvent): void {
    if (event.button !== 0) return;
    const at = this.placeOf(event);
    const point = this.handleAt(at);
    if (point === null && this.tool() === null) return;
    this.sheet().nativeElement.setPointerCapture(event.pointerId);
    this.list().hold();
    this.held = point === null ? { from: at, drawing: false } : { point };
  }

  protected drag(event: PointerEvent): void {
    const held = this.held;
    if (!held) return;
    const at = this.placeOf(event);
    if ('point' in held) {
      this.move(held.point, at);
      return;
    }
    const tool = this.tool();
    if (!tool) return;
    if (!held.drawing) {
      if (Math.hypot(at.x - held.from.x, at.y - held.from.y) * this.scale() < LEAST) return;
      this.held = { ...held, drawing: true };
      this.list().drawn(tool, held.from, at);
    }
    const last = tool === 'words' ? 0 : 1;
    this.move(last, at);
  }

  protected lift(event: PointerEvent): void {
    const held = this.held;
    if (!held) return;
    const tool = this.tool();
    // Words need no drag: a press says where they stand.
    if (!('point' in held) && !held.drawing && tool === 'words' && event.type === 'pointerup')
      this.list().drawn(tool, held.from, held.from);
    this.held = null;
    this.list().release();
  }

  private move(point: number, at: Place): void {
    const list = this.list();
    const chosen = list.chosen();
    const drawing = chosen === null ? undefined : list.drawings()[chosen];
    if (chosen !== null && drawing) list.change(chosen, withPoint(drawing, point, at, this.frames()));
  }

  /** Index of the chosen thing's point under a place of the still; null when there is none. */
  private handleAt({ x, y }: Place): number | null {
    const chosen = this.list().chosen();
    const drawing = chosen === null ? undefined : this.list().drawings()[chosen];
    if (!drawing) return null;
    const away = pointsOf(drawing).map((point) => Math.hypot(point.x - x, point.y - y) * this.scale());
    const nearest = Math.min(...away);
    return nearest <= REACH ? away.indexOf(nearest) : null;
  }

  private placeOf(event: PointerEvent): Place {
    const { left, top } = this.sheet().nativeElement.getBoundingClientRect();
    return { x: (event.clientX - left) / this.scale(), y: (event.clientY - top) / this.scale() };
  }

  private drawPicture(): void {
    const [frames, canvas] = [this.frames(), this.picture().nativeElement];
    canvas.width = frames.width;
    canvas.height = frames.height;
    canvas.getContext('2d')?.drawImage(frames, 0, 0);
  }

  private drawSheet(): void {
    const { width, height } = this.frames();
    const [drawings, chosen, scale] = [this.list().drawings(), this.list().chosen(), this.scale()];
    const { stage, layer } = this.opened();
    stage.size({ width: Math.max(1, width * scale), height: Math.max(1, height * scale) });
    layer.destroyChildren();
    const things = drawingNodes(drawings, { width, height });
    things.scale({ x: scale, y: scale });
    layer.add(things);
    const held = chosen === null ? undefined : drawings[chosen];
    if (held) {
      const handles = new Group({ listening: false });
      for (const { x, y } of pointsOf(held))
        handles.add(
          new Circle({ x: x * scale, y: y * scale, radius: 8, stroke: '#10222b', strokeWidth: 4 }),
          new Circle({ x: x * scale, y: y * scale, radius: 8, stroke: '#ffffff', strokeWidth: 2 }),
        );
      layer.add(handles);
    }
    layer.draw();
  }

  private opened(): { stage: KonvaStage; layer: Layer } {
    if (!this.konva) {
      const container = this.sheet().nativeElement;
      const stage = new KonvaStage({ container, width: 1, height: 1, listening: false });
      const layer = new Layer({ listening: false });
      stage.add(layer);
      this.konva = { stage, layer };
    }
    return this.konva;
  }
}
