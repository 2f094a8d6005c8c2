import { drawFrame, type PictureShape } from '../../playback/draw-frame';
import type { LoadedPicture } from './picture-loader';
import type { PicturePoint, Size } from './spaces';
import { showsPixels, type ViewTransform } from './view-transform';

/**
 * The shown picture, ready to be drawn at any zoom. The first drawing goes straight from the decoder's picture, since a
 * step must be on screen at once; the second one (a zoom, a pan, the loupe) makes a copy in picture pixels, from which
 * all others are cheap.
 */
export class PictureCanvas {
  private picture: LoadedPicture | null = null;
  private copy: OffscreenCanvas | null = null;
  private copied = false;
  private drawnOnce = false;

  constructor(private readonly shape: PictureShape) {}

  /** Draws the picture onto a canvas whose backing store is `stage` times `ratio`. */
  draw(
    context: CanvasRenderingContext2D,
    picture: LoadedPicture | null,
    view: ViewTransform,
    stage: Size,
    ratio: number,
  ): void {
    this.take(picture);
    context.setTransform(1, 0, 0, 1, 0, 0);
    context.clearRect(0, 0, Math.ceil(stage.width * ratio), Math.ceil(stage.height * ratio));
    if (!picture) return;
    const scale = view.scale * ratio;
    context.setTransform(scale, 0, 0, scale, view.offsetX * ratio, view.offsetY * ratio);
    context.imageSmoothingEnabled = !showsPixels(view, ratio);
    context.imageSmoothingQuality = 'medium';
    if (this.drawnOnce) {
      const still = this.still();
      if (still) context.drawImage(still, 0, 0);
    } else {
      drawFrame(context, picture.image, this.shape);
      this.drawnOnce = true;
    }
  }

  /**
   * Draws the surroundings of a point enlarged, the point in the middle.
   *
   * @param side width and height of the target in its own pixels
   * @param scale target pixels per picture pixel
   */
  drawAround(context: CanvasRenderingContext2D, point: PicturePoint, side: number, scale: number): void {
    context.setTransform(1, 0, 0, 1, 0, 0);
    context.clearRect(0, 0, side, side);
    const still = this.still();
    if (!still) return;
    context.setTransform(scale, 0, 0, scale, side / 2 - point.x * scale, side / 2 - point.y * scale);
    context.imageSmoothingEnabled = false;
    context.drawImage(still, 0, 0);
  }

  private take(picture: LoadedPicture | null): void {
    if (this.picture === picture) return;
    this.picture = picture;
    this.copied = false;
    this.drawnOnce = false;
  }

  private still(): OffscreenCanvas | null {
    if (!this.picture) return null;
    this.copy ??= new OffscreenCanvas(this.shape.width, this.shape.height);
    if (!this.copied) {
      const context = this.copy.getContext('2d', { alpha: false });
      if (!context) return null;
      drawFrame(context, this.picture.image, this.shape);
      this.copied = true;
    }
    return this.copy;
  }
}
