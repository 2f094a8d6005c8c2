import { computed, Injectable, signal } from '@angular/core';
import { type PicturePoint, type Size, type StagePoint, stagePoint } from './spaces';
import {
  clampView,
  fitView,
  isFitted,
  resizedView,
  toStage,
  type ViewFrame,
  type ViewTransform,
  zoomAt,
} from './view-transform';

/** Zoom of one key press or button. */
const ZOOM_STEP = 1.5;
const NO_SIZE: Size = { width: 0, height: 0 };

/** What only the stage itself can do. */
export interface AttachedStage {
  cancel(): void;
}

/**
 * What the stage looks at and what hangs on the pointer: view, loupe, trail. The stage and the Desk's
 * keys share one; nothing here is saved.
 */
@Injectable()
export class StageController {
  private readonly pictureSize = signal<Size>(NO_SIZE);
  private readonly stageSize = signal<Size>(NO_SIZE);
  private readonly viewNow = signal<ViewTransform>({ scale: 1, offsetX: 0, offsetY: 0 });
  private stage: AttachedStage | null = null;

  readonly frame = computed<ViewFrame>(() => ({ picture: this.pictureSize(), stage: this.stageSize() }));
  readonly view = this.viewNow.asReadonly();
  readonly fitted = computed(() => isFitted(this.viewNow(), this.frame()));
  /** CSS pixels per picture pixel, in percent. */
  readonly zoomPercent = computed(() => Math.round(this.viewNow().scale * 100));

  /** Whether the loupe may show at all. */
  readonly loupeWanted = signal(true);
  /** Whether the chosen arm's neighbouring marks are shown. */
  readonly trailWanted = signal(false);
  /** Held down, any drag moves the picture. */
  readonly panKeyHeld = signal(false);

  /** Both sizes in pixels: picture as shown, stage in CSS pixels. Another picture is fitted. */
  setSizes(picture: Size, stage: Size): void {
    const before = this.frame();
    const samePicture = before.picture.width === picture.width && before.picture.height === picture.height;
    const wasEmpty = before.stage.width === 0 || before.stage.height === 0;
    const after = { picture, stage };
    this.viewNow.set(samePicture && !wasEmpty ? resizedView(this.viewNow(), before, after) : fitView(after));
    this.pictureSize.set(picture);
    this.stageSize.set(stage);
  }

  setView(view: ViewTransform): void {
    this.viewNow.set(clampView(view, this.frame()));
  }

  zoomIn(): void {
    this.zoomBy(ZOOM_STEP);
  }

  zoomOut(): void {
    this.zoomBy(1 / ZOOM_STEP);
  }

  /** Zooms at a stage point; in its middle when none is given. */
  zoomBy(factor: number, at: StagePoint = this.stageMiddle()): void {
    this.viewNow.set(zoomAt(this.viewNow(), this.frame(), at, factor));
  }

  fit(): void {
    this.viewNow.set(fitView(this.frame()));
  }

  toggleLoupe(): void {
    this.loupeWanted.update((wanted) => !wanted);
  }

  toggleTrail(): void {
    this.trailWanted.update((wanted) => !wanted);
  }

  /** Lets go of whatever a pointer holds, with everything as it was before. */
  cancel(): void {
    this.stage?.cancel();
  }

  /** The stage says what letting go means while it is there. */
  attach(stage: AttachedStage): () => void {
    this.stage = stage;
    return () => {
      if (this.stage === stage) this.stage = null;
    };
  }

  /** Moves the picture just far enough that a point is well on the stage. */
  reveal(point: PicturePoint): void {
    const view = this.viewNow();
    const { stage } = this.frame();
    const at = toStage(view, point);
    const margin = Math.min(stage.width, stage.height) * 0.15;
    const shift = (value: number, side: number) =>
      value < margin ? margin - value : value > side - margin ? side - margin - value : 0;
    const dx = shift(at.x, stage.width);
    const dy = shift(at.y, stage.height);
    if (dx !== 0 || dy !== 0) {
      this.setView({ ...view, offsetX: view.offsetX + dx, offsetY: view.offsetY + dy });
    }
  }

  private stageMiddle(): StagePoint {
    const { width, height } = this.stageSize();
    return stagePoint(width / 2, height / 2);
  }
}
