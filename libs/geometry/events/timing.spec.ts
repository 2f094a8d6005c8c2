import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { constantRate, onFrame, reasonOf, valueOf } from '../testing/arms';
import { frameIntervalUs, frameTimeUs, nearestFrame } from './frame-times';
import { midPull } from './mid-pull';
import { strokePhases } from './phases';
import { checkOrder } from './stroke';
import { strokeRate } from './stroke-rate';

const times = constantRate(100, 50);
const stroke = { entry: 0, catch: 20, exit: 50, nextEntry: 70 };

describe('frame times', () => {
  it('finds the nearest frame as a search of all would', () => {
    const gaps = fc.array(fc.integer({ min: 1, max: 50_000 }), { minLength: 1, maxLength: 60 });
    fc.assert(
      fc.property(gaps, fc.double({ min: -1e5, max: 4e6, noNaN: true }), (steps, time) => {
        const uneven = steps.reduce((all, step) => [...all, (all.at(-1) ?? 0) + step], [0]);
        const found = nearestFrame(uneven, time, 0, uneven.length - 1);
        const distances = uneven.map((at) => Math.abs(at - time));
        expect(distances[found]).toBe(Math.min(...distances));
      }),
    );
  });

  it('knows the ends of a clip', () => {
    expect(reasonOf(frameTimeUs(times, 100))).toBe('frame-outside-clip');
    expect(reasonOf(frameTimeUs([], 0))).toBe('frame-outside-clip');
    expect(frameIntervalUs(times, 0)).toBe(20_000);
    expect(frameIntervalUs(times, 99)).toBe(20_000);
    expect(frameIntervalUs([0, 10, 40], 1)).toBe(20);
    expect(frameIntervalUs([5], 0)).toBe(0);
  });
});

describe('order of events', () => {
  it.each([
    [{ ...stroke, catch: 0 }, 'catch-not-after-entry'],
    [{ ...stroke, exit: 20 }, 'exit-not-after-catch'],
    [{ ...stroke, nextEntry: 50 }, 'next-entry-not-after-exit'],
    [{ ...stroke, entry: 0.5 }, 'frame-not-whole'],
    [{ ...stroke, catch: NaN }, 'frame-not-whole'],
    [{ ...stroke, entry: -1 }, 'frame-outside-clip'],
    [{ ...stroke, nextEntry: 100 }, 'frame-outside-clip'],
  ])('%j: %s', (events, reason) => {
    expect(reasonOf(checkOrder(events, 100))).toBe(reason);
    expect(reasonOf(strokePhases(events, null, times))).toBe(reason);
    expect(reasonOf(strokeRate([events], times))).toBe(reason);
  });

  it('frames that carry no time have no duration', () => {
    const still = times.map(() => 7);
    expect(reasonOf(strokePhases(stroke, null, still))).toBe('no-duration');
    expect(reasonOf(strokeRate([stroke], still))).toBe('no-duration');
  });
});

describe('phases', () => {
  it('go by time at a variable rate', () => {
    const uneven = times.map((time, frame) => (frame > 50 ? time + (frame - 50) * 20_000 : time));
    const { recovery, entryAndCatch, cycleS } = valueOf(strokePhases(stroke, null, uneven));
    expect(cycleS).toBeCloseTo(1.8, 12);
    expect(recovery.share).toBeCloseTo(0.8 / 1.8, 12);
    expect(entryAndCatch.share).toBeCloseTo(0.4 / 1.8, 12);
  });

  it('count the shared event of a phase and its cycle once', () => {
    const { entryAndCatch } = valueOf(strokePhases(stroke, null, times, { eventErrorFrames: 0.5 }));
    // a = (c − e)/(n − e): slopes 1, −(1 − a), −a over the cycle.
    const a = 20 / 70;
    const u = (20_000 / Math.sqrt(12) / 1_400_000) * Math.hypot(1, 1 - a, a);
    expect(entryAndCatch.uncertainty).toBeCloseTo(u, 7);
  });

  it('have no pull and push without mid-pull, and refuse one outside the pull', () => {
    expect(valueOf(strokePhases(stroke, null, times))).toMatchObject({ pull: null, push: null });
    const mid = (timeUs: number) => ({ timeUs, uncertaintyUs: 0, frame: 30 });
    expect(reasonOf(strokePhases(stroke, mid(1), times))).toBe('mid-pull-outside-pull');
    expect(reasonOf(strokePhases(stroke, mid(NaN), times))).toBe('mid-pull-outside-pull');
    expect(reasonOf(strokePhases(stroke, null, times, { captureRateFactor: 0 }))).toBe('bad-capture-rate');
  });
});

describe('mid-pull', () => {
  const context = {
    travel: 'right',
    plumb: null,
    jointUncertaintyPx: { shoulder: 2, elbow: 2, wrist: 2 },
  } as const;
  const reach = (frame: number, deg: number) => onFrame(frame, { upperArmDeg: deg, forearmDeg: deg });

  it('lies where the line between two marks meets the shoulder', () => {
    // Wrist 210·sin 30° ahead, then as far behind: halfway between the frames.
    const mid = valueOf(midPull(stroke, [reach(20, 80), reach(30, 30), reach(40, -30)], times, context));
    expect(mid).toMatchObject({ frame: 35, frames: [30, 40] });
    expect(mid.timeUs).toBeCloseTo(700_000, 3);
    expect(mid.share).toBeCloseTo(0.5, 9);
    expect(mid.gapShare).toBeCloseTo(1 / 3, 9);
    expect(mid.uncertaintyUs).toBeGreaterThan(0);
  });

  it('is not guessed', () => {
    const read = (...marks: ReturnType<typeof reach>[]) => reasonOf(midPull(stroke, marks, times, context));
    expect(read()).toBe('too-few-marks');
    expect(read(reach(30, 20))).toBe('too-few-marks');
    expect(read(reach(30, 60), reach(40, 20))).toBe('hand-never-under-shoulder');
    expect(read(reach(30, -10), reach(40, -60))).toBe('hand-behind-at-first-mark');
    expect(read(reach(5, 60), reach(60, -60))).toBe('too-few-marks');
  });
});
