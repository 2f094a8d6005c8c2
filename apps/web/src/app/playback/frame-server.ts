import { FrameCache } from './frame-cache';
import type { FrameDamage, PlaybackFault, StepDirection } from './frame-source';
import { Decoding, DecoderGaveUp } from './decoding';
import type { PacketReader } from './packet-reader';
import { DecoderStalled } from './picture-decoder';
import { nextPrefetch } from './prefetch';
import type { WorkerStats } from './protocol';
import { isByteSourceFailure } from '@stillstroke/clip-index/clip-refusal';

/** Receives the answers. A picture given to it is its own. */
export interface FrameReceiver {
  picture(id: number, image: VideoFrame): void;
  noPicture(id: number, reason: FrameDamage | PlaybackFault, message: string): void;
}

interface Waiting {
  readonly id: number;
  readonly frame: number;
  /** Waits its turn instead of being overtaken. */
  readonly keep: boolean;
}

/** Kept behind a frame that was jumped to, so that the first steps back need nothing. */
const BEHIND_JUMP = 10;
/** Requests this close together are steps and tell a direction. */
const STEP = 10;

/** Answers frames of one opened clip from cache and decoder, one request at a time, the newest first. */
export class FrameServer {
  private readonly cache: FrameCache<VideoFrame>;
  private readonly decoding: Decoding;
  private readonly hidden: number;
  private readonly damaged = new Map<number, string>();
  private readonly open = new Set<VideoFrame>();
  private waiting: Waiting[] = [];
  private current: Waiting | null = null;
  private direction: StepDirection = 0;
  private focus = 0;
  private pumping: Promise<void> | null = null;
  private closed = false;
  private overtaken = 0;
  private frameBytes: number;

  constructor(
    private readonly reader: PacketReader,
    config: VideoDecoderConfig,
    budgetBytes: number,
    private readonly receiver: FrameReceiver,
  ) {
    this.hidden = reader.table.hidden;
    this.cache = new FrameCache(budgetBytes);
    this.frameBytes = Math.max(1, reader.index.codedWidth * reader.index.codedHeight * 1.5);
    this.decoding = new Decoding(reader, config, (rank, picture) => {
      this.accept(rank - this.hidden, picture);
    });
  }

  /** Asks for a frame; the answer goes to the receiver under this id. */
  ask(id: number, frame: number, keep: boolean): void {
    if (!keep) {
      this.turnTo(frame);
      this.overtake();
    }
    if (this.answerAtOnce({ id, frame, keep })) {
      this.pump();
      return;
    }
    this.waiting.push({ id, frame, keep });
    this.pump();
  }

  cancel(id: number): void {
    const taken = [...this.waiting, ...(this.current === null ? [] : [this.current])].some(
      (one) => one.id === id,
    );
    if (!taken) return;
    this.waiting = this.waiting.filter((one) => one.id !== id);
    if (this.current?.id === id) this.current = null;
    this.receiver.noPicture(id, 'aborted', 'The request was taken back.');
  }

  hint(direction: StepDirection): void {
    this.direction = direction;
    this.cache.look(this.focus, direction);
    this.pump();
  }

  stats(): WorkerStats {
    this.forgetClosed();
    return {
      cachedFrames: this.cache.size,
      cachedBytes: this.cache.bytes,
      budgetBytes: this.cache.budgetBytes,
      openInWorker: this.open.size,
      bytesFetched: this.reader.bytesFetched,
      packetsDecoded: this.decoding.packetsDecoded,
      packetsSkipped: this.decoding.packetsSkipped,
      overtaken: this.overtaken,
    };
  }

  /** Resolves when nothing is waited for and nothing is being prefetched. */
  async idle(): Promise<void> {
    while (this.pumping !== null) await this.pumping;
  }

  async close(): Promise<void> {
    this.closed = true;
    for (const { id } of this.waiting) this.receiver.noPicture(id, 'aborted', 'The clip was closed.');
    this.waiting = [];
    this.decoding.close();
    await this.pumping;
    this.cache.clear();
    this.reader.close();
  }

  private turnTo(frame: number): void {
    const step = frame - this.focus;
    if (step !== 0) this.direction = Math.abs(step) <= STEP ? (Math.sign(step) as StepDirection) : 0;
    this.focus = frame;
    this.cache.look(frame, this.direction);
  }

  private overtake(): void {
    const late = this.waiting.filter((one) => !one.keep);
    this.waiting = this.waiting.filter((one) => one.keep);
    if (this.current !== null && !this.current.keep) {
      late.push(this.current);
      this.current = null;
    }
    for (const { id } of late) {
      this.overtaken += 1;
      this.receiver.noPicture(id, 'aborted', 'A newer request took its place.');
    }
  }

  private answerAtOnce({ id, frame }: Waiting): boolean {
    const image = this.cache.get(frame);
    if (image !== undefined) {
      this.receiver.picture(id, this.lend(frame, image));
      return true;
    }
    const damage = this.damaged.get(frame);
    if (damage !== undefined) this.receiver.noPicture(id, 'corrupt-frame', damage);
    return damage !== undefined;
  }

  /** A handle of its own on the same picture, stamped with the frame's presentation time. */
  private lend(frame: number, image: VideoFrame): VideoFrame {
    return new VideoFrame(image, { timestamp: this.reader.index.timestampsUs[frame] ?? 0 });
  }

  /** Takes a picture from the decoder: to whoever waits for it, and into the cache. */
  private accept(frame: number, picture: VideoFrame): void {
    if (this.closed || frame < 0 || frame >= this.reader.index.timestampsUs.length) {
      picture.close();
      return;
    }
    if (this.open.size > 2 * this.cache.size + 64) this.forgetClosed();
    this.open.add(picture);
    if (this.current?.frame === frame) {
      const { id } = this.current;
      this.current = null;
      this.receiver.picture(id, this.lend(frame, picture));
    }
    const waiting = this.waiting.filter((one) => one.frame === frame);
    for (const { id } of waiting) this.receiver.picture(id, this.lend(frame, picture));
    if (waiting.length > 0) this.waiting = this.waiting.filter((one) => one.frame !== frame);
    this.frameBytes = bytesOf(picture);
    this.cache.offer(frame, picture, this.frameBytes);
  }

  private pump(): void {
    if (this.pumping !== null || this.closed) return;
    this.pumping = this.work().finally(() => {
      this.pumping = null;
    });
  }

  private async work(): Promise<void> {
    while (!this.closed) {
      const request = this.nextWaiting();
      if (request !== undefined) await this.serve(request);
      else if (!(await this.prefetch())) return;
    }
  }

  /** The one that cannot be overtaken any more goes first, then those that wait their turn. */
  private nextWaiting(): Waiting | undefined {
    const urgent = this.waiting.findIndex((one) => !one.keep);
    return this.waiting.splice(Math.max(0, urgent), 1)[0];
  }

  private async serve(request: Waiting): Promise<void> {
    if (this.answerAtOnce(request)) return;
    this.current = request;
    const keepFrom = this.direction < 0 ? request.frame - this.chunk() : request.frame - BEHIND_JUMP;
    try {
      const outcome = await this.decoding.reach({
        rank: this.hidden + request.frame,
        keepFrom: this.hidden + keepFrom,
        stop: () => this.closed || this.current !== request,
      });
      if (typeof outcome === 'object') this.refuse(request, outcome.damage);
    } catch (error) {
      this.fail(request, error);
    }
    if (this.current === request) this.current = null;
  }

  private forgetClosed(): void {
    for (const picture of this.open) if (picture.format === null) this.open.delete(picture);
  }

  private chunk(): number {
    return Math.floor((this.cache.budgetBytes / this.frameBytes) * 0.6);
  }

  private refuse(request: Waiting, message: string): void {
    this.damaged.set(request.frame, message);
    if (this.current === request) this.receiver.noPicture(request.id, 'corrupt-frame', message);
  }

  private fail(request: Waiting, error: unknown): void {
    if (this.current !== request) return;
    if (this.closed) this.receiver.noPicture(request.id, 'aborted', 'The clip was closed.');
    else if (isByteSourceFailure(error)) {
      this.receiver.noPicture(
        request.id,
        'network',
        'The connection was lost while the frame was fetched. It is fetched again as soon as you step.',
      );
    } else if (error instanceof DecoderGaveUp || error instanceof DecoderStalled) {
      this.receiver.noPicture(
        request.id,
        'decoder-gave-up',
        'The browser stopped decoding this clip. Reload the page; if it happens again, try another browser.',
      );
    } else {
      const detail = error instanceof Error ? error.message : String(error);
      this.receiver.noPicture(request.id, 'decoder-gave-up', `The frame could not be decoded: ${detail}`);
    }
  }

  /** Decodes one stretch ahead of need; false when there is nothing to do or it could not be done. */
  private async prefetch(): Promise<boolean> {
    const plan = nextPrefetch({
      focus: this.focus,
      direction: this.direction,
      count: this.reader.index.timestampsUs.length,
      capacity: Math.floor(this.cache.budgetBytes / this.frameBytes),
      settled: (frame) => this.cache.has(frame) || this.damaged.has(frame),
    });
    if (plan === null) return false;
    try {
      const outcome = await this.decoding.reach({
        rank: this.hidden + plan.goal,
        keepFrom: this.hidden + plan.keepFrom,
        stop: () => this.closed || this.waiting.length > 0,
      });
      if (typeof outcome === 'object') this.damaged.set(plan.goal, outcome.damage);
      // Out but not kept means the budget has no room for it: more of the same would be in vain.
      return outcome !== 'ready' || this.cache.has(plan.goal) || this.waiting.length > 0;
    } catch {
      // Nobody asked for it yet. Whoever does meets the failure and is told.
      return this.waiting.length > 0;
    }
  }
}

/** Bytes of the picture as the decoder holds it. */
function bytesOf(picture: VideoFrame): number {
  return picture.format === null ? picture.codedWidth * picture.codedHeight * 4 : picture.allocationSize();
}
