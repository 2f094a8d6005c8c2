import type { ClipIndex } from '@stillstroke/clip-index/frame-index';
import type { FrameAnswer, FrameSource, FrameSourceStats } from '../../playback/frame-source';
import { testClip, testTimesUs } from '../state/testing';

/** A source whose frames are painted: each is one grey of its own, with a light square where a test wants one. */
export class PaintedSource implements FrameSource {
  readonly index: ClipIndex;
  readonly asked: number[] = [];
  /** Frames that are damaged. */
  readonly damaged = new Set<number>();
  /** Every picture given away, to see whether it was closed. */
  readonly given: VideoFrame[] = [];
  closed = false;
  private held: (() => void)[] | null = null;

  constructor(
    readonly square: { readonly x: number; readonly y: number; readonly side: number } | null = null,
  ) {
    const { width, height, durationUs } = testClip;
    this.index = {
      timestampsUs: [...testTimesUs],
      keyFrames: [0],
      width,
      height,
      codedWidth: width,
      codedHeight: height,
      rotation: 0,
      mirrored: false,
      pixelAspect: 1,
      codec: 'avc',
      container: 'MP4',
      durationUs,
      frameRate: 60,
      truncated: false,
    };
  }

  async frame(n: number): Promise<FrameAnswer> {
    this.asked.push(n);
    await new Promise<void>((resolve) => {
      if (this.held) this.held.push(resolve);
      else resolve();
    });
    if (this.damaged.has(n)) {
      return { ok: false, frame: n, reason: 'corrupt-frame', message: 'The data of this frame is damaged.' };
    }
    const image = this.paint(n);
    this.given.push(image);
    return { ok: true, frame: n, image };
  }

  /** Holds answers back until `letGo`. */
  hold(): void {
    this.held = [];
  }

  letGo(): void {
    const waiting = this.held ?? [];
    this.held = null;
    for (const go of waiting) go();
  }

  /** Pictures that nobody has closed. */
  open(): number {
    return this.given.filter((image) => image.format !== null).length;
  }

  hint(): void {
    // Painted frames need no time.
  }

  stats(): Promise<FrameSourceStats> {
    return Promise.reject(new Error('a painted source keeps no figures'));
  }

  close(): Promise<void> {
    this.closed = true;
    return Promise.resolve();
  }

  private paint(n: number): VideoFrame {
    const { width, height } = this.index;
    const canvas = new OffscreenCanvas(width, height);
    const context = canvas.getContext('2d');
    if (!context) throw new Error('no 2D canvas');
    context.fillStyle = greyOf(n);
    context.fillRect(0, 0, width, height);
    context.fillStyle = '#f0f0f0';
    if (this.square) context.fillRect(this.square.x, this.square.y, this.square.side, this.square.side);
    return new VideoFrame(canvas, { timestamp: this.index.timestampsUs[n] ?? 0 });
  }
}

/** The grey that a frame is painted in. */
export function greyOf(n: number): string {
  return `rgb(${levelOf(n)}, ${levelOf(n)}, ${levelOf(n)})`;
}

export function levelOf(n: number): number {
  return 20 + (n % 20) * 8;
}
