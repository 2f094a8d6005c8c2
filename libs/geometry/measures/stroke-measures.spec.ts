import { describe, expect, it } from 'vitest';
import { framesStillToMark, framesToMark } from '../events/stroke';
import { constantRate, onFrame, reasonOf, valueOf } from '../testing/arms';
import { strokeMeasures } from './stroke-measures';

const times = constantRate(120, 50);
const stroke = { entry: 0, catch: 20, exit: 50, nextEntry: 70 };
const context = {
  travel: 'right',
  plumb: { top: { x: 10, y: 0 }, bottom: { x: 10, y: 600 } },
  jointUncertaintyPx: { shoulder: 2, elbow: 2, wrist: 2 },
} as const;
/** Forearm 80° at the catch, −40° at the exit; upper arm 90° to −50°: both turn evenly. */
const at = (frame: number) => {
  const share = (frame - 20) / 30;
  return onFrame(frame, { upperArmDeg: 90 - 140 * share, forearmDeg: 80 - 120 * share });
};
const marks = [0, 20, 25, 30, 35, 40, 45, 50].map(at);

describe('measures of a stroke', () => {
  const measures = strokeMeasures(stroke, marks, times, context);

  it('finds when the forearm comes within tolerance of vertical, between frames', () => {
    const vertical = valueOf(measures.verticalAt);
    expect(vertical.value).toBeCloseTo(65 / 120, 9);
    expect(vertical.bracket).toEqual([35, 40]);
    expect(vertical.frame).toBe(36);
    expect(vertical.uncertainty).toBeGreaterThan(0);
  });

  it('says why there is no such moment', () => {
    const level = [20, 30, 50].map((frame) => onFrame(frame, { upperArmDeg: 90, forearmDeg: 70 }));
    expect(reasonOf(strokeMeasures(stroke, level, times, context).verticalAt)).toBe('vertical-not-reached');
    const late = [30, 50].map((frame) => onFrame(frame, { upperArmDeg: 90, forearmDeg: 3 }));
    expect(reasonOf(strokeMeasures(stroke, late, times, context).verticalAt)).toBe(
      'vertical-before-first-mark',
    );
    expect(reasonOf(strokeMeasures(stroke, [], times, context).verticalAt)).toBe('too-few-marks');
    const early = [20, 50].map((frame) => onFrame(frame, { upperArmDeg: 90, forearmDeg: 3 }));
    expect(valueOf(strokeMeasures(stroke, early, times, context).verticalAt).value).toBe(0);
  });

  it('takes the side of vertical the forearm comes from', () => {
    const through = [
      onFrame(20, { upperArmDeg: 90, forearmDeg: -60 }),
      onFrame(50, { upperArmDeg: 90, forearmDeg: 60 }),
    ];
    expect(valueOf(strokeMeasures(stroke, through, times, context).verticalAt).value).toBeCloseTo(
      45 / 120,
      9,
    );
  });

  it('finds mid-pull where the wrist passes under the shoulder, and the elbow there', () => {
    const mid = valueOf(measures.midPull);
    expect(mid.frames).toEqual([35, 40]);
    const elbow = valueOf(measures.elbowAtMidPull);
    const bend = (share: number) => Math.abs(90 - 140 * share - (80 - 120 * share));
    expect(elbow.value).toBeCloseTo(180 - bend(mid.share), 6);
    expect(elbow.frames).toEqual([35, 40]);
  });

  it('names the frame of the largest drop among the marked ones of the pull', () => {
    const drop = valueOf(measures.peakDrop);
    const largest = Math.max(...measures.dropCurve.map(({ deg }) => deg));
    expect(drop.value).toBe(largest);
    expect(measures.dropCurve.find(({ frame }) => frame === drop.frame)?.deg).toBe(largest);
    expect(drop.frames).not.toContain(0);
  });

  it('divides the cycle, slow motion included', () => {
    const phases = valueOf(measures.phases);
    const { entryAndCatch, pull, push, recovery, propulsive } = phases;
    const sum = entryAndCatch.share + (pull?.share ?? NaN) + (push?.share ?? NaN) + recovery.share;
    expect(sum).toBeCloseTo(1, 12);
    expect(propulsive.share).toBeCloseTo(30 / 70, 12);
    expect(measures.durationS).toBeCloseTo(1.4, 12);
    const slow = strokeMeasures(stroke, marks, times, { ...context, captureRateFactor: 0.25 });
    expect(slow.durationS).toBeCloseTo(0.35, 12);
    expect(valueOf(slow.phases).propulsive.share).toBe(propulsive.share);
  });

  it('refuses events out of order and strokes beyond the clip by code, whatever is asked', () => {
    const turned = strokeMeasures({ ...stroke, catch: 55 }, marks, times, context);
    expect(reasonOf(turned.verticalAt)).toBe('exit-not-after-catch');
    expect(reasonOf(turned.phases)).toBe('exit-not-after-catch');
    expect(turned.forearmCurve).toEqual([]);
    expect(
      reasonOf(strokeMeasures({ ...stroke, exit: 500, nextEntry: null }, marks, times, context).peakDrop),
    ).toBe('frame-outside-clip');
    expect(reasonOf(strokeMeasures({ ...stroke, nextEntry: null }, marks, times, context).phases)).toBe(
      'no-next-entry',
    );
  });

  it('sets a mark that cannot be read aside and keeps the others', () => {
    const broken = { ...at(30), wrist: at(30).elbow };
    const rest = strokeMeasures(
      stroke,
      [...marks.filter(({ frame }) => frame !== 30), broken],
      times,
      context,
    );
    expect(rest.unusable).toEqual([{ frame: 30, reason: 'coincident-joints' }]);
    expect(rest.forearmCurve.map(({ frame }) => frame)).toEqual([20, 25, 35, 40, 45, 50]);
  });
});

describe('frames to mark', () => {
  it('takes thirds by time, not by index', () => {
    const uneven = times.map((time, frame) => (frame > 30 ? time + (frame - 30) * 20_000 : time));
    const frames = valueOf(framesToMark(stroke, uneven)).map(({ need, frame }) => [need, frame]);
    // 20 frames of 20 ms up to 30, then 40 ms: the pull lasts 1.0 s.
    expect(frames).toEqual([
      ['entry', 0],
      ['catch', 20],
      ['one-third', 33],
      ['mid-pull', 37],
      ['two-thirds', 42],
      ['exit', 50],
    ]);
  });

  it('lists a frame once however short the stroke, and ends', () => {
    const short = valueOf(framesToMark({ entry: 3, catch: 4, exit: 5, nextEntry: null }, times));
    expect(short.map(({ frame }) => frame)).toEqual([3, 4, 5]);
    const needed = valueOf(framesToMark(stroke, times));
    expect(framesStillToMark(needed, [0, 20, 30, 36, 40]).map(({ need }) => need)).toEqual(['exit']);
    expect(framesStillToMark(needed, [0, 20, 30, 38, 40, 50]).map(({ need }) => need)).toEqual(['mid-pull']);
  });
});
