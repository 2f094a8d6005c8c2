import { signal } from '@angular/core';
import type { FrameAnswer, FrameDamage, FrameSource, PlaybackFault } from '../../playback/frame-source';

/** A picture on loan, and the frame that it is. */
export interface LoadedPicture {
  readonly frame: number;
  readonly image: VideoFrame;
}

/** A frame that could not be had. */
export interface PictureFailure {
  readonly frame: number;
  readonly reason: FrameDamage | Exclude<PlaybackFault, 'aborted'>;
  /** For the person. */
  readonly message: string;
}

/** After this many milliseconds a missing picture is worth a word. */
const SLOW_MS = 150;

/**
 * Asks for frames, the newest request winning, and keeps the last picture until the next is there. Pictures are closed
 * here and nowhere else.
 */
export class PictureLoader {
  private readonly pictureNow = signal<LoadedPicture | null>(null);
  private readonly failureNow = signal<PictureFailure | null>(null);
  private readonly slowNow = signal<number | null>(null);
  private wanted: { readonly frame: number; readonly turn: number } | null = null;
  private turn = 0;
  private slowTimer: ReturnType<typeof setTimeout> | null = null;
  private closed = false;

  /** The newest picture there is; its `frame` may differ from the one asked for. */
  readonly picture = this.pictureNow.asReadonly();
  /** Why the frame asked for last cannot be shown. */
  readonly failure = this.failureNow.asReadonly();
  /** The frame that is taking its time. */
  readonly slow = this.slowNow.asReadonly();

  constructor(private readonly source: FrameSource) {}

  /** Asks for a frame unless it is already shown or on its way. */
  want(frame: number): void {
    if (this.closed || this.wanted?.frame === frame) return;
    this.ask(frame);
  }

  /** Asks again for the frame that failed. */
  retry(): void {
    if (!this.closed && this.wanted) this.ask(this.wanted.frame);
  }

  /** Takes a picture that came without being asked for, as while playing. */
  take(frame: number, image: VideoFrame): void {
    this.turn += 1;
    this.wanted = { frame, turn: this.turn };
    this.settle(null);
    this.show({ frame, image });
  }

  /** Notes a frame that came out unreadable without being asked for. */
  miss(answer: FrameAnswer & { ok: false }): void {
    this.turn += 1;
    this.wanted = { frame: answer.frame, turn: this.turn };
    this.settle(failureOf(answer));
  }

  /** The next frame in a direction that can be shown; null when there is none up to the clip's end. */
  async nextReadable(from: number, direction: 1 | -1): Promise<number | null> {
    const count = this.source.index.timestampsUs.length;
    for (let frame = from + direction; frame >= 0 && frame < count && !this.closed; frame += direction) {
      const answer = await this.source.frame(frame, { keep: true });
      if (answer.ok) {
        answer.image.close();
        return frame;
      }
      if (answer.reason !== 'corrupt-frame') return null;
    }
    return null;
  }

  close(): void {
    this.closed = true;
    this.settle(null);
    this.show(null);
  }

  private ask(frame: number): void {
    this.turn += 1;
    const { turn } = this;
    this.wanted = { frame, turn };
    this.failureNow.set(null);
    this.slowTimer ??= setTimeout(() => {
      this.slowTimer = null;
      this.slowNow.set(this.wanted?.frame ?? null);
    }, SLOW_MS);
    if (this.slowNow() !== null) this.slowNow.set(frame);
    void this.source.frame(frame).then((answer) => {
      const overtaken = this.closed || turn !== this.wanted?.turn;
      if (overtaken) {
        if (answer.ok) answer.image.close();
      } else if (answer.ok) {
        this.settle(null);
        this.show({ frame, image: answer.image });
      } else {
        this.settle(failureOf(answer));
      }
    });
  }

  private show(picture: LoadedPicture | null): void {
    const before = this.pictureNow();
    this.pictureNow.set(picture);
    before?.image.close();
  }

  private settle(failure: PictureFailure | null): void {
    if (this.slowTimer !== null) clearTimeout(this.slowTimer);
    this.slowTimer = null;
    this.slowNow.set(null);
    this.failureNow.set(failure);
  }
}

/** Being overtaken is no failure: the newer request answers for itself. */
function failureOf({ frame, reason, message }: FrameAnswer & { ok: false }): PictureFailure | null {
  return reason === 'aborted' ? null : { frame, reason, message };
}
