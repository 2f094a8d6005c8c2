import { computed, type Signal, signal } from '@angular/core';
import type { DeskState } from '../state/desk-state';
import type { ClipFrames } from './clip-frames';
import { ClipPlayer } from './clip-player';
import { DeskStage, type TheirMark } from './desk-stage';
import type { Box } from './label-place';
import { loupePlace, loupeScale } from './loupe';
import { PictureCanvas } from './picture-canvas';
import { asPicturePoint, type PicturePoint, type Size, type StagePoint } from './spaces';
import type { StageColours } from './stage-colours';
import type { StageController } from './stage-controller';
import { ToolBench } from './tool-bench';
import { toStage } from './view-transform';

/** The loupe while it is shown. */
export interface Loupe {
  readonly point: PicturePoint;
  /** CSS pixels per picture pixel. */
  readonly scale: number;
  /** Its top left corner on the stage. */
  readonly at: StagePoint;
}

/** Everything that the stage knows, as signals: what it draws follows from these alone. */
export class StageModel {
  /** CSS pixels of the stage; zero until it was measured. */
  readonly size = signal<Size>({ width: 0, height: 0 });
  /** Device pixels per CSS pixel. */
  readonly ratio = signal(1);
  /** Places on the stage that its own controls cover, CSS pixels; no number is drawn there. */
  readonly taken = signal<readonly Box[]>([]);
  readonly colours = signal<StageColours | null>(null);
  /** The keyboard placed or moved last, not a pointer. */
  readonly keyboardAims = signal(false);

  readonly open = computed(() => {
    const frames = this.frames.state();
    return frames.kind === 'open' ? frames : null;
  });
  readonly picture = computed(() => this.open()?.loader.picture() ?? null);
  /** The frame whose picture is on screen, which is not always the one asked for. */
  readonly shownFrame = computed(() => this.picture()?.frame ?? null);
  readonly desk: Signal<DeskStage>;
  readonly bench = computed(() => new ToolBench(this.desk(), this.controller));
  readonly canvas = computed(() => {
    const open = this.open();
    return open ? new PictureCanvas(open.source.index) : null;
  });
  readonly player = computed(() => {
    const open = this.open();
    const desk = this.desk();
    const show = (frame: number) => {
      desk.showFrame(frame);
    };
    return open
      ? new ClipPlayer(open.source, open.loader, desk.play, show, () => desk.timesUs().length)
      : null;
  });
  /** The keyboard's pointer, while it is the keyboard that aims. */
  readonly crosshair = computed(() => {
    const desk = this.desk();
    return this.keyboardAims() && desk.task().kind === 'place' ? asPicturePoint(desk.crosshair()) : null;
  });
  readonly loupe = computed(() => this.placeLoupe());

  constructor(
    state: Signal<DeskState>,
    theirs: Signal<readonly TheirMark[]>,
    readonly controller: StageController,
    readonly frames: ClipFrames,
  ) {
    this.desk = computed(() => new DeskStage(state(), theirs, this.shownFrame));
  }

  private placeLoupe(): Loupe | null {
    const inspected = this.bench().inspected();
    const point = inspected?.point ?? this.crosshair();
    const view = this.controller.view();
    const scale = loupeScale(view.scale);
    if (!point || scale === null || !this.controller.loupeWanted()) return null;
    const pointer = inspected?.pointer ?? null;
    const at = loupePlace(pointer?.at ?? toStage(view, point), pointer?.kind ?? 'mouse', this.size());
    return { point, scale, at };
  }
}
