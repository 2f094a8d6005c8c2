import type { ClipIndex } from '@stillstroke/clip-index/frame-index';

/** What drawing needs to know of a clip. */
export type PictureShape = Pick<ClipIndex, 'width' | 'height' | 'rotation' | 'mirrored'>;

/** Either kind of 2D context. */
export type DrawingContext = CanvasRenderingContext2D | OffscreenCanvasRenderingContext2D;

/**
 * Draws the picture as shown: stretched by its pixel aspect, turned, and mirrored. In its own size it covers `width` ×
 * `height` canvas units from the context's origin; scale the context to draw it larger or smaller. The context is left
 * as it was. The image is not closed.
 */
export function drawFrame(context: DrawingContext, image: CanvasImageSource, shape: PictureShape): void {
  const { width, height, rotation, mirrored } = shape;
  const onSide = rotation === 90 || rotation === 270;
  const [storedWidth, storedHeight] = onSide ? [height, width] : [width, height];
  context.save();
  context.translate(width / 2, height / 2);
  if (mirrored) context.scale(-1, 1);
  context.rotate((rotation * Math.PI) / 180);
  context.drawImage(image, -storedWidth / 2, -storedHeight / 2, storedWidth, storedHeight);
  context.restore();
}
