import { describe, expect, it } from 'vitest';
import { constantRate, valueOf } from '../testing/arms';
import { indexOfCoordination } from './coordination';
import { eventInput, eventUncertaintyUs, WRIST_PROXY_ERROR_S } from './event-moment';
import { strokePhases } from './phases';
import { strokeRate } from './stroke-rate';

const times = constantRate(400, 50);
const stroke = { entry: 10, catch: 30, exit: 60, nextEntry: 80 };
const frameUs = 20_000 / Math.sqrt(3);
const wristUs = (1e6 * WRIST_PROXY_ERROR_S) / Math.sqrt(3);

describe('events of the hand and of the wrist', () => {
  it('adds the wrist’s own error to the choice of the frame, in world time', () => {
    const wrist = { ...stroke, exitSource: 'wrist-proxy' } as const;
    expect(eventUncertaintyUs(stroke, 'exit', times)).toBeCloseTo(frameUs, 9);
    expect(eventUncertaintyUs(wrist, 'exit', times)).toBeCloseTo(Math.hypot(frameUs, wristUs), 9);
    expect(eventUncertaintyUs(wrist, 'entry', times)).toBeCloseTo(frameUs, 9);
    // Four times slower in the file, the same error of the hand lasts four times as long there.
    const slow = eventUncertaintyUs(wrist, 'exit', times, { captureRateFactor: 0.25 });
    expect(slow).toBeCloseTo(Math.hypot(frameUs, 4 * wristUs), 9);
  });

  it('has no time where there is no event', () => {
    const open = { ...stroke, nextEntry: null };
    expect(eventInput(open, 'nextEntry', times)).toEqual({
      source: 'next-entry-frame',
      value: NaN,
      standard: 0,
    });
  });

  it('reaches phases, rate and coordination', () => {
    const wrist = { ...stroke, entrySource: 'wrist-proxy', exitSource: 'wrist-proxy' } as const;
    const { recovery, propulsive } = valueOf(strokePhases(wrist, null, times));
    const seen = valueOf(strokePhases(stroke, null, times));
    expect(recovery.uncertainty).toBeGreaterThan(1.5 * seen.recovery.uncertainty);
    expect(propulsive.parts[0]?.source).toBe('exit-frame');
    const rate = valueOf(strokeRate([wrist], times));
    // f = 60/T: u(f) = f·u(T)/T with one event of each kind.
    const cycleUs = 1_400_000;
    expect(rate.uncertainty).toBeCloseTo(
      (rate.cyclesPerMinute * Math.hypot(Math.hypot(frameUs, wristUs), frameUs)) / cycleUs,
      4,
    );
    const later = (by: number) => ({ entry: 10 + by, catch: 30 + by, exit: 60 + by, nextEntry: 80 + by });
    const arms = { right: [wrist, later(70)], left: [later(35)] };
    const { uncertainty } = valueOf(indexOfCoordination(arms, times));
    const four = Math.hypot(Math.hypot(frameUs, wristUs), frameUs, frameUs, frameUs);
    expect(uncertainty).toBeCloseTo((50 * four) / cycleUs, 9);
  });

  it('counts an event that two strokes share by its wider choice', () => {
    const first = { ...stroke, nextEntrySource: 'wrist-proxy' } as const;
    const second = { entry: 80, catch: 100, exit: 130, nextEntry: 150 };
    // Between two cycles its error cancels; at the end of the last it does not.
    const both = valueOf(strokeRate([first, second], times));
    const plain = valueOf(strokeRate([stroke, second], times));
    expect(both.uncertainty).toBeCloseTo(plain.uncertainty, 9);
    expect(valueOf(strokeRate([first], times)).uncertainty).toBeGreaterThan(plain.uncertainty);
  });
});

describe('passages along a clip', () => {
  const at = (entry: number, nextEntry: number | null = entry + 70) => ({
    entry,
    catch: entry + 20,
    exit: entry + 50,
    nextEntry,
  });

  it('go on after strokes that were not entered, and share no event', () => {
    const right = [at(0), at(70), at(220), at(290)];
    const left = [at(35), at(255)];
    const read = valueOf(indexOfCoordination({ left, right }, times));
    expect(read.cycles.map(({ strokes }) => strokes.map(({ entry }) => entry))).toEqual([
      [0, 35, 70],
      [220, 255, 290],
    ]);
    expect(read.uncertainty).toBeCloseTo((read.cycles[0]?.uncertainty ?? NaN) / Math.SQRT2, 12);
  });

  it('begin with either arm where the other has no second stroke', () => {
    const read = valueOf(
      indexOfCoordination({ left: [at(0, null), at(100)], right: [at(35, null), at(135)] }, times),
    );
    expect(read.from).toBe('left');
    const gap = indexOfCoordination({ left: [at(0)], right: [at(35), at(105)] }, times);
    expect(gap.ok).toBe(false);
  });

  it('take each frame’s own time', () => {
    const uneven = times.map((time, frame) => (frame > 49 ? time + 20_000 * (frame - 49) : time));
    const arms = { left: [at(35)], right: [at(0), at(70)] };
    const [even, stretched] = [times, uneven].map((of) => valueOf(indexOfCoordination(arms, of)));
    // Frame 50, the first exit, lies 40 ms after the one before and as long before the next.
    expect(stretched?.cycles[0]?.parts).not.toEqual(even?.cycles[0]?.parts);
    const [e1 = NaN, c1 = NaN, e2 = NaN, c2 = NaN] = [50, 55, 85, 90].map((frame) => uneven[frame]);
    const lasting = (from: number, to: number) => (uneven[to] ?? NaN) - (uneven[from] ?? NaN);
    const mean = (lasting(0, 70) + lasting(70, 140) + lasting(35, 105)) / 3;
    expect(stretched?.index).toBeCloseTo((50 * (e1 - c1 + e2 - c2)) / mean, 9);
  });
});
