import type { ClipIndex } from '@stillstroke/clip-index/frame-index';
import {
  PlaybackError,
  type FrameAnswer,
  type FrameSource,
  type FrameSourceStats,
  type OpenClipOptions,
  type StepDirection,
} from './frame-source';
import type { ToPage, ToWorker, WorkerStats } from './protocol';

type Pending =
  | { readonly kind: 'frame'; readonly frame: number; readonly settle: (answer: FrameAnswer) => void }
  | { readonly kind: 'stats'; readonly settle: (stats: WorkerStats) => void }
  | { readonly kind: 'close'; readonly settle: () => void };

/** The part of a `Worker` that is used here. */
export type WorkerPort = Pick<Worker, 'postMessage' | 'terminate' | 'addEventListener'>;

/** The page's end of a clip that a worker has opened. */
export class ClipConnection implements FrameSource {
  private readonly pending = new Map<number, Pending>();
  private readonly lent = new Set<VideoFrame>();
  private nextId = 1;
  private last: WorkerStats | null = null;
  private closing: Promise<void> | null = null;
  private dead: string | null = null;

  private constructor(
    private readonly worker: WorkerPort,
    readonly index: ClipIndex,
  ) {
    worker.addEventListener('message', (event) => {
      this.receive((event as MessageEvent<ToPage>).data);
    });
    worker.addEventListener('error', () => {
      this.die('The part of the page that decodes frames has stopped. Reload the page.');
    });
  }

  /** @throws PlaybackError when the worker refuses the clip or cannot be started */
  static async open(worker: WorkerPort, options: OpenClipOptions): Promise<ClipConnection> {
    const answer = await new Promise<ToPage>((resolve) => {
      worker.addEventListener('message', (event) => {
        resolve((event as MessageEvent<ToPage>).data);
      });
      worker.addEventListener('error', () => {
        resolve({
          kind: 'refused',
          id: 0,
          code: 'network',
          message: 'The part of the page that decodes frames could not be loaded. Reload the page.',
        });
      });
      worker.postMessage({ kind: 'open', id: 0, ...options } satisfies ToWorker);
    });
    if (answer.kind === 'opened') return new ClipConnection(worker, answer.index);
    worker.terminate();
    if (answer.kind === 'refused') throw new PlaybackError(answer.code, answer.message);
    throw new PlaybackError('unreadable', 'The clip could not be opened. Reload the page and try again.');
  }

  frame(n: number, options: { signal?: AbortSignal; keep?: boolean } = {}): Promise<FrameAnswer> {
    if (!Number.isInteger(n) || n < 0 || n >= this.index.timestampsUs.length) {
      throw new RangeError(`There is no frame ${n} in a clip of ${this.index.timestampsUs.length}.`);
    }
    const { signal, keep = false } = options;
    if (this.closing !== null) return Promise.resolve(aborted(n, 'The clip was closed.'));
    if (this.dead !== null) return Promise.resolve(gaveUp(n, this.dead));
    if (signal?.aborted === true) return Promise.resolve(aborted(n, 'The request was taken back.'));
    return new Promise((resolve) => {
      const id = this.nextId;
      const takeBack = (): void => {
        this.post({ kind: 'cancel', id });
      };
      this.nextId += 1;
      this.pending.set(id, {
        kind: 'frame',
        frame: n,
        settle: (answer) => {
          signal?.removeEventListener('abort', takeBack);
          resolve(answer);
        },
      });
      signal?.addEventListener('abort', takeBack);
      this.post({ kind: 'frame', id, frame: n, keep });
    });
  }

  hint(direction: StepDirection): void {
    if (this.closing === null) this.post({ kind: 'hint', direction });
  }

  async stats(): Promise<FrameSourceStats> {
    if (this.closing === null && this.dead === null) {
      await new Promise<void>((resolve) => {
        const id = this.nextId;
        this.nextId += 1;
        this.pending.set(id, {
          kind: 'stats',
          settle: (stats) => {
            this.last = stats;
            resolve();
          },
        });
        this.post({ kind: 'stats', id });
      });
    }
    return { ...(this.last ?? NOTHING), lentFrames: this.countLent() };
  }

  close(): Promise<void> {
    this.closing ??= new Promise((resolve) => {
      const id = this.nextId;
      this.nextId += 1;
      const finish = (): void => {
        this.worker.terminate();
        this.settleAll((n) => aborted(n, 'The clip was closed.'));
        resolve();
      };
      if (this.dead !== null) {
        finish();
        return;
      }
      this.pending.set(id, { kind: 'close', settle: finish });
      this.post({ kind: 'close', id });
    });
    return this.closing;
  }

  private post(message: ToWorker): void {
    this.worker.postMessage(message);
  }

  private receive(message: ToPage): void {
    const waiting = this.pending.get(message.id);
    if (message.kind === 'stats' && waiting?.kind !== 'frame') this.last = message.stats;
    if (message.kind === 'stats' && waiting?.kind === 'close') return;
    this.pending.delete(message.id);
    if (message.kind === 'picture') this.receivePicture(message.image, waiting);
    else if (message.kind === 'no-picture' && waiting?.kind === 'frame') {
      const { reason, message: text } = message;
      waiting.settle({ ok: false, frame: waiting.frame, reason, message: text });
    } else if (message.kind === 'stats' && waiting?.kind === 'stats') waiting.settle(message.stats);
    else if (message.kind === 'closed' && waiting?.kind === 'close') waiting.settle();
  }

  private receivePicture(image: VideoFrame, waiting: Pending | undefined): void {
    if (waiting?.kind !== 'frame') {
      image.close();
      return;
    }
    this.countLent();
    this.lent.add(image);
    waiting.settle({ ok: true, frame: waiting.frame, image });
  }

  /** A closed frame has lost its format; that is how its holder's `close()` shows here. */
  private countLent(): number {
    for (const image of this.lent) if (image.format === null) this.lent.delete(image);
    return this.lent.size;
  }

  private die(message: string): void {
    this.dead = message;
    this.worker.terminate();
    this.settleAll((n) => gaveUp(n, message));
  }

  private settleAll(answer: (frame: number) => FrameAnswer): void {
    for (const [id, waiting] of this.pending) {
      this.pending.delete(id);
      if (waiting.kind === 'frame') waiting.settle(answer(waiting.frame));
      else if (waiting.kind === 'stats') waiting.settle(this.last ?? NOTHING);
      else waiting.settle();
    }
  }
}

const NOTHING: WorkerStats = {
  cachedFrames: 0,
  cachedBytes: 0,
  budgetBytes: 0,
  openInWorker: 0,
  bytesFetched: 0,
  packetsDecoded: 0,
  packetsSkipped: 0,
  overtaken: 0,
};

function aborted(frame: number, message: string): FrameAnswer {
  return { ok: false, frame, reason: 'aborted', message };
}

function gaveUp(frame: number, message: string): FrameAnswer {
  return { ok: false, frame, reason: 'decoder-gave-up', message };
}
