import {
  afterRenderEffect,
  ChangeDetectionStrategy,
  Component,
  computed,
  DestroyRef,
  ElementRef,
  inject,
  input,
  linkedSignal,
  output,
  signal,
  viewChild,
} from '@angular/core';
import { paintStrip, type StripColours } from './strip-paint';
import { layOut, timeAt, xOf, type StripMark, type StripStroke } from './strip-scene';
import {
  following,
  frameAt,
  moved,
  typicalFrameUs,
  wholeClip,
  zoomed,
  type StripWindow,
} from './strip-window';

/**
 * The band below the stage: time along x, one lane an arm with its strokes, phases, marks and the forearm over them.
 * Click or drag goes to a frame; wheel, pinch and the buttons zoom; what is drawn is also in the lists beside the stage.
 */
@Component({
  selector: 'st-strip',
  templateUrl: './strip.html',
  styleUrl: './strip.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Strip {
  readonly timesUs = input.required<readonly number[]>();
  readonly frame = input.required<number>();
  readonly strokes = input.required<readonly StripStroke[]>();
  readonly marks = input.required<readonly StripMark[]>();

  readonly goTo = output<number>();

  private readonly canvas = viewChild.required<ElementRef<HTMLCanvasElement>>('canvas');
  private readonly host = inject<ElementRef<HTMLElement>>(ElementRef).nativeElement;
  private readonly size = signal({ width: 0, height: 0 });
  private readonly pointers = new Map<number, number>();

  private readonly whole = computed(() => wholeClip(this.timesUs()));
  private readonly frameUs = computed(() => typicalFrameUs(this.timesUs()));
  private readonly playheadUs = computed(() => this.timesUs()[this.frame()] ?? 0);
  /** What is in view: the whole clip at first, kept by hand afterwards, moved along with the playhead. */
  private readonly window = linkedSignal<{ whole: StripWindow; playhead: number }, StripWindow>({
    source: () => ({ whole: this.whole(), playhead: this.playheadUs() }),
    computation: ({ whole, playhead }, previous) =>
      previous?.source.whole === whole ? following(previous.value, whole, playhead) : whole,
  });

  protected readonly lastFrame = computed(() => Math.max(0, this.timesUs().length - 1));
  protected readonly sayFrame = computed(
    () => `Frame ${this.frame()} of ${this.lastFrame() + 1}, ${this.seconds()} seconds`,
  );
  protected readonly zoomedIn = computed(() => {
    const [seen, all] = [this.window(), this.whole()];
    return seen.toUs - seen.fromUs < all.toUs - all.fromUs - 1;
  });
  private readonly seconds = computed(() => (this.playheadUs() / 1_000_000).toFixed(2));

  constructor() {
    const watcher = new ResizeObserver(([entry]) => {
      if (entry) this.size.set({ width: entry.contentRect.width, height: entry.contentRect.height });
    });
    watcher.observe(this.host);
    inject(DestroyRef).onDestroy(() => watcher.disconnect());
    afterRenderEffect({ write: () => this.paint() });
  }

  private paint(): void {
    const size = this.size();
    const canvas = this.canvas().nativeElement;
    const context = canvas.getContext('2d');
    if (!context || size.width === 0) return;
    const ratio = globalThis.devicePixelRatio || 1;
    const [width, height] = [Math.round(size.width * ratio), Math.round(size.height * ratio)];
    if (canvas.width !== width || canvas.height !== height) Object.assign(canvas, { width, height });
    context.setTransform(ratio, 0, 0, ratio, 0, 0);
    const content = { timesUs: this.timesUs(), strokes: this.strokes(), marks: this.marks() };
    const window = this.window();
    const playhead = {
      x: xOf(this.playheadUs(), window, size),
      label: `${this.frame()} · ${this.seconds()} s`,
    };
    paintStrip(context, layOut(content, window, size), size, this.colours(), playhead);
  }

  private colours(): StripColours {
    const style = getComputedStyle(this.host);
    const of = (name: string) => style.getPropertyValue(name).trim();
    return {
      left: of('--st-left-on-picture'),
      right: of('--st-right-on-picture'),
      quiet: of('--strip-quiet'),
      line: of('--strip-line'),
      text: of('--strip-text'),
      ground: of('--strip-ground'),
    };
  }

  protected pressPointer(event: PointerEvent): void {
    if (event.button !== 0) return;
    (event.target as HTMLElement).setPointerCapture(event.pointerId);
    this.pointers.set(event.pointerId, event.offsetX);
    if (this.pointers.size === 1) this.goToPlace(event.offsetX);
  }

  protected movePointer(event: PointerEvent): void {
    const before = this.pointers.get(event.pointerId);
    if (before === undefined) return;
    if (this.pointers.size === 2) this.pinch(event, before);
    else this.goToPlace(event.offsetX);
    this.pointers.set(event.pointerId, event.offsetX);
  }

  protected releasePointer(event: PointerEvent): void {
    this.pointers.delete(event.pointerId);
  }

  /** Wheel zooms at the pointer; sideways or with Shift it moves along the clip. */
  protected turnWheel(event: WheelEvent): void {
    event.preventDefault();
    const sideways = event.shiftKey ? event.deltaY : event.deltaX;
    if (Math.abs(sideways) > Math.abs(event.shiftKey ? 0 : event.deltaY)) {
      this.window.update((window) =>
        moved(window, this.whole(), (sideways / this.size().width) * (window.toUs - window.fromUs)),
      );
    } else {
      this.zoomAt(Math.exp(-event.deltaY / 300), event.offsetX);
    }
  }

  protected zoomAtPlayhead(factor: number): void {
    this.zoomAt(factor, xOf(this.playheadUs(), this.window(), this.size()));
  }

  protected showWhole(): void {
    this.window.set(this.whole());
  }

  private pinch(event: PointerEvent, before: number): void {
    const other = [...this.pointers].find(([id]) => id !== event.pointerId)?.[1];
    if (other === undefined || before === other) return;
    const factor = Math.abs(event.offsetX - other) / Math.abs(before - other);
    if (factor > 0.2 && factor < 5) this.zoomAt(factor, (event.offsetX + other) / 2);
  }

  private zoomAt(factor: number, x: number): void {
    const size = this.size();
    this.window.update((window) => {
      const share = (timeAt(x, window, size) - window.fromUs) / (window.toUs - window.fromUs);
      return zoomed(window, this.whole(), this.frameUs(), factor, Math.min(1, Math.max(0, share)));
    });
  }

  private goToPlace(x: number): void {
    this.goTo.emit(frameAt(this.timesUs(), timeAt(x, this.window(), this.size())));
  }
}
