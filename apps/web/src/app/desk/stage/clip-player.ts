import type { FrameSource } from '../../playback/frame-source';
import { Player, type PlaySpeed } from '../../playback/player';
import type { PictureLoader } from './picture-loader';
import type { StagePlay } from './stage-state';

/** Plays a clip onto the stage as the playback state says. */
export class ClipPlayer {
  private readonly player: Player;
  private lastShown: number | null = null;
  private running: string | null = null;

  constructor(
    source: FrameSource,
    loader: PictureLoader,
    private readonly playback: StagePlay,
    private readonly showFrame: (frame: number) => void,
    private readonly frameCount: () => number,
  ) {
    this.player = new Player(source, {
      show: (answer) => {
        if (answer.ok) loader.take(answer.frame, answer.image);
        else loader.miss(answer);
        this.lastShown = answer.frame;
        this.showFrame(answer.frame);
      },
      behind: (behind) => {
        playback.setBehind(behind);
      },
      stopped: (reason) => {
        if (reason !== 'stop') playback.stop();
      },
    });
  }

  /**
   * Makes the player do what the state says. A frame that did not come from playing means that the person has gone
   * elsewhere: playing ends.
   */
  follow(direction: 1 | -1 | 0, speed: PlaySpeed, frame: number): void {
    const order = direction === 0 ? null : `${direction} ${speed}`;
    if (order === null) {
      this.halt();
    } else if (this.running === null) {
      this.start(order, direction === 1 ? 1 : -1, speed, frame);
    } else if (frame !== this.lastShown) {
      this.halt();
      this.playback.stop();
    } else if (order !== this.running) {
      this.start(order, direction === 1 ? 1 : -1, speed, frame);
    }
  }

  halt(): void {
    this.running = null;
    this.player.stop();
  }

  /** At the end it was going to, playing starts over from the other one. */
  private start(order: string, direction: 1 | -1, speed: PlaySpeed, frame: number): void {
    const last = this.frameCount() - 1;
    const from = direction === 1 && frame >= last ? 0 : direction === -1 && frame <= 0 ? last : frame;
    this.running = order;
    this.lastShown = from;
    if (from !== frame) this.showFrame(from);
    this.player.play(from, direction, speed);
  }
}
