import { drawFrame } from '../../playback/draw-frame';
import type { FrameAnswer, FrameSource } from '../../playback/frame-source';

/**
 * The frame that a source answered, as shown and in its own size. The answer's picture is closed.
 *
 * @throws Error with a sentence for the person when there is no picture
 */
export function frameCanvas(answer: FrameAnswer, { index }: Pick<FrameSource, 'index'>): HTMLCanvasElement {
  if (!answer.ok) throw new Error(answer.message);
  try {
    const canvas = document.createElement('canvas');
    canvas.width = index.width;
    canvas.height = index.height;
    const context = canvas.getContext('2d');
    if (!context) throw new Error('This browser draws no pictures.');
    drawFrame(context, answer.image, index);
    return canvas;
  } finally {
    answer.image.close();
  }
}
