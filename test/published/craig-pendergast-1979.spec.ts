import { swimSpeed } from '@stillstroke/geometry/events/known-distance';
import { strokeLength } from '@stillstroke/geometry/events/stroke-length';
import { strokeRate } from '@stillstroke/geometry/events/stroke-rate';
import { valueOf } from '@stillstroke/geometry/testing/arms';
import { describe, expect, it } from 'vitest';

/** Exact speed in m/s and rate in cycles a minute. */
const swimAt = (metresPerSecond: number, cyclesPerMinute: number) =>
  valueOf(
    strokeLength(
      { metresPerSecond, parts: [], frames: [0, 1] },
      { cyclesPerMinute, parts: [], frames: [0, 1] },
    ),
  );

/**
 * Craig AB Jr, Pendergast DR (1979). Relationships of stroke rate, distance per stroke, and velocity in competitive
 * swimming. Med Sci Sports 11(3):278–283 [SEEN pubmed.ncbi.nlm.nih.gov/522640]; speed = rate × length
 * [SEEN PMC3613086]. Stroke index: Costill DL et al. (1985) Int J Sports Med 6(5):266–270, formula [MEM].
 */
describe('rate, length, speed, index', () => {
  it.each([
    // V m/s, cycles/min, SL m, SI m²/s: [CALC]
    [1.5, 42, 2.142857, 3.214286],
    [1.8, 54, 2.0, 3.6],
    [1.98, 54, 2.2, 4.356],
    [1.0, 30, 2.0, 2.0],
  ])('%f m/s at %f cycles a minute [CALC]', (speed, rate, length, index) => {
    const swim = swimAt(speed, rate);
    expect(swim.length.value).toBeCloseTo(length, 6);
    expect(swim.index.value).toBeCloseTo(index, 6);
  });

  it('the worked example with its uncertainties [CALC]', () => {
    const times = Array.from({ length: 400 }, (_, frame) => frame * 20_000);
    const stroke = (entry: number) => ({ entry, catch: entry + 20, exit: entry + 50, nextEntry: entry + 70 });
    const rate = valueOf(strokeRate([stroke(0), stroke(70), stroke(140)], times, { eventErrorFrames: 0.5 }));
    expect(rate.durationS).toBeCloseTo(4.2, 12);
    expect(rate.cyclesPerMinute).toBeCloseTo(42.857143, 6);
    expect(rate.uncertainty).toBeCloseTo(0.083316, 6);
    // 10 m in 6.80 s: frames 10 and 350.
    const distance = { metres: 10, uncertaintyM: 0.05, fromFrame: 10, toFrame: 350 };
    const speed = valueOf(swimSpeed(distance, times, { eventErrorFrames: 0.5 }));
    const swim = valueOf(strokeLength(speed, rate));
    expect(speed.metresPerSecond).toBeCloseTo(1.470588, 6);
    expect(swim.length.value).toBeCloseTo(2.058824, 6);
    expect(swim.index.value).toBeCloseTo(3.027682, 6);
    expect(speed.standard).toBeCloseTo(0.007562, 6);
    // The rate's slopes are small differences: the last printed digit may be off by one.
    expect(swim.length.uncertainty).toBeCloseTo(0.011318, 5);
    expect(swim.index.uncertainty).toBeCloseTo(0.031689, 5);
    expect(speed.parts.map(({ source }) => source)).toEqual(['distance', 'time']);
    expect(swim.index.parts.map(({ source }) => source).slice(0, 2)).toEqual(['distance', 'time']);
  });

  it('slow motion: the capture rate factor makes rates those of the world', () => {
    const times = Array.from({ length: 400 }, (_, frame) => frame * 20_000);
    const stroke = { entry: 0, catch: 80, exit: 200, nextEntry: 280 };
    const rate = valueOf(strokeRate([stroke], times, { captureRateFactor: 0.25 }));
    expect(rate.cyclesPerMinute).toBeCloseTo(42.857143, 6);
  });
});

/** Ogaratto, Feitosa, Castro (2023) Apunts 154:44–51 [SEEN abstract]: SL 1.5, V 0.98, index 1.67 (means). */
describe('the product of means is not the mean index', () => {
  it('0.98 × 1.5 is not the printed 1.67 [SEEN abstract]', () => {
    expect(0.98 * 1.5).toBeCloseTo(1.47, 9);
    const swims = [swimAt(0.8, 54), swimAt(1.2, 30)] as const;
    const [slow, fast] = swims;
    const meanIndex = (slow.index.value + fast.index.value) / 2;
    const product = ((0.8 + 1.2) / 2) * ((slow.length.value + fast.length.value) / 2);
    expect(Math.abs(meanIndex - product)).toBeGreaterThan(0.1);
  });
});
