import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { speeds, type Speed } from '../state/desk-play';
import type { DeskState } from '../state/desk-state';

/** Under the stage: step, play, speed, arm, and the way to the next frame to mark. Everything here is also a key. */
@Component({
  selector: 'st-transport',
  templateUrl: './transport.html',
  styleUrl: './transport.scss',
  host: { role: 'group', 'aria-label': 'Frames and arms' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Transport {
  readonly state = input.required<DeskState>();

  /** Of slow-motion film it is said which speed is the water's and which the file's own. */
  protected readonly speeds = computed(() => {
    const { captureRateFactor } = this.state().clip();
    if (captureRateFactor === 1) return speeds;
    return speeds.map(({ value, name }) => {
      const says = value === captureRateFactor ? ', as the file' : value === 1 ? ', as in the water' : '';
      return { value, name: name + says };
    });
  });
  protected readonly lastFrame = computed(() => this.state().frameTimesUs().length - 1);
  /** Each button stops what it started, and stays in place, so that it keeps the focus. */
  protected readonly ways = [
    { direction: -1, name: 'Play back' },
    { direction: 1, name: 'Play' },
  ] as const;
  protected readonly arms = [
    { arm: 'left', name: 'Left arm', key: '1' },
    { arm: 'right', name: 'Right arm', key: '2' },
  ] as const;

  protected plays(direction: 1 | -1): boolean {
    const { play } = this.state();
    return play.playing() && play.direction() === direction;
  }

  protected playOrStop(direction: 1 | -1): void {
    const { play } = this.state();
    if (this.plays(direction)) play.stop();
    else play.start(direction);
  }

  protected chooseSpeed(event: Event): void {
    this.state().play.setSpeed(Number((event.target as HTMLSelectElement).value) as Speed);
  }
}
