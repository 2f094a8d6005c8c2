import {
  afterNextRender,
  afterRenderEffect,
  ChangeDetectionStrategy,
  Component,
  computed,
  DestroyRef,
  effect,
  type ElementRef,
  inject,
  input,
  signal,
  untracked,
  viewChild,
} from '@angular/core';
import type { DeskState } from '../state/desk-state';
import { ClipFrames } from './clip-frames';
import { ClipPlayer } from './clip-player';
import { DeskStage, type TheirMark } from './desk-stage';
import { drawLoupeCross, LOUPE_SIDE, loupePlace, loupeScale } from './loupe';
import { movingNodes, restingNodes } from './mark-scene';
import { MarkSurface } from './mark-surface';
import { PictureCanvas } from './picture-canvas';
import { feedPointers } from './pointer-feed';
import { asPicturePoint, type Size } from './spaces';
import { type StageColours, stageColours } from './stage-colours';
import { StageController } from './stage-controller';
import { stageWords, troubleTitle } from './stage-words';
import { ToolBench } from './tool-bench';
import { toStage } from './view-transform';

let stagesMade = 0;

/**
 * The picture with the marks on it. Signals in, drawing out: pointers and frames only write signals, and every drawing
 * happens after rendering, in the same display frame.
 */
@Component({
  selector: 'st-stage',
  templateUrl: './stage.html',
  styleUrl: './stage.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
  host: {
    tabindex: '0',
    role: 'region',
    'aria-label': 'Stage: the picture with its marks',
    '[attr.aria-describedby]': 'wordsId',
    '(keydown.escape)': 'cancel($event)',
    '(focus)': 'aimByKeyboard($event)',
  },
})
export class Stage {
  protected readonly controller = inject(StageController);
  private readonly frames = inject(ClipFrames);

  readonly state = input.required<DeskState>();
  /** Marks that someone else saved meanwhile and that are to be settled. */
  readonly theirs = input<readonly TheirMark[]>([]);

  private readonly pictureElement = viewChild.required<ElementRef<HTMLCanvasElement>>('pictureCanvas');
  private readonly marksElement = viewChild.required<ElementRef<HTMLDivElement>>('marks');
  private readonly pointersElement = viewChild.required<ElementRef<HTMLElement>>('pointers');
  private readonly loupeElement = viewChild.required<ElementRef<HTMLCanvasElement>>('loupeCanvas');

  protected readonly wordsId = `stage-words-${++stagesMade}`;
  private readonly size = signal<Size>({ width: 0, height: 0 });
  private readonly ratio = signal(1);
  private readonly keyboardAims = signal(false);
  private readonly surface = signal<MarkSurface | null>(null);
  private readonly colours = signal<StageColours | null>(null);
  protected readonly desk = computed(() => new DeskStage(this.state(), this.theirs));
  private readonly bench = computed(() => new ToolBench(this.desk(), this.controller));
  private readonly open = computed(() => {
    const frames = this.frames.state();
    return frames.kind === 'open' ? frames : null;
  });
  private readonly canvas = computed(() => {
    const open = this.open();
    return open ? new PictureCanvas(open.source.index) : null;
  });
  private readonly player = computed(() => {
    const open = this.open();
    const state = this.desk();
    const show = (frame: number) => {
      state.showFrame(frame);
    };
    return open ? new ClipPlayer(open.source, open.loader, state.play, show, this.frameCount) : null;
  });

  protected readonly searching = signal(false);
  protected readonly opening = computed(() => this.frames.state().kind === 'opening');
  /** The frame whose picture is on screen, which is not always the one asked for. */
  protected readonly shownFrame = computed(() => this.open()?.loader.picture()?.frame ?? null);
  protected readonly slowFrame = computed(() => this.open()?.loader.slow() ?? null);
  protected readonly frameCount = computed(() => this.desk().timesUs().length);
  protected readonly trouble = computed(() => {
    const frames = this.frames.state();
    if (frames.kind === 'failed') {
      return { title: troubleTitle(frames.code, null), message: frames.message, frame: null };
    }
    const failure = this.open()?.loader.failure();
    if (!failure) return null;
    return {
      title: troubleTitle(failure.reason, failure.frame),
      message: failure.message,
      frame: failure.frame,
    };
  });
  protected readonly words = computed(() => stageWords(this.desk()));
  protected readonly cursor = computed(() => {
    const bench = this.bench();
    const tool = bench.tool();
    if (tool.name === 'dragging-joint') return 'none';
    if (tool.name === 'panning') return 'grabbing';
    if (bench.hovered() || this.controller.panKeyHeld()) return 'grab';
    return tool.name === 'idle' ? 'default' : 'crosshair';
  });
  /** The keyboard's pointer, while it is the keyboard that aims. */
  private readonly crosshair = computed(() => {
    const point = this.keyboardAims() && this.desk().task().kind === 'place' ? this.desk().crosshair() : null;
    return point && asPicturePoint(point);
  });
  protected readonly loupe = computed(() => this.placeLoupe());
  protected readonly loupeTransform = computed(() => {
    const loupe = this.loupe();
    return loupe ? `translate(${loupe.at.x}px, ${loupe.at.y}px)` : null;
  });

  constructor() {
    const destroyRef = inject(DestroyRef);
    afterNextRender({
      write: () => {
        destroyRef.onDestroy(this.setUp());
      },
    });
    this.followClip();
    this.followFrame();
    this.followTask();
    afterRenderEffect({
      write: () => {
        this.drawPicture();
      },
    });
    afterRenderEffect({
      write: () => {
        this.drawResting();
      },
    });
    afterRenderEffect({
      write: () => {
        this.drawMoving();
      },
    });
    afterRenderEffect({
      write: () => {
        this.drawLoupe();
      },
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
    const loader = this.open()?.loader;
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
    const bench = this.bench();
    if (bench.held()) bench.send({ kind: 'cancel' });
    else if (bench.task().kind === 'plumb') this.desk().stopPlumb();
    else return;
    event.stopPropagation();
  }

  /** Focus that came by keyboard brings the crosshair up. */
  protected aimByKeyboard({ target }: FocusEvent): void {
    if (target instanceof Element && target.matches(':focus-visible')) this.keyboardAims.set(true);
  }

  private setUp(): () => void {
    const host = this.pictureElement().nativeElement.parentElement ?? document.body;
    const surface = new MarkSurface(this.marksElement().nativeElement);
    this.surface.set(surface);
    this.colours.set(stageColours(host));
    const measure = () => {
      this.ratio.set(window.devicePixelRatio || 1);
      this.size.set({ width: host.clientWidth, height: host.clientHeight });
    };
    const observer = new ResizeObserver(measure);
    observer.observe(host);
    window.addEventListener('resize', measure);
    const stopPointers = feedPointers(this.pointersElement().nativeElement, {
      send: (event) => {
        if (event.kind === 'press') host.focus({ preventScroll: true });
        this.keyboardAims.set(false);
        this.bench().send(event);
      },
      zoom: (factor, at) => {
        this.controller.zoomBy(factor, at);
      },
      leave: () => {
        this.bench().hover(null);
        this.bench().inspect(null, null);
      },
      panKeyHeld: () => this.controller.panKeyHeld(),
    });
    const detach = this.controller.attach({
      cancel: () => {
        this.bench().send({ kind: 'cancel' });
      },
    });
    return () => {
      observer.disconnect();
      window.removeEventListener('resize', measure);
      stopPointers();
      detach();
      untracked(this.player)?.halt();
      surface.destroy();
    };
  }

  private followClip(): void {
    effect(() => {
      const [clipId, timesUs] = [this.desk().clipId(), this.desk().timesUs()];
      untracked(() => {
        this.frames.open(clipId, timesUs);
      });
    });
    effect(() => {
      const picture = this.desk().picture();
      const size = this.size();
      untracked(() => {
        this.controller.setSizes(picture, size);
      });
    });
  }

  private followFrame(): void {
    effect((onCleanup) => {
      const player = this.player();
      onCleanup(() => player?.halt());
    });
    effect(() => {
      const { play, frame } = this.desk();
      const direction = play.playing() ? play.direction() : 0;
      const [speed, wanted, player, open] = [play.speed(), frame(), this.player(), this.open()];
      untracked(() => {
        player?.follow(direction, speed, wanted);
        open?.loader.want(wanted);
      });
    });
  }

  private followTask(): void {
    effect(() => {
      const bench = this.bench();
      bench.taskNow();
      untracked(() => {
        bench.send({ kind: 'task' });
      });
    });
    effect(() => {
      if (this.desk().crosshairMoved()) this.keyboardAims.set(true);
    });
    effect(() => {
      const crosshair = this.crosshair();
      untracked(() => {
        if (crosshair) this.controller.reveal(crosshair);
      });
    });
    // What hangs on another frame is let go.
    effect(() => {
      this.desk().frame();
      const bench = this.bench();
      untracked(() => {
        bench.hover(null);
        if (bench.held() && bench.tool().name !== 'panning') bench.send({ kind: 'cancel' });
      });
    });
  }

  private drawPicture(): void {
    const element = this.pictureElement().nativeElement;
    const size = this.size();
    const ratio = this.ratio();
    const picture = this.open()?.loader.picture() ?? null;
    const view = this.controller.view();
    const canvas = this.canvas();
    fitCanvas(element, size, ratio);
    const context = element.getContext('2d');
    if (context) canvas?.draw(context, picture, view, size, ratio);
  }

  private drawResting(): void {
    const [surface, place] = [this.surface(), this.place()];
    const state = this.desk();
    if (!surface || !place) return;
    const scene = {
      arms: state.arms(),
      chosen: state.arm(),
      trail: this.controller.trailWanted() ? state.neighbours() : [],
      plumb: state.task().kind === 'plumb' ? null : state.plumb(),
    };
    surface.resize(place.stage, this.ratio());
    surface.drawResting(restingNodes(scene, place));
  }

  private drawMoving(): void {
    const [surface, place] = [this.surface(), this.place()];
    const state = this.desk();
    const bench = this.bench();
    if (!surface || !place) return;
    const chosen = state.arm();
    const scene = {
      arm: state.arms().find(({ arm }) => arm === chosen) ?? null,
      chosen,
      chosenJoint: state.canEdit() ? state.joint() : null,
      angles: state.angles(),
      plumb: bench.plumb(),
      drawsPlumb: state.task().kind === 'plumb',
      tool: bench.tool(),
      aim: bench.inspected()?.point ?? null,
      crosshair: this.crosshair(),
      hovered: bench.tool().name === 'dragging-joint' ? null : bench.hovered(),
    };
    surface.drawMoving(movingNodes(scene, place));
  }

  private place() {
    const colours = this.colours();
    const stage = this.size();
    if (!colours || stage.width === 0) return null;
    return { view: this.controller.view(), stage, colours };
  }

  private placeLoupe() {
    const inspected = this.bench().inspected();
    const crosshair = this.crosshair();
    const point = inspected?.point ?? crosshair;
    const view = this.controller.view();
    const scale = loupeScale(view.scale);
    if (!point || scale === null || !this.controller.loupeWanted()) return null;
    const pointer = inspected?.pointer ?? null;
    return {
      point,
      scale,
      at: loupePlace(pointer?.at ?? toStage(view, point), pointer?.kind ?? 'mouse', this.size()),
    };
  }

  private drawLoupe(): void {
    const loupe = this.loupe();
    const canvas = this.canvas();
    const colours = this.colours();
    const ratio = this.ratio();
    // Read so that the loupe follows the picture.
    this.open()?.loader.picture();
    if (!loupe || !canvas || !colours) return;
    const element = this.loupeElement().nativeElement;
    fitCanvas(element, { width: LOUPE_SIDE, height: LOUPE_SIDE }, ratio);
    const context = element.getContext('2d');
    if (!context) return;
    canvas.drawAround(context, loupe.point, element.width, loupe.scale * ratio);
    drawLoupeCross(context, colours.arm[this.desk().arm()], colours.casing, ratio);
  }
}

/** Gives a canvas one pixel of its own for every device pixel. */
function fitCanvas(element: HTMLCanvasElement, { width, height }: Size, ratio: number): void {
  const wide = Math.round(width * ratio);
  const high = Math.round(height * ratio);
  if (element.width !== wide) element.width = wide;
  if (element.height !== high) element.height = high;
}
