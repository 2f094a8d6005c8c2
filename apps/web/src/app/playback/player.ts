import type { FrameAnswer, FrameSource } from './frame-source';
import { Pace } from './pace';

/** Time and frames of the display, so that tests can turn them by hand. */
export interface PlayerClock {
  /** Milliseconds, rising. */
  now(): number;
  /** Calls back at the next display frame; answers what `cancel` takes. */
  schedule(callback: () => void): number;
  cancel(handle: number): void;
}

/** The display's own clock. */
export const displayClock: PlayerClock = {
  now: () => performance.now(),
  schedule: (callback) => requestAnimationFrame(callback),
  cancel: (handle) => {
    cancelAnimationFrame(handle);
  },
};

/** Share of the file's own speed, above 0. */
export type PlaySpeed = number;

/** What happens while playing. Pictures are handed over: the receiver closes them. */
export interface PlayerEvents {
  /** A frame is due; in order, none left out. */
  show(answer: FrameAnswer): void;
  /** True when frames come later than they are due, false when they are on time again. */
  behind(isBehind: boolean): void;
  /** Playing ended: at the clip's end, by `stop`, or because of a fault that `answer` of the last `show` names. */
  stopped(reason: 'end' | 'stop' | 'fault'): void;
}

/** A frame later than this, in milliseconds, moves the time of all that follow. */
const SLIP_MS = 25;

/**
 * Plays every frame of a clip in order, forward or back, at the clip's own times. When decoding cannot keep up it plays
 * slower and says so; it never leaves a frame out, because the one left out may be the catch.
 */
export class Player {
  private run: PlayRun | null = null;

  constructor(
    private readonly source: FrameSource,
    private readonly events: PlayerEvents,
    private readonly clock: PlayerClock = displayClock,
  ) {}

  get playing(): boolean {
    return this.run !== null;
  }

  /**
   * Plays from the frame after `from`, which is on screen already.
   *
   * @param from frame on screen
   * @param direction 1 forward, −1 back
   * @param speed share of the file's own speed
   */
  play(from: number, direction: 1 | -1, speed: PlaySpeed): void {
    this.run?.end('stop');
    this.source.hint(direction);
    this.run = new PlayRun(this.source, this.clock, { from, direction, speed }, this.events, () => {
      this.run = null;
    });
    this.run.next();
  }

  stop(): void {
    this.run?.end('stop');
  }
}

interface PlayOrder {
  readonly from: number;
  readonly direction: 1 | -1;
  readonly speed: number;
}

/** One stretch of playing, from pressing play to its end. */
class PlayRun {
  private readonly abort = new AbortController();
  private frame: number;
  private dueAt: number;
  private handle: number | null = null;
  private due: FrameAnswer | null = null;
  private readonly pace = new Pace();
  private behind = false;
  private over = false;

  constructor(
    private readonly source: FrameSource,
    private readonly clock: PlayerClock,
    private readonly order: PlayOrder,
    private readonly events: PlayerEvents,
    private readonly done: () => void,
  ) {
    this.frame = order.from;
    this.dueAt = clock.now();
  }

  /** Fetches the frame that comes next and shows it when it is due. */
  next(): void {
    const coming = this.frame + this.order.direction;
    const times = this.source.index.timestampsUs;
    const own = times[this.frame];
    const time = times[coming];
    if (own === undefined || time === undefined) {
      this.end('end');
      return;
    }
    const planned = Math.abs(time - own) / 1000 / this.order.speed;
    this.dueAt += planned;
    this.pace.plan(planned);
    this.frame = coming;
    void this.source.frame(coming, { signal: this.abort.signal }).then((answer) => {
      if (this.over) closeImage(answer);
      else this.showWhenDue(answer);
    });
  }

  end(reason: 'end' | 'stop' | 'fault'): void {
    if (this.over) return;
    this.over = true;
    this.abort.abort();
    if (this.handle !== null) this.clock.cancel(this.handle);
    this.forget();
    this.tellBehind(false);
    this.done();
    this.events.stopped(reason);
  }

  private showWhenDue(answer: FrameAnswer): void {
    this.due = answer;
    const wait = (): void => {
      this.handle = null;
      if (this.clock.now() < this.dueAt) this.handle = this.clock.schedule(wait);
      else this.show(answer);
    };
    this.handle = this.clock.schedule(wait);
  }

  private show(answer: FrameAnswer): void {
    this.due = null;
    this.measureLateness();
    this.events.show(answer);
    if (this.over) return;
    // A damaged frame is shown as such and passed; without bytes or decoder there is nothing to go on with.
    if (answer.ok || answer.reason === 'corrupt-frame') this.next();
    else this.end('fault');
  }

  /** Catching up would mean leaving frames out, so time that was lost stays lost. */
  private measureLateness(): void {
    const now = this.clock.now();
    if (now - this.dueAt > SLIP_MS) this.dueAt = now;
    this.tellBehind(this.pace.isBehind(now, this.behind));
  }

  private tellBehind(behind: boolean): void {
    if (behind === this.behind) return;
    this.behind = behind;
    this.events.behind(behind);
  }

  private forget(): void {
    if (this.due !== null) closeImage(this.due);
    this.due = null;
  }
}

function closeImage(answer: FrameAnswer): void {
  if (answer.ok) answer.image.close();
}
