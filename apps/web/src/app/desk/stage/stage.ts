import {
  afterNextRender,
  afterRenderEffect,
  ChangeDetectionStrategy,
  Component,
  computed,
  DestroyRef,
  ElementRef,
  inject,
  input,
  signal,
  untracked,
  viewChild,
} from '@angular/core';
import type { DeskState } from '../state/desk-state';
import { ClipFrames } from './clip-frames';
import type { TheirMark } from './desk-stage';
import type { Box } from './label-place';
import { MarkSurface } from './mark-surface';
import { feedPointers } from './pointer-feed';
import { stageColours } from './stage-colours';
import { StageController } from './stage-controller';
import { drawLoupe, drawMoving, drawPicture, drawResting } from './stage-drawing';
import { followDesk } from './stage-following';
import { StageModel } from './stage-model';
import { PlumbEnds } from './plumb-ends';
import { ScaleOverlay } from './scale-overlay';
import { stageWords, troubleTitle } from './stage-words';

let stagesMade = 0;
const CAPTION_WIDTH = 230;

/**
 * The picture with the marks on it. Signals in, drawing out: pointers and frames only write signals, and every drawing
 * happens after rendering, in the same display frame. The page around it provides `stageProviders`.
 */
@Component({
  selector: 'st-stage',
  imports: [PlumbEnds, ScaleOverlay],
  templateUrl: './stage.html',
  styleUrl: './stage.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
  host: {
    tabindex: '0',
    role: 'region',
    'aria-label': 'Stage: the picture with its marks',
    '[attr.aria-describedby]': 'wordsId',
    '(keydown.escape)': 'cancel($event)',
    '(focus)': 'aimByKeyboard()',
  },
})
export class Stage {
  protected readonly controller = inject(StageController);
  private readonly frames = inject(ClipFrames);
  private readonly host = inject<ElementRef<HTMLElement>>(ElementRef).nativeElement;

  readonly state = input.required<DeskState>();
  /** Marks that someone else saved meanwhile and that are to be settled. */
  readonly theirs = input<readonly TheirMark[]>([]);

  private readonly pictureElement = viewChild.required<ElementRef<HTMLCanvasElement>>('pictureCanvas');
  private readonly marksElement = viewChild.required<ElementRef<HTMLDivElement>>('marks');
  private readonly pointersElement = viewChild.required<ElementRef<HTMLElement>>('pointers');
  private readonly loupeElement = viewChild.required<ElementRef<HTMLCanvasElement>>('loupeCanvas');

  protected readonly model = new StageModel(this.state, this.theirs, this.controller, this.frames);
  private readonly surface = signal<MarkSurface | null>(null);

  protected readonly wordsId = `stage-words-${++stagesMade}`;
  protected readonly desk = this.model.desk;
  protected readonly searching = signal(false);
  protected readonly frameCount = computed(() => this.desk().timesUs().length);
  protected readonly opening = computed(() => this.frames.state().kind === 'opening');
  protected readonly slowFrame = computed(() => this.model.open()?.loader.slow() ?? null);
  protected readonly trouble = computed(() => this.readTrouble());
  protected readonly words = computed(() => stageWords(this.desk()));
  protected readonly drawsPlumb = computed(() => this.desk().task().kind === 'plumb');
  protected readonly cursor = computed(() => {
    const bench = this.model.bench();
    const tool = bench.tool();
    if (tool.name === 'dragging-joint') return 'none';
    if (tool.name === 'panning') return 'grabbing';
    if (bench.hovered() || this.controller.panKeyHeld()) return 'grab';
    return tool.name === 'idle' ? 'default' : 'crosshair';
  });
  protected readonly loupe = this.model.loupe;
  protected readonly loupeTransform = computed(() => {
    const loupe = this.loupe();
    return loupe ? `translate(${loupe.at.x}px, ${loupe.at.y}px)` : null;
  });

  constructor() {
    const destroyRef = inject(DestroyRef);
    followDesk(this.model);
    afterNextRender({
      write: () => {
        destroyRef.onDestroy(this.setUp());
      },
    });
    const draw = (write: () => void) => afterRenderEffect({ write });
    draw(() => {
      drawPicture(this.model, this.pictureElement().nativeElement);
    });
    draw(() => {
      const surface = this.surface();
      if (surface) drawResting(this.model, surface);
    });
    draw(() => {
      const surface = this.surface();
      if (surface) drawMoving(this.model, surface);
    });
    draw(() => {
      drawLoupe(this.model, this.loupeElement().nativeElement);
    });
  }

  protected tryAgain(): void {
    const frames = this.frames.state();
    const reason = frames.kind === 'open' ? frames.loader.failure()?.reason : null;
    // A decoder that gave up stays so; a new one is started with the clip.
    if (frames.kind === 'open' && reason !== 'decoder-gave-up') frames.loader.retry();
    else this.frames.reopen();
  }

  protected async goToNextReadable(): Promise<void> {
    const loader = this.model.open()?.loader;
    const failure = loader?.failure();
    if (!loader || !failure) return;
    this.searching.set(true);
    const { frame } = failure;
    const next = (await loader.nextReadable(frame, 1)) ?? (await loader.nextReadable(frame, -1));
    this.searching.set(false);
    if (next !== null) this.desk().goTo(next);
  }

  /** Escape lets go of what is held, then of the plumb; otherwise the key is the Desk's. */
  protected cancel(event: Event): void {
    const bench = this.model.bench();
    if (bench.held()) bench.send({ kind: 'cancel' });
    else if (this.drawsPlumb()) this.desk().stopPlumb();
    else return;
    event.stopPropagation();
  }

  /** Focus that came by keyboard brings the crosshair up. */
  protected aimByKeyboard(): void {
    if (this.host.matches(':focus-visible')) this.model.keyboardAims.set(true);
  }

  private readTrouble() {
    const frames = this.frames.state();
    if (frames.kind === 'failed') {
      return { title: troubleTitle(frames.code, null), message: frames.message, frame: null };
    }
    const failure = this.model.open()?.loader.failure();
    if (!failure) return null;
    const { frame, reason, message } = failure;
    return { title: troubleTitle(reason, frame), message, frame };
  }

  private setUp(): () => void {
    const surface = new MarkSurface(this.marksElement().nativeElement);
    this.surface.set(surface);
    this.model.colours.set(stageColours(this.host));
    const stopMeasuring = this.measure();
    const bench = () => this.model.bench();
    const stopPointers = feedPointers(this.pointersElement().nativeElement, {
      send: (event) => {
        if (event.kind === 'press') this.host.focus({ preventScroll: true });
        this.model.keyboardAims.set(false);
        bench().send(event);
      },
      zoom: (factor, at) => {
        this.controller.zoomBy(factor, at);
      },
      leave: () => {
        bench().hover(null);
        bench().inspect(null, null);
      },
      panKeyHeld: () => this.controller.panKeyHeld(),
    });
    const detach = this.controller.attach({
      cancel: () => {
        bench().send({ kind: 'cancel' });
      },
    });
    return () => {
      stopMeasuring();
      stopPointers();
      detach();
      untracked(this.model.player)?.halt();
      surface.destroy();
    };
  }

  /** The caption's words change, its place does not: it is taken at its usual width. */
  private boxOf(part: Element): Box {
    const [own, host] = [part.getBoundingClientRect(), this.host.getBoundingClientRect()];
    const width = Math.max(own.width, part.matches('.caption') ? CAPTION_WIDTH : 0);
    return { left: own.left - host.left, top: own.top - host.top, width, height: own.height };
  }

  /** Follows the stage's size, and the device's pixels when the window moves to another screen. */
  private measure(): () => void {
    const read = () => {
      this.model.ratio.set(window.devicePixelRatio || 1);
      this.model.size.set({ width: this.host.clientWidth, height: this.host.clientHeight });
      this.model.taken.set(
        [...this.host.querySelectorAll('.caption, .zoom')].map((part) => this.boxOf(part)),
      );
    };
    const observer = new ResizeObserver(read);
    observer.observe(this.host);
    window.addEventListener('resize', read);
    return () => {
      observer.disconnect();
      window.removeEventListener('resize', read);
    };
  }
}
