import type { ClipIndex } from '@stillstroke/clip-index/frame-index';
import { describe, expect, it } from 'vitest';
import type { FrameAnswer, FrameSource } from './frame-source';
import { Player, type PlayerClock } from './player';

/** A display of 60 frames a second that is turned by hand. */
class HandClock implements PlayerClock {
  time = 0;
  private callbacks = new Map<number, () => void>();
  private handles = 0;

  now(): number {
    return this.time;
  }

  schedule(callback: () => void): number {
    this.handles += 1;
    this.callbacks.set(this.handles, callback);
    return this.handles;
  }

  cancel(handle: number): void {
    this.callbacks.delete(handle);
  }

  /** Lets display frames pass, with answers arriving in between. */
  async turn(displayFrames: number): Promise<void> {
    for (let n = 0; n < displayFrames; n += 1) {
      for (let settle = 0; settle < 4; settle += 1) await Promise.resolve();
      this.time += 1000 / 60;
      const due = [...this.callbacks.values()];
      this.callbacks.clear();
      for (const callback of due) callback();
    }
  }
}

class Image {
  closed = false;
  close(): void {
    this.closed = true;
  }
}

interface Setup {
  times: number[];
  answer?: (n: number) => FrameAnswer | null;
  wait?: (n: number) => Promise<void>;
}

function setUp({ times, answer, wait }: Setup) {
  const clock = new HandClock();
  const images: Image[] = [];
  const asked: number[] = [];
  const hints: number[] = [];
  const source = {
    index: { timestampsUs: times } as ClipIndex,
    async frame(n: number): Promise<FrameAnswer> {
      asked.push(n);
      await wait?.(n);
      const image = new Image();
      images.push(image);
      return answer?.(n) ?? { ok: true, frame: n, image: image as unknown as VideoFrame };
    },
    hint: (direction: number) => hints.push(direction),
  } as unknown as FrameSource;
  const shown: { frame: number; at: number }[] = [];
  const log: string[] = [];
  const player = new Player(
    source,
    {
      show: (one) => {
        shown.push({ frame: one.frame, at: Math.round(clock.time) });
        if (one.ok) one.image.close();
      },
      behind: (isBehind) => log.push(isBehind ? 'behind' : 'on time'),
      stopped: (reason) => log.push(reason),
    },
    clock,
  );
  return { player, clock, shown, log, images, asked, hints };
}

const steady = (count: number, rate: number): number[] =>
  Array.from({ length: count }, (_, n) => Math.round((n * 1e6) / rate));

describe('Player', () => {
  it('shows every frame in order to the end', async () => {
    const { player, clock, shown, log, hints } = setUp({ times: steady(31, 30) });
    player.play(0, 1, 1);
    await clock.turn(70);
    expect(shown.map((one) => one.frame)).toEqual(Array.from({ length: 30 }, (_, n) => n + 1));
    expect(shown.at(-1)?.at).toBeGreaterThanOrEqual(1000);
    expect(shown.at(-1)?.at).toBeLessThan(1050);
    expect(log).toEqual(['end']);
    expect(hints).toEqual([1]);
    expect(player.playing).toBe(false);
  });

  it('plays back, at an eighth of the speed', async () => {
    const { player, clock, shown, log } = setUp({ times: steady(5, 30) });
    player.play(4, -1, 0.125);
    await clock.turn(70);
    expect(shown.map((one) => one.frame)).toEqual([3, 2, 1, 0]);
    expect(shown.map((one) => Math.round(one.at / 267))).toEqual([1, 2, 3, 4]);
    expect(log).toEqual(['end']);
  });

  it('keeps the spacing of a variable rate', async () => {
    const { player, clock, shown } = setUp({ times: [0, 100_000, 150_000, 400_000] });
    player.play(0, 1, 1);
    await clock.turn(30);
    expect(shown.map((one) => Math.round(one.at / 17))).toEqual([6, 9, 24]);
  });

  it('says that it is behind when frames are due faster than the display shows them, and leaves none out', async () => {
    const { player, clock, shown, log } = setUp({ times: steady(121, 240) });
    player.play(0, 1, 1);
    await clock.turn(130);
    expect(shown.map((one) => one.frame)).toEqual(Array.from({ length: 120 }, (_, n) => n + 1));
    expect(log).toEqual(['behind', 'on time', 'end']);
  });

  it('says so when decoding is slow, and takes it back when it is not any more', async () => {
    let slow = true;
    const clockOf: { clock?: HandClock } = {};
    const set = setUp({
      times: steady(200, 30),
      wait: async () => {
        const until = (clockOf.clock?.time ?? 0) + 90;
        while (slow && (clockOf.clock?.time ?? 0) < until)
          await new Promise((resolve) => setTimeout(resolve));
      },
    });
    clockOf.clock = set.clock;
    const turn = async (count: number) => {
      for (let n = 0; n < count; n += 1) {
        await new Promise((resolve) => setTimeout(resolve));
        await set.clock.turn(1);
      }
    };
    set.player.play(0, 1, 1);
    await turn(60);
    expect(set.log).toEqual(['behind']);
    slow = false;
    await turn(120);
    expect(set.log).toEqual(['behind', 'on time']);
    expect(set.shown.map((one) => one.frame)).toEqual(set.shown.map((_, n) => n + 1));
  });

  it('passes a damaged frame, showing that it is one, and ends where there is nothing to go on with', async () => {
    const { player, clock, shown, log } = setUp({
      times: steady(10, 30),
      answer: (n) =>
        n === 3
          ? { ok: false, frame: n, reason: 'corrupt-frame', message: '' }
          : n === 6
            ? { ok: false, frame: n, reason: 'network', message: '' }
            : null,
    });
    player.play(0, 1, 1);
    await clock.turn(40);
    expect(shown.map((one) => one.frame)).toEqual([1, 2, 3, 4, 5, 6]);
    expect(log).toEqual(['fault']);
  });

  it('closes what arrives after it was stopped', async () => {
    const { player, clock, images, log, shown } = setUp({ times: steady(10, 30) });
    player.play(0, 1, 1);
    await clock.turn(3);
    player.stop();
    await clock.turn(10);
    expect(log).toEqual(['stop']);
    expect(images.every((image) => image.closed)).toBe(true);
    expect(shown.length).toBeLessThan(3);
  });
});
